import 'server-only';
import { getDb } from '@/db/client';
import { fills, lots, pulls, sessions, vessels } from '@/db/schema';
import { and, desc, eq, inArray, isNull, max } from 'drizzle-orm';
import { loadAccess, type Access } from '../auth/access';
import { allows } from '../auth/permissions';
import { listStandingCalls } from '../calls/data';
import { CALL_WORDS } from '../calls/format';
import { now } from '../clock';
import { dayIn, showCalendarDay, showDay, showMoment } from '../time';
import type { SessionState } from '@/db/enums';

/** Without a pull for so long a barrel is due: six weeks (common practice: monthly when young). */
const DUE_DAYS = 42;
const SHOWN = 12;
const DAY_MS = 86_400_000;

export interface DueBarrel {
  vesselId: string;
  name: string;
  lot: string;
  lastPull: string;
  /** In one line. */
  reason: string;
  isUrgent: boolean;
}

const natural = new Intl.Collator('en', { numeric: true });

function listDue(access: Access): { due: DueBarrel[]; more: number } {
  const db = getDb();
  const zone = access.cellar.timeZone;
  const today = dayIn(now(), zone);
  const rows = db
    .select({ vesselId: vessels.id, name: vessels.name, fillId: fills.id, lot: lots.code, last: max(pulls.pulledAt) })
    .from(fills)
    .innerJoin(vessels, eq(vessels.id, fills.vesselId))
    .innerJoin(lots, eq(lots.id, fills.lotId))
    .leftJoin(pulls, and(eq(pulls.fillId, fills.id), isNull(pulls.archivedAt)))
    .where(and(eq(fills.cellarId, access.cellar.id), isNull(fills.toDay), isNull(vessels.archivedAt)))
    .groupBy(fills.id)
    .all();
  const calls = new Map(listStandingCalls(access).filter((call) => call.nextDay !== null && call.nextDay <= today).map((call) => [call.vessel.id, call]));
  const due: (DueBarrel & { rank: number })[] = [];
  for (const row of rows) {
    const call = calls.get(row.vesselId);
    const days = row.last ? Math.floor((now().getTime() - row.last.getTime()) / DAY_MS) : null;
    if (!call && days !== null && days < DUE_DAYS) continue;
    const reason = call ? `${CALL_WORDS[call.kind]}, due ${showCalendarDay(call.nextDay!)}: ${call.reasons}` : days === null ? 'Never drawn from' : `Not drawn from for ${days} days`;
    due.push({ vesselId: row.vesselId, name: row.name, lot: row.lot, lastPull: row.last ? showDay(row.last, zone) : 'never', reason, isUrgent: call !== undefined, rank: call ? 1e6 : (days ?? 1e5) });
  }
  due.sort((a, b) => b.rank - a.rank || natural.compare(a.name, b.name));
  return { due: due.slice(0, SHOWN).map(({ rank: _, ...barrel }) => barrel), more: Math.max(0, due.length - SHOWN) };
}

export interface WaitingSession {
  id: string;
  title: string;
  state: SessionState;
  waitsFor: string;
}

const WAITS_FOR: Partial<Record<SessionState, string>> = {
  draft: 'to be sealed',
  sealed: 'to be poured and opened',
  open: 'open now',
  closed: 'for its key to be opened',
};

/** What waits today: sessions, barrels, the last pulls. */
export async function loadToday(slug: string) {
  const access = await loadAccess(slug, 'session.list');
  const mayView = allows(access.roles, 'cellar.view');
  const mayDesign = allows(access.roles, 'session.design');
  const db = getDb();
  const states: SessionState[] = mayDesign ? ['open', 'closed', 'sealed', 'draft'] : ['open', 'sealed'];
  const waiting: WaitingSession[] = db
    .select({ id: sessions.id, title: sessions.title, state: sessions.state })
    .from(sessions)
    .where(and(eq(sessions.cellarId, access.cellar.id), inArray(sessions.state, states)))
    .all()
    .sort((a, b) => states.indexOf(a.state) - states.indexOf(b.state) || a.title.localeCompare(b.title))
    .map((session) => ({ ...session, waitsFor: WAITS_FOR[session.state] ?? '' }));
  const finished = db.select({ id: sessions.id, title: sessions.title, at: sessions.unsealedAt }).from(sessions).where(and(eq(sessions.cellarId, access.cellar.id), eq(sessions.state, 'unsealed'))).orderBy(desc(sessions.unsealedAt)).limit(5).all()
    .map(({ id, title, at }) => ({ id, title, on: showMoment(at!, access.cellar.timeZone) }));
  return { access, mayView, mayDesign, waiting, finished, ...(mayView ? listDue(access) : { due: [], more: 0 }), today: showDay(now(), access.cellar.timeZone) };
}
