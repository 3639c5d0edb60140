import 'server-only';
import { getDb, type Db, type Tx } from '@/db/client';
import type { SessionState } from '@/db/enums';
import { notFound } from 'next/navigation';
import type { Access } from '../auth/access';
import { allows } from '../auth/permissions';
import { AppError, asAppError } from '../errors';
import { methodOf } from '../methods';
import { UNIT_WORDS } from '../methods/types';
import { findSession, type SessionRow } from '../sessions/find';
import { showMoment } from '../time';
import { listEarlyOpenings, listGlasses, listItems, listOperations, listSamples, listSeats, readFrame } from './data';
import { countAnswers, type GlassFact } from './evidence';
import { spreadFound } from './found';
import { reportItems } from './report';
import { countAll, gatherSaid, viewSeats } from './said';
import type { EarlyOpeningView, NotYetView, ResultsView, SampleView } from './types';
import { commonWarnings } from './warnings';

/** What still has to happen before the results of a session in that state can be read. */
const MISSING: Record<SessionState, string[]> = {
  draft: ['Seal it: codes are drawn and the key is locked away.', 'Open it, taste, and close it.', 'Unseal it.'],
  sealed: ['Open it, taste, and close it.', 'Unseal it.'],
  open: ['Wait for the ballots that are still out, then close it.', 'Unseal it.'],
  closed: ['Unseal it: only then does the key say which glass was which.'],
  unsealed: [],
  abandoned: ['Nothing more comes: the session was given up before the key was opened.'],
};

/** The question is for those who work in the cellar; people who only taste read the neutral title. */
const aimFor = (access: Access, session: SessionRow) => (allows(access.roles, 'cellar.view') ? session.privateQuestion || session.title : session.title);

function withCodes(samples: readonly Omit<SampleView, 'codes'>[], glasses: readonly GlassFact[], isFlight: boolean): SampleView[] {
  return samples.map((sample) => {
    const own = glasses.filter((glass) => glass.sample === sample.sample).sort((a, b) => a.block - b.block);
    return { ...sample, codes: isFlight ? [...new Set(own.map((glass) => glass.code))] : [] };
  });
}

function viewOpenings(db: Tx | Db, session: SessionRow, timeZone: string): EarlyOpeningView[] {
  return listEarlyOpenings(db, session).map((row) => ({
    isGranted: row.approvedAt !== null,
    scope: row.code === null ? 'The whole session' : `Code ${row.code}`,
    reason: row.reason,
    requestedBy: row.requestedBy,
    requestedOn: showMoment(row.requestedAt, timeZone),
    decision: row.approvedAt ? `Approved by ${row.approvedBy ?? 'a second person'}, ${showMoment(row.approvedAt, timeZone)}.` : row.refusedAt ? 'Refused: nothing was opened.' : 'Never approved: nothing was opened.',
  }));
}

function assemble(db: Tx | Db, access: Access, session: SessionRow): ResultsView {
  const { timeZone } = access.cellar;
  const method = methodOf(session.method);
  const glasses = listGlasses(db, session);
  const seats = listSeats(db, session);
  const items = listItems(db, session);
  const answers = countAnswers(listOperations(db, session));
  const samples = withCodes(listSamples(db, session, timeZone), glasses, method.facts.glassesPerBlock === null);
  const numbers = samples.map((sample) => sample.sample);
  const counts = countAll({ answers, seats, glasses, items, facts: method.facts });
  const seatViews = viewSeats(seats, answers);
  const early = viewOpenings(db, session, timeZone);
  const found = method.analyse({ answers, glasses, seats, items, samples: numbers, replicates: session.replicates, alpha: session.alpha });
  const frame = readFrame(db, session);
  const granted = early.filter((opening) => opening.isGranted).length;
  return {
    session: {
      id: session.id, title: session.title, question: aimFor(access, session), method: session.method, state: session.state,
      abandonReason: session.abandonReason, unsealedOn: showMoment(session.unsealedAt!, timeZone), leader: frame.leader,
    },
    verdict: method.verdict(found, samples),
    warnings: [...commonWarnings(session, counts, seatViews, samples, granted), ...method.cautions(found)],
    samples, seats: seatViews, counts, ...spreadFound(found),
    said: gatherSaid({ answers, glasses, seats, items, samples: numbers, blockWord: UNIT_WORDS[method.facts.unit].block }),
    earlyOpenings: early,
    report: reportItems({
      session, facts: method.facts, aim: aimFor(access, session), frame, samples, counts, early, timeZone,
      checkHref: frame.commitment === null ? null : `/check/${frame.commitment}`,
    }),
    commitment: frame.commitment,
  };
}

/**
 * The results of a session, for handlers.
 * @throws AppError `not_found`, and `wrong_state` until the key is open: nothing of any answer before
 */
export function readResults(access: Access, sessionId: string): ResultsView {
  return getDb().transaction((tx) => assemble(tx, access, findUnsealed(tx, access, sessionId)));
}

function findUnsealed(tx: Tx, access: Access, sessionId: string): SessionRow {
  const session = findSession(tx, access.cellar.id, sessionId);
  if (session.unsealedAt === null) throw new AppError('wrong_state', 'The results can be read after unsealing.');
  return session;
}

/** For the page: the results, or what is missing until there are any; a foreign session is "not found". */
export function loadResults(access: Access, sessionId: string): { results: ResultsView; notYet: null } | { results: null; notYet: NotYetView } {
  try {
    return { results: readResults(access, sessionId), notYet: null };
  } catch (error) {
    const code = asAppError(error)?.code;
    if (code === 'not_found') notFound();
    if (code !== 'wrong_state') throw error;
    const session = findSession(getDb(), access.cellar.id, sessionId);
    return { results: null, notYet: { id: session.id, title: session.title, state: session.state, missing: MISSING[session.state] } };
  }
}
