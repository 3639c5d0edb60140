import 'server-only';
import { getDb, type Db, type Tx } from '@/db/client';
import { calls, fills, lots, sampleComponents, pulls, samples, sessions, users, vessels } from '@/db/schema';
import type { VesselKind } from '@/db/enums';
import { and, asc, desc, eq, isNull } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import type { Access } from '../auth/access';
import { now } from '../clock';
import { VESSEL_WORDS } from '../register/format';
import { dayIn, showDay } from '../time';
import type { CallStatus, CallView, FillOption } from './types';

const withdrawers = alias(users, 'withdrawers');

function rowsOf(cellarId: string) {
  return getDb()
    .select({
      id: calls.id, fillId: calls.fillId, kind: calls.kind, reasons: calls.reasons, nextDay: calls.nextDay, decidedAt: calls.decidedAt,
      withdrawnAt: calls.withdrawnAt, withdrawReason: calls.withdrawReason, toDay: fills.toDay,
      decidedBy: users.name, withdrawnBy: withdrawers.name, vesselId: vessels.id, vesselName: vessels.name, vesselKind: vessels.kind,
      lotId: lots.id, lotCode: lots.code, sessionId: sessions.id, sessionTitle: sessions.title,
    })
    .from(calls)
    .innerJoin(fills, and(eq(fills.id, calls.fillId), eq(fills.cellarId, calls.cellarId)))
    .innerJoin(vessels, eq(vessels.id, fills.vesselId))
    .innerJoin(lots, eq(lots.id, fills.lotId))
    .innerJoin(users, eq(users.id, calls.decidedBy))
    .leftJoin(withdrawers, eq(withdrawers.id, calls.withdrawnBy))
    .leftJoin(sessions, eq(sessions.id, calls.sessionId))
    .where(eq(calls.cellarId, cellarId))
    .orderBy(desc(calls.decidedAt), desc(calls.id))
    .all();
}

type Row = ReturnType<typeof rowsOf>[number];

/** The newest call of each fill that was not taken back; rows come newest first. */
function standingIds(rows: readonly Row[]): Set<string> {
  const byFill = new Map<string, string>();
  for (const row of rows) if (!row.withdrawnAt && !byFill.has(row.fillId)) byFill.set(row.fillId, row.id);
  return new Set(byFill.values());
}

function statusOf(row: Row, standing: ReadonlySet<string>): CallStatus {
  if (row.withdrawnAt) return 'withdrawn';
  if (!standing.has(row.id)) return 'superseded';
  return row.toDay === null ? 'standing' : 'emptied';
}

/** Every call of the cellar, newest first. Text is in the cellar's time zone. */
export function listCalls(access: Access): CallView[] {
  const { id, timeZone } = access.cellar;
  const today = dayIn(now(), timeZone);
  const rows = rowsOf(id);
  const standing = standingIds(rows);
  return rows.map((row) => {
    const status = statusOf(row, standing);
    return {
      id: row.id, kind: row.kind, reasons: row.reasons, nextDay: row.nextDay, status,
      isDue: status === 'standing' && row.nextDay !== null && row.nextDay <= today,
      vessel: { id: row.vesselId, name: row.vesselName, kind: row.vesselKind },
      lot: { id: row.lotId, code: row.lotCode },
      session: row.sessionId && row.sessionTitle ? { id: row.sessionId, title: row.sessionTitle } : null,
      decidedBy: row.decidedBy,
      decidedOn: showDay(row.decidedAt, timeZone),
      withdrawn: row.withdrawnAt ? { by: row.withdrawnBy ?? '', on: showDay(row.withdrawnAt, timeZone), reason: row.withdrawReason ?? '' } : null,
    };
  });
}

/** The calls on everything that this vessel held, newest first; another cellar's vessel has none. */
export const listCallsOfVessel = (access: Access, vesselId: string): CallView[] =>
  listCalls(access).filter((call) => call.vessel.id === vesselId);

/** The calls that rest on this session, newest first. */
export const listCallsOfSession = (access: Access, sessionId: string): CallView[] =>
  listCalls(access).filter((call) => call.session?.id === sessionId);

/** The calls that stand, soonest next day first; those without a day last. */
export const listStandingCalls = (access: Access): CallView[] =>
  listCalls(access)
    .filter((call) => call.status === 'standing')
    .sort((a, b) => (a.nextDay ?? '9999').localeCompare(b.nextDay ?? '9999'));

const label = (row: { kind: VesselKind; vessel: string; lot: string }) => `${VESSEL_WORDS[row.kind]} ${row.vessel}, ${row.lot}`;

/** What stands in the cellar's vessels now. */
export function listPresentFills(access: Access): (FillOption & { vesselId: string })[] {
  return getDb()
    .select({ fillId: fills.id, vesselId: vessels.id, kind: vessels.kind, vessel: vessels.name, lot: lots.code })
    .from(fills)
    .innerJoin(vessels, eq(vessels.id, fills.vesselId))
    .innerJoin(lots, eq(lots.id, fills.lotId))
    .where(and(eq(fills.cellarId, access.cellar.id), isNull(fills.toDay), isNull(vessels.archivedAt)))
    .orderBy(asc(vessels.name))
    .all()
    .sort((a, b) => a.vessel.localeCompare(b.vessel, 'en', { numeric: true }))
    .map((row) => ({ fillId: row.fillId, vesselId: row.vesselId, label: label(row) }));
}

/** The fills that the samples of a session were drawn from. */
export function listFillsOfSession(db: Tx | Db, cellarId: string, sessionId: string): (FillOption & { sampleId: string; vesselId: string })[] {
  return db
    .select({ fillId: fills.id, vesselId: vessels.id, kind: vessels.kind, vessel: vessels.name, lot: lots.code, sampleId: samples.id })
    .from(samples)
    .innerJoin(sampleComponents, and(eq(sampleComponents.sampleId, samples.id), eq(sampleComponents.cellarId, samples.cellarId)))
    .innerJoin(pulls, eq(pulls.id, sampleComponents.pullId))
    .innerJoin(fills, eq(fills.id, pulls.fillId))
    .innerJoin(vessels, eq(vessels.id, fills.vesselId))
    .innerJoin(lots, eq(lots.id, fills.lotId))
    .where(and(eq(samples.cellarId, cellarId), eq(samples.sessionId, sessionId)))
    .all()
    .sort((a, b) => a.vessel.localeCompare(b.vessel, 'en', { numeric: true }))
    .map((row) => ({ fillId: row.fillId, vesselId: row.vesselId, sampleId: row.sampleId, label: label(row) }));
}
