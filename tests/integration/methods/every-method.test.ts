import { randomUUID } from 'node:crypto';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { METHODS, type Method } from '@/db/enums';
import type { OperationBody } from '@/lib/ballots/schema';
import type { Sheet, SyncResponse } from '@/lib/ballots/types';
import { METHOD_FACTS } from '@/lib/methods/facts';
import type { ResultsView } from '@/lib/results/types';
import { Client, type Page } from '../../support/http';
import { startServer, type TestServer } from '../../support/server';
import { reproduce, unpack, whyNoR } from '../../support/reproduce';
import { normalDraw, pickBy, seeded } from '../../support/tasters';
import { addBarrel, addLot } from '../results/register';

/*
 * Every method from the design form to the report, over the application's own addresses, by simulated people
 * whose difference is known: barrels 1 to 4 stand at 0, 1, 2 and 3 times D apart.
 */
const D = 3;
const PEOPLE = 9;
const BARRELS = ['1', '2', '3', '4'];

let server: TestServer;
let owner: Client;
let home: string;

beforeAll(async () => {
  server = await startServer();
  const { path: link } = JSON.parse(readFileSync(path.join(server.folder, 'first-owner.json'), 'utf8')) as { path: string };
  owner = new Client(server.url);
  const page = await owner.submitForm(await owner.get(link), 'Make the cellar', {
    cellarName: 'Every Way', drink: 'wine', timeZone: 'Europe/London', name: 'Owen', email: 'owen@every.example', password: 'nine people and four barrels',
  });
  home = new URL(page.url).pathname;
  await addLot(owner, home, '25-A');
  for (const name of BARRELS) await addBarrel(owner, home, name);
}, 120_000);
afterAll(() => server?.stop());

function ticked(page: Page, name: string, words: readonly string[]): string[] {
  const boxes = [...page.document.querySelectorAll<HTMLInputElement>(`input[name="${name}"]`)].map((box) => ({ value: box.value, label: box.closest('label')!.textContent.trim().toLowerCase() }));
  return words.map((word) => boxes.find((box) => box.label.startsWith(word))!.value);
}

interface Running {
  path: string;
  joinKey: string;
  /** Barrel number by seat, block and position: as the pourer reads it. */
  barrelOf(seat: number, block: number, position: number, code: string): number;
}

async function designAndOpen(method: Method): Promise<Running> {
  const facts = METHOD_FACTS[method];
  const form = await owner.get(`${home}/sessions/new?method=${method}`);
  const count = Math.min(facts.sampleCount.max, 3);
  const lines = facts.items?.from !== 'chosen' ? [] : facts.items.max === 1 ? ['bitter'] : ['bitter', 'sour'];
  const draft = await owner.submitForm(form, 'Save the draft', {
    method, title: 'Wednesday tasting', instruction: 'Taste and spit.', privateQuestion: 'Is it so?', pulls: ticked(form, 'pulls', BARRELS.slice(0, count).map((name) => `barrel ${name},`)),
    ...(lines.length > 0 && { lines: ticked(form, 'lines', lines) }), seatsPlanned: PEOPLE, reservesPlanned: 0, replicates: 1, alpha: 0.05, servingVolumeMl: 30, restS: 0, allergens: ['sulfites'],
    pourers: ticked(form, 'pourers', ['owen']),
  });
  const sealed = await owner.submitForm(draft, 'Seal the plan (hold two seconds)');
  const open = await owner.submitForm(sealed, 'Open the session');
  const pour = await owner.get(`${new URL(draft.url).pathname}/pour`);
  const byCode = new Map<string, number>();
  for (const bottle of pour.document.querySelectorAll('.bottle')) byCode.set(bottle.querySelector('.code')!.getAttribute('aria-label')!.replace(/\D/g, ''), Number(/\d+/.exec(bottle.querySelector('b')!.textContent)![0]));
  for (const section of pour.document.querySelectorAll('section:has(h3)')) {
    const barrel = Number(/\d+/.exec(section.querySelector('h3')!.textContent)![0]);
    for (const code of section.querySelectorAll('.code')) byCode.set(code.getAttribute('aria-label')!.replace(/\D/g, ''), barrel);
  }
  return { path: new URL(draft.url).pathname, joinKey: /\/j\/([a-z2-7]{16})/.exec(open.html)![1]!, barrelOf: (_seat, _block, _position, code) => byCode.get(code)! };
}

interface Person {
  client: Client;
  sheet: Sheet;
  send(...bodies: OperationBody[]): Promise<SyncResponse>;
}

