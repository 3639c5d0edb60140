import 'server-only';
import { getDb, type Tx } from '@/db/client';
import * as schema from '@/db/schema';
import { and, eq, inArray, notExists, sql } from 'drizzle-orm';
import { requireCapability, type Access } from '../auth/access';
import { AppError } from '../errors';

/** Children before parents. */
const OWN_TABLES = [
  schema.calls, schema.auditEvents, schema.earlyOpenings, schema.operations, schema.servingSamples, schema.seals, schema.servings,
  schema.seatPeople, schema.seats, schema.ballotItems, schema.sampleComponents, schema.samples, schema.sessionPourers, schema.sessions,
  schema.descriptors, schema.pulls, schema.fills, schema.vessels, schema.lots, schema.membershipRoles, schema.memberships,
] as const;

function removePeople(tx: Tx, userIds: string[]): void {
  if (userIds.length === 0) return;
  const strays = tx
    .select({ id: schema.users.id })
    .from(schema.users)
    .where(and(inArray(schema.users.id, userIds), notExists(tx.select({ one: sql`1` }).from(schema.memberships).where(eq(schema.memberships.userId, schema.users.id)))))
    .all()
    .map((row) => row.id);
  if (strays.length === 0) return;
  tx.delete(schema.oneTimeLinks).where(inArray(schema.oneTimeLinks.userId, strays)).run();
  tx.delete(schema.signIns).where(inArray(schema.signIns.userId, strays)).run();
  tx.delete(schema.users).where(inArray(schema.users.id, strays)).run();
}

/**
 * Removes the demo cellar as a whole, with the invented people who belong nowhere else.
 * @throws AppError `forbidden` (not a demo cellar), `invalid` (its name was not typed)
 */
export function removeDemoCellar(access: Access, typedName: string): void {
  requireCapability(access, 'cellar.manage');
  if (!access.cellar.isDemo) throw new AppError('forbidden', 'Only a demo cellar can be removed.');
  if (typedName.trim() !== access.cellar.name) throw new AppError('invalid', 'Type the name of the cellar exactly.', { typedName: 'Not its name' });
  const cellarId = access.cellar.id;
  getDb().transaction((tx) => {
    const people = tx.select({ userId: schema.memberships.userId }).from(schema.memberships).where(eq(schema.memberships.cellarId, cellarId)).all().map((row) => row.userId);
    for (const table of OWN_TABLES) tx.delete(table).where(eq(table.cellarId, cellarId)).run();
    tx.delete(schema.cellars).where(eq(schema.cellars.id, cellarId)).run();
    removePeople(tx, people);
  }, { behavior: 'immediate' });
}
