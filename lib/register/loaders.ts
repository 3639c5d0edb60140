import 'server-only';
import { getDb } from '@/db/client';
import { fills, lots, pulls, users, vessels, sampleComponents, samples, sessions } from '@/db/schema';
import { and, count, desc, eq, isNull, max } from 'drizzle-orm';
import { loadAccess, type Access } from '../auth/access';
import { AppError } from '../errors';
import { localInput, dayIn, showCalendarDay, showDay, showMoment } from '../time';
import { now } from '../clock';
import { DRAW_WORDS, TOAST_WORDS, VESSEL_WORDS } from './format';

export interface VesselListItem {
  id: string;
  name: string;
  kind: string;
  volumeL: number;
  cooper: string;
  toast: string;
  year: number | null;
  lot: string | null;
  lotName: string | null;
  lastPull: string | null;
  location: string;
  isArchived: boolean;
}

export const VESSEL_SORTS = ['name', 'lot', 'cooper', 'year', 'last'] as const;
export type VesselSort = (typeof VESSEL_SORTS)[number];

const natural = new Intl.Collator('en', { numeric: true });

/** All vessels of the cellar with what is in them now; search by any word. */
export async function loadVessels(slug: string, query: string, sort: VesselSort, withArchived: boolean): Promise<{ access: Access; items: VesselListItem[]; total: number }> {
  const access = await loadAccess(slug, 'cellar.view');
  const db = getDb();
  const lastPulls = new Map(
    db.select({ vesselId: fills.vesselId, at: max(pulls.pulledAt) }).from(pulls).innerJoin(fills, eq(fills.id, pulls.fillId)).where(and(eq(pulls.cellarId, access.cellar.id), isNull(pulls.archivedAt))).groupBy(fills.vesselId).all().map((row) => [row.vesselId, row.at]),
  );
  const rows = db
    .select({ vessel: vessels, lot: lots.code, lotName: lots.name })
    .from(vessels)
    .leftJoin(fills, and(eq(fills.vesselId, vessels.id), isNull(fills.toDay)))
    .leftJoin(lots, eq(lots.id, fills.lotId))
    .where(eq(vessels.cellarId, access.cellar.id))
    .all()
    .filter(({ vessel }) => withArchived || !vessel.archivedAt);
  const words = query.toLowerCase().split(/\s+/).filter(Boolean);
  const found = rows.filter(({ vessel, lot, lotName }) => {
    const text = [vessel.name, vessel.kind, vessel.cooper, vessel.woodSpecies, vessel.woodOrigin, vessel.toast, vessel.location, vessel.year, lot, lotName].join(' ').toLowerCase();
    return words.every((word) => text.includes(word));
  });
  const lastOf = (vesselId: string) => lastPulls.get(vesselId)?.getTime() ?? 0;
  const compare: Record<VesselSort, (a: (typeof found)[number], b: (typeof found)[number]) => number> = {
    name: (a, b) => natural.compare(a.vessel.name, b.vessel.name),
    lot: (a, b) => natural.compare(a.lot ?? '~', b.lot ?? '~'),
    cooper: (a, b) => natural.compare(a.vessel.cooper || '~', b.vessel.cooper || '~'),
    year: (a, b) => (b.vessel.year ?? 0) - (a.vessel.year ?? 0),
    last: (a, b) => lastOf(a.vessel.id) - lastOf(b.vessel.id),
  };
  found.sort((a, b) => compare[sort](a, b) || compare.name(a, b));
  return {
    access,
    total: rows.length,
    items: found.map(({ vessel, lot, lotName }) => {
      const last = lastPulls.get(vessel.id);
      return {
        id: vessel.id, name: vessel.name, kind: VESSEL_WORDS[vessel.kind], volumeL: vessel.volumeL, cooper: vessel.cooper,
        toast: vessel.toast ? TOAST_WORDS[vessel.toast] : '', year: vessel.year, lot, lotName, location: vessel.location,
        lastPull: last ? showDay(last, access.cellar.timeZone) : null, isArchived: vessel.archivedAt !== null,
      };
    }),
  };
}

