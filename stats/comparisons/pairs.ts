import { requireFinite, requireFiniteArray, requireProbability } from '../check';
import { studentizedRangeQuantile, studentizedRangeTail, tQuantile, tTwoSided } from '../distributions';
import { StatsError } from '../errors';

export interface PairQuestion {
  /** One mean for each product; at most 2,000. */
  readonly means: ArrayLike<number>;
  /** Scores behind each mean: one number for all, or one for each (Tukey–Kramer). */
  readonly n: number | ArrayLike<number>;
  /** The mean square that the means are judged by (product tests: the interaction's) and its degrees of freedom. */
  readonly ms: number;
  readonly df: number;
  readonly alpha: number;
}

/** One pair: `difference` = mean of `second` − mean of `first`, with limits at 1 − α. */
export interface Pair {
  readonly first: number;
  readonly second: number;
  readonly difference: number;
  readonly standardError: number;
  readonly p: number;
  readonly low: number;
  readonly high: number;
  readonly isShown: boolean;
}

export interface Comparisons {
  /** Every pair, (0,1), (0,2), … (1,2), … */
  readonly pairs: readonly Pair[];
  /** q(1 − α; k, df) for Tukey, t(1 − α/2; df) for LSD. */
  readonly critical: number;
  /** Smallest difference that is shown at α; null when the n differ (each pair has its own). */
  readonly criticalDifference: number | null;
}

/** Pairs grow with the square of the means. */
const MOST_MEANS = 2000;

function requireQuestion({ means, n, ms, df, alpha }: PairQuestion): void {
  requireFiniteArray(means, 'means');
  if (means.length < 2) throw new StatsError('too_few', 'A comparison needs at least two means');
  if (means.length > MOST_MEANS) throw new StatsError('out_of_range', `Pairs are compared for at most ${MOST_MEANS} means`);
  requireFinite(ms, 'mean square');
  if (ms <= 0) throw new StatsError('constant', 'The error mean square is 0: the scores leave nothing to judge differences by');
  requireFinite(df, 'degrees of freedom');
  if (df <= 0) throw new StatsError('too_few', 'There are no degrees of freedom for the error');
  requireProbability(alpha, 'alpha');
  if (typeof n !== 'number') {
    requireFiniteArray(n, 'numbers of scores');
    if (n.length !== means.length) throw new StatsError('shape', 'There must be one number of scores for each mean');
  }
  for (let i = 0; i < means.length; i += 1) if (countOf(n, i) < 1) throw new StatsError('out_of_range', 'Each mean must have at least one score');
}

const countOf = (n: PairQuestion['n'], i: number): number => (typeof n === 'number' ? n : n[i]);

function compare(question: PairQuestion, critical: number, perSe: number, tail: (t: number) => number): Comparisons {
  const { means, n, ms, alpha } = question;
  const pairs: Pair[] = [];
  for (let first = 0; first < means.length; first += 1) {
    for (let second = first + 1; second < means.length; second += 1) {
      const difference = means[second] - means[first];
      const standardError = Math.sqrt(ms * (1 / countOf(n, first) + 1 / countOf(n, second)));
      const reach = perSe * standardError;
      const p = tail(Math.abs(difference) / standardError);
      pairs.push({ first, second, difference, standardError, p, low: difference - reach, high: difference + reach, isShown: p <= alpha });
    }
  }
  const criticalDifference = typeof n === 'number' ? perSe * Math.sqrt((2 * ms) / n) : null;
  return { pairs, critical, criticalDifference };
}

/**
 * Tukey's honestly significant differences of all pairs (Tukey–Kramer when the n differ):
 * |difference| against q(1 − α; k, df) √(ms (1/n₁ + 1/n₂) / 2). The chance of any false difference
 * among all pairs is at most α. p to about 1e-10.
 */
export function tukeyComparisons(question: PairQuestion): Comparisons {
  requireQuestion(question);
  const k = question.means.length;
  const q = studentizedRangeQuantile(1 - question.alpha, k, question.df);
  const sf = studentizedRangeTail(k, question.df);
  return compare(question, q, q / Math.SQRT2, (t) => sf(t * Math.SQRT2));
}

/**
 * Fisher's least significant differences: a t test of each pair with the common error, without a
 * guard for many pairs. Exploratory.
 */
export function lsdComparisons(question: PairQuestion): Comparisons {
  requireQuestion(question);
  const t = tQuantile(1 - question.alpha / 2, question.df);
  return compare(question, t, t, (x) => tTwoSided(x, question.df));
}
