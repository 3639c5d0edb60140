import { requireInteger, requireProbability } from '../check';
import { binomialCdf, binomialPmf, binomialSf, normalQuantile } from '../distributions';
import { StatsError } from '../errors';
import { requireChance, requireCounts, TIE_GUARD } from './protocols';

/** p-values of a number of correct answers against guessing. */
export interface BinomialTest {
  /** Exact one-sided p: P(X ≥ correct | n, chance). The p-value of every one-sided discrimination test. */
  readonly p: number;
  /** Two-sided: twice the smaller tail, at most 1. For chance ½ this is the paired comparison's p. */
  readonly twoSided: number;
  /** Two-sided: total probability of all outcomes no more likely than the one seen. */
  readonly twoSidedByLikelihood: number;
}

/**
 * Exact binomial test of `correct` answers out of `n` (1 to 1e9) against guessing with probability `chance`.
 * Throws on counts that are not whole, correct outside 0..n, chance outside (0, 1).
 * Relative error of p below 1e-12. Source: definition; ISO 4120:2021 8.1, ISO 5495 7.2.
 */
export function binomialTest({ correct, n, chance }: { correct: number; n: number; chance: number }): BinomialTest {
  requireCounts(correct, n);
  requireChance(chance);
  const upper = binomialSf(correct, n, chance);
  const lower = binomialCdf(correct, n, chance);
  return {
    p: upper,
    twoSided: Math.min(1, 2 * Math.min(upper, lower)),
    twoSidedByLikelihood: byLikelihood(correct, n, chance, upper, lower),
  };
}

function byLikelihood(x: number, n: number, chance: number, upper: number, lower: number): number {
  const mode = Math.min(n, Math.floor((n + 1) * chance));
  // Equal probabilities must count as equal in floating point.
  const limit = binomialPmf(x, n, chance) * (1 + 1e-7);
  const unlikely = (k: number) => binomialPmf(k, n, chance) <= limit;
  if (unlikely(mode)) return 1;
  if (x < mode) {
    let [likely, k] = [mode, n + 1];
    while (k - likely > 1) {
      const middle = Math.floor((likely + k) / 2);
      if (unlikely(middle)) k = middle;
      else likely = middle;
    }
    return Math.min(1, lower + binomialSf(k, n, chance));
  }
  let [k, likely] = [-1, mode];
  while (likely - k > 1) {
    const middle = Math.floor((likely + k) / 2);
    if (unlikely(middle)) k = middle;
    else likely = middle;
  }
  return Math.min(1, upper + binomialCdf(k, n, chance));
}

/** Options of tests that may look to both sides. */
export interface Sides {
  /** Both directions count (paired comparison without an expected direction). Needs chance ½. */
  readonly twoSided?: boolean;
}

/** Throws when both sides are asked for and guessing is not symmetric. */
export function requireSides(chance: number, { twoSided }: Sides): void {
  if (twoSided && chance !== 0.5) {
    throw new StatsError('out_of_range', 'A two-sided test needs a guessing probability of one half');
  }
}

/**
 * Smallest number of correct answers that is significant: the smallest x with P(X ≥ x | n, chance) ≤ α,
 * or 2 P(X ≥ x) ≤ α with `twoSided` (chance ½ only). P equal to α counts as significant.
 * null when not even n of n is. n from 1, α and chance in (0, 1); throws otherwise. Exact.
 * Source: ISO 4120:2021 table A.1, ISO 10399 table A.1, ISO 5495 tables A.1 and A.2 by definition.
 */
export function minimumCorrect(n: number, alpha: number, chance: number, sides: Sides = {}): number | null {
  requireInteger(n, 'number of answers', 1);
  requireProbability(alpha, 'alpha');
  requireChance(chance);
  requireSides(chance, sides);
  const limit = (sides.twoSided ? alpha / 2 : alpha) * TIE_GUARD;
  const deviation = Math.sqrt(n * chance * (1 - chance));
  const guess = Math.round(n * chance + 0.5 - normalQuantile(Math.min(limit, 0.999)) * deviation);
  let x = Math.min(n, Math.max(1, guess));
  let tail = binomialSf(x, n, chance);
  let mass = binomialPmf(x, n, chance);
  const odds = chance / (1 - chance);
  while (tail > limit && x <= n) {
    tail -= mass;
    mass *= ((n - x) / (x + 1)) * odds;
    x += 1;
    // The subtraction above may leave rounding behind; the last steps are taken afresh.
    if (tail < 2 * limit) tail = binomialSf(x, n, chance);
  }
  if (x > n) return null;
  for (;;) {
    mass *= x / ((n - x + 1) * odds);
    if (x === 1 || tail + mass > limit) return x;
    tail += mass;
    x -= 1;
  }
}
