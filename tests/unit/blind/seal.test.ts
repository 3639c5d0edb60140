import { createHash, randomBytes } from 'node:crypto';
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { decrypt, encrypt } from '@/lib/blind/cipher';
import { canonicalText, parsePlanFile, type PlanFile } from '@/lib/blind/plan-file';

beforeAll(() => {
  process.env.TERCET_SECRETS_DIR = mkdtempSync(path.join(tmpdir(), 'tercet-secrets-'));
});

const plan: PlanFile = {
  format: 'tercet-plan-1',
  session: { id: 's1', title: 'Wednesday tasting', method: 'profile', sealedAt: '2026-05-13T08:42:00.000Z' },
  salt: randomBytes(32).toString('hex'),
  samples: [{ sample: 1, label: 'Barrel 31', components: [{ vessel: '31', lot: '25-B', pulledAt: '2026-05-13T08:00:00.000Z', share: 1 }] }],
  ballot: [{ item: 1, phase: 'nose', kind: 'line', name: 'Dark plum' }],
  servings: [{ seat: 1, block: 1, position: 1, code: '417', sample: 1 }],
};

describe('the sealed plan', () => {
  it('comes back to the byte, and only under its own session and commitment', () => {
    const text = canonicalText(plan);
    const commitment = createHash('sha256').update(text).digest('hex');
    const sealed = encrypt(text, 's1', commitment);
    expect(decrypt(sealed, 's1', commitment)).toBe(text);
    expect(() => decrypt(sealed, 's2', commitment)).toThrow();
    expect(() => decrypt(sealed, 's1', 'f'.repeat(64))).toThrow();
  });

  it('is refused after one flipped bit', () => {
    const sealed = encrypt(canonicalText(plan), 's1', 'c');
    sealed.ciphertext[3]! ^= 1;
    expect(() => decrypt(sealed, 's1', 'c')).toThrow();
  });

  it('shows nothing of the key in its ciphertext, and never encrypts the same way twice', () => {
    const a = encrypt(canonicalText(plan), 's1', 'c');
    const b = encrypt(canonicalText(plan), 's1', 'c');
    expect(a.ciphertext.toString('latin1')).not.toContain('Barrel');
    expect(a.nonce.equals(b.nonce)).toBe(false);
    expect(a.ciphertext.equals(b.ciphertext)).toBe(false);
  });

  it('has one canonical text whatever the order in which a program holds its members', () => {
    const { servings, session, ...rest } = plan;
    expect(canonicalText({ servings, ...rest, session })).toBe(canonicalText(plan));
    expect(parsePlanFile(canonicalText(plan))).toEqual(plan);
  });
});
