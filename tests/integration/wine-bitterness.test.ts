import { randomUUID } from 'node:crypto';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { OperationBody } from '@/lib/ballots/schema';
import type { Sheet, SyncResponse } from '@/lib/ballots/types';
import type { ResultsView } from '@/lib/results/types';
import { Client } from '../support/http';
import { startServer, type TestServer } from '../support/server';
import { TREATMENTS, wineCase, wineScores } from '../support/wine-bitterness';
import { addBarrel, addLot } from './results/register';

const TITLE = 'Wednesday tasting';
let server: TestServer;
let owner: Client;
let home: string;
let sessionPath: string;
let resultsApi: string;
let joinKey: string;
let results: ResultsView;
const tasters: Taster[] = [];

async function setUp(): Promise<void> {
  const { path: link } = JSON.parse(readFileSync(path.join(server.folder, 'first-owner.json'), 'utf8')) as { path: string };
  owner = new Client(server.url);
  const page = await owner.submitForm(await owner.get(link), 'Make the cellar', {
    cellarName: 'Randall Cellar', drink: 'wine', timeZone: 'Europe/London', name: 'Owen', email: 'owen@randall.example', password: 'cold and warm bottles',
  });
  home = new URL(page.url).pathname;
  expect(home).toMatch(/^\/c\/[\w-]+$/);
}

/** Values of the ticks of that name whose words hold each of `words`. */
function ticks(document: Document, name: string, ...words: string[]): string[] {
  const boxes = [...document.querySelectorAll<HTMLInputElement>(`input[name="${name}"]`)].map((box) => ({ value: box.value, label: box.closest('label')!.textContent.trim() }));
  return words.map((word) => {
    const box = boxes.find((one) => one.label.toLowerCase().includes(word));
    if (!box) throw new Error(`no tick "${word}" among ${boxes.map((one) => one.label).join(' | ')}`);
    return box.value;
  });
}

async function designAndOpen(): Promise<void> {
  const form = await owner.get(`${home}/sessions/new`);
  const draft = await owner.submitForm(form, 'Save the draft', {
    method: 'profile', title: TITLE, instruction: 'Score each glass by itself.', privateQuestion: 'Does warmth or skin contact make it more bitter?',
    pulls: ticks(form.document, 'pulls', ...TREATMENTS.map((name) => `barrel ${name},`)), lines: ticks(form.document, 'lines', 'bitter '),
    seatsPlanned: 9, reservesPlanned: 0, replicates: 2, alpha: 0.05, servingVolumeMl: 30, restS: 60, allergens: ['sulfites'], pourers: ticks(form.document, 'pourers', 'owen'),
  });
  sessionPath = new URL(draft.url).pathname;
  expect(sessionPath).toMatch(/\/sessions\/[0-9a-f-]{36}$/);
  resultsApi = `/api/v1${sessionPath}/results`;
  const sealed = await owner.submitForm(draft, 'Seal the plan (hold two seconds)');
  expect(sealed.text).toMatch(/sealed/i);
  const open = await owner.submitForm(sealed, 'Open the session');
  joinKey = /\/j\/([a-z2-7]{16})/.exec(open.html)![1]!;
}

/** Code → treatment, as the pourer reads it off the pour sheet. */
async function readPourSheet(): Promise<Map<string, string>> {
  const page = await owner.get(`${sessionPath}/pour`);
  const key = new Map<string, string>();
  for (const bottle of page.document.querySelectorAll('.bottle')) {
    const code = bottle.querySelector('.code')!.getAttribute('aria-label')!.replace(/\D/g, '');
    key.set(code, bottle.querySelector('b')!.textContent.replace(/^barrel /i, ''));
  }
  return key;
}

interface Taster {
  client: Client;
  sheet: Sheet;
  device: string;
  seq: number;
}

async function join(judge: number): Promise<Taster> {
  const client = new Client(server.url);
  const door = await client.get(`/j/${joinKey}`);
  const sheetPage = await client.submitForm(door, 'form:has(input[name=displayName])', { displayName: `Judge ${judge}`, seatRole: 'taste', isOfAge: true, hasRead: true });
  expect(new URL(sheetPage.url).pathname).toBe(`/t/${joinKey}`);
  const answer = await client.getJson(`/api/v1/sheet/${joinKey}`);
  return { client, sheet: answer.body as Sheet, device: randomUUID(), seq: 0 };
}

const operation = (taster: Taster, body: OperationBody) => ({ opId: randomUUID(), deviceId: taster.device, seq: (taster.seq += 1), clientAt: Date.now(), body });

async function send(taster: Taster, ops: ReturnType<typeof operation>[]): Promise<SyncResponse> {
  const answer = await taster.client.json('/api/v1/sync', { protocol: 1, joinKey, at: null, onPhone: 0, ops });
  expect(answer.status).toBe(200);
  return answer.body as SyncResponse;
}

/** Sends the judge's eight ballots one by one, some of them as a bad line would: twice, or changed before the last word. */
async function taste(judge: number, key: Map<string, string>): Promise<void> {
  const taster = await join(judge);
  tasters.push(taster);
  const own = wineScores().filter((score) => score.judge === judge);
  const item = taster.sheet.items[0]!.item;
  for (const { block, glasses } of taster.sheet.blocks) {
    for (const { position, code } of glasses) {
      const product = TREATMENTS.indexOf(key.get(code) as (typeof TREATMENTS)[number]) + 1;
      const value = own.find((score) => score.product === product && score.replicate === block)!.response;
      if (judge === 3) await send(taster, [operation(taster, { kind: 'score', block, position, item, value: 100 - value })]);
      const ops = [operation(taster, { kind: 'score', block, position, item, value })];
      const first = await send(taster, ops);
      expect(first.receipts).toHaveLength(1);
      if (judge === 5) expect((await send(taster, ops)).receipts).toEqual(first.receipts);
    }
  }
  await send(taster, [operation(taster, { kind: 'submit' })]);
}

