import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, it } from 'vitest';
import type { Sheet, SyncResponse } from '@/lib/ballots/types';
import { readDemo, signInOf } from '../../support/demo';
import { Client } from '../../support/http';
import { startServer, type TestServer } from '../../support/server';

let server: TestServer;
beforeAll(async () => {
  server = await startServer({ demo: true });
});
afterAll(() => server?.stop());

const score = (value: number, seq: number, deviceId: string) => ({ opId: randomUUID(), deviceId, seq, clientAt: 1, body: { kind: 'score', block: 1, position: 1, item: 1, value } });

it('a lost phone’s seat goes to another phone with its answers; the old phone and the used link are dead', async () => {
  const demo = readDemo(server.folder);
  const joinKey = demo.joinPath.split('/').at(-1)!;
  const send = (client: Client, ops: unknown[]) => client.json('/api/v1/sync', { protocol: 1, joinKey, at: null, onPhone: 0, ops });
  const lost = new Client(server.url);
  await lost.submitForm(await lost.get(demo.joinPath), 'Take a seat', { displayName: 'Lost', seatRole: 'taste', isOfAge: true, hasRead: true });
  const { seatLabel, blocks } = (await lost.getJson(`/api/v1/sheet/${joinKey}`)).body as Sheet;
  expect((await send(lost, [score(33, 1, randomUUID())])).status).toBe(200);

  const leader = new Client(server.url);
  const { email, password } = signInOf(demo, 'leader');
  await leader.signIn(email, password);
  const sessions = await leader.get('/c/pellow-rake/sessions?state=open');
  const path = [...sessions.document.querySelectorAll('a')].find((link) => link.textContent === 'Open tasting')!.getAttribute('href')!;
  const board = await leader.get(path);
  const shown = await leader.submitForm(board, `form:has(input[name=seat][value="${seatLabel}"])`);
  const link = /\/seat\/[\w-]{20,}/.exec(shown.html)![0];

  const found = new Client(server.url);
  const sheetPage = await found.submitForm(await found.get(link), `Take seat ${seatLabel} on this phone`);
  expect(new URL(sheetPage.url).pathname).toBe(`/t/${joinKey}`);
  const sheet = (await found.getJson(`/api/v1/sheet/${joinKey}`)).body as Sheet;
  expect(sheet.seatLabel).toBe(seatLabel);
  expect(sheet.blocks).toEqual(blocks);
  expect(sheet.answers.scores).toEqual([{ block: 1, position: 1, item: 1, value: 33 }]);

  expect((await send(lost, [score(99, 2, randomUUID())])).status).toBe(401);
  expect((await lost.getJson(`/api/v1/sheet/${joinKey}`)).status).toBe(401);
  const answer = await send(found, [score(44, 1, randomUUID())]);
  expect((answer.body as SyncResponse).receipts).toHaveLength(1);
  expect(((await found.getJson(`/api/v1/sheet/${joinKey}`)).body as Sheet).answers.scores).toMatchObject([{ value: 44 }]);
  expect((await new Client(server.url).get(link)).text).toContain('This link has run out');
});

it('phones that answer two hundred times while the leader closes: each answer is counted or set aside, none both or neither', async () => {
  const demo = readDemo(server.folder);
  const joinKey = demo.joinPath.split('/').at(-1)!;
  const guests: Client[] = [];
  for (let i = 0; i < 8; i += 1) {
    const guest = new Client(server.url);
    const page = await guest.submitForm(await guest.get(demo.joinPath), 'Take a seat', { displayName: `G${i}`, seatRole: 'taste', isOfAge: true, hasRead: true });
    if (new URL(page.url).pathname.startsWith('/t/')) guests.push(guest);
  }
  expect(guests.length).toBeGreaterThan(5);
  const leader = new Client(server.url);
  const { email, password } = signInOf(demo, 'leader');
  await leader.signIn(email, password);
  const sessions = await leader.get('/c/pellow-rake/sessions?state=open');
  const path = [...sessions.document.querySelectorAll('a')].find((link) => link.textContent === 'Open tasting')!.getAttribute('href')!;
  const page = await leader.get(path);
  const devices = guests.map(() => randomUUID());
  const sent = guests.flatMap((guest, i) => Array.from({ length: 25 }, (_, k) => ({ guest, op: score(k, k + 1, devices[i]!) })));
  const half = sent.length / 2;
  const deliver = ({ guest, op }: (typeof sent)[number]) => guest.json('/api/v1/sync', { protocol: 1, joinKey, at: null, onPhone: 0, ops: [op] });
  const [first, , second] = await Promise.all([
    Promise.all(sent.slice(0, half).map(deliver)),
    leader.submitForm(page, 'Close session (hold two seconds)', { reason: 'Time is up.' }),
    Promise.all(sent.slice(half).map(deliver)),
  ]);
  const receipts = [...first, ...second].flatMap((answer) => (answer.body as SyncResponse).receipts);
  expect(receipts).toHaveLength(sent.length);
  expect(new Set(receipts.map((receipt) => receipt.receiptNo)).size).toBe(sent.length);
  const late = receipts.filter((receipt) => receipt.admission === 'late');
  const again = await Promise.all(sent.map(deliver));
  // A repeat after the close gets the word that it had: what counted goes on counting.
  expect(again.flatMap((answer) => (answer.body as SyncResponse).receipts).filter((receipt) => receipt.admission === 'late').length).toBe(late.length);
  const closed = await leader.get(path);
  expect(closed.text).toMatch(late.length > 0 ? new RegExp(`${late.length} answers came after the close`) : /Closed/);
  // A person may ask for the name to go; the answers stay.
  expect(closed.text).toContain('Ines');
  const erased = await leader.submitForm(closed, 'form:has(input[name=seat][value="1"])');
  expect(erased.text).not.toContain('Ines');
  expect(erased.text).toContain('erased');
});
