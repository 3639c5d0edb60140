import 'server-only';
import { getDb, type Tx } from '@/db/client';
import type { SeatRole } from '@/db/enums';
import { seatPeople, seats, sessions } from '@/db/schema';
import { and, asc, eq, isNull } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import type { User } from '../auth/access';
import { seatCookie } from '../auth/cookie';
import { requireTriesLeft, takeTry } from '../auth/limits';
import { findLink, useLink } from '../auth/links';
import { isPourer, isTaster } from '../blind/read-key';
import { now } from '../clock';
import { AppError } from '../errors';
import { newId } from '../ids';
import { findByJoinKey, findSeat, holdSeat, type SeatAccess } from './access';

/**
 * The join key behind six typed digits. Limited by phone and by all wrong tries together, so that
 * six digits can't be guessed; the link in a QR code is not touched by it.
 * @throws AppError `too_many`, `invalid`
 */
export async function findByTypedCode(code: string): Promise<string> {
  const cookie = await seatCookie();
  if (!cookie.device) {
    cookie.device = newId();
    await cookie.save();
  }
  await requireTriesLeft('joinWrong', 'all');
  await takeTry('joinDevice', cookie.device);
  const row = getDb().select({ joinKey: sessions.joinKey }).from(sessions).where(eq(sessions.joinCode, code)).get();
  if (!row?.joinKey) {
    await takeTry('joinWrong', 'all');
    throw new AppError('invalid', 'No session has that code now. Look at the board again.', { code: 'No session has this code' });
  }
  return row.joinKey;
}

/** The first free numbered seat, then the reserves. */
function takeFreeSeat(tx: Tx, sessionId: string, seatRole: SeatRole): typeof seats.$inferSelect {
  const free = tx.select({ id: seats.id }).from(seats).where(and(eq(seats.sessionId, sessionId), isNull(seats.claimedAt))).orderBy(asc(seats.number)).limit(1).get();
  if (!free) throw new AppError('conflict', 'All seats are taken. Tell the leader: more people need a second plan.');
  const at = now();
  return tx
    .update(seats)
    .set({ claimedAt: at, consentedAt: at, seatRole, tokenGeneration: 1, lastHeardAt: at })
    .where(and(eq(seats.id, free.id), isNull(seats.claimedAt)))
    .returning()
    .get();
}

/**
 * Takes a seat for this phone, with the guest's consent.
 * @throws AppError `not_found`, `wrong_state` (not open), `forbidden` (a pourer does not taste), `conflict` (full)
 */
export async function claimSeat(input: { joinKey: string; displayName: string; seatRole: SeatRole }, user: User | null): Promise<void> {
  if (await findSeat(input.joinKey)) return;
  const session = findByJoinKey(input.joinKey);
  if (!session) throw new AppError('not_found');
  if (session.state !== 'open') throw new AppError('wrong_state', session.state === 'sealed' ? 'The session is not open yet. Keep this page: it looks again by itself.' : 'The session is closed; nobody can join any more.');
  const seat = getDb().transaction((tx) => {
    if (user && isPourer(tx, session.id, user.id)) throw new AppError('forbidden', 'You pour in this session and may read its key, so you can’t taste in it.');
    if (user && isTaster(tx, session.id, user.id)) throw new AppError('conflict', 'You hold a seat on another phone. Ask the leader for a new link to it.');
    const taken = takeFreeSeat(tx, session.id, input.seatRole);
    tx.insert(seatPeople).values({ seatId: taken.id, cellarId: taken.cellarId, displayName: input.displayName, userId: user?.id ?? null }).run();
    recordAudit(tx, { cellarId: taken.cellarId, sessionId: session.id, actorSeatId: taken.id, action: 'seat.claimed', subjectType: 'seat', subjectId: taken.id, detail: { number: taken.number } });
    return taken;
  }, { behavior: 'immediate' });
  await holdSeat(seat.id, seat.tokenGeneration);
}

/** Leaves without a reason; what was answered before stays and counts. */
export function leaveSeat({ seat, session }: SeatAccess): void {
  getDb().transaction((tx) => {
    tx.update(seats).set({ leftAt: now() }).where(and(eq(seats.id, seat.id), isNull(seats.leftAt))).run();
    recordAudit(tx, { cellarId: seat.cellarId, sessionId: session.id, actorSeatId: seat.id, action: 'seat.left', subjectType: 'seat', subjectId: seat.id, detail: { number: seat.number } });
  }, { behavior: 'immediate' });
}

/** Whether a reissue link can still be used, and for which session and seat. */
export function findSeatLink(token: string): { title: string; number: number } | null {
  const link = findLink(getDb(), 'seat', token);
  if (!link?.seatId) return null;
  return getDb().select({ title: sessions.title, number: seats.number }).from(seats).innerJoin(sessions, eq(sessions.id, seats.sessionId)).where(eq(seats.id, link.seatId)).get() ?? null;
}

/**
 * Gives the seat of a one-time link to this phone; the former phone's hold ends with it.
 * @returns the session's join key
 * @throws AppError `expired`
 */
export async function takeSeatByLink(token: string): Promise<string> {
  const { seat, joinKey } = getDb().transaction((tx) => {
    const link = useLink(tx, 'seat', token);
    const before = tx.select().from(seats).where(eq(seats.id, link.seatId!)).get()!;
    const taken = tx.update(seats).set({ tokenGeneration: before.tokenGeneration + 1, leftAt: null, lastHeardAt: now() }).where(eq(seats.id, before.id)).returning().get();
    const session = tx.select({ joinKey: sessions.joinKey }).from(sessions).where(eq(sessions.id, taken.sessionId)).get()!;
    recordAudit(tx, { cellarId: taken.cellarId, sessionId: taken.sessionId, actorSeatId: taken.id, action: 'seat.reissued', subjectType: 'seat', subjectId: taken.id, detail: { number: taken.number } });
    return { seat: taken, joinKey: session.joinKey! };
  }, { behavior: 'immediate' });
  await holdSeat(seat.id, seat.tokenGeneration);
  return joinKey;
}
