import type { SessionState } from '@/db/enums';
import type { Operation, OperationBody, SyncRequest } from '../ballots/schema';
import type { Sheet, SyncResponse } from '../ballots/types';
import { standing, type Answer } from './answers';
import type { PhoneDatabase } from './database';
import type { Mirror } from './mirror';
import type { OutboxRow, Place, SheetMeta } from './types';
import { randomUuid } from './uuid';

/** Most operations in one delivery (the handler's own limit). */
const BATCH = 200;

/** How soon what could not be kept is tried again. */
const RETRY_MS = 3_000;

/** From this age on an unsent answer is worth a nag. */
const OLD_MS = 24 * 60 * 60 * 1000;

export interface SheetState {
  isReady: boolean;
  answers: ReadonlyMap<string, Answer>;
  place: Place | null;
  /** Kept on this phone, not on its way. */
  waiting: number;
  /** Handed to the network, no receipt yet; back to `waiting` when no answer comes. */
  sent: number;
  /** Not kept on this phone yet. */
  isUnkept: boolean;
  /** Tried and could not be kept anywhere: say so, loudly. It is tried again. */
  isLost: boolean;
  /** Something has waited for more than a day. */
  isOld: boolean;
  refused: readonly OutboxRow[];
  received: number;
  /** The highest receipt number; 0 before the first. */
  lastReceipt: number;
  late: number;
  sessionState: SessionState;
  /** Why the last delivery failed; null when it did not. */
  trouble: 'no-signal' | 'no-seat' | 'not-understood' | null;
}

/** Brings a delivery to the server. @throws on no answer; `status` tells 200 and 422 from the rest */
export type Deliver = (request: SyncRequest) => Promise<{ status: number; body: SyncResponse | null }>;

export interface StoreParts {
  sheet: Sheet;
  database: Pick<PhoneDatabase, 'load' | 'keep'>;
  mirror: Mirror;
  deliver: Deliver;
  now?: () => number;
}

/** The sheet's own store: every tap is kept on the phone first, then sent until it has a receipt. */
export class SheetStore {
  readonly sheetKey: string;
  private rows = new Map<string, OutboxRow>();
  private meta: SheetMeta;
  private listeners = new Set<() => void>();
  private unkept = new Set<string>();
  private sent = new Set<string>();
  private isLost = false;
  private retry: ReturnType<typeof setTimeout> | undefined;
  private writing: Promise<void> = Promise.resolve();
  private delivering: Promise<boolean> | null = null;
  private sessionState: SessionState;
  private trouble: SheetState['trouble'] = null;
  private isReady = false;
  private snapshot: SheetState;