/** @throws AppError `not_found` */
function findVessel(access: Access, vesselId: string) {
  const vessel = getDb().select().from(vessels).where(and(eq(vessels.id, vesselId), eq(vessels.cellarId, access.cellar.id))).get();
  if (!vessel) throw new AppError('not_found');
  return vessel;
}

const fillsOf = (vesselId: string) =>
  getDb().select({ fill: fills, lotId: lots.id, lot: lots.code, lotName: lots.name }).from(fills).innerJoin(lots, eq(lots.id, fills.lotId)).where(eq(fills.vesselId, vesselId)).orderBy(desc(fills.fromDay)).all();

/** Unsealed sessions in which a pull of the vessel was under test. Before unsealing only the pull itself is told of. */
function sessionsOf(access: Access, vesselId: string) {
  return getDb()
    .selectDistinct({ id: sessions.id, title: sessions.title, question: sessions.privateQuestion, at: sessions.unsealedAt })
    .from(sessions)
    .innerJoin(samples, eq(samples.sessionId, sessions.id))
    .innerJoin(sampleComponents, eq(sampleComponents.sampleId, samples.id))
    .innerJoin(pulls, eq(pulls.id, sampleComponents.pullId))
    .innerJoin(fills, eq(fills.id, pulls.fillId))
    .where(and(eq(fills.vesselId, vesselId), eq(sessions.cellarId, access.cellar.id), eq(sessions.state, 'unsealed')))
    .orderBy(desc(sessions.unsealedAt))
    .all()
    .map(({ id, title, question, at }) => ({ id, title, question, on: showDay(at!, access.cellar.timeZone) }));
}

export async function loadVessel(slug: string, vesselId: string) {
  const access = await loadAccess(slug, 'cellar.view');
  const vessel = findVessel(access, vesselId);
  const zone = access.cellar.timeZone;
  const history = fillsOf(vesselId).map(({ fill, lotId, lot, lotName }) => ({
    id: fill.id, version: fill.version, lotId, lot, lotName, from: showCalendarDay(fill.fromDay), to: fill.toDay ? showCalendarDay(fill.toDay) : null, note: fill.note,
  }));
  const drawn = getDb()
    .select({ pull: pulls, by: users.name, lot: lots.code })
    .from(pulls)
    .innerJoin(fills, eq(fills.id, pulls.fillId))
    .innerJoin(lots, eq(lots.id, fills.lotId))
    .innerJoin(users, eq(users.id, pulls.pulledBy))
    .where(and(eq(fills.vesselId, vesselId), eq(pulls.cellarId, access.cellar.id)))
    .orderBy(desc(pulls.pulledAt))
    .all()
    .map(({ pull, by, lot }) => ({
      id: pull.id, at: showMoment(pull.pulledAt, zone), by, lot, method: DRAW_WORDS[pull.drawMethod], volumeMl: pull.volumeMl, temperatureC: pull.temperatureC,
      hiss: pull.isHissHeard, note: pull.note, isArchived: pull.archivedAt !== null,
      undone: [!pull.isVented && 'not vented', !pull.isResealed && 'not resealed', !pull.isToppedUp && 'not topped up', !pull.isWiped && 'not wiped'].filter((text): text is string => text !== false),
    }));
  return { access, vessel: { ...publicVessel(vessel) }, history, present: history.find((fill) => fill.to === null) ?? null, pulls: drawn, sessions: sessionsOf(access, vesselId) };
}

function publicVessel(vessel: typeof vessels.$inferSelect) {
  const { id, version, name, kind, volumeL, cooper, woodSpecies, woodOrigin, grain, toast, year, location, note, archivedAt } = vessel;
  return { id, version, name, kind, volumeL, cooper, woodSpecies, woodOrigin, grain, toast, year, location, note, isArchived: archivedAt !== null };
}

export async function loadVesselForm(slug: string, vesselId: string) {
  const access = await loadAccess(slug, 'register.edit');
  return { access, vessel: publicVessel(findVessel(access, vesselId)) };
}

