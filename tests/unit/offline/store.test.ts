import 'fake-indexeddb/auto';
import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import type { SyncRequest } from '@/lib/ballots/schema';
import { syncSchema } from '@/lib/ballots/schema';
import type { Sheet, SyncResponse } from '@/lib/ballots/types';
import { scoreKey } from '@/lib/offline/answers';
import { openPhoneDatabase, type PhoneDatabase } from '@/lib/offline/database';
import type { Mirror } from '@/lib/offline/mirror';
import { backoff } from '@/lib/offline/pump';
import { SheetStore, type Deliver } from '@/lib/offline/store';
import type { OutboxRow } from '@/lib/offline/types';
import { randomUuid } from '@/lib/offline/uuid';

const sheet = (seatLabel: string): Sheet => ({
  protocol: 1, joinKey: 'abcdefghijklmnop', state: 'open', method: 'profile', ballot: { kind: 'glasses' }, title: 'T', instruction: 'I', seatLabel, seatRole: 'taste', commitment: 'a'.repeat(64),
  handoverKey: 'a'.repeat(64), restS: 0, servingVolumeMl: 30, allergens: [], blocks: [{ block: 1, glasses: [{ position: 1, code: '417' }, { position: 2, code: '523' }] }],
  items: [1, 2].map((item) => ({ item, phase: 'nose' as const, kind: 'line' as const, name: `L${item}`, definition: '', lowAnchor: 'none', highAnchor: 'very strong' })),
  answers: { scores: [], faults: [], choices: [], orders: [], comments: [] }, isSubmitted: false,
});

const noMirror = (): Mirror => ({ read: () => [], write: () => true });
const memoryMirror = (): Mirror & { kept: Map<string, OutboxRow[]> } => {
  const kept = new Map<string, OutboxRow[]>();
  return { kept, read: (key) => structuredClone(kept.get(key) ?? []), write: (key, rows) => (kept.set(key, structuredClone(rows)), true) };
};

/** What a server must do with deliveries: each id once, receipts repeated. */
class IdealServer {
  readonly received = new Map<string, { receiptNo: number; body: string }>();
  take(request: SyncRequest): SyncResponse {
    syncSchema.parse(request);
    const receipts: SyncResponse['receipts'] = [];
    const refused: SyncResponse['refused'] = [];
    for (const op of request.ops) {
      const body = JSON.stringify(op);
      const before = this.received.get(op.opId);
      if (before && before.body !== body) refused.push({ opId: op.opId, code: 'body_changed', message: 'changed' });
      else {
        const receiptNo = before?.receiptNo ?? this.received.size + 1;
        this.received.set(op.opId, { receiptNo, body });
        receipts.push({ opId: op.opId, receiptNo, admission: 'counted' });
      }
    }
    return { protocol: 1, state: 'open', receipts, refused };
  }
}

let names = 0;
const freshDatabase = () => openPhoneDatabase(`test-${(names += 1)}`);

type Fate = 'arrives' | 'lost' | 'answer lost' | 'twice' | 'fault';

