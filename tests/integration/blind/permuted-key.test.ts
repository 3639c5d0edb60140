import { expect, it } from 'vitest';
import { seals, servings } from '@/db/schema';
import { takeOut } from '@/lib/blind/vault';
import { startServer } from '../../support/server';
import { Recorder, tasteAll } from './recorder';
import { makeScene, PASSWORD, release } from './scene';

/** Masks what differs between any two runs: ids, keys, seals, nonces, times. */
function masked(bytes: Buffer): string {
  return bytes.toString('utf8')
    .replaceAll(/[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}/g, '<id>')
    .replaceAll(/(?:[0-9a-f]{4} ){15}[0-9a-f]{4}/g, '<seal>').replaceAll(/\b[0-9a-f]{64}\b/g, '<seal>')
    .replaceAll(/Seal [0-9a-f]{4} [0-9a-f]{4}/g, 'Seal <seal>').replaceAll(/(Seal (?:<!-- -->)?)[0-9a-f]{4}(<!-- --> (?:<!-- -->)?| )[0-9a-f]{4}/g, '$1<seal>')
    .replaceAll(/nonce(?:-|=\\?"|":\\?"|\\":\\")[\w+/=]+/g, '<nonce>')
    .replaceAll(/\b[a-z2-7]{16}\b/g, '<key>').replaceAll(/\b\d{3}(?: ?|<!-- --> <!-- -->|\\*",\\*" \\*",\\*")\d{3}\b/g, '<join>')
    .replaceAll(/data:image\/svg\+xml;base64,[\w+/=]+/g, '<qr>').replaceAll(/T[0-9a-f]+,<qr>/g, '<qr>')
    .replaceAll(/([>"])\d+ (s|min)([<\\"])/g, '$1<ago>$3')
    .replaceAll(/127\.0\.0\.1:\d+/g, '<host>')
    .replaceAll(/set-cookie: [^\n]*/g, 'set-cookie')
    .replaceAll(/\n(?:date|content-length|keep-alive|connection|x-nextjs-[\w-]+): [^\n]*/g, '')
    .replaceAll(/\d{1,2} \w{3} \d{4}, \d{2}:\d{2}|\d{4}-\d{2}-\d{2}[T ][\d:.]+Z?|\w{3}, \d{2} \w{3} \d{4} [\d:]+ GMT/g, '<time>')
    .replaceAll(/(\\*"(?:receiptNo|silentS|clientAt|b|S)\\*":)\\*"?[^,}\]]*/g, '$1');
}

/** One whole run; what a guest, a tasting member and a tasting leader received. */
async function run(order: readonly number[]) {
  const scene = await makeScene(order, 99);
  const codes = scene.db.select({ code: servings.code }).from(servings).all().map((row) => row.code).sort();
  const keyText = scene.db.select({ sessionId: seals.sessionId }).from(seals).all()
    .map(({ sessionId }) => { const plan = takeOut(scene.db, scene.cellarId, sessionId); return plan.servings.map((s) => `${s.code}=${plan.samples[s.sample - 1]!.label}`).sort().join(); }).sort().join('|');
  release();
  const server = await startServer({ folder: scene.folder });
  const received: string[] = [];
  const keep = (who: string, recorder: Recorder) => recorder.answers.forEach(({ what, bytes }) => received.push(`${who} ${masked(Buffer.from(what))}\n${masked(bytes)}`));
  try {
    const guest = new Recorder(server.url);
    await tasteAll(guest, scene.joinKeys.profile, 'Wren');
    await tasteAll(guest, scene.joinKeys.triangle, 'Wren');
    keep('guest', guest);
    for (const who of ['lio', 'odo']) {
      const member = new Recorder(server.url);
      await member.signIn(`${who}@pellow-rake.example`, PASSWORD);
      member.answers.length = 0;
      await tasteAll(member, scene.joinKeys.profile, who);
      for (const path of ['/c/pellow-rake', '/c/pellow-rake/sessions', `/c/pellow-rake/sessions/${scene.profileId}`, `/c/pellow-rake/sessions/${scene.profileId}/pour`, `/c/pellow-rake/sessions/${scene.profileId}/results`]) await member.see(path);
      await member.getJson(`/api/v1/c/pellow-rake/sessions/${scene.profileId}/board`);
      keep(who, member);
    }
  } finally {
    await server.stop();
  }
  return { codes, keyText, received };
}

it('with the key permuted, everybody who tastes receives the same bytes', async () => {
  const first = await run([0, 1, 2]);
  const second = await run([2, 0, 1]);
  // The draw was the same and the key is not: otherwise the comparison would show nothing.
  expect(second.codes).toEqual(first.codes);
  expect(second.keyText).not.toBe(first.keyText);
  expect(second.received.length).toBe(first.received.length);
  first.received.forEach((bytes, index) => {
    // Found by position to keep the report short when it fails.
    const other = second.received[index]!;
    const at = [...bytes].findIndex((char, i) => char !== other[i]);
    const differs = bytes === other ? null : `${bytes.split('\n')[0]}: …${bytes.slice(Math.max(0, at - 120), at + 120)}… / …${other.slice(Math.max(0, at - 40), at + 80)}…`;
    expect(differs).toBeNull();
  });
}, 120_000);
