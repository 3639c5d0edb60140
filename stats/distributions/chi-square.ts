import gammainc from '@stdlib/math-base-special-gammainc';
import quantile from '@stdlib/stats-base-dists-chisquare-quantile';
import { requireFinite } from '../check';
import { requireClosedProbability, requireDf, requireNumber } from './arguments';

function tail(x: number, df: number, upper: boolean): number {
  requireNumber(x, 'chi-square');
  requireFinite(df, 'df');
  requireDf(df, 'df');
  if (x <= 0) return upper ? 1 : 0;
  if (x === Infinity) return upper ? 0 : 1;
  return gammainc(x / 2, df / 2, true, upper);
}

/**
 * Upper tail of chi-square, P(X > x), df > 0 and finite, not necessarily whole. x ≤ 0 gives 1.
 * Computed directly. Throws on NaN and on df ≤ 0. Relative error below 1e-13.
 */
export function chiSquareSf(x: number, df: number): number {
  return tail(x, df, true);
}

/** Distribution function of chi-square, P(X ≤ x). Domain and accuracy as {@link chiSquareSf}. */
export function chiSquareCdf(x: number, df: number): number {
  return tail(x, df, false);
}

/**
 * Quantile of chi-square: the x with P(X ≤ x) = p, p in [0, 1], df > 0 and finite.
 * Throws on p outside [0, 1], NaN, df ≤ 0. Relative error about 1e-13.
 */
export function chiSquareQuantile(p: number, df: number): number {
  requireClosedProbability(p);
  requireFinite(df, 'df');
  requireDf(df, 'df');
  if (p === 0) return 0;
  if (p === 1) return Infinity;
  return quantile(p, df);
}