beforeAll(async () => {
  server = await startServer();
  await setUp();
  await addLot(owner, home, '25-A');
  for (const name of TREATMENTS) await addBarrel(owner, home, name);
  await designAndOpen();
  const key = await readPourSheet();
  expect(key.size).toBe(8);
  for (let judge = 1; judge <= 9; judge += 1) await taste(judge, key);
});

afterAll(() => server?.stop());

// Expected values: R 4.2.2 on the data of Randall (1989), tests/reference/cases.
describe('a session of four bottles and nine judges, through the application’s own addresses', () => {
  const { expected } = wineCase('09_anova_balanced.json', (c) => c.inputs.response === 'response');

  it('shows nobody a result before the key is open', async () => {
    expect((await owner.getJson(resultsApi)).status).toBe(409);
    const page = await owner.get(`${sessionPath}/results`);
    expect(page.text).toContain('Nobody reads a score before the key is open');
    expect(page.html).not.toMatch(/cold_no|warm_yes/);
    expect((await new Client(server.url).getJson(resultsApi)).status).toBe(401);
  });

  it('closes, opens the key and reads back R’s answers', async () => {
    const closed = await owner.submitForm(await owner.get(sessionPath), 'Close session (hold two seconds)');
    expect((await owner.getJson(resultsApi)).status).toBe(409);
    await owner.submitForm(closed, 'Open the key (hold two seconds)');
    const answer = await owner.getJson(resultsApi);
    expect(answer.status).toBe(200);
    expect(answer.headers.get('cache-control')).toContain('no-store');
    results = answer.body as ResultsView;
    const line = results.profile!.lines[0]!;
    const meanOf = (name: string) => line.cells.find((cell) => results.samples.find((s) => s.sample === cell.sample)!.label === `Barrel ${name}`)!;
    expect(line.product!.F).toBeCloseTo(expected.anova.product.F, 8);
    expect(line.product!.p / expected.anova.product.p).toBeCloseTo(1, 8);
    expect([line.product!.df1, line.product!.df2]).toEqual([3, 24]);
    expect(line.interaction!.F).toBeCloseTo(expected.anova.interaction.F, 8);
    expect(line.smallestDifference!).toBeCloseTo(expected.posthoc.HSD, 7);
    TREATMENTS.forEach((name, i) => expect(meanOf(name).mean).toBeCloseTo(expected.posthoc.means[i], 10));
    const letters = TREATMENTS.map((name) => meanOf(name).letters);
    TREATMENTS.forEach((a, i) =>
      TREATMENTS.forEach((b, j) => {
        const shares = (x: string, y: string) => [...x].some((letter) => y.includes(letter));
        expect(shares(letters[i]!, letters[j]!)).toBe(shares(expected.posthoc.letters_tukey[a], expected.posthoc.letters_tukey[b]));
      }),
    );
    // Judge 3 changed each of eight answers once; judge 5's repeats were recognised.
    expect(results.counts).toMatchObject({ counted: 72, replaced: 8, late: 0, unanswered: 0, seatsSubmitted: 9 });
  });

  it('shows the same numbers on the page', async () => {
    const page = await owner.get(`${sessionPath}/results`);
    expect(page.text).toContain(`F(3, 24) = ${expected.anova.product.F.toFixed(2)}, p < 0.001`);
    for (const mean of expected.posthoc.means as number[]) expect(page.text).toContain(mean.toFixed(1));
    expect(page.text).toContain('Barrel warm_yes stands above all the others in bitter');
    expect(page.text).not.toMatch(/NaN|undefined|Infinity/);
  });

  it('sets an answer that comes after close aside, and lets nobody else join', async () => {
    const taster = tasters[0]!;
    const { item } = taster.sheet.items[0]!;
    const late = await send(taster, [operation(taster, { kind: 'score', block: 1, position: 1, item, value: 0 })]);
    expect(late.receipts[0]!.admission).toBe('late');
    const after = (await owner.getJson(resultsApi)).body as ResultsView;
    expect(after.counts.late).toBe(1);
    expect(after.profile!.lines).toEqual(results.profile!.lines);
    expect((await new Client(server.url).get(`/j/${joinKey}`)).text).toContain('closed');
  });

  it('leads to the call, on the barrel and with the session', async () => {
    const sample = results.samples.find((s) => s.label === 'Barrel warm_yes')!;
    const form = await owner.get(`${home}/calls/new?session=${results.session.id}&sample=${sample.id}`);
    expect(form.document.querySelector<HTMLSelectElement>('select[name=fill]')!.value).toBe(sample.components[0]!.fillId);
    const refused = await owner.submitForm(form, 'Record the call', { kind: 'hold', reasons: 'Too bitter by far.' });
    expect(refused.text).toContain('Say until when it is held');
    const call = await owner.submitForm(form, 'Record the call', { kind: 'declassify', reasons: 'Too bitter by far.' });
    expect(call.text).toContain('Declassify barrel warm_yes');
    expect((await owner.get(`${home}/calls`)).text).toContain('Too bitter by far.');
    expect((await owner.get(`${sessionPath}/results`)).text).toContain('Too bitter by far.');
  });
});
