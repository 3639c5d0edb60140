import 'server-only';
import { getDb, type Tx } from '@/db/client';
import { calls, fills } from '@/db/schema';
import { and, eq, isNull } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import { requireCapability, type Access } from '../auth/access';
import { now } from '../clock';
import { AppError } from '../errors';
import { newId } from '../ids';
import { findSession, requireState } from '../sessions/find';
import { dayIn } from '../time';
import { listFillsOfSession } from './data';
import type { CreateCall, WithdrawCall } from './schema';

/** A call may rest only on evidence that is open, and that tasted this fill. */
function requireEvidence(tx: Tx, cellarId: string, fillId: string, sessionId: string): void {
  const session = findSession(tx, cellarId, sessionId);
  requireState(session, 'unsealed');
  if (!listFillsOfSession(tx, cellarId, sessionId).some((fill) => fill.fillId === fillId)) {
    throw new AppError('invalid', 'That session did not taste this barrel’s fill.', { fill: 'The session did not taste it' });
  }
}

/**
 * Records the decision on a fill: what, why, when to look again, on which session's evidence.
 * @returns the call's id
 * @throws AppError `forbidden`, `not_found` (fill or session of another cellar), `wrong_state`
 * (session not unsealed), `invalid` (fill not tasted in it, fill gone, next day in the past)
 */
export function createCall(access: Access, input: CreateCall): string {
  requireCapability(access, 'call.make');
  return getDb().transaction((tx) => {
    const cellarId = access.cellar.id;
    const fill = tx.select().from(fills).where(and(eq(fills.id, input.fill), eq(fills.cellarId, cellarId))).get();
    if (!fill) throw new AppError('not_found');
    if (input.session) requireEvidence(tx, cellarId, fill.id, input.session);
    else if (fill.toDay !== null) throw new AppError('invalid', 'That fill has left its vessel: there is nothing to decide on.', { fill: 'It has left the vessel' });
    if (input.nextDay && input.nextDay < dayIn(now(), access.cellar.timeZone)) {
      throw new AppError('invalid', 'The next date lies in the past.', { nextDay: 'Choose today or a later day' });
    }
    const id = newId();
    tx.insert(calls).values({
      id, cellarId, fillId: fill.id, sessionId: input.session ?? null, kind: input.kind, reasons: input.reasons,
      nextDay: input.nextDay ?? null, decidedBy: access.user.id, decidedAt: now(),
    }).run();
    recordAudit(tx, {
      cellarId, sessionId: input.session ?? null, actorUserId: access.user.id, action: 'call.made', subjectType: 'call', subjectId: id,
      detail: { kind: input.kind, nextDay: input.nextDay ?? null },
    });
    return id;
  }, { behavior: 'immediate' });
}

/**
 * Takes a call back, with a reason. It stays on record.
 * @throws AppError `forbidden`, `not_found`, `conflict` when it was taken back before
 */
export function withdrawCall(access: Access, input: WithdrawCall): void {
  requireCapability(access, 'call.make');
  getDb().transaction((tx) => {
    const isOurs = and(eq(calls.id, input.call), eq(calls.cellarId, access.cellar.id));
    if (!tx.select({ id: calls.id }).from(calls).where(isOurs).get()) throw new AppError('not_found');
    const changed = tx
      .update(calls)
      .set({ withdrawnAt: now(), withdrawnBy: access.user.id, withdrawReason: input.reason })
      .where(and(isOurs, isNull(calls.withdrawnAt)))
      .run();
    if (changed.changes !== 1) throw new AppError('conflict', 'That call was taken back before.');
    recordAudit(tx, {
      cellarId: access.cellar.id, actorUserId: access.user.id, action: 'call.withdrawn', subjectType: 'call', subjectId: input.call,
      detail: { reason: input.reason },
    });
  }, { behavior: 'immediate' });
}
