import 'server-only';
import { getDb } from '@/db/client';
import { loadAccess, requireCapability, type Access } from '../auth/access';
import { allows } from '../auth/permissions';
import { readResults } from '../results/loaders';
import type { ProfileView } from '../results/types';
import { listMembers } from '../sessions/data';
import { listPastProfiles, mostBallots } from './data';
import { poolScatter, scatterOfLine, type LineScatter } from './plan-profile';

/** Sessions looked back on: a panel changes, and each costs an analysis. */
const LOOK_BACK = 8;

/** What the cellar has to plan with. */
export interface PlannerFacts {
  members: number;
  /** Most ballots handed in at one past session; 0 when there was none. */
  ballots: number;
  /** People that plans begin with. */
  panel: number;
  /** Scatter by line of the ballot from past sessions; null for those who may not see results. */
  past: {
    lines: ReturnType<typeof poolScatter>;
    sessions: number;
    /** Lines of those sessions with gaps or without a test. */
    leftOut: number;
  } | null;
}

/** A panel that plans begin with where a cellar has nobody yet. */
const NOBODY_YET = 8;

/** Lines of a past session whose error can be told: tested without gaps. */
function scattersOf(profile: ProfileView): LineScatter[] {
  return profile.lines
    .filter((line) => line.method === 'anova' && line.product !== null && line.smallestDifference !== null && line.assessors >= 2 && line.cells.length >= 2)
    .map((line) => scatterOfLine({
      name: `${line.name} (${line.phase})`, panelists: line.assessors, samples: line.cells.length, replicates: profile.replicates, alpha: profile.alpha,
      smallestDifference: line.smallestDifference!, interactionF: line.interaction?.F ?? null,
    }));
}

/**
 * The people and the panel's own past scatter, from unsealed sessions of this cellar only.
 * @throws AppError `forbidden` unless the person may design sessions
 */
export function readPlannerFacts(access: Access): PlannerFacts {
  requireCapability(access, 'session.design');
  const db = getDb();
  const { id } = access.cellar;
  const members = listMembers(db, id).length;
  const ballots = mostBallots(db, id);
  const facts = { members, ballots, panel: ballots || members || NOBODY_YET };
  if (!allows(access.roles, 'results.view')) return { ...facts, past: null };
  const profiles = listPastProfiles(db, id, LOOK_BACK).flatMap((sessionId) => readResults(access, sessionId).profile ?? []);
  const scatters = profiles.flatMap(scattersOf);
  const scored = profiles.reduce((sum, profile) => sum + profile.lines.length, 0);
  return { ...facts, past: { lines: poolScatter(scatters), sessions: profiles.length, leftOut: scored - scatters.length } };
}

/** For the page: access and facts; strangers find nothing there. */
export async function loadPlanner(slug: string): Promise<{ access: Access; facts: PlannerFacts }> {
  const access = await loadAccess(slug, 'session.design');
  return { access, facts: readPlannerFacts(access) };
}
