import 'server-only';
import { getDb, type Tx } from '@/db/client';
import type { Role } from '@/db/enums';
import { cellars, membershipRoles, memberships, users } from '@/db/schema';
import { and, eq, isNull } from 'drizzle-orm';
import type { z } from 'zod';
import { recordAudit } from '../audit/record';
import { requireCapability, type Access } from '../auth/access';
import { createLink } from '../auth/links';
import { now } from '../clock';
import { AppError } from '../errors';
import { newId } from '../ids';
import type { addMemberSchema, cellarSchema, changeRolesSchema } from './schema';

function audit(tx: Tx, access: Access, action: string, subjectId: string): void {
  recordAudit(tx, { cellarId: access.cellar.id, actorUserId: access.user.id, action, subjectType: 'user', subjectId });
}

/** @throws AppError `not_found` for somebody who is no member now */
function requireMember(tx: Tx, cellarId: string, userId: string): void {
  const row = tx.select({ userId: memberships.userId }).from(memberships).where(and(eq(memberships.cellarId, cellarId), eq(memberships.userId, userId), isNull(memberships.endedAt))).get();
  if (!row) throw new AppError('not_found');
}

/** A cellar is never left without an owner. @throws AppError `conflict` */
function requireOwnerLeft(tx: Tx, cellarId: string): void {
  const owner = tx
    .select({ userId: membershipRoles.userId })
    .from(membershipRoles)
    .innerJoin(memberships, and(eq(memberships.cellarId, membershipRoles.cellarId), eq(memberships.userId, membershipRoles.userId)))
    .where(and(eq(membershipRoles.cellarId, cellarId), eq(membershipRoles.role, 'owner'), isNull(memberships.endedAt)))
    .get();
  if (!owner) throw new AppError('conflict', 'The cellar needs an owner: make somebody else one first.');
}

function setRoles(tx: Tx, cellarId: string, userId: string, roles: readonly Role[]): void {
  tx.delete(membershipRoles).where(and(eq(membershipRoles.cellarId, cellarId), eq(membershipRoles.userId, userId))).run();
  for (const role of new Set(roles)) tx.insert(membershipRoles).values({ cellarId, userId, role }).run();
}

/** Adds a person, known here or new; a former member comes back. @throws AppError `conflict` for a present member */
export function addMember(access: Access, input: z.output<typeof addMemberSchema>): string {
  requireCapability(access, 'members.manage');
  const cellarId = access.cellar.id;
  return getDb().transaction((tx) => {
    let user = tx.select({ id: users.id }).from(users).where(eq(users.email, input.email)).get();
    if (!user) {
      user = { id: newId() };
      tx.insert(users).values({ id: user.id, email: input.email, name: input.name, createdAt: now() }).run();
    }
    const before = tx.select().from(memberships).where(and(eq(memberships.cellarId, cellarId), eq(memberships.userId, user.id))).get();
    if (before && !before.endedAt) throw new AppError('conflict', 'That person is a member already.', { email: 'A member already' });
    if (before) tx.update(memberships).set({ endedAt: null }).where(and(eq(memberships.cellarId, cellarId), eq(memberships.userId, user.id))).run();
    else tx.insert(memberships).values({ cellarId, userId: user.id, createdAt: now() }).run();
    setRoles(tx, cellarId, user.id, input.roles);
    audit(tx, access, 'member.added', user.id);
    return user.id;
  }, { behavior: 'immediate' });
}

/** @throws AppError `not_found`, `conflict` (the last owner) */
export function changeRoles(access: Access, { userId, roles }: z.output<typeof changeRolesSchema>): void {
  requireCapability(access, 'members.manage');
  getDb().transaction((tx) => {
    requireMember(tx, access.cellar.id, userId);
    setRoles(tx, access.cellar.id, userId, roles);
    requireOwnerLeft(tx, access.cellar.id);
    audit(tx, access, 'member.roles_changed', userId);
  }, { behavior: 'immediate' });
}

/** Ends a membership; what the person did stays. @throws AppError `not_found`, `conflict` (the last owner) */
export function endMembership(access: Access, userId: string): void {
  requireCapability(access, 'members.manage');
  getDb().transaction((tx) => {
    requireMember(tx, access.cellar.id, userId);
    tx.update(memberships).set({ endedAt: now() }).where(and(eq(memberships.cellarId, access.cellar.id), eq(memberships.userId, userId))).run();
    requireOwnerLeft(tx, access.cellar.id);
    audit(tx, access, 'member.ended', userId);
  }, { behavior: 'immediate' });
}

/**
 * A one-time link with which a member sets a password. Refused for a person who also belongs to
 * another cellar and has a password: one cellar's owner must not take over a consultant's account.
 * @returns the token, stored nowhere
 */
export function makePasswordLink(access: Access, userId: string): string {
  requireCapability(access, 'members.manage');
  return getDb().transaction((tx) => {
    requireMember(tx, access.cellar.id, userId);
    const person = tx.select({ hash: users.passwordHash }).from(users).where(eq(users.id, userId)).get();
    const elsewhere = tx.select({ cellarId: memberships.cellarId }).from(memberships).where(eq(memberships.userId, userId)).all().some((row) => row.cellarId !== access.cellar.id);
    if (person?.hash && elsewhere) throw new AppError('forbidden', 'This person belongs to other cellars too and has a password: only they can change it, under their account.');
    audit(tx, access, 'member.link_made', userId);
    return createLink(tx, { purpose: 'set_password', userId, createdBy: access.user.id });
  }, { behavior: 'immediate' });
}

/** @throws AppError `stale` */
export function changeCellar(access: Access, input: z.output<typeof cellarSchema>): void {
  requireCapability(access, 'cellar.manage');
  getDb().transaction((tx) => {
    const { changes } = tx.update(cellars).set({ name: input.name, timeZone: input.timeZone, version: input.version + 1 }).where(and(eq(cellars.id, access.cellar.id), eq(cellars.version, input.version))).run();
    if (changes !== 1) throw new AppError('stale');
    recordAudit(tx, { cellarId: access.cellar.id, actorUserId: access.user.id, action: 'cellar.changed', subjectType: 'cellar', subjectId: access.cellar.id });
  }, { behavior: 'immediate' });
}
