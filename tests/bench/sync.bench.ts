import { randomUUID } from 'node:crypto';
import { Agent, request } from 'node:http';
import { afterAll, expect, it } from 'vitest';
import type { SyncResponse } from '@/lib/ballots/types';
import { startServer, type TestServer } from '../support/server';
import { buildBareApp } from './bare-app';
import { makeBenchScene } from './scene';

// `npm run bench`: how fast answers are acknowledged, as a ratio to a bare route handler of the same
// framework that does one insert with synchronous=FULL, in one run; and 100 seats that hand in at once.

const SECONDS = Number(process.env.BENCH_SECONDS ?? 6);
const CONNECTIONS = 10;
const ROUNDS = 3;
const SHEET = 24;

interface Answer {
  status: number;
  body: string;
  ms: number;
}

/** One POST over a kept connection. */
function post(agent: Agent, url: string, body: string, cookie = ''): Promise<Answer> {
  const began = performance.now();
  return new Promise((resolve, reject) => {
    const headers = { 'content-type': 'application/json', origin: new URL(url).origin, 'content-length': Buffer.byteLength(body), ...(cookie && { cookie }) };
    const sent = request(url, { method: 'POST', agent, headers }, (answer) => {
      let text = '';
      answer.on('data', (part) => (text += part));
      answer.on('end', () => resolve({ status: answer.statusCode!, body: text, ms: performance.now() - began }));
    });
    sent.on('error', reject);
    sent.end(body);
  });
}

interface Rate {
  perSecond: number;
  p50: number;
  p99: number;
}

async function rate(url: string, makeBody: (i: number) => string, cookies: readonly string[] = []): Promise<Rate> {
  const agent = new Agent({ keepAlive: true, maxSockets: CONNECTIONS });
  for (let i = 0; i < 50; i += 1) await post(agent, url, makeBody(0), cookies[0]);
  const end = performance.now() + SECONDS * 1000;
  const times: number[] = [];
  await Promise.all(Array.from({ length: CONNECTIONS }, async (_, i) => {
    while (performance.now() < end) {
      const { status, ms } = await post(agent, url, makeBody(i), cookies[i]);
      if (status !== 200) throw new Error(`status ${status}`);
      times.push(ms);
    }
  }));
  agent.destroy();
  times.sort((a, b) => a - b);
  return { perSecond: times.length / SECONDS, p50: times[Math.floor(times.length / 2)]!, p99: times[Math.floor(times.length * 0.99)]! };
}

const servers: TestServer[] = [];
afterAll(async () => {
  for (const server of servers) await server.stop('SIGKILL');
});

it('acknowledges answers', { timeout: 600_000 }, async () => {
  const scene = await makeBenchScene(100);
  const bare = await startServer({ cwd: buildBareApp() });
  const own = await startServer({ folder: scene.folder });
  servers.push(bare, own);
  const seq = new Map<number, number>();
  const sheetOf = (seat: number, answers: number): string =>
    JSON.stringify({
      protocol: 1, joinKey: scene.joinKey, at: null, onPhone: 0,
      ops: Array.from({ length: answers }, (_, k) => {
        const n = (seq.get(seat) ?? 0) + 1;
        seq.set(seat, n);
        return { opId: randomUUID(), deviceId: scene.devices[seat], seq: n, clientAt: Date.now(), body: { kind: 'score', block: 1, position: 1 + (k % scene.glasses), item: 1 + (Math.floor(k / scene.glasses) % scene.items), value: k % 101 } };
      }),
    });
  const ownUrl = `${own.url}/api/v1/sync`;
  const rounds: Record<'bare' | 'one' | 'sheet', Rate>[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    rounds.push({
      bare: await rate(`${bare.url}/api/one`, () => JSON.stringify({ id: randomUUID(), value: 1 })),
      one: await rate(ownUrl, (i) => sheetOf(i, 1), scene.cookies),
      sheet: await rate(ownUrl, (i) => sheetOf(i, SHEET), scene.cookies),
    });
  }
  const median = (pick: (round: (typeof rounds)[number]) => number) => rounds.map(pick).sort((a, b) => a - b)[Math.floor(ROUNDS / 2)]!;
  for (const key of ['bare', 'one', 'sheet'] as const) {
    console.log(`${key}: ${median((r) => r[key].perSecond).toFixed(0)} requests/s, p50 ${median((r) => r[key].p50).toFixed(1)} ms, p99 ${median((r) => r[key].p99).toFixed(1)} ms, ratio to bare ${(median((r) => r[key].perSecond / r.bare.perSecond)).toFixed(2)}`);
  }
  console.log(`answers in sheets of ${SHEET}: ${(SHEET * median((r) => r.sheet.perSecond)).toFixed(0)}/s`);

  const agent = new Agent({ keepAlive: true, maxSockets: 100 });
  const sheets = scene.cookies.map((cookie, seat) => ({ cookie, body: sheetOf(seat, SHEET) }));
  const began = performance.now();
  const answers = await Promise.all(sheets.map(({ cookie, body }) => post(agent, ownUrl, body, cookie)));
  const all = performance.now() - began;
  const receipts = answers.flatMap((answer) => (answer.status === 200 ? (JSON.parse(answer.body) as SyncResponse).receipts : []));
  const kept = scene.countKept(receipts.map((receipt) => receipt.opId));
  const times = answers.map((answer) => answer.ms).sort((a, b) => a - b);
  console.log(`100 seats at once, ${SHEET} answers each: ${receipts.length} of ${100 * SHEET} acknowledged, ${receipts.length - kept} of these lost, ${answers.filter((a) => a.status >= 500).length} answers of 5xx, p99 ${times[98]!.toFixed(0)} ms, all in ${all.toFixed(0)} ms`);
  expect(kept).toBe(100 * SHEET);
});
