import { requireFinite, requireInteger } from '../check';
import { StatsError } from '../errors';

/** Discrimination tests, by the name of their protocol. */
export type Protocol = 'triangle' | 'tetrad' | 'three_afc' | 'duo_trio' | 'two_afc' | 'two_out_of_five';

/**
 * Probability of a correct answer by guessing alone. Sources: ISO 4120 (triangle), ISO 10399 (duo-trio),
 * ISO 5495 (paired comparison = 2-AFC), ISO 6658 (two-out-of-five, 1 / C(5, 2)); tetrad 2 of the 6 sortings.
 */
export const CHANCE: Readonly<Record<Protocol, number>> = {
  triangle: 1 / 3,
  tetrad: 1 / 3,
  three_afc: 1 / 3,
  duo_trio: 1 / 2,
  two_afc: 1 / 2,
  two_out_of_five: 1 / 10,
};

/**
 * A tail that equals α counts as significant. Exact ties exist (two-out-of-five, 3 of 3: P = .001) and
 * floating point may put them a hair above α; this guard lets them in.
 */
export const TIE_GUARD = 1 + 1e-12;

/** Throws unless 0 < chance < 1. */
export function requireChance(chance: number): void {
  requireFinite(chance, 'chance');
  if (chance <= 0 || chance >= 1) throw new StatsError('out_of_range', 'chance must lie between 0 and 1');
}

/** Throws unless n is a whole number from 1 and 0 ≤ correct ≤ n. */
export function requireCounts(correct: number, n: number): void {
  requireInteger(n, 'number of answers', 1);
  requireInteger(correct, 'number of correct answers', 0, n);
}

/** Throws unless 0 < pd ≤ 1. */
export function requireDistinguishers(pd: number): void {
  requireFinite(pd, 'proportion of distinguishers');
  if (pd <= 0 || pd > 1) throw new StatsError('out_of_range', 'proportion of distinguishers must be above 0 and at most 1');
}