/** What the fill form offers. */
export async function loadFillForm(slug: string, vesselId: string) {
  const access = await loadAccess(slug, 'register.edit');
  const vessel = publicVessel(findVessel(access, vesselId));
  const present = fillsOf(vesselId).find(({ fill }) => fill.toDay === null);
  return {
    access, vessel, today: dayIn(now(), access.cellar.timeZone),
    present: present && { id: present.fill.id, version: present.fill.version, lot: present.lot, lotName: present.lotName, from: showCalendarDay(present.fill.fromDay) },
    lots: getDb().select({ value: lots.id, code: lots.code, name: lots.name }).from(lots).where(and(eq(lots.cellarId, access.cellar.id), isNull(lots.archivedAt))).orderBy(desc(lots.createdAt)).all().map(({ value, code, name }) => ({ value, label: `${code}, ${name}` })),
  };
}

export async function loadPullForm(slug: string, vesselId: string) {
  const access = await loadAccess(slug, 'pull.record');
  const vessel = publicVessel(findVessel(access, vesselId));
  const present = fillsOf(vesselId).find(({ fill }) => fill.toDay === null);
  return { access, vessel, lot: present ? `${present.lot}, ${present.lotName}` : null, at: localInput(now(), access.cellar.timeZone) };
}

export const LOT_SORTS = ['vintage', 'code', 'name', 'vessels'] as const;
export type LotSort = (typeof LOT_SORTS)[number];

export async function loadLots(slug: string, query: string, sort: LotSort, withArchived: boolean) {
  const access = await loadAccess(slug, 'cellar.view');
  const filled = new Map(getDb().select({ lotId: fills.lotId, n: count() }).from(fills).where(and(eq(fills.cellarId, access.cellar.id), isNull(fills.toDay))).groupBy(fills.lotId).all().map((row) => [row.lotId, row.n]));
  const words = query.toLowerCase();
  const items = getDb()
    .select()
    .from(lots)
    .where(eq(lots.cellarId, access.cellar.id))
    .orderBy(desc(lots.vintage), lots.code)
    .all()
    .filter((lot) => (withArchived || !lot.archivedAt) && `${lot.code} ${lot.name} ${lot.drink} ${lot.vintage ?? ''}`.toLowerCase().includes(words))
    .map((lot) => ({ id: lot.id, code: lot.code, name: lot.name, drink: lot.drink, vintage: lot.vintage, vessels: filled.get(lot.id) ?? 0, isArchived: lot.archivedAt !== null }));
  const compare: Record<LotSort, (a: (typeof items)[number], b: (typeof items)[number]) => number> = {
    vintage: (a, b) => (b.vintage ?? 0) - (a.vintage ?? 0),
    code: (a, b) => natural.compare(a.code, b.code),
    name: (a, b) => natural.compare(a.name, b.name),
    vessels: (a, b) => b.vessels - a.vessels,
  };
  items.sort((a, b) => compare[sort](a, b) || compare.code(a, b));
  return { access, items };
}

export async function loadLot(slug: string, lotId: string) {
  const access = await loadAccess(slug, 'cellar.view');
  const lot = getDb().select().from(lots).where(and(eq(lots.id, lotId), eq(lots.cellarId, access.cellar.id))).get();
  if (!lot) throw new AppError('not_found');
  const stays = getDb()
    .select({ vesselId: vessels.id, vessel: vessels.name, kind: vessels.kind, fromDay: fills.fromDay, toDay: fills.toDay })
    .from(fills)
    .innerJoin(vessels, eq(vessels.id, fills.vesselId))
    .where(eq(fills.lotId, lot.id))
    .all()
    .sort((a, b) => natural.compare(a.vessel, b.vessel))
    .map((stay) => ({ vesselId: stay.vesselId, vessel: `${VESSEL_WORDS[stay.kind]} ${stay.vessel}`, from: showCalendarDay(stay.fromDay), to: stay.toDay ? showCalendarDay(stay.toDay) : null }));
  const { id, version, code, name, drink, vintage, note, archivedAt } = lot;
  return { access, lot: { id, version, code, name, drink, vintage, note, isArchived: archivedAt !== null }, stays };
}
