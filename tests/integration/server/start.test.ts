import { connect } from 'node:net';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readDemo } from '../../support/demo';
import { Client } from '../../support/http';
import { startServer, type TestServer } from '../../support/server';

let server: TestServer;
beforeAll(async () => {
  server = await startServer({ demo: true, viaStart: true });
});
afterAll(() => server?.stop('SIGKILL'));

describe('npm start', () => {
  it('prints, one a line, the address, the demo sign-ins, the join link and the way to an own cellar', async () => {
    for (let i = 0; i < 50 && !server.log().includes('Stop with'); i += 1) await new Promise((resolve) => setTimeout(resolve, 100));
    const lines = server.log().split('\n').map((line) => line.trim());
    const demo = readDemo(server.folder);
    expect(lines).toContain(`Tercet is at ${server.url}`);
    for (const { role, email, password } of demo.signIns) expect(lines).toContain(`${role}: ${email}  ${password}`);
    expect(lines.some((line) => line.includes(`${server.url}${demo.joinPath}`) && line.includes(demo.joinCode))).toBe(true);
    const { path: setup } = JSON.parse(readFileSync(path.join(server.folder, 'first-owner.json'), 'utf8')) as { path: string };
    expect(lines.some((line) => line.endsWith(`${server.url}${setup}`))).toBe(true);
  });

  it('makes a real cellar by a link that works once', async () => {
    const { path: link } = JSON.parse(readFileSync(path.join(server.folder, 'first-owner.json'), 'utf8')) as { path: string };
    const owner = new Client(server.url);
    const fields = { cellarName: 'Own Cellar', drink: 'cider', timeZone: 'Europe/Madrid', name: 'Owen', email: 'owen@example.com', password: 'apples under the ladder' };
    const bad = await owner.submitForm(await owner.get(link), 'Make the cellar', { ...fields, timeZone: 'Mars/Olympus', password: 'short' });
    expect(bad.document.querySelector('.summary')).not.toBeNull();
    const home = await owner.submitForm(await owner.get(link), 'Make the cellar', fields);
    expect(new URL(home.url).pathname).toBe('/c/own-cellar');
    expect((await new Client(server.url).get(link)).html).not.toContain('Make the cellar</button>');
  });

  it('ends within three seconds at SIGTERM, with connections open, and comes up again on the same data', async () => {
    const sockets = Array.from({ length: 5 }, () => connect(server.port, '127.0.0.1'));
    for (const socket of sockets) {
      socket.on('error', () => {});
      socket.write('POST /api/v1/sync HTTP/1.1\r\nHost: x\r\nContent-Type: application/json\r\nContent-Length: 1000\r\n\r\n{');
    }
    await new Promise((resolve) => setTimeout(resolve, 200));
    const { folder } = server;
    const passwords = readFileSync(path.join(folder, 'demo.json'), 'utf8');
    expect(await server.stop()).toBeLessThan(3000);
    for (const socket of sockets) socket.destroy();
    const began = Date.now();
    server = await startServer({ demo: true, viaStart: true, folder });
    expect(Date.now() - began).toBeLessThan(15_000);
    expect(readFileSync(path.join(folder, 'demo.json'), 'utf8')).toBe(passwords);
    const owner = new Client(server.url);
    expect(new URL((await owner.signIn('owen@example.com', 'apples under the ladder')).url).pathname).toBe('/c/own-cellar');
  });
});