async function join(running: Running, n: number): Promise<Person> {
  const client = new Client(server.url);
  await client.submitForm(await client.get(`/j/${running.joinKey}`), 'form:has(input[name=displayName])', { displayName: `Person ${n}`, seatRole: 'taste', isOfAge: true, hasRead: true });
  const page = await client.get(`/t/${running.joinKey}`);
  expect(page.status).toBe(200);
  const sheet = (await client.getJson(`/api/v1/sheet/${running.joinKey}`)).body as Sheet;
  let seq = 0;
  const deviceId = randomUUID();
  const send: Person['send'] = async (...bodies) => {
    const ops = bodies.map((body) => ({ opId: randomUUID(), deviceId, seq: (seq += 1), clientAt: Date.now(), body }));
    return (await client.json('/api/v1/sync', { protocol: 1, joinKey: running.joinKey, at: null, onPhone: 0, ops })).body as SyncResponse;
  };
  return { client, sheet, send };
}

const PROTOCOL = { triangle: 'triangle', tetrad: 'tetrad', duo_trio: 'duo_trio', duo_trio_constant: 'duo_trio', two_of_five: 'two_out_of_five', directional_pair: 'two_afc', preference: 'two_afc' } as const;

/** What the kinds of line take, from a strength of 0 to 6 or so. */
const VALUE: Record<string, (strength: number) => number> = {
  line: (s) => Math.round(Math.min(100, Math.max(0, 20 + 10 * s))), category: (s) => Math.min(5, Math.max(0, Math.round(s))), check: (s) => Number(s > 2), rate: (s) => Math.min(3, Math.max(0, Math.round(s / 2))),
  just_right: (s) => Math.min(5, Math.max(1, Math.round(1 + s / 2))), liking: (s) => Math.min(9, Math.max(1, Math.round(2 + s))), term: (s) => Math.min(3, Math.max(1, Math.round(s / 2))),
};

/** Answers the whole sheet. @returns what the person did, for the count */
function answersOf({ sheet }: Person, running: Running, seat: number, random: () => number): OperationBody[] {
  const bodies: OperationBody[] = [];
  for (const { block, glasses } of sheet.blocks) {
    const felt = glasses.map(({ position, code }) => normalDraw(random, D * (running.barrelOf(seat, block, position, code) - 1)));
    if (sheet.ballot.kind === 'pick') {
      const [position, also] = pickBy(PROTOCOL[sheet.method as keyof typeof PROTOCOL], felt) as [number, number?];
      bodies.push({ kind: 'choice', block, position, ...(also !== undefined && { also }), isGuess: false });
    } else if (sheet.ballot.kind === 'order') {
      bodies.push({ kind: 'order', block, order: glasses.map((g) => g.position).sort((a, b) => felt[a - 1]! - felt[b - 1]!) });
    } else {
      glasses.forEach(({ position }, i) => {
        if (sheet.ballot.kind === 'note') bodies.push({ kind: 'comment', block, position, text: 'Lemon, no vanilla.' });
        for (const item of sheet.items) {
          if (item.kind === 'flag') continue;
          if (item.kind === 'term' && (item.name !== 'Lemon' || felt[i]! < 2)) continue;
          bodies.push({ kind: 'score', block, position, item: item.item, value: VALUE[item.kind]!(felt[i]!) });
        }
      });
    }
  }
  return bodies;
}

const WRONG: Record<Sheet['ballot']['kind'], OperationBody[]> = {
  glasses: [{ kind: 'choice', block: 1, position: 1, isGuess: false }, { kind: 'order', block: 1, order: [1] }, { kind: 'score', block: 1, position: 1, item: 399, value: 1 }, { kind: 'score', block: 1, position: 1, item: 1, value: 100 }],
  note: [{ kind: 'choice', block: 1, position: 1, isGuess: false }, { kind: 'score', block: 1, position: 1, item: 1, value: 4 }, { kind: 'fault', block: 1, position: 1, item: 1, isNoted: true }],
  pick: [{ kind: 'score', block: 1, position: 1, item: 1, value: 1 }, { kind: 'order', block: 1, order: [1, 2] }, { kind: 'choice', block: 1, position: 40, isGuess: false }, { kind: 'choice', block: 1, position: 2, also: 1, isGuess: false }],
  order: [{ kind: 'choice', block: 1, position: 1, isGuess: false }, { kind: 'order', block: 1, order: [1, 1] }, { kind: 'order', block: 1, order: [1, 40] }],
};

