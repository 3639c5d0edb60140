import 'server-only';
import { getDb } from '@/db/client';
import { notFound } from 'next/navigation';
import type { Access } from '../auth/access';
import { asAppError } from '../errors';
import { findSession } from '../sessions/find';
import { dayIn } from '../time';
import { now } from '../clock';
import { listCalls, listFillsOfSession, listPresentFills } from './data';
import type { CallFilter } from './schema';
import type { CallDraft, CallView } from './types';

/** Most rows that the list shows at once. */
export const LIST_LIMIT = 200;

const BY: Record<CallFilter['sort'], (a: CallView, b: CallView) => number> = {
  next: (a, b) => (a.nextDay ?? '9999').localeCompare(b.nextDay ?? '9999'),
  // The list comes newest first already.
  decided: () => 0,
  barrel: (a, b) => a.vessel.name.localeCompare(b.vessel.name, 'en', { numeric: true }),
};

/** The calls that the filter asks for. `total` counts all that fit, `calls` holds the first of them. */
export function loadCalls(access: Access, filter: CallFilter): { calls: CallView[]; total: number; ever: number } {
  const all = listCalls(access);
  const find = filter.find.toLowerCase();
  const fitting = all
    .filter((call) => filter.show === 'all' || call.status === filter.show)
    .filter((call) => !filter.kind || call.kind === filter.kind)
    .filter((call) => !find || `${call.vessel.name} ${call.lot.code} ${call.reasons}`.toLowerCase().includes(find))
    .sort(BY[filter.sort]);
  return { calls: fitting.slice(0, LIST_LIMIT), total: fitting.length, ever: all.length };
}

/** One call, or "not found". */
export function loadCall(access: Access, callId: string): CallView {
  return listCalls(access).find((call) => call.id === callId) ?? notFound();
}

const sessionOf = (access: Access, sessionId: string) => {
  try {
    return findSession(getDb(), access.cellar.id, sessionId);
  } catch (error) {
    if (asAppError(error)?.code === 'not_found') notFound();
    throw error;
  }
};

/**
 * What "Record the call" starts with: from a session its samples' fills, from a barrel what it
 * holds now, from nowhere every vessel's present fill.
 */
export function loadCallDraft(access: Access, from: { session?: string; sample?: string; vessel?: string }): CallDraft {
  const today = dayIn(now(), access.cellar.timeZone);
  if (from.session) {
    const session = sessionOf(access, from.session);
    if (session.state !== 'unsealed') notFound();
    const fills = listFillsOfSession(getDb(), access.cellar.id, session.id);
    const options = [...new Map(fills.map(({ fillId, label }) => [fillId, { fillId, label }])).values()];
    const chosen = fills.find((fill) => fill.sampleId === from.sample) ?? fills.find((fill) => fill.vesselId === from.vessel);
    return { options, fillId: chosen?.fillId ?? null, session: { id: session.id, title: session.title }, today };
  }
  const fills = listPresentFills(access);
  return {
    options: fills.map(({ fillId, label }) => ({ fillId, label })),
    fillId: fills.find((fill) => fill.vesselId === from.vessel)?.fillId ?? null,
    session: null,
    today,
  };
}
