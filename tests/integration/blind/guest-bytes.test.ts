import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Client } from '../../support/http';
import { startServer, type TestServer } from '../../support/server';
import { findIn } from './decode';
import { Recorder, tasteAll } from './recorder';
import { makeScene, PASSWORD, PRIVATE_QUESTION, release, VESSELS, type Scene } from './scene';

let scene: Scene;
let server: TestServer;

beforeAll(async () => {
  scene = await makeScene([0, 1, 2], 7);
  release();
  server = await startServer({ folder: scene.folder });
});
afterAll(() => server?.stop());

describe.each(['profile', 'triangle'] as const)('every byte that a guest of a %s receives, from join to submit', (method) => {
  it('tells nothing of lot, vessel, pull or sample', async () => {
    const guest = new Recorder(server.url);
    await tasteAll(guest, scene.joinKeys[method], 'Wren');
    const sessionId = method === 'profile' ? scene.profileId : scene.triangleId;
    for (const path of ['', '/pour', '/results', '/design']) await guest.see(`/c/pellow-rake/sessions/${sessionId}${path}`);
    await guest.getJson(`/api/v1/c/pellow-rake/sessions/${sessionId}/board`);
    await guest.getJson(`/api/v1/c/pellow-rake/sessions/${sessionId}/results`);
    await guest.seeAssets();
    expect(guest.answers.length).toBeGreaterThan(40);
    const size = guest.answers.reduce((sum, answer) => sum + answer.bytes.length, 0);
    expect(size).toBeGreaterThan(500_000);
    for (const { what, bytes } of guest.answers) {
      expect({ what, found: findIn(bytes, [...scene.canaries, PRIVATE_QUESTION]) }).toEqual({ what, found: [] });
    }
  });
});

describe('the same look', () => {
  it('finds the names on the pour sheet, where they stand (positive control)', async () => {
    const pourer = new Recorder(server.url);
    await pourer.signIn('bram@pellow-rake.example', PASSWORD);
    await pourer.see(`/c/pellow-rake/sessions/${scene.profileId}/pour`);
    const sheet = pourer.answers.find(({ what }) => what.endsWith('/pour'))!;
    expect(findIn(sheet.bytes, scene.canaries)).toEqual([...VESSELS]);
  });

  it('finds a name behind JSON, URL, HTML, base64 and UTF-16 (control of the decoders)', () => {
    const name = 'Quillfox91';
    const hidden = [
      JSON.stringify({ a: name }).replace('Q', '\\u0051'), encodeURIComponent(name).replace('Q', '%51'), name.replace('Q', '&#x51;'),
      Buffer.from(`xxxxxxxx ${name} xxxxxxx`).toString('base64'),
    ].map((text) => Buffer.from(text));
    for (const bytes of [...hidden, Buffer.from(name, 'utf16le')]) expect(findIn(bytes, [name])).toEqual([name]);
  });

  it('never answers a stranger about another cellar otherwise than about none', async () => {
    const stranger = new Client(server.url);
    await stranger.signIn('lio@pellow-rake.example', PASSWORD);
    const foreign = await stranger.getJson(`/api/v1/c/somewhere-else/sessions/${scene.profileId}/board`);
    const none = await stranger.getJson('/api/v1/c/nowhere-at-all/sessions/00000000-0000-4000-8000-000000000000/board');
    expect(foreign).toMatchObject({ status: 404, body: none.body });
  });
});
