import 'server-only';
import { seals } from '@/db/schema';
import type { Db, Tx } from '@/db/client';
import { and, eq } from 'drizzle-orm';
import { AppError } from '../errors';
import { sha256Hex } from '../ids';
import { decrypt, encrypt } from './cipher';
import { canonicalText, parsePlanFile, type PlanFile } from './plan-file';

/**
 * The one place that puts a key to rest and takes it out. Nothing outside `lib/blind`, the demo and the
 * session's life cycle calls it; every call of `takeOut` stands beside an audit entry.
 */

/** Seals the plan. @returns the commitment that is published at once */
export function putAway(tx: Tx, cellarId: string, plan: PlanFile, sealedAt: Date): string {
  const text = canonicalText(plan);
  const commitment = sha256Hex(text);
  const sealed = encrypt(text, plan.session.id, commitment);
  tx.insert(seals).values({ sessionId: plan.session.id, cellarId, ...sealed, commitment, sealedAt }).run();
  return commitment;
}

/** The exact text of the sealed file. @throws AppError `not_found`; Error when the seal is damaged */
export function takeOutText(db: Tx | Db, cellarId: string, sessionId: string): string {
  const row = db.select().from(seals).where(and(eq(seals.sessionId, sessionId), eq(seals.cellarId, cellarId))).get();
  if (!row) throw new AppError('not_found');
  const text = decrypt(row, sessionId, row.commitment);
  if (sha256Hex(text) !== row.commitment) throw new Error('the sealed plan does not fit its commitment');
  return text;
}

export const takeOut = (db: Tx | Db, cellarId: string, sessionId: string): PlanFile => parsePlanFile(takeOutText(db, cellarId, sessionId));
