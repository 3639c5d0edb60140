import 'server-only';
import { getDb, type Tx } from '@/db/client';
import { operations, samples, seats, servingSamples, servings, sessions } from '@/db/schema';
import { and, asc, eq, isNotNull, isNull } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import { requireCapability, type Access } from '../auth/access';
import { takeOut } from '../blind/vault';
import { AppError } from '../errors';
import { now } from '../clock';
import { sha256Hex } from '../ids';
import { findSession, requireState, type SessionRow } from './find';

export { sealSession } from './seal';

type Changes = Partial<Omit<SessionRow, 'id' | 'cellarId'>>;

function change(tx: Tx, session: SessionRow, changes: Changes): void {
  const changed = tx
    .update(sessions)
    .set({ ...changes, version: session.version + 1 })
    .where(and(eq(sessions.id, session.id), eq(sessions.state, session.state), eq(sessions.version, session.version)))
    .run();
  if (changed.changes !== 1) throw new AppError('stale');
}

function audit(tx: Tx, access: Access, session: SessionRow, action: string, detail: Record<string, string | number | boolean | null> = {}): void {
  recordAudit(tx, { cellarId: session.cellarId, sessionId: session.id, actorUserId: access.user.id, action, subjectType: 'session', subjectId: session.id, detail });
}

/** Lets seats be claimed and ballots come in. @throws AppError `forbidden`, `not_found`, `wrong_state` */
export function openSession(access: Access, sessionId: string): void {
  requireCapability(access, 'session.run');
  getDb().transaction((tx) => {
    const session = findSession(tx, access.cellar.id, sessionId);
    requireState(session, 'sealed');
    change(tx, session, { state: 'open', openedAt: now() });
    audit(tx, access, session, 'session.opened');
  }, { behavior: 'immediate' });
}

/** Numbers of the seats that were taken, not given up, and have not handed in. */
export function seatsThatOwe(tx: Tx | ReturnType<typeof getDb>, sessionId: string): number[] {
  return tx
    .select({ number: seats.number })
    .from(seats)
    .where(and(eq(seats.sessionId, sessionId), isNotNull(seats.claimedAt), isNull(seats.submittedAt), isNull(seats.leftAt)))
    .orderBy(asc(seats.number))
    .all()
    .map((row) => row.number);
}

/** One hash over every answer that counts, in the order of receipt: it goes into the audit chain. */
function answersDigest(tx: Tx, sessionId: string): { count: number; digest: string } {
  const rows = tx
    .select({ opId: operations.opId, bodyHash: operations.bodyHash })
    .from(operations)
    .where(and(eq(operations.sessionId, sessionId), eq(operations.admission, 'counted')))
    .orderBy(asc(operations.receiptNo))
    .all();
  return { count: rows.length, digest: sha256Hex(rows.map((row) => `${row.opId}:${row.bodyHash}\n`).join('')) };
}

function closeIn(tx: Tx, access: Access, session: SessionRow, reason: string | null): void {
  requireState(session, 'open');
  const owing = seatsThatOwe(tx, session.id);
  if (owing.length > 0 && !reason) {
    throw new AppError('conflict', `Seats ${owing.join(', ')} have not handed in. Wait for them, or close with a reason.`, { reason: 'Say why it is closed without them' });
  }
  const { count, digest } = answersDigest(tx, session.id);
  change(tx, session, { state: 'closed', closedAt: now(), joinCode: null, closeReason: owing.length > 0 ? reason : null });
  audit(tx, access, session, 'session.closed', { answers: count, digest, owing: owing.join(' '), reason });
}

/**
 * Ends all answers: what arrives later is set aside, shown, never counted.
 * @param reason needed when seats still owe answers
 * @throws AppError `conflict` (seats owe and no reason), `forbidden`, `not_found`, `wrong_state`
 */
export function closeSession(access: Access, sessionId: string, reason: string | null): void {
  requireCapability(access, 'session.run');
  getDb().transaction((tx) => closeIn(tx, access, findSession(tx, access.cellar.id, sessionId), reason), { behavior: 'immediate' });
}

/** Writes which sample each serving was, from the sealed plan. */
function writeKey(tx: Tx, session: SessionRow): void {
  const plan = takeOut(tx, session.cellarId, session.id);
  const sampleIds = tx.select({ id: samples.id }).from(samples).where(eq(samples.sessionId, session.id)).orderBy(asc(samples.ordinal)).all();
  const glasses = tx
    .select({ id: servings.id, seat: seats.number, block: servings.block, position: servings.position })
    .from(servings)
    .innerJoin(seats, eq(seats.id, servings.seatId))
    .where(eq(servings.sessionId, session.id))
    .all();
  const byPlace = new Map(glasses.map((glass) => [`${glass.seat}/${glass.block}/${glass.position}`, glass.id]));
  for (const planned of plan.servings) {
    const servingId = byPlace.get(`${planned.seat}/${planned.block}/${planned.position}`);
    const sampleId = sampleIds[planned.sample - 1]?.id;
    if (!servingId || !sampleId) throw new Error('the sealed plan does not fit the servings');
    tx.insert(servingSamples).values({ servingId, cellarId: session.cellarId, sampleId }).run();
  }
}

function unsealIn(tx: Tx, access: Access, session: SessionRow, detail: Record<string, string | boolean> = {}): void {
  requireState(session, 'closed');
  change(tx, session, { state: 'unsealed', unsealedAt: now() });
  writeKey(tx, session);
  audit(tx, access, session, 'session.unsealed', detail);
}

/** Opens the key, after close only. @throws AppError `forbidden`, `not_found`, `wrong_state` */
export function unsealSession(access: Access, sessionId: string): void {
  requireCapability(access, 'session.run');
  getDb().transaction((tx) => unsealIn(tx, access, findSession(tx, access.cellar.id, sessionId)), { behavior: 'immediate' });
}

/** Closes and unseals at once; only an approved early opening calls it. */
export function closeAndUnseal(tx: Tx, access: Access, sessionId: string, reason: string): void {
  const session = findSession(tx, access.cellar.id, sessionId);
  if (session.state === 'sealed') {
    change(tx, session, { state: 'open', openedAt: now() });
    return closeAndUnseal(tx, access, sessionId, reason);
  }
  if (session.state === 'open') {
    closeIn(tx, access, session, reason);
    return closeAndUnseal(tx, access, sessionId, reason);
  }
  unsealIn(tx, access, session, { early: true, reason });
}

/** Gives the session up, from any state, with a reason. Nothing is deleted. */
export function abandonSession(access: Access, sessionId: string, reason: string): void {
  requireCapability(access, 'session.run');
  getDb().transaction((tx) => {
    const session = findSession(tx, access.cellar.id, sessionId);
    if (session.state === 'abandoned') throw new AppError('wrong_state');
    change(tx, session, { state: 'abandoned', abandonedAt: now(), abandonReason: reason, joinCode: null });
    audit(tx, access, session, 'session.abandoned', { from: session.state, reason });
  }, { behavior: 'immediate' });
}
