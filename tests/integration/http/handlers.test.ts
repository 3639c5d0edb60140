import { randomUUID } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import Database from 'better-sqlite3';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Client } from '../../support/http';
import { readDemo } from '../../support/demo';
import { startServer, type TestServer } from '../../support/server';

let server: TestServer;
let guest: Client;
let joinKey: string;

beforeAll(async () => {
  server = await startServer({ demo: true });
  const { joinPath } = readDemo(server.folder);
  joinKey = joinPath.split('/').at(-1)!;
  guest = new Client(server.url);
  await guest.submitForm(await guest.get(joinPath), 'Take a seat', { displayName: 'Wren', seatRole: 'taste', isOfAge: true, hasRead: true });
});
afterAll(() => server?.stop());

function routesUnder(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const file = path.join(folder, entry.name);
    return entry.isDirectory() ? routesUnder(file) : entry.name === 'route.ts' ? [file] : [];
  });
}

const countRows = () => {
  const sqlite = new Database(server.databaseFile, { readonly: true });
  const count = sqlite.prepare('SELECT count(*) FROM operations').pluck().get();
  sqlite.close();
  return count;
};

const body = () => ({ protocol: 1, joinKey, at: null, onPhone: 0, ops: [{ opId: randomUUID(), deviceId: randomUUID(), seq: 1, clientAt: 1, body: { kind: 'score', block: 1, position: 1, item: 1, value: 50 } }] });

