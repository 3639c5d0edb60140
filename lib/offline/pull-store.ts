import type { PhonePull, PullsAnswer } from '../pulls/schema';
import type { PhoneDatabase } from './database';
import type { PullRow } from './types';

export interface PullState {
  isReady: boolean;
  /** This hand's pulls in this cellar, newest first. */
  rows: readonly PullRow[];
  waiting: number;
  /** Something could not be kept on this phone. */
  isLost: boolean;
  trouble: 'no-signal' | 'signed-out' | null;
}

export interface PullParts {
  cellar: string;
  userId: string;
  database: Pick<PhoneDatabase, 'loadPulls' | 'keepPulls'>;
  /** @throws on no answer */
  deliver(pulls: readonly PhonePull[]): Promise<{ status: number; body: PullsAnswer | null }>;
}

/** Most pulls in one delivery (the handler's own limit). */
const BATCH = 100;

/** The pull sheet's own store: each pull is kept on the phone before the screen says so, then sent. */
export class PullStore {
  private rows = new Map<string, PullRow>();
  private listeners = new Set<() => void>();
  private delivering: Promise<boolean> | null = null;
  private isReady = false;
  /** Ids of pulls that are in this page only: the phone would not keep them. */
  private unkept = new Set<string>();
  private isUnreadable = false;
  private trouble: PullState['trouble'] = null;
  private snapshot: PullState;

  constructor(private readonly parts: PullParts) {
    this.snapshot = this.derive();
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  getState = (): PullState => this.snapshot;

  /** Reads what this phone kept for this hand and cellar. */
  async load(): Promise<void> {
    try {
      for (const row of await this.parts.database.loadPulls()) {
        if (row.cellar === this.parts.cellar && row.userId === this.parts.userId) this.rows.set(row.opId, row);
      }
    } catch {
      this.isUnreadable = true;
    }
    this.isReady = true;
    this.changed();
  }

  /** Keeps a pull. @returns whether it is on this phone */
  async record(pull: PhonePull, barrel: string, lot: string): Promise<boolean> {
    const row: PullRow = { opId: pull.opId, cellar: this.parts.cellar, userId: this.parts.userId, barrel, lot, pull: Object.freeze({ ...pull }), state: 'waiting' };
    this.rows.set(row.opId, row);
    return this.write([row]);
  }

  /** Writes these and whatever could not be kept before. @returns whether all of it is on this phone */
  private async write(rows: readonly PullRow[]): Promise<boolean> {
    for (const row of rows) this.unkept.add(row.opId);
    const owed = [...this.unkept].flatMap((opId) => this.rows.get(opId) ?? []);
    try {
      await this.parts.database.keepPulls(owed);
      // A later state of the same pull may have come meanwhile; it has a write of its own.
      for (const row of owed) if (this.rows.get(row.opId) === row) this.unkept.delete(row.opId);
      this.isUnreadable = false;
    } catch {
      // They stay in `unkept`, which is what the screen says.
    }
    this.changed();
    return this.unkept.size === 0;
  }

  /** Sends what waits. @returns whether nothing waits any more */
  flush(): Promise<boolean> {
    this.delivering ??= this.deliverAll().finally(() => {
      this.delivering = null;
    });
    return this.delivering;
  }

  private async deliverAll(): Promise<boolean> {
    if (this.unkept.size > 0) await this.write([]);
    for (;;) {
      const waiting = [...this.rows.values()].filter((row) => row.state === 'waiting').slice(0, BATCH);
      if (waiting.length === 0) {
        this.trouble = null;
        this.changed();
        return true;
      }
      let answer: Awaited<ReturnType<PullParts['deliver']>>;
      try {
        answer = await this.parts.deliver(waiting.map((row) => row.pull));
      } catch {
        return this.fail('no-signal');
      }
      if (answer.status === 401 || answer.status === 403 || answer.status === 404) return this.fail('signed-out');
      if (answer.status !== 200 || !answer.body) return this.fail('no-signal');
      const { received, refused } = answer.body;
      const settled = waiting.flatMap((row): PullRow[] => {
        const refusal = refused.find((entry) => entry.opId === row.opId);
        if (refusal) return [{ ...row, state: 'refused', message: refusal.message }];
        return received.includes(row.opId) ? [{ ...row, state: 'received' }] : [];
      });
      if (settled.length === 0) return this.fail('no-signal');
      for (const row of settled) this.rows.set(row.opId, row);
      await this.write(settled);
    }
  }

  private fail(trouble: PullState['trouble']): boolean {
    this.trouble = trouble;
    this.changed();
    return false;
  }

  private derive(): PullState {
    const rows = [...this.rows.values()].sort((a, b) => b.pull.pulledAt - a.pull.pulledAt);
    return { isReady: this.isReady, rows, waiting: rows.filter((row) => row.state === 'waiting').length, isLost: this.isUnreadable || this.unkept.size > 0, trouble: this.trouble };
  }

  private changed(): void {
    this.snapshot = this.derive();
    for (const listener of this.listeners) listener();
  }
}