describe('the sheet’s store', () => {
  it('brings every answer over once under any schedule of lost, doubled and failed deliveries (1,000 schedules)', async () => {
    const score = fc.record({ position: fc.integer({ min: 1, max: 2 }), item: fc.integer({ min: 1, max: 2 }), value: fc.integer({ min: 0, max: 100 }) });
    const step = fc.oneof({ weight: 3, arbitrary: score.map((s) => ({ tap: s })) }, { weight: 2, arbitrary: fc.constantFrom<Fate>('arrives', 'lost', 'answer lost', 'twice', 'fault').map((fate) => ({ send: fate })) }, { weight: 1, arbitrary: fc.constant({ reload: true }) });
    await fc.assert(
      fc.asyncProperty(fc.array(step, { minLength: 1, maxLength: 14 }), async (steps) => {
        const server = new IdealServer();
        let fate: Fate = 'arrives';
        const deliver: Deliver = async (request) => {
          const sent = structuredClone(request);
          if (fate === 'lost') throw new Error('no signal');
          if (fate === 'fault') return { status: 503, body: null };
          const body = server.take(sent);
          if (fate === 'twice') server.take(sent);
          if (fate === 'answer lost') throw new Error('no signal');
          return { status: 200, body };
        };
        const database = freshDatabase();
        const mirror = memoryMirror();
        const open = async () => {
          const store = new SheetStore({ sheet: sheet('1'), database, mirror, deliver, now: () => 1 });
          await store.load();
          return store;
        };
        let store = await open();
        const ideal = new Map<string, number>();
        let taps = 0;
        for (const one of steps) {
          if ('tap' in one) {
            await store.record({ kind: 'score', block: 1, ...one.tap });
            ideal.set(scoreKey(1, one.tap.position, one.tap.item), one.tap.value);
            taps += 1;
          } else if ('send' in one) {
            fate = one.send;
            await store.flush();
          } else store = await open();
        }
        fate = 'arrives';
        expect(await store.flush()).toBe(true);
        expect(server.received.size).toBe(taps);
        const { answers, waiting, refused, received } = store.getState();
        expect({ waiting, refused: refused.length, received }).toEqual({ waiting: 0, refused: 0, received: taps });
        expect(answers.size).toBe(ideal.size);
        for (const [key, value] of ideal) expect(answers.get(key)).toMatchObject({ op: { kind: 'score', value }, state: 'received' });
        // The phone's count gives the server the same order.
        const ops = [...server.received.values()].map(({ body }) => JSON.parse(body));
        expect(new Set(ops.map((op) => op.seq)).size).toBe(taps);
      }),
      { numRuns: 1000 },
    );
  }, 120_000);

  it('says loudly when nothing can be kept, tries again by itself, and loses nothing', async () => {
    let isFull = true;
    const kept: string[] = [];
    const disk: Pick<PhoneDatabase, 'load' | 'keep'> = {
      load: async () => ({ rows: [], meta: null }),
      keep: async (rows) => {
        if (isFull) throw new DOMException('full', 'QuotaExceededError');
        kept.push(...rows.map((row) => row.opId));
      },
    };
    const store = new SheetStore({ sheet: sheet('1'), database: disk, mirror: { read: () => [], write: () => false }, deliver: () => Promise.reject(new Error('no signal')) });
    await store.load();
    await store.record({ kind: 'score', block: 1, position: 1, item: 1, value: 5 });
    expect(store.getState()).toMatchObject({ isLost: true, isUnkept: true });
    isFull = false;
    await vi.waitFor(() => expect(store.getState()).toMatchObject({ isLost: false, isUnkept: false, waiting: 1 }), { timeout: 8_000 });
    expect(kept).toHaveLength(1);
  });

  it('says "sent" between sending and the receipt, and "on this phone" again when no answer came', async () => {
    const answers: ((error: Error) => void)[] = [];
    const store = new SheetStore({ sheet: sheet('1'), database: { load: async () => ({ rows: [], meta: null }), keep: async () => {} }, mirror: noMirror(), deliver: () => new Promise((_, reject) => answers.push(reject)) });
    await store.load();
    await store.record({ kind: 'score', block: 1, position: 1, item: 1, value: 5 });
    const stateOf = () => store.getState().answers.get('1/1/line/1')!.state;
    expect(stateOf()).toBe('on-phone');
    const flushed = store.flush();
    await vi.waitFor(() => expect(stateOf()).toBe('sent'));
    expect(store.getState()).toMatchObject({ waiting: 0, sent: 1 });
    answers[0]!(new Error('cut off'));
    expect(await flushed).toBe(false);
    expect(stateOf()).toBe('on-phone');
    expect(store.getState()).toMatchObject({ waiting: 1, sent: 0, trouble: 'no-signal' });
  });

  it('nags about what has waited for more than a day', async () => {
    let now = 1_796_000_000_000;
    const store = new SheetStore({ sheet: sheet('1'), database: { load: async () => ({ rows: [], meta: null }), keep: async () => {} }, mirror: noMirror(), deliver: () => Promise.reject(new Error('no signal')), now: () => now });
    await store.load();
    await store.record({ kind: 'score', block: 1, position: 1, item: 1, value: 5 });
    expect(store.getState().isOld).toBe(false);
    now += 25 * 60 * 60 * 1000;
    await store.flush();
    expect(store.getState().isOld).toBe(true);
  });

  it('says "on this phone" only after the database has it, and "received" only with a receipt', async () => {
    let finish = () => {};
    const slow: Pick<PhoneDatabase, 'load' | 'keep'> = { load: async () => ({ rows: [], meta: null }), keep: () => new Promise((resolve) => { finish = resolve; }) };
    const server = new IdealServer();
    const store = new SheetStore({ sheet: sheet('1'), database: slow, mirror: noMirror(), deliver: async (request) => ({ status: 200, body: server.take(request) }) });
    await store.load();
    const kept = store.record({ kind: 'score', block: 1, position: 1, item: 1, value: 5 });
    await Promise.resolve();
    const stateOf = () => store.getState().answers.get(scoreKey(1, 1, 1))!.state;
    expect(stateOf()).toBe('saving');
    await new Promise((resolve) => setTimeout(resolve));
    finish();
    await kept;
    expect(stateOf()).toBe('on-phone');
    const sending = store.flush();
    await new Promise((resolve) => setTimeout(resolve));
    finish();
    await sending;
    expect(stateOf()).toBe('received');
  });

  it('falls back to the mirror when the database is dead, and says so when even that fails', async () => {
    const dead: Pick<PhoneDatabase, 'load' | 'keep'> = { load: () => Promise.reject(new Error('connection lost')), keep: () => Promise.reject(new Error('connection lost')) };
    const mirror = memoryMirror();
    const deliver: Deliver = async () => { throw new Error('no signal'); };
    const store = new SheetStore({ sheet: sheet('1'), database: dead, mirror, deliver });
    await store.load();
    await store.record({ kind: 'score', block: 1, position: 1, item: 1, value: 5 });
    expect(store.getState()).toMatchObject({ isUnkept: false, waiting: 1 });
    const again = new SheetStore({ sheet: sheet('1'), database: dead, mirror, deliver });
    await again.load();
    expect(again.getState().answers.get(scoreKey(1, 1, 1))).toMatchObject({ op: { value: 5 } });
    const nothing = new SheetStore({ sheet: sheet('1'), database: dead, mirror: { read: () => [], write: () => false }, deliver });
    await nothing.load();
    await nothing.record({ kind: 'score', block: 1, position: 1, item: 1, value: 5 });
    expect(nothing.getState().isUnkept).toBe(true);
  });

  it('keeps its outbox through a 401, and never sends one seat’s answers as another’s', async () => {
    const database = freshDatabase();
    let status = 401;
    const server = new IdealServer();
    const deliver: Deliver = async (request) => (status === 401 ? { status, body: null } : { status: 200, body: server.take(request) });
    const first = new SheetStore({ sheet: sheet('1'), database, mirror: noMirror(), deliver });
    await first.load();
    await first.record({ kind: 'score', block: 1, position: 1, item: 1, value: 5 });
    expect(await first.flush()).toBe(false);
    expect(first.getState()).toMatchObject({ trouble: 'no-seat', waiting: 1 });
    status = 200;
    const other = new SheetStore({ sheet: sheet('2'), database, mirror: noMirror(), deliver });
    await other.load();
    await other.flush();
    expect(server.received.size).toBe(0);
    expect(await first.flush()).toBe(true);
    expect(server.received.size).toBe(1);
  });

  it('shows and keeps what is refused for good, and goes on with the rest', async () => {
    const deliver: Deliver = async ({ ops }) => ({ status: 200, body: { protocol: 1, state: 'open', receipts: ops.slice(1).map((op, i) => ({ opId: op.opId, receiptNo: i + 1, admission: 'counted' as const })), refused: [{ opId: ops[0]!.opId, code: 'no_such_line', message: 'The ballot has no such line.' }] } });
    const store = new SheetStore({ sheet: sheet('1'), database: freshDatabase(), mirror: noMirror(), deliver });
    await store.load();
    await store.record({ kind: 'score', block: 1, position: 1, item: 1, value: 5 });
    await store.record({ kind: 'score', block: 1, position: 2, item: 1, value: 6 });
    await store.flush();
    expect(store.getState()).toMatchObject({ waiting: 0, received: 1, refused: [{ message: 'The ballot has no such line.' }] });
  });
});

describe('small parts', () => {
  it('ids are version 4 and differ (RFC 9562)', () => {
    const ids = Array.from({ length: 1000 }, randomUuid);
    expect(new Set(ids).size).toBe(1000);
    for (const id of ids) expect(id).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
  });

  it('waits between half a second and a minute, longer after each failure', () => {
    for (let failures = 0; failures < 40; failures += 1) {
      expect(backoff(failures, () => 0)).toBeGreaterThanOrEqual(500);
      expect(backoff(failures, () => 0.999)).toBeLessThanOrEqual(60_000);
    }
    expect(backoff(5, () => 0.5)).toBeGreaterThan(backoff(1, () => 0.5));
  });
});
