import 'server-only';
import { getDb } from '@/db/client';
import type { Drink, Role } from '@/db/enums';
import { cellars, membershipRoles, memberships, signIns, users } from '@/db/schema';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { notFound, redirect } from 'next/navigation';
import { cache } from 'react';
import { AppError } from '../errors';
import { signInCookie } from './cookie';
import { allows, type Capability } from './permissions';

export interface User {
  id: string;
  email: string;
  name: string;
  signInId: string;
}

export interface Cellar {
  id: string;
  slug: string;
  name: string;
  timeZone: string;
  drink: Drink;
  isDemo: boolean;
}

declare const checked: unique symbol;

/**
 * A person's proven standing in one cellar. Only this file makes one, so that a function that asks
 * for it can't be called without the check.
 */
export interface Access {
  readonly user: User;
  readonly cellar: Cellar;
  readonly roles: ReadonlySet<Role>;
  readonly [checked]: true;
}

/** The signed-in person by the database's word, or null. */
export const currentUser = cache(async (): Promise<User | null> => {
  const { signInId } = await signInCookie();
  if (!signInId) return null;
  const row = getDb()
    .select({ id: users.id, email: users.email, name: users.name, signInId: signIns.id })
    .from(signIns)
    .innerJoin(users, eq(users.id, signIns.userId))
    .where(and(eq(signIns.id, signInId), isNull(signIns.endedAt), gt(signIns.expiresAt, new Date()), isNull(users.disabledAt)))
    .get();
  return row ?? null;
});

/** @throws AppError `unauthenticated` */
export async function requireUser(): Promise<User> {
  const user = await currentUser();
  if (!user) throw new AppError('unauthenticated');
  return user;
}

/** A person's standing in the cellar of that name; null when there is none, or no such cellar. */
export function accessOf(user: User, slug: string): Access | null {
  const db = getDb();
  const cellar = db
    .select({ id: cellars.id, slug: cellars.slug, name: cellars.name, timeZone: cellars.timeZone, drink: cellars.drink, isDemo: cellars.isDemo })
    .from(cellars)
    .innerJoin(memberships, eq(memberships.cellarId, cellars.id))
    .where(and(eq(cellars.slug, slug), eq(memberships.userId, user.id), isNull(memberships.endedAt)))
    .get();
  if (!cellar) return null;
  const roles = db
    .select({ role: membershipRoles.role })
    .from(membershipRoles)
    .where(and(eq(membershipRoles.cellarId, cellar.id), eq(membershipRoles.userId, user.id)))
    .all();
  return { user, cellar, roles: new Set(roles.map((r) => r.role)) } as unknown as Access;
}

/** @throws AppError `forbidden` */
export function requireCapability(access: Access, capability: Capability): void {
  if (!allows(access.roles, capability)) throw new AppError('forbidden');
}

/**
 * The one permission check of actions and handlers.
 * @throws AppError `unauthenticated`, `not_found` (no such cellar, or not a member), `forbidden`
 */
export async function requireAccess(slug: string, capability: Capability): Promise<Access> {
  const access = accessOf(await requireUser(), slug);
  if (!access) throw new AppError('not_found');
  requireCapability(access, capability);
  return access;
}

/**
 * The same check for pages: signs in first, shows "not found" to strangers and says which roles
 * would be needed to members who lack them.
 */
export const loadAccess = cache(async (slug: string, capability: Capability): Promise<Access> => {
  const user = await currentUser();
  if (!user) redirect(`/sign-in?next=/c/${encodeURIComponent(slug)}`);
  const access = accessOf(user, slug);
  if (!access) notFound();
  if (!allows(access.roles, capability)) redirect(`/c/${slug}/not-allowed`);
  return access;
});

/** The cellars that the person belongs to, by name. */
export function listCellars(user: User): Cellar[] {
  return getDb()
    .select({ id: cellars.id, slug: cellars.slug, name: cellars.name, timeZone: cellars.timeZone, drink: cellars.drink, isDemo: cellars.isDemo })
    .from(cellars)
    .innerJoin(memberships, eq(memberships.cellarId, cellars.id))
    .where(and(eq(memberships.userId, user.id), isNull(memberships.endedAt)))
    .orderBy(cellars.name)
    .all();
}
