import 'server-only';
import { getDb } from '@/db/client';
import type { Role } from '@/db/enums';
import { cellars, membershipRoles, memberships, users } from '@/db/schema';
import { and, asc, eq, isNull } from 'drizzle-orm';
import { loadAccess } from '../auth/access';

export interface MemberView {
  id: string;
  name: string;
  email: string;
  roles: Role[];
  hasPassword: boolean;
}

/** The cellar's settings and people, for an owner. */
export async function loadSettings(slug: string) {
  const access = await loadAccess(slug, 'members.manage');
  const db = getDb();
  const roles = db.select().from(membershipRoles).where(eq(membershipRoles.cellarId, access.cellar.id)).all();
  const members: MemberView[] = db
    .select({ id: users.id, name: users.name, email: users.email, hash: users.passwordHash })
    .from(memberships)
    .innerJoin(users, eq(users.id, memberships.userId))
    .where(and(eq(memberships.cellarId, access.cellar.id), isNull(memberships.endedAt)))
    .orderBy(asc(users.name))
    .all()
    .map(({ id, name, email, hash }) => ({ id, name, email, hasPassword: hash !== null, roles: roles.filter((row) => row.userId === id).map((row) => row.role) }));
  const { version } = db.select({ version: cellars.version }).from(cellars).where(eq(cellars.id, access.cellar.id)).get()!;
  return { access, members, version };
}
