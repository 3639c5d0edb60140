import { inflateRawSync } from 'node:zlib';
import fc from 'fast-check';
import encodeQR from 'qr';
import decodeQR from 'qr/decode.js';
import { describe, expect, it } from 'vitest';
import { collect, toFrames, type Collected } from '@/lib/handover/frames';
import { markOf, packHandover, type Handover } from '@/lib/handover/pack';

const KEY = 'c3'.repeat(32);
const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;

const handover = (answers: number): Handover => ({
  joinKey: 'ura477zwknw7xzpr',
  ops: Array.from({ length: answers }, (_, i) => ({ opId: uuid(i), deviceId: uuid(999), seq: i + 1, clientAt: 1_796_000_000_000 + i * 4321, body: { kind: 'score', block: 1, position: 1 + (i % 6), item: 1 + (i % 40), value: (i * 37) % 101 } })),
});

/** A code as a picture of black and white, four dots a module. */
function pictureOf(text: string) {
  const modules = encodeQR(text, 'raw', { ecc: 'low', border: 3 });
  const size = modules.length * 4;
  const data = new Uint8ClampedArray(size * size * 4);
  for (let y = 0; y < size; y += 1) {
    for (let x = 0; x < size; x += 1) data.set(modules[y >> 2]![x >> 2] ? [0, 0, 0, 255] : [255, 255, 255, 255], (y * size + x) * 4);
  }
  return { width: size, height: size, data };
}

describe('a handover by code', () => {
  it.each([1, 24, 240])('of %d answers comes whole through QR codes, scanned in any order and more than once', async (answers) => {
    const text = await packHandover(handover(answers), KEY);
    const frames = toFrames(text, 'abc123');
    const scanned = frames.map((frame) => decodeQR(pictureOf(frame)));
    let seen: ReadonlyMap<string, Collected> = new Map();
    for (const frame of [...scanned.toReversed(), ...scanned]) seen = collect(seen, frame);
    expect(seen.get('abc123')!.text).toBe(text);
    const [kind, data, mark] = text.split('.') as [string, string, string];
    const payload = Buffer.from(data, 'base64url');
    expect(kind).toBe('d');
    expect(JSON.parse(inflateRawSync(payload).toString())).toEqual(handover(answers));
    expect(markOf(KEY, payload)).toBe(mark);
  });

  it('of a sheet of 24 answers needs few codes', async () => {
    expect(toFrames(await packHandover(handover(24), KEY), 'abc123').length).toBeLessThanOrEqual(3);
  });

  it('keeps those of two phones apart, and takes no other code', () => {
    fc.assert(
      fc.property(fc.string({ unit: fc.constantFrom(...'abcXYZ09_-.'), minLength: 1, maxLength: 4000 }), fc.string({ unit: fc.constantFrom(...'abcXYZ09_-.'), minLength: 1, maxLength: 4000 }), (a, b) => {
        const codes = [...toFrames(a, 'aaaaaa'), 'https://elsewhere.example/', ...toFrames(b, 'bbbbbb'), 'T1.aaaaaa.9.2.x', ''];
        let seen: ReadonlyMap<string, Collected> = new Map();
        for (const code of codes) seen = collect(seen, code);
        expect(seen.get('aaaaaa')!.text).toBe(a);
        expect(seen.get('bbbbbb')!.text).toBe(b);
        expect(seen.size).toBe(2);
      }),
      { seed: 1, numRuns: 60 },
    );
  });

  it('has a mark that another key, or a changed answer, does not give', () => {
    const payload = new TextEncoder().encode('{"a":1}');
    expect(markOf('ab'.repeat(32), payload)).not.toBe(markOf(KEY, payload));
    expect(markOf(KEY, new TextEncoder().encode('{"a":2}'))).not.toBe(markOf(KEY, payload));
  });
});
