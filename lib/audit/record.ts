import 'server-only';
import { auditEvents } from '@/db/schema';
import type { Db, Tx } from '@/db/client';
import { desc, eq } from 'drizzle-orm';
import { now } from '../clock';
import { sha256Hex } from '../ids';

export interface AuditEntry {
  cellarId: string;
  action: string;
  subjectType: string;
  subjectId: string;
  actorUserId?: string | null;
  actorSeatId?: string | null;
  sessionId?: string | null;
  detail?: Record<string, string | number | boolean | null>;
  /** True when the text could name a barrel: blinded people never see the entry. */
  isBlinding?: boolean;
}

export const CHAIN_START = '0'.repeat(64);

type Chained = Omit<typeof auditEvents.$inferSelect, 'hash'>;

/** The text that an entry's hash is taken of: every column but the hash itself, in a fixed order. */
export function chainText(row: Chained): string {
  return JSON.stringify([
    row.previousHash, row.cellarId, row.seq, row.at.getTime(), row.actorUserId, row.actorSeatId,
    row.action, row.sessionId, row.subjectType, row.subjectId, row.detail, row.isBlinding,
  ]);
}

/**
 * Appends one entry to the cellar's hash chain. Call it inside the transaction of the change that
 * it tells of, so that neither stands without the other.
 */
export function recordAudit(tx: Tx | Db, entry: AuditEntry): void {
  const last = tx.select().from(auditEvents).where(eq(auditEvents.cellarId, entry.cellarId)).orderBy(desc(auditEvents.seq)).limit(1).get();
  const row: Chained = {
    cellarId: entry.cellarId,
    seq: (last?.seq ?? 0) + 1,
    at: now(),
    actorUserId: entry.actorUserId ?? null,
    actorSeatId: entry.actorSeatId ?? null,
    action: entry.action,
    sessionId: entry.sessionId ?? null,
    subjectType: entry.subjectType,
    subjectId: entry.subjectId,
    detail: entry.detail ?? {},
    isBlinding: entry.isBlinding ?? false,
    previousHash: last?.hash ?? CHAIN_START,
  };
  tx.insert(auditEvents).values({ ...row, hash: sha256Hex(chainText(row)) }).run();
}
