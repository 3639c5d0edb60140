import 'server-only';
import type { Db, Tx } from '@/db/client';
import { operations } from '@/db/schema';
import { and, asc, eq } from 'drizzle-orm';
import { standingOperations } from './standing';

/** The counted answers of one seat that stand now. */
export function standingAnswers(db: Db | Tx, seatId: string): (typeof operations.$inferSelect)[] {
  const counted = db.select().from(operations).where(and(eq(operations.seatId, seatId), eq(operations.admission, 'counted'))).orderBy(asc(operations.receiptNo)).all();
  return standingOperations(counted).standing;
}
