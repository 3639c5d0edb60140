import 'server-only';
import { getDb, type Tx } from '@/db/client';
import { fills, lots, pulls, vessels } from '@/db/schema';
import { and, eq, gt, isNull, lt, ne, or } from 'drizzle-orm';
import type { z } from 'zod';
import { recordAudit } from '../audit/record';
import { requireCapability, type Access } from '../auth/access';
import { now } from '../clock';
import { AppError } from '../errors';
import { newId } from '../ids';
import { dayIn, fromLocalInput } from '../time';
import type { archiveSchema, emptySchema, fillSchema, LotInput, PullInput, VesselInput } from './schema';

function audit(tx: Tx, access: Access, action: string, subjectType: string, subjectId: string): void {
  // The register names barrels: people who taste never see these entries.
  recordAudit(tx, { cellarId: access.cellar.id, actorUserId: access.user.id, action, subjectType, subjectId, isBlinding: true });
}

/** The row changed by an edit must be there, the cellar's, and as old as the form. */
function requireChanged(changes: number, isThere: boolean): void {
  if (changes === 1) return;
  throw new AppError(isThere ? 'stale' : 'not_found');
}

const lotOf = (tx: Tx, cellarId: string, id: string) => tx.select().from(lots).where(and(eq(lots.id, id), eq(lots.cellarId, cellarId))).get();
const vesselOf = (tx: Tx, cellarId: string, id: string) => tx.select().from(vessels).where(and(eq(vessels.id, id), eq(vessels.cellarId, cellarId))).get();

/** A new lot, or a change of one. @returns its id @throws AppError `conflict` when the code is taken */
export function saveLot(access: Access, { cellar: _, id, version, ...input }: LotInput): string {
  requireCapability(access, 'register.edit');
  const cellarId = access.cellar.id;
  const values = { ...input, vintage: input.vintage ?? null };
  return getDb().transaction((tx) => {
    const lotId = id ?? newId();
    if (tx.select({ id: lots.id }).from(lots).where(and(eq(lots.cellarId, cellarId), eq(lots.code, input.code), ne(lots.id, lotId))).get()) {
      throw new AppError('conflict', 'Another lot has that code.', { code: 'Another lot has this code' });
    }
    if (id) {
      const { changes } = tx.update(lots).set({ ...values, version: (version ?? 0) + 1 }).where(and(eq(lots.id, id), eq(lots.cellarId, cellarId), eq(lots.version, version ?? 0))).run();
      requireChanged(changes, lotOf(tx, cellarId, id) !== undefined);
    } else tx.insert(lots).values({ id: lotId, cellarId, createdAt: now(), ...values }).run();
    audit(tx, access, id ? 'lot.changed' : 'lot.created', 'lot', lotId);
    return lotId;
  }, { behavior: 'immediate' });
}

/** A new vessel, or a change of one. @returns its id @throws AppError `conflict` when the name is taken */
export function saveVessel(access: Access, { cellar: _, id, version, ...input }: VesselInput): string {
  requireCapability(access, 'register.edit');
  const cellarId = access.cellar.id;
  const values = { ...input, year: input.year ?? null, grain: input.grain ?? null, toast: input.toast ?? null };
  return getDb().transaction((tx) => {
    const vesselId = id ?? newId();
    if (tx.select({ id: vessels.id }).from(vessels).where(and(eq(vessels.cellarId, cellarId), eq(vessels.name, input.name), ne(vessels.id, vesselId))).get()) {
      throw new AppError('conflict', 'Another vessel has that name.', { name: 'Another vessel has this name' });
    }
    if (id) {
      const { changes } = tx.update(vessels).set({ ...values, version: (version ?? 0) + 1 }).where(and(eq(vessels.id, id), eq(vessels.cellarId, cellarId), eq(vessels.version, version ?? 0))).run();
      requireChanged(changes, vesselOf(tx, cellarId, id) !== undefined);
    } else tx.insert(vessels).values({ id: vesselId, cellarId, createdAt: now(), ...values }).run();
    audit(tx, access, id ? 'vessel.changed' : 'vessel.created', 'vessel', vesselId);
    return vesselId;
  }, { behavior: 'immediate' });
}

/**
 * Fills a vessel with a lot from a day on. A fill that is still in ends that day.
 * @throws AppError `not_found` (vessel or lot), `conflict` when the stay would overlap another
 */
export function fillVessel(access: Access, input: z.output<typeof fillSchema>): string {
  requireCapability(access, 'register.edit');
  const cellarId = access.cellar.id;
  return getDb().transaction((tx) => {
    const vessel = vesselOf(tx, cellarId, input.vesselId);
    const lot = lotOf(tx, cellarId, input.lotId);
    if (!vessel || !lot) throw new AppError('not_found');
    if (vessel.archivedAt || lot.archivedAt) throw new AppError('conflict', 'An archived vessel or lot can’t be filled. Restore it first.');
    const present = tx.select().from(fills).where(and(eq(fills.vesselId, vessel.id), isNull(fills.toDay))).get();
    if (present && present.fromDay >= input.fromDay) throw new AppError('conflict', `It was filled on ${present.fromDay}; a new fill must come later.`, { fromDay: `Later than ${present.fromDay}` });
    if (tx.select({ id: fills.id }).from(fills).where(and(eq(fills.vesselId, vessel.id), gt(fills.toDay, input.fromDay))).get()) {
      throw new AppError('conflict', 'The vessel held something else on that day.', { fromDay: 'Overlaps an earlier fill' });
    }
    if (present) tx.update(fills).set({ toDay: input.fromDay, version: present.version + 1 }).where(eq(fills.id, present.id)).run();
    const id = newId();
    tx.insert(fills).values({ id, cellarId, vesselId: vessel.id, lotId: lot.id, fromDay: input.fromDay, note: input.note, createdAt: now() }).run();
    audit(tx, access, 'vessel.filled', 'fill', id);
    return id;
  }, { behavior: 'immediate' });
}