  constructor(private readonly parts: StoreParts) {
    const { sheet } = parts;
    this.sheetKey = `${sheet.joinKey}/${sheet.seatLabel}`;
    this.sessionState = sheet.state;
    this.meta = { sheetKey: this.sheetKey, deviceId: randomUuid(), nextSeq: 1, place: null };
    this.snapshot = this.derive();
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  getState = (): SheetState => this.snapshot;

  /** Reads what this phone kept, from its database and from the mirror. */
  async load(): Promise<void> {
    let kept: Awaited<ReturnType<PhoneDatabase['load']>> = { rows: [], meta: null };
    try {
      kept = await this.parts.database.load(this.sheetKey);
    } catch {
      // Without a database the mirror is all there is.
    }
    for (const row of [...kept.rows, ...this.parts.mirror.read(this.sheetKey)]) {
      if (!this.rows.has(row.opId)) this.rows.set(row.opId, row);
    }
    if (kept.meta) this.meta = kept.meta;
    const lastSeq = Math.max(0, ...[...this.rows.values()].map((row) => row.op.seq));
    this.meta = { ...this.meta, nextSeq: Math.max(this.meta.nextSeq, lastSeq + 1) };
    this.isReady = true;
    this.changed();
  }

  /** Keeps one answer; resolves when it is on this phone (or could not be: see `isUnkept`). */
  async record(body: OperationBody): Promise<void> {
    const op: Operation = {
      opId: randomUuid(),
      deviceId: this.meta.deviceId,
      seq: this.meta.nextSeq,
      clientAt: (this.parts.now ?? Date.now)(),
      body: Object.freeze({ ...body }) as OperationBody,
    };
    this.meta = { ...this.meta, nextSeq: op.seq + 1 };
    const row: OutboxRow = { opId: op.opId, sheetKey: this.sheetKey, op, state: 'waiting' };
    this.rows.set(op.opId, row);
    this.unkept.add(op.opId);
    this.changed();
    await this.write([row]);
  }

  /** Remembers where the panelist is. */
  async moveTo(place: Place): Promise<void> {
    this.meta = { ...this.meta, place };
    this.changed();
    await this.write([]);
  }

  private write(rows: OutboxRow[]): Promise<void> {
    const run = async () => {
      const isMirrored = this.parts.mirror.write(this.sheetKey, this.waitingRows());
      let isKept = false;
      try {
        await this.parts.database.keep(rows, this.meta);
        isKept = true;
      } catch {
        isKept = isMirrored;
      }
      if (isKept) for (const row of rows) this.unkept.delete(row.opId);
      this.isLost = this.unkept.size > 0 && !isKept;
      clearTimeout(this.retry);
      if (this.isLost) this.retry = setTimeout(() => void this.write([...this.unkept].flatMap((opId) => this.rows.get(opId) ?? [])), RETRY_MS);
      this.changed();
    };
    // One after the other: a later state of a row must not be overtaken by an earlier one.
    this.writing = this.writing.then(run, run);
    return this.writing;
  }

  private waitingRows(): OutboxRow[] {
    return [...this.rows.values()].filter((row) => row.state === 'waiting').sort((a, b) => a.op.seq - b.op.seq);
  }

  /**
   * Sends what waits. Deliveries never overlap in this page; overlapping ones of two pages do no
   * harm, since the server knows each operation by its id.
   * @returns whether everything has a receipt or a refusal now
   */
  flush(): Promise<boolean> {
    this.delivering ??= this.deliverAll().finally(() => {
      this.delivering = null;
    });
    return this.delivering;
  }

  private async deliverAll(): Promise<boolean> {
    await this.writing;
    for (;;) {
      const waiting = this.waitingRows();
      const batch = waiting.slice(0, BATCH);
      const { place } = this.meta;
      this.sent = new Set(batch.map((row) => row.opId));
      this.changed();
      let answer: Awaited<ReturnType<Deliver>>;
      try {
        answer = await this.parts.deliver({
          protocol: 1,
          joinKey: this.parts.sheet.joinKey,
          at: place && { block: place.block, position: place.position, phase: place.phase },
          onPhone: waiting.length - batch.length,
          ops: batch.map((row) => row.op),
        });
      } catch {
        return this.fail('no-signal');
      }
      this.sent.clear();
      if (answer.status === 401) return this.fail('no-seat');
      if (!answer.body || (answer.status !== 200 && answer.status !== 422)) return this.fail(answer.status >= 500 || answer.status === 429 ? 'no-signal' : 'not-understood');
      this.trouble = null;
      await this.settle(answer.body);
      if (this.waitingRows().length === 0) return true;
      if (answer.body.receipts.length + answer.body.refused.length === 0) return this.fail('not-understood');
    }
  }

  private fail(trouble: SheetState['trouble']): boolean {
    this.sent.clear();
    this.trouble = trouble;
    this.changed();
    return false;
  }

  private async settle(body: SyncResponse): Promise<void> {
    this.sessionState = body.state;
    const settled: OutboxRow[] = [];
    for (const { opId, receiptNo, admission } of body.receipts) {
      const row = this.rows.get(opId);
      if (row) settled.push({ ...row, state: 'received', receiptNo, isLate: admission === 'late' });
    }
    for (const { opId, message } of body.refused) {
      const row = this.rows.get(opId);
      if (row && row.state === 'waiting') settled.push({ ...row, state: 'refused', message });
    }
    for (const row of settled) this.rows.set(row.opId, row);
    this.changed();
    if (settled.length > 0) await this.write(settled);
  }

  private derive(): SheetState {
    const rows = [...this.rows.values()];
    const answers = standing(this.parts.sheet.answers, rows);
    const under = new Map(rows.map((row) => [row.op.body, row.opId]));
    for (const answer of answers.values()) {
      const opId = answer.op && under.get(answer.op);
      if (opId && this.unkept.has(opId)) answer.state = 'saving';
      else if (opId && this.sent.has(opId)) answer.state = 'sent';
    }
    const waiting = rows.filter((row) => row.state === 'waiting');
    const oldest = Math.min(...waiting.map((row) => row.op.clientAt));
    return {
      isReady: this.isReady,
      answers,
      place: this.meta.place,
      waiting: waiting.filter((row) => !this.sent.has(row.opId)).length,
      sent: waiting.filter((row) => this.sent.has(row.opId)).length,
      isUnkept: this.unkept.size > 0,
      isLost: this.isLost,
      isOld: oldest < (this.parts.now ?? Date.now)() - OLD_MS,
      refused: rows.filter((row) => row.state === 'refused'),
      received: rows.filter((row) => row.state === 'received' && !row.isLate).length,
      lastReceipt: Math.max(0, ...rows.map((row) => row.receiptNo ?? 0)),
      late: rows.filter((row) => row.isLate).length,
      sessionState: this.sessionState,
      trouble: this.trouble,
    };
  }

  /** What the server has no receipt for, in the phone's order: what a handover by code carries. */
  owed(): Operation[] {
    return this.waitingRows().map((row) => row.op);
  }

  private changed(): void {
    this.snapshot = this.derive();
    for (const listener of this.listeners) listener();
  }
}
