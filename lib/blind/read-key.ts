import 'server-only';
import { getDb, type Db, type Tx } from '@/db/client';
import type { Method, PourStep } from '@/db/enums';
import { seatPeople, seats, seals, sessionPourers, sessions } from '@/db/schema';
import { and, eq } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import type { Access } from '../auth/access';
import { mayReadKey } from '../auth/permissions';
import { AppError } from '../errors';
import { findSession, requireState } from '../sessions/find';
import type { PlanFile } from './plan-file';
import { takeOut, takeOutText } from './vault';

/** What the person is named to prepare in the session; null for nothing. */
export function stepOf(db: Tx | Db, sessionId: string, userId: string): PourStep | null {
  return db.select({ step: sessionPourers.step }).from(sessionPourers).where(and(eq(sessionPourers.sessionId, sessionId), eq(sessionPourers.userId, userId))).get()?.step ?? null;
}

/** Whether the person is named to pour with the whole key, and so can't taste. */
export const isPourer = (db: Tx | Db, sessionId: string, userId: string): boolean => stepOf(db, sessionId, userId) === 'key';

/** Whether the person holds a seat in the session. */
export function isTaster(db: Tx | Db, sessionId: string, userId: string): boolean {
  return (
    db
      .select({ id: seats.id })
      .from(seats)
      .innerJoin(seatPeople, eq(seatPeople.seatId, seats.id))
      .where(and(eq(seats.sessionId, sessionId), eq(seatPeople.userId, userId)))
      .get() !== undefined
  );
}

/** The key as the pourer needs it. */
export interface PouringKey {
  method: Method;
  commitment: string;
  samples: { sample: number; label: string }[];
  servings: PlanFile['servings'];
}

/**
 * The key, for the pour sheet. Every reading, and every refusal, is in the audit log.
 * @throws AppError `not_found`, `forbidden`
 */
export function readKeyForPouring(access: Access, sessionId: string): PouringKey {
  const db = getDb();
  const session = findSession(db, access.cellar.id, sessionId);
  const allowed = mayReadKey({
    state: session.state,
    wasUnsealed: session.unsealedAt !== null,
    isPourer: isPourer(db, sessionId, access.user.id),
    isTaster: isTaster(db, sessionId, access.user.id),
    roles: access.roles,
  });
  return db.transaction((tx) => {
    recordAudit(tx, {
      cellarId: session.cellarId, sessionId, actorUserId: access.user.id, action: allowed ? 'key.read_for_pouring' : 'key.refused',
      subjectType: 'session', subjectId: sessionId,
    });
    if (!allowed) return null;
    const plan = takeOut(tx, session.cellarId, sessionId);
    const seal = tx.select({ commitment: seals.commitment }).from(seals).where(eq(seals.sessionId, sessionId)).get();
    return {
      method: session.method,
      commitment: seal!.commitment,
      samples: plan.samples.map(({ sample, label }) => ({ sample, label })),
      servings: plan.servings,
    };
  }, { behavior: 'immediate' }) ?? refuse();
}

function refuse(): never {
  throw new AppError('forbidden', 'Before unsealing only the session’s named pourers, who do not taste in it, may read the key.');
}

/** What anybody may know of a commitment. */
export interface Commitment {
  title: string;
  sealedAt: Date;
  isPublished: boolean;
}

/** The session behind a commitment; null when there is none. */
export function findCommitment(commitment: string): Commitment | null {
  const row = getDb()
    .select({ title: sessions.title, sealedAt: seals.sealedAt, unsealedAt: sessions.unsealedAt })
    .from(seals)
    .innerJoin(sessions, eq(sessions.id, seals.sessionId))
    .where(eq(seals.commitment, commitment))
    .get();
  return row ? { title: row.title, sealedAt: row.sealedAt, isPublished: row.unsealedAt !== null } : null;
}

/**
 * The published plan file, to the byte: anybody may have it once the session is unsealed.
 * @throws AppError `not_found`, `wrong_state`
 */
export function publishedPlanFile(commitment: string): string {
  const db = getDb();
  const row = db
    .select({ sessionId: seals.sessionId, cellarId: seals.cellarId, unsealedAt: sessions.unsealedAt })
    .from(seals)
    .innerJoin(sessions, eq(sessions.id, seals.sessionId))
    .where(eq(seals.commitment, commitment))
    .get();
  if (!row) throw new AppError('not_found');
  if (!row.unsealedAt) throw new AppError('wrong_state', 'The plan file is published when the session is unsealed.');
  return takeOutText(db, row.cellarId, row.sessionId);
}

/** One of the two halves of the key. Neither says which code is which sample. */
export type HalfKey =
  | { step: 'letters'; commitment: string; bottles: { letter: string; label: string }[] }
  | { step: 'codes'; commitment: string; bottles: { letter: string; code: string; block: number }[]; servings: Omit<PlanFile['servings'][number], 'sample'>[] };

/**
 * The half of the key that the person is named for in two-step coding; null when it is neither. Who tastes may
 * read it too: that is its point. Every reading is in the audit log.
 * @throws AppError `not_found`, `wrong_state` (not sealed yet, or abandoned)
 */
export function readHalfKey(access: Access, sessionId: string): HalfKey | null {
  const db = getDb();
  const session = findSession(db, access.cellar.id, sessionId);
  const step = stepOf(db, sessionId, access.user.id);
  if (session.coding !== 'two_step' || step === null || step === 'key') return null;
  requireState(session, 'sealed', 'open', 'closed', 'unsealed');
  return db.transaction((tx) => {
    recordAudit(tx, { cellarId: session.cellarId, sessionId, actorUserId: access.user.id, action: `key.read_${step}`, subjectType: 'session', subjectId: sessionId });
    const plan = takeOut(tx, session.cellarId, sessionId);
    const { commitment } = tx.select({ commitment: seals.commitment }).from(seals).where(eq(seals.sessionId, sessionId)).get()!;
    const letterOf = new Map(plan.letters?.map(({ sample, letter }) => [sample, letter]));
    if (step === 'letters') {
      const bottles = plan.samples.map(({ sample, label }) => ({ letter: letterOf.get(sample)!, label }));
      return { step, commitment, bottles: bottles.sort((a, b) => a.label.localeCompare(b.label, 'en', { numeric: true })) };
    }
    const codes = new Map(plan.servings.map(({ block, code, sample }) => [`${block}/${code}`, { letter: letterOf.get(sample)!, code, block }]));
    const bottles = [...codes.values()].sort((a, b) => a.block - b.block || a.letter.localeCompare(b.letter));
    return { step, commitment, bottles, servings: plan.servings.map(({ sample: _, ...serving }) => serving) };
  }, { behavior: 'immediate' });
}