describe.each(METHODS)('%s, from design to report', (method) => {
  it('is planned, served, answered and analysed', { timeout: 120_000 }, async () => {
    const random = seeded(xoroshiro128plus(METHODS.indexOf(method) + 11));
    const running = await designAndOpen(method);
    const choices: { sheet: Sheet; bodies: OperationBody[]; seat: number }[] = [];
    for (let seat = 1; seat <= PEOPLE; seat += 1) {
      const person = await join(running, seat);
      // A line from 0 to 100 takes 100; every other line refuses it.
      const wrong = WRONG[person.sheet.ballot.kind].filter((body) => !(method === 'profile' && body.kind === 'score' && body.value === 100));
      if (seat === 1) expect((await person.send(...wrong)).refused).toHaveLength(wrong.length);
      const bodies = answersOf(person, running, seat, random);
      expect((await person.send(...bodies, { kind: 'submit' })).refused).toEqual([]);
      choices.push({ sheet: person.sheet, bodies, seat });
    }
    expect((await owner.getJson(`/api/v1${running.path}/board`)).body).toMatchObject({ seats: expect.arrayContaining([expect.objectContaining({ isSubmitted: true })]) as unknown });
    const closed = await owner.submitForm(await owner.get(running.path), 'Close session (hold two seconds)');
    await owner.submitForm(closed, 'Open the key (hold two seconds)');
    const results = (await owner.getJson(`/api/v1${running.path}/results`)).body as ResultsView;
    const page = await owner.get(`${running.path}/results`);
    expect(page.status).toBe(200);
    expect(page.text).toContain(results.verdict.headline);
    expect(page.text).not.toMatch(/NaN|undefined|Infinity/);
    expect(results.counts).toMatchObject({ seatsSubmitted: PEOPLE, unanswered: 0, late: 0 });
    expect(results.report.find((entry) => entry.name === 'Method')!.text).toBe(METHOD_FACTS[method].reportName);

    const barrels = (entry: (typeof choices)[number]) => entry.sheet.blocks[0]!.glasses.map(({ position, code }) => running.barrelOf(entry.seat, 1, position, code));
    const pickOf = (entry: (typeof choices)[number]) => entry.bodies[0] as Extract<OperationBody, { kind: 'choice' }>;
    if (results.choice) {
      // Counted once more from what was poured and picked, by the words of each standard.
      const right = choices.filter((entry) => {
        const inGlass = barrels(entry);
        const { position, also } = pickOf(entry);
        const picked = inGlass[position - 1]!;
        const alike = inGlass.filter((barrel) => barrel === picked).length;
        if (method === 'triangle') return alike === 1;
        if (method === 'tetrad') return inGlass[also! - 1] === picked;
        if (method === 'two_of_five') return inGlass[also! - 1] === picked && alike === 2;
        return picked === inGlass[0];
      }).length;
      expect(results.choice).toMatchObject({ n: PEOPLE, correct: right, chance: METHOD_FACTS[method].chance! });
      if (method === 'duo_trio_constant') expect(new Set(choices.map((entry) => barrels(entry)[0])).size).toBe(1);
    }
    if (results.pair) {
      const first = choices.filter((entry) => barrels(entry)[pickOf(entry).position - 1] === 1).length;
      expect(results.pair.chosen.map((cell) => cell.count)).toEqual([first, PEOPLE - first]);
    }
    if (results.order) {
      const ranks = BARRELS.slice(0, 3).map((name) => choices.reduce((sum, entry) => sum + (entry.bodies[0] as Extract<OperationBody, { kind: 'order' }>).order.findIndex((position) => barrels(entry)[position - 1] === Number(name)) + 1, 0));
      expect(results.order.cells.map((cell) => cell.rankSum)).toEqual(ranks);
      expect(results.order.isShown).toBe(true);
    }
    if (results.profile) {
      const line = results.profile.lines[0]!;
      const means = [...line.cells].sort((a, b) => a.sample - b.sample).map((cell) => cell.mean);
      expect(means).toEqual([...means].sort((a, b) => a - b));
      expect(line.product!.p).toBeLessThan(0.01);
    }
    if (results.ticks) {
      const line = results.ticks.lines[0]!;
      expect(line.counts.every((cell) => cell.of === PEOPLE)).toBe(true);
      expect(line.counts[0]!.ticked).toBeLessThan(line.counts[2]!.ticked);
      if (method === 'free_note') expect(results.said.comments).toHaveLength(3 * PEOPLE);
    }
    if (results.right) expect(results.right.lines[0]!.cells.map((cell) => cell.n)).toEqual([PEOPLE, PEOPLE, PEOPLE]);
    // What R computes from the exported answers is what the report says.
    const zip = new Uint8Array(await (await owner.request(`/api/v1${running.path}/results/reproduce.zip`)).arrayBuffer());
    if (!whyNoR) {
      const { status, counts, text } = reproduce(unpack(zip));
      expect({ status, differ: counts.differ, missing: counts.missing }, text).toEqual({ status: 0, differ: 0, missing: 0 });
    }
    expect([results.profile, results.choice, results.pair, results.order, results.ticks, results.right].filter(Boolean)).toHaveLength(1);
  });
});
