import { normalSf } from '../distributions';
import { requireFinite, requireFiniteArray } from '../check';
import { StatsError } from '../errors';
import { midranks } from '../ranks/midranks';

/** Wilcoxon's signed-rank test. */
export interface WilcoxonResult {
  /** Differences of 0 that were dropped, and differences that remained. */
  zeros: number;
  n: number;
  /** Sum of the ranks of the positive differences, and of the negative ones. */
  vPlus: number;
  vMinus: number;
  /** Whether two differences had the same size. */
  ties: boolean;
  /** Normal approximation with tie-corrected variance, without and with continuity correction; p two-sided. */
  z: number;
  p: number;
  zContinuity: number;
  pContinuity: number;
  /** Exact permutation p given the mid-ranks; null above 500 differences. */
  exact: { greater: number; less: number; twoSided: number } | null;
}

const MOST_EXACT = 500;

/**
 * Wilcoxon's signed-rank test of paired scores: is the middle of the differences away from 0?
 *
 * Zeros are dropped. Sizes get mid-ranks, and the exact p is the permutation distribution of those mid-ranks over all
 * 2^n signs; two-sided = twice the smaller tail, at most 1. Variance n(n + 1)(2n + 1)/24 - sum(t^3 - t)/48.
 *
 * @param differences first score less second, one for each pair. Assumed symmetric about their middle.
 * @param tolerance sizes (and zeros) this close count as equal, in the unit of the scores; the default, 1e-9 of the
 * largest size, undoes the rounding of decimal scores (8.3 - 7.1 and 7.3 - 6.1 differ in the last bit). 0 = bit for bit.
 * @throws StatsError `empty`, `not_finite`, `out_of_range` (tolerance below 0), `constant` (all differences are 0).
 * Source: Wilcoxon (1945); Hollander & Wolfe, sec. 3.1; Pratt & Gibbons on ties. Checked against R 4.2.2 and
 * exactRankTests 0.8-35 to 1e-10.
 */
export function wilcoxonSignedRank(differences: ArrayLike<number>, tolerance?: number): WilcoxonResult {
  requireFiniteArray(differences, 'The list of differences');
  let largest = 0;
  for (let i = 0; i < differences.length; i += 1) largest = Math.max(largest, Math.abs(differences[i]));
  const near = tolerance ?? 1e-9 * largest;
  requireFinite(near, 'The tolerance');
  if (near < 0) throw new StatsError('out_of_range', 'The tolerance must not be below 0');
  const kept = Array.from(differences).filter((d) => Math.abs(d) > near);
  const n = kept.length;
  if (n === 0) throw new StatsError('constant', 'All differences are 0, so there is no direction to test');
  const ranks = midranks(merged(kept.map(Math.abs), near));
  let vPlus = 0;
  kept.forEach((d, i) => {
    if (d > 0) vPlus += ranks[i];
  });
  const sizes = new Map<number, number>();
  for (const rank of ranks) sizes.set(rank, (sizes.get(rank) ?? 0) + 1);
  let tieSum = 0;
  for (const t of sizes.values()) tieSum += t * t * t - t;
  const mean = (n * (n + 1)) / 4;
  const sd = Math.sqrt((n * (n + 1) * (2 * n + 1)) / 24 - tieSum / 48);
  const z = (vPlus - mean) / sd;
  const zContinuity = (vPlus - mean - Math.sign(vPlus - mean) / 2) / sd;
  return {
    zeros: differences.length - n,
    n,
    vPlus,
    vMinus: 2 * mean - vPlus,
    ties: tieSum > 0,
    z,
    p: 2 * normalSf(Math.abs(z)),
    zContinuity,
    pContinuity: 2 * normalSf(Math.abs(zContinuity)),
    exact: n <= MOST_EXACT ? signPermutation(ranks, vPlus) : null,
  };
}

/** Gives sizes that follow each other within `near` one value, so that they tie. */
function merged(sizes: number[], near: number): number[] {
  const order = sizes.map((_, i) => i).sort((a, b) => sizes[a] - sizes[b]);
  const result = new Array<number>(sizes.length);
  order.forEach((at, place) => {
    const before = place > 0 ? order[place - 1] : at;
    result[at] = sizes[at] - sizes[before] <= near && place > 0 ? result[before] : sizes[at];
  });
  return result;
}

/** Tails of the sum of positive ranks when every sign is as likely as the other. Doubled ranks are whole numbers. */
function signPermutation(ranks: number[], vPlus: number): { greater: number; less: number; twoSided: number } {
  const doubled = ranks.map((r) => 2 * r);
  const total = doubled.reduce((sum, r) => sum + r, 0);
  const probability = new Float64Array(total + 1);
  probability[0] = 1;
  let reach = 0;
  for (const r of doubled) {
    for (let i = reach + r; i >= 0; i -= 1) {
      const without = i <= reach ? probability[i] : 0;
      probability[i] = (without + (i >= r ? probability[i - r] : 0)) / 2;
    }
    reach += r;
  }
  const seen = 2 * vPlus;
  let greater = 0;
  let less = 0;
  for (let i = total; i >= seen; i -= 1) greater += probability[i];
  for (let i = 0; i <= seen; i += 1) less += probability[i];
  return { greater: Math.min(1, greater), less: Math.min(1, less), twoSided: Math.min(1, 2 * Math.min(greater, less)) };
}
