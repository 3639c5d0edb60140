import 'server-only';
import type { seats } from '@/db/schema';
import { readSeatCookie, seatCookie } from '../auth/cookie';
import { statements } from '../ballots/statements';
import { AppError } from '../errors';
import type { SessionRow } from '../sessions/find';

export type SeatRow = typeof seats.$inferSelect;

/** A phone's proven hold of one seat. Made only here. */
export interface SeatAccess {
  seat: SeatRow;
  session: SessionRow;
}

/** The session behind a join link; null when there is none. */
export const findByJoinKey = (joinKey: string): SessionRow | null =>
  statements().sessionByJoinKey.get({ joinKey }) ?? null;

/** The seat that this phone holds in the session; null when it holds none (or its seat was given to another phone). */
export async function findSeat(joinKey: string): Promise<SeatAccess | null> {
  const session = findByJoinKey(joinKey);
  if (!session) return null;
  const { seats: held = [] } = await readSeatCookie();
  for (const { seatId, generation } of held) {
    const seat = statements().heldSeat.get({ seatId, sessionId: session.id });
    if (seat && seat.tokenGeneration === generation) return { seat, session };
  }
  return null;
}

/** @throws AppError `unauthenticated`: nothing on the phone is lost by it */
export async function requireSeat(joinKey: string): Promise<SeatAccess> {
  const access = await findSeat(joinKey);
  if (!access) throw new AppError('unauthenticated', 'This phone holds no seat here. Join again, or ask the leader for a new link to your seat.');
  return access;
}

/** Puts a seat into the phone's cookie. */
export async function holdSeat(seatId: string, generation: number): Promise<void> {
  const cookie = await seatCookie();
  // A phone that tastes often keeps its last seats only: a cookie holds about 4 kB.
  cookie.seats = [{ seatId, generation }, ...(cookie.seats ?? []).filter((held) => held.seatId !== seatId)].slice(0, 8);
  await cookie.save();
}
