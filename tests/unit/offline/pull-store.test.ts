import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { PullStore } from '@/lib/offline/pull-store';
import type { PullRow } from '@/lib/offline/types';
import { randomUuid } from '@/lib/offline/uuid';
import type { PhonePull, PullsAnswer } from '@/lib/pulls/schema';

const pull = (at: number): PhonePull => ({
  opId: randomUuid(), vesselId: randomUuid(), pulledAt: at, drawMethod: 'nail', volumeMl: 100, temperatureC: null, evaporationS: 60, isVented: true, isHissHeard: false, isToppedUp: true, colour: '', note: '',
});

/** A phone's disk that outlives the page. */
class Disk {
  rows = new Map<string, PullRow>();
  loadPulls = async () => [...this.rows.values()];
  keepPulls = async (rows: readonly PullRow[]) => {
    for (const row of rows) this.rows.set(row.opId, row);
  };
}

type Fate = 'arrives' | 'lost before' | 'lost after' | 'signed out' | 'fails';

describe('the pull sheet’s store', () => {
  it('brings every pull to the server once, through lost and doubled deliveries and reloads', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(fc.constantFrom<Fate | 'pull' | 'reload'>('arrives', 'lost before', 'lost after', 'signed out', 'fails', 'pull', 'pull', 'reload'), { maxLength: 25 }), async (events) => {
        const disk = new Disk();
        const server: string[] = [];
        let fate: Fate = 'arrives';
        const deliver = async (pulls: readonly PhonePull[]): Promise<{ status: number; body: PullsAnswer | null }> => {
          if (fate === 'lost before') throw new Error('no network');
          if (fate === 'signed out') return { status: 401, body: null };
          if (fate === 'fails') return { status: 500, body: null };
          for (const { opId } of pulls) if (!server.includes(opId)) server.push(opId);
          if (fate === 'lost after') throw new Error('answer lost');
          return { status: 200, body: { protocol: 1, received: pulls.map(({ opId }) => opId), refused: [] } };
        };
        const open = async () => {
          const store = new PullStore({ cellar: 'c', userId: 'u', database: disk, deliver });
          await store.load();
          return store;
        };
        let store = await open();
        const made: string[] = [];
        for (const event of events) {
          if (event === 'reload') store = await open();
          else if (event === 'pull') {
            const next = pull(made.length);
            made.push(next.opId);
            expect(await store.record(next, '31', '25-T')).toBe(true);
          } else {
            fate = event;
            await store.flush();
          }
        }
        fate = 'arrives';
        expect(await store.flush()).toBe(true);
        expect(server.toSorted()).toEqual(made.toSorted());
        expect(store.getState().rows.every((row) => row.state === 'received')).toBe(true);
      }),
      { seed: 4, numRuns: 150 },
    );
  });

  it('shows and keeps a refusal, and sends the others', async () => {
    const disk = new Disk();
    const [bad, good] = [pull(1), pull(2)];
    const store = new PullStore({ cellar: 'c', userId: 'u', database: disk, deliver: async () => ({ status: 200, body: { protocol: 1, received: [good.opId], refused: [{ opId: bad.opId, message: 'no wine' }] } }) });
    await store.load();
    await store.record(bad, '31', 'x');
    await store.record(good, '32', 'x');
    await store.flush();
    expect(disk.rows.get(bad.opId)).toMatchObject({ state: 'refused', message: 'no wine' });
    expect(store.getState().waiting).toBe(0);
  });

  it('never sends the pulls of another hand or cellar on the same phone', async () => {
    const disk = new Disk();
    const first = new PullStore({ cellar: 'c', userId: 'ines', database: disk, deliver: async () => ({ status: 500, body: null }) });
    await first.load();
    await first.record(pull(1), '31', 'x');
    const sent: unknown[] = [];
    const second = new PullStore({ cellar: 'c', userId: 'bram', database: disk, deliver: async (pulls) => (sent.push(pulls), { status: 200, body: null }) });
    await second.load();
    await second.flush();
    expect(sent).toEqual([]);
  });

  it('says so when the phone can keep nothing', async () => {
    const store = new PullStore({ cellar: 'c', userId: 'u', database: { loadPulls: async () => [], keepPulls: () => Promise.reject(new Error('full')) }, deliver: async () => ({ status: 200, body: null }) });
    await store.load();
    expect(await store.record(pull(1), '31', 'x')).toBe(false);
    expect(store.getState().isLost).toBe(true);
  });

  it('goes on saying so until that very pull is kept, and tries it again with the next', async () => {
    const disk = new Disk();
    let isFull = true;
    const database = { loadPulls: disk.loadPulls, keepPulls: (rows: readonly PullRow[]) => (isFull ? Promise.reject(new Error('full')) : disk.keepPulls(rows)) };
    const store = new PullStore({ cellar: 'c', userId: 'u', database, deliver: async () => Promise.reject(new Error('no network')) });
    await store.load();
    const [first, second] = [pull(1), pull(2)];
    await store.record(first, '31', 'x');
    await store.flush();
    expect(store.getState().isLost).toBe(true);
    isFull = false;
    expect(await store.record(second, '32', 'x')).toBe(true);
    expect([...disk.rows.keys()].toSorted()).toEqual([first.opId, second.opId].toSorted());
    expect(store.getState().isLost).toBe(false);
  });
});
