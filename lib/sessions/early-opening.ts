import 'server-only';
import { getDb } from '@/db/client';
import { earlyOpenings, servings } from '@/db/schema';
import { and, eq, isNull } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import { requireCapability, type Access } from '../auth/access';
import { takeOut } from '../blind/vault';
import { AppError } from '../errors';
import { now } from '../clock';
import { newId } from '../ids';
import { findSession, requireState } from './find';
import { closeAndUnseal } from './lifecycle';

/**
 * Asks to open the key before its time: one code in an emergency, or the whole session.
 * Nothing opens until a second person approves.
 * @param code null asks for the whole session
 */
export function requestEarlyOpening(access: Access, sessionId: string, code: string | null, reason: string): string {
  requireCapability(access, 'session.run');
  return getDb().transaction((tx) => {
    const session = findSession(tx, access.cellar.id, sessionId);
    requireState(session, 'sealed', 'open', 'closed');
    if (code !== null && !tx.select({ id: servings.id }).from(servings).where(and(eq(servings.sessionId, sessionId), eq(servings.code, code))).get()) {
      throw new AppError('invalid', 'No glass of this session has that code.', { code: 'No glass has this code' });
    }
    const id = newId();
    tx.insert(earlyOpenings).values({ id, cellarId: session.cellarId, sessionId, code, reason, requestedBy: access.user.id, requestedAt: now() }).run();
    recordAudit(tx, {
      cellarId: session.cellarId, sessionId, actorUserId: access.user.id, action: 'early_opening.requested',
      subjectType: 'early_opening', subjectId: id, detail: { scope: code === null ? 'session' : 'one code', reason },
    });
    return id;
  }, { behavior: 'immediate' });
}

function findOpening(tx: Parameters<typeof findSession>[0], cellarId: string, openingId: string) {
  const row = tx.select().from(earlyOpenings).where(and(eq(earlyOpenings.id, openingId), eq(earlyOpenings.cellarId, cellarId))).get();
  if (!row) throw new AppError('not_found');
  return row;
}

/**
 * The second person's word. Approving the whole session closes and unseals it.
 * @throws AppError `forbidden` when it is the person who asked, `conflict` when it was decided before
 */
export function decideEarlyOpening(access: Access, openingId: string, isApproved: boolean): void {
  requireCapability(access, 'session.run');
  getDb().transaction((tx) => {
    const opening = findOpening(tx, access.cellar.id, openingId);
    if (opening.requestedBy === access.user.id && isApproved) throw new AppError('forbidden', 'A second person must approve: not the one who asked.');
    const at = now();
    const decided = tx
      .update(earlyOpenings)
      .set(isApproved ? { approvedBy: access.user.id, approvedAt: at } : { refusedAt: at })
      .where(and(eq(earlyOpenings.id, openingId), isNull(earlyOpenings.approvedAt), isNull(earlyOpenings.refusedAt)))
      .run();
    if (decided.changes !== 1) throw new AppError('conflict', 'That request was decided before.');
    recordAudit(tx, {
      cellarId: opening.cellarId, sessionId: opening.sessionId, actorUserId: access.user.id,
      action: isApproved ? 'early_opening.approved' : 'early_opening.refused', subjectType: 'early_opening', subjectId: openingId,
    });
    if (isApproved && opening.code === null) closeAndUnseal(tx, access, opening.sessionId, opening.reason);
  }, { behavior: 'immediate' });
}

/**
 * The one sample that an approved request opened. Only the two who stand for it may read it, and
 * each reading is logged.
 */
export function readEarlyOpening(access: Access, openingId: string): string {
  return getDb().transaction((tx) => {
    const opening = findOpening(tx, access.cellar.id, openingId);
    if (!opening.approvedAt || opening.code === null) throw new AppError('wrong_state', 'This request has not been approved.');
    if (access.user.id !== opening.requestedBy && access.user.id !== opening.approvedBy) throw new AppError('forbidden');
    const plan = takeOut(tx, opening.cellarId, opening.sessionId);
    const labels = new Set(plan.servings.filter((s) => s.code === opening.code).map((s) => plan.samples[s.sample - 1]!.label));
    recordAudit(tx, {
      cellarId: opening.cellarId, sessionId: opening.sessionId, actorUserId: access.user.id, action: 'key.read_one_code',
      subjectType: 'early_opening', subjectId: openingId,
    });
    return [...labels].join(', ');
  }, { behavior: 'immediate' });
}
