import { betaQuantile, binomialSf } from '../distributions';
import { requireInteger, requireProbability } from '../check';
import { StatsError } from '../errors';

export interface PairedPreferenceOptions {
  /**
   * What becomes of "no preference": `exclude` drops those answers; `split` gives half to each product, an odd one to the
   * product with fewer votes, so that it never makes a difference look greater.
   */
  noPreference?: 'exclude' | 'split';
  /** Confidence level of the interval, 0.95 unless given. */
  level?: number;
}

/** A paired preference test. */
export interface PairedPreferenceResult {
  /** Answers that were counted, and how many of them were for the first product. */
  n: number;
  first: number;
  /** Exact binomial p that preferences are even: two-sided, and one-sided for the first and for the second product. */
  pTwoSided: number;
  pFirst: number;
  pSecond: number;
  /** Share of the counted answers for the first product, with its Clopper-Pearson interval. */
  share: number;
  lower: number;
  upper: number;
}

/**
 * Paired preference: exact test that as many people prefer one product as the other.
 *
 * Two-sided p = min(1, 2 P(X >= larger count)), X binomial(n, 1/2). The two-sided test is the right one unless only one
 * direction was of interest before the tasting. No preference shown is not proof that people like both alike.
 *
 * @param first people for the first product. @param second for the second. @param none with no preference.
 * @throws StatsError `not_integer`, `out_of_range`, `not_finite`, `too_few` (no answer left to count).
 * Source: ISO 5495 for the binomial test; Clopper & Pearson (1934) Biometrika 26:404 for the interval.
 */
export function pairedPreference(
  first: number,
  second: number,
  none = 0,
  { noPreference = 'exclude', level = 0.95 }: PairedPreferenceOptions = {},
): PairedPreferenceResult {
  requireInteger(first, 'The number for the first product', 0, 1e9);
  requireInteger(second, 'The number for the second product', 0, 1e9);
  requireInteger(none, 'The number with no preference', 0, 1e9);
  requireProbability(level, 'The confidence level');
  let x = first;
  let n = first + second;
  if (noPreference === 'split') {
    x += Math.floor(none / 2) + (none % 2 === 1 && first < second ? 1 : 0);
    n += none;
  }
  if (n === 0) throw new StatsError('too_few', 'Nobody stated a preference');
  const tail = (1 - level) / 2;
  return {
    n,
    first: x,
    pTwoSided: Math.min(1, 2 * binomialSf(Math.max(x, n - x), n, 0.5)),
    pFirst: binomialSf(x, n, 0.5),
    pSecond: binomialSf(n - x, n, 0.5),
    share: x / n,
    lower: x === 0 ? 0 : betaQuantile(tail, x, n - x + 1),
    upper: x === n ? 1 : betaQuantile(1 - tail, x + 1, n - x),
  };
}