/** Ends a fill. @throws AppError `not_found`, `stale`, `conflict` (before its first day) */
export function emptyVessel(access: Access, input: z.output<typeof emptySchema>): void {
  requireCapability(access, 'register.edit');
  getDb().transaction((tx) => {
    const fill = tx.select().from(fills).where(and(eq(fills.id, input.fillId), eq(fills.cellarId, access.cellar.id), eq(fills.vesselId, input.vesselId))).get();
    if (!fill) throw new AppError('not_found');
    if (fill.version !== input.version || fill.toDay) throw new AppError('stale');
    if (input.toDay < fill.fromDay) throw new AppError('conflict', 'It can’t end before it began.', { toDay: `Not before ${fill.fromDay}` });
    tx.update(fills).set({ toDay: input.toDay, version: fill.version + 1 }).where(eq(fills.id, fill.id)).run();
    audit(tx, access, 'vessel.emptied', 'fill', fill.id);
  }, { behavior: 'immediate' });
}

type NewPull = Omit<typeof pulls.$inferInsert, 'cellarId' | 'fillId' | 'pulledBy' | 'createdAt'> & { vesselId: string };

/**
 * Records a pull from what the vessel held on that day, inside the caller's transaction.
 * @throws AppError `not_found`, `conflict` (empty then)
 */
export function insertPull(tx: Tx, access: Access, { vesselId, ...pull }: NewPull): void {
  const { id: cellarId, timeZone } = access.cellar;
  const onDay = dayIn(pull.pulledAt, timeZone);
  const vessel = vesselOf(tx, cellarId, vesselId);
  if (!vessel) throw new AppError('not_found');
  const fill = tx
    .select()
    .from(fills)
    .where(and(eq(fills.vesselId, vessel.id), lt(fills.fromDay, `${onDay}~`), or(isNull(fills.toDay), gt(fills.toDay, onDay), eq(fills.toDay, onDay))))
    .all()
    .sort((a, b) => b.fromDay.localeCompare(a.fromDay))[0];
  if (!fill) throw new AppError('conflict', `${vessel.name} held nothing on that day. Record its fill first.`, { pulledAt: 'The vessel was empty then' });
  tx.insert(pulls).values({ ...pull, cellarId, fillId: fill.id, pulledBy: access.user.id, createdAt: now() }).run();
  audit(tx, access, 'pull.recorded', 'pull', pull.id);
}

/**
 * Records a pull from the desk's form.
 * @throws AppError `not_found`, `conflict` (empty then), `invalid` (in the future)
 */
export function recordPull(access: Access, { cellar: _, pulledAt: pulledText, isHissHeard, ...input }: PullInput): string {
  requireCapability(access, 'pull.record');
  const pulledAt = fromLocalInput(pulledText, access.cellar.timeZone);
  if (pulledAt.getTime() > now().getTime() + 5 * 60_000) throw new AppError('invalid', 'A pull can’t be in the future.', { pulledAt: 'Not in the future' });
  const id = newId();
  getDb().transaction(
    (tx) => insertPull(tx, access, { id, pulledAt, ...input, temperatureC: input.temperatureC ?? null, isHissHeard: isHissHeard === undefined ? null : isHissHeard === 'yes' }),
    { behavior: 'immediate' },
  );
  return id;
}

const ARCHIVED = { lot: lots, vessel: vessels, pull: pulls } as const;

/** Puts a row away, or takes it back. What depends on it stays as it is. @throws AppError `not_found`, `conflict` */
export function archiveRow(access: Access, { kind, id, isArchived }: z.output<typeof archiveSchema>): void {
  requireCapability(access, kind === 'pull' ? 'pull.record' : 'register.edit');
  const table = ARCHIVED[kind];
  getDb().transaction((tx) => {
    if (kind === 'vessel' && isArchived === 'yes' && tx.select({ id: fills.id }).from(fills).where(and(eq(fills.vesselId, id), eq(fills.cellarId, access.cellar.id), isNull(fills.toDay))).get()) {
      throw new AppError('conflict', 'It is full. Empty it first.');
    }
    const { changes } = tx.update(table).set({ archivedAt: isArchived === 'yes' ? now() : null }).where(and(eq(table.id, id), eq(table.cellarId, access.cellar.id))).run();
    if (changes !== 1) throw new AppError('not_found');
    audit(tx, access, isArchived === 'yes' ? `${kind}.archived` : `${kind}.restored`, kind, id);
  }, { behavior: 'immediate' });
}
