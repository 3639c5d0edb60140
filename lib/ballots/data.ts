import 'server-only';
import type { Db, Tx } from '@/db/client';
import { operations } from '@/db/schema';
import { and, asc, eq } from 'drizzle-orm';

export type OperationRow = typeof operations.$inferSelect;

/** What an operation speaks of: the later one of the same key takes the earlier one's place. */
const keyOf = (row: OperationRow): string => {
  const line = row.kind === 'score' || row.kind === 'clear' ? `line ${row.item}` : row.kind === 'fault' ? `fault ${row.item}` : row.kind;
  return row.kind === 'choice' ? `${row.block}/choice` : `${row.block}/${row.position}/${line}`;
};

const isLater = (a: OperationRow, b: OperationRow): boolean =>
  a.tokenGeneration !== b.tokenGeneration ? a.tokenGeneration > b.tokenGeneration : a.seq > b.seq;

/**
 * The answers that stand: of each key the latest by holding of the seat and by the phone's own
 * count, whatever the order of arrival. A choice is final: the first stands.
 */
export function latestOperations(rows: readonly OperationRow[]): OperationRow[] {
  const latest = new Map<string, OperationRow>();
  for (const row of rows) {
    const key = `${row.seatId}/${keyOf(row)}`;
    const before = latest.get(key);
    if (!before || (row.kind === 'choice' ? row.receiptNo < before.receiptNo : isLater(row, before))) latest.set(key, row);
  }
  return [...latest.values()];
}

/** The counted answers of one seat that stand now. */
export function standingAnswers(db: Db | Tx, seatId: string): OperationRow[] {
  return latestOperations(
    db.select().from(operations).where(and(eq(operations.seatId, seatId), eq(operations.admission, 'counted'))).orderBy(asc(operations.receiptNo)).all(),
  );
}