describe('every route handler', () => {
  it('goes through the one wrapper: a write through origin, media type, size and schema', () => {
    const files = routesUnder('app');
    expect(files.length).toBeGreaterThanOrEqual(5);
    for (const file of files) {
      const source = readFileSync(file, 'utf8');
      for (const [, method, made] of source.matchAll(/export (?:const|async function) (GET|HEAD|POST|PUT|PATCH|DELETE)(?: = (\w+))?/g)) {
        expect(`${file} ${method} ${made}`).toBe(`${file} ${method} ${method === 'GET' ? 'readHandler' : 'writeHandler'}`);
      }
    }
  });

  it.each([
    ['no Origin', { 'content-type': 'application/json' }, 403],
    ['a foreign Origin', { 'content-type': 'application/json', origin: 'https://evil.example' }, 403],
    ['Origin null', { 'content-type': 'application/json', origin: 'null' }, 403],
    ['a cross-site request', { 'content-type': 'application/json', origin: '<own>', 'sec-fetch-site': 'cross-site' }, 403],
    ['text/plain', { 'content-type': 'text/plain', origin: '<own>' }, 415],
    ['a form', { 'content-type': 'application/x-www-form-urlencoded', origin: '<own>' }, 415],
  ] as const)('with %s does nothing', async (_, headers, status) => {
    const before = countRows();
    const own = Object.fromEntries(Object.entries(headers).map(([name, value]) => [name, value === '<own>' ? server.url : value]));
    const answer = await guest.request('/api/v1/sync', { method: 'POST', body: JSON.stringify(body()), headers: own });
    expect(answer.status).toBe(status);
    expect(countRows()).toBe(before);
  });

  it('stops reading a body that is too large, declared or not', async () => {
    const large = JSON.stringify({ ...body(), padding: 'x'.repeat(3_000_000) });
    const stream = new ReadableStream({
      start(controller) {
        for (let i = 0; i < 60; i += 1) controller.enqueue(new TextEncoder().encode('x'.repeat(50_000)));
        controller.close();
      },
    });
    for (const sent of [large, stream]) {
      const answer = await guest.request('/api/v1/sync', { method: 'POST', body: sent, headers: { 'content-type': 'application/json', origin: server.url, connection: 'close' }, ...(sent === stream && { duplex: 'half' }) } as RequestInit);
      expect(answer.status).toBe(413);
    }
  });

  it('answers bad input with 400 and words, never with a fault', async () => {
    const good = body();
    const bad: unknown[] = [
      null, [], 'x', {}, { ...good, protocol: 2 }, { ...good, extra: 1 }, { ...good, joinKey: '../../etc' }, { ...good, ops: 'x' },
      { ...good, ops: Array.from({ length: 201 }, () => good.ops[0]) },
      ...[{ value: 101 }, { value: -1 }, { value: 1e9 }, { value: '50' }, { value: null }, { value: 0.5 }, { block: 0 }, { position: 41 }, { item: 1.5 }, { kind: 'erase' }, { surprise: true }].map((change) => ({ ...good, ops: [{ ...good.ops[0], body: { ...good.ops[0]!.body, ...change } }] })),
      { ...good, ops: [{ ...good.ops[0], opId: 'not-an-id' }] }, { ...good, ops: [{ ...good.ops[0], seq: 0 }] },
    ];
    const before = countRows();
    for (const sent of bad) {
      const answer = await guest.json('/api/v1/sync', sent);
      expect({ sent, status: answer.status }).toEqual({ sent, status: 400 });
      expect(answer.body).toMatchObject({ error: { code: 'invalid', message: expect.any(String) } });
    }
    const broken = await guest.request('/api/v1/sync', { method: 'POST', body: '{"a":', headers: { 'content-type': 'application/json', origin: server.url } });
    expect(broken.status).toBe(400);
    expect(countRows()).toBe(before);
    expect((await guest.json('/api/v1/sync', good)).status).toBe(200);
  });

  it('asks a phone without a seat to join, and keeps nothing of it', async () => {
    const before = countRows();
    expect((await new Client(server.url).json('/api/v1/sync', body())).status).toBe(401);
    expect((await new Client(server.url).getJson(`/api/v1/sheet/${joinKey}`)).status).toBe(401);
    expect(countRows()).toBe(before);
  });

  it('sends the security headers with pages and answers', async () => {
    for (const path of ['/sign-in', '/j', `/t/${joinKey}`, '/api/health', `/api/v1/sheet/${joinKey}`, '/api/v1/commitments/none']) {
      const { headers } = await guest.request(path);
      const policy = path.startsWith('/api') ? /default-src 'none'; frame-ancestors 'none'/ : /script-src 'self' 'nonce-[\w+/=]+' 'strict-dynamic'.*frame-ancestors 'none'/;
      expect(headers.get('content-security-policy')).toMatch(policy);
      expect(headers.get('x-content-type-options')).toBe('nosniff');
      expect(headers.get('referrer-policy')).toBe('same-origin');
      expect(headers.get('cache-control')).toMatch(/no-store/);
      expect(headers.get('x-powered-by')).toBeNull();
    }
  });
});

describe('a server action', () => {
  it('posted from elsewhere, or without Origin, does nothing', async () => {
    const client = new Client(server.url);
    const page = await client.get('/j');
    const form = page.document.querySelector('form:has(input[name=code])')!;
    const send = (headers: Record<string, string>) => {
      const data = new FormData();
      for (const input of form.querySelectorAll('input')) data.append(input.name, input.name === 'code' ? '123456' : input.value);
      return client.request('/j', { method: 'POST', body: data, headers });
    };
    expect((await send({ origin: 'https://evil.example' })).status).toBeGreaterThanOrEqual(400);
    expect(await (await send({})).text()).toContain('did not come from this site');
    expect(await (await send({ origin: server.url })).text()).toContain('No session has that code');
  });

  it('lets a phone type ten codes in five minutes and no more, while the link goes on working', async () => {
    const client = new Client(server.url);
    let said = '';
    for (let i = 0; i < 11; i += 1) said = (await client.submitForm(await client.get('/j'), 'Find the session', { code: String(100_000 + i) })).text;
    expect(said).toContain('Too many tries');
    expect((await client.get(`/j/${joinKey}`)).status).toBe(200);
  });
});
