import 'server-only';
import { getDb, type Db, type Tx } from '@/db/client';
import type { Method } from '@/db/enums';
import { seatPeople, seats, seals, sessionPourers, sessions } from '@/db/schema';
import { and, eq } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import type { Access } from '../auth/access';
import { mayReadKey } from '../auth/permissions';
import { AppError } from '../errors';
import { findSession } from '../sessions/find';
import type { PlanFile } from './plan-file';
import { takeOut, takeOutText } from './vault';

/** Whether the person is named to pour in the session. */
export function isPourer(db: Tx | Db, sessionId: string, userId: string): boolean {
  return db.select().from(sessionPourers).where(and(eq(sessionPourers.sessionId, sessionId), eq(sessionPourers.userId, userId))).get() !== undefined;
}

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
