import 'server-only';
import type { Tx } from '@/db/client';
import type { Drink, Role } from '@/db/enums';
import { cellars, membershipRoles, memberships } from '@/db/schema';
import { eq } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import { now } from '../clock';
import { newId } from '../ids';
import { fillLexicon } from '../lexicon/fill';
import { slugOf } from './slug';

/** The owner of a new cellar decides on its barrels too, until somebody else is given that role. */
const FOUNDER_ROLES: readonly Role[] = ['owner', 'winemaker'];

function freeSlug(tx: Tx, name: string): string {
  const base = slugOf(name);
  for (let n = 1; ; n += 1) {
    const slug = n === 1 ? base : `${base}-${n}`;
    if (!tx.select({ id: cellars.id }).from(cellars).where(eq(cellars.slug, slug)).get()) return slug;
  }
}

/**
 * Makes a cellar with its founder as a member and the built-in lexicon as its own.
 * @returns id, and the name that stands in addresses
 */
export function createCellar(tx: Tx, cellar: { name: string; timeZone: string; drink: Drink; ownerId: string }): { id: string; slug: string } {
  const id = newId();
  const slug = freeSlug(tx, cellar.name);
  const createdAt = now();
  tx.insert(cellars).values({ id, slug, name: cellar.name, timeZone: cellar.timeZone, drink: cellar.drink, createdAt }).run();
  tx.insert(memberships).values({ cellarId: id, userId: cellar.ownerId, createdAt }).run();
  for (const role of FOUNDER_ROLES) tx.insert(membershipRoles).values({ cellarId: id, userId: cellar.ownerId, role }).run();
  fillLexicon(tx, id);
  recordAudit(tx, { cellarId: id, action: 'cellar.created', subjectType: 'cellar', subjectId: id, actorUserId: cellar.ownerId });
  return { id, slug };
}
