import 'server-only';
import { sessions } from '@/db/schema';
import type { Db, Tx } from '@/db/client';
import type { SessionState } from '@/db/enums';
import { and, eq } from 'drizzle-orm';
import { AppError } from '../errors';

export type SessionRow = typeof sessions.$inferSelect;

/** The session of that cellar. @throws AppError `not_found` (unknown, or another cellar's) */
export function findSession(db: Tx | Db, cellarId: string, sessionId: string): SessionRow {
  const row = db.select().from(sessions).where(and(eq(sessions.id, sessionId), eq(sessions.cellarId, cellarId))).get();
  if (!row) throw new AppError('not_found');
  return row;
}

/** @throws AppError `wrong_state` unless the session is in one of the states */
export function requireState(row: SessionRow, ...states: SessionState[]): void {
  if (states.includes(row.state)) return;
  throw new AppError('wrong_state', `The session is ${row.state}; that needs it to be ${states.join(' or ')}.`);
}
