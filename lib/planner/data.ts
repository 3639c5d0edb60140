import 'server-only';
import type { Db } from '@/db/client';
import { seats, sessions } from '@/db/schema';
import { and, count, desc, eq, isNotNull } from 'drizzle-orm';

/** Ids of the cellar's unsealed profile sessions, the newest first. */
export const listPastProfiles = (db: Db, cellarId: string, limit: number): string[] =>
  db
    .select({ id: sessions.id })
    .from(sessions)
    .where(and(eq(sessions.cellarId, cellarId), eq(sessions.method, 'profile'), eq(sessions.state, 'unsealed'), isNotNull(sessions.unsealedAt)))
    .orderBy(desc(sessions.unsealedAt))
    .limit(limit)
    .all()
    .map((row) => row.id);

/** The most ballots that were handed in at one of the cellar's unsealed sessions; 0 when there is none. */
export function mostBallots(db: Db, cellarId: string): number {
  const row = db
    .select({ n: count() })
    .from(seats)
    .innerJoin(sessions, eq(sessions.id, seats.sessionId))
    .where(and(eq(seats.cellarId, cellarId), eq(sessions.state, 'unsealed'), isNotNull(seats.submittedAt)))
    .groupBy(seats.sessionId)
    .orderBy(desc(count()))
    .limit(1)
    .get();
  return row?.n ?? 0;
}
