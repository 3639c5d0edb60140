import betainc from '@stdlib/math-base-special-betainc';
import quantile from '@stdlib/stats-base-dists-t-quantile';
import { requireClosedProbability, requireDf, requireNumber } from './arguments';
import { normalQuantile, normalSf } from './normal';

/** P(|T| > |t|) from the incomplete beta function, by whichever form has the smaller argument. */
function outside(t: number, df: number): number {
  const square = t * t;
  if (square === Infinity) return 0;
  return square < df
    ? betainc(square / (df + square), 0.5, df / 2, true, true)
    : betainc(df / (df + square), df / 2, 0.5, true, false);
}

/**
 * Two-sided tail of Student's t, P(|T| > |t|), df > 0 (not necessarily whole; Infinity = normal).
 * Computed directly. Throws on NaN and on df ≤ 0. Relative error below 1e-11.
 */
export function tTwoSided(t: number, df: number): number {
  requireNumber(t, 't');
  requireDf(df, 'df');
  if (df === Infinity) return 2 * normalSf(Math.abs(t));
  return outside(t, df);
}

/**
 * Upper tail of Student's t, P(T > t), df > 0 (Infinity = normal). Computed directly.
 * Throws on NaN and on df ≤ 0. Relative error below 1e-11.
 */
export function tSf(t: number, df: number): number {
  requireNumber(t, 't');
  requireDf(df, 'df');
  if (df === Infinity) return normalSf(t);
  const half = outside(t, df) / 2;
  return t > 0 ? half : 1 - half;
}

/** Distribution function of Student's t, P(T ≤ t) = P(T > −t). Domain and accuracy as {@link tSf}. */
export function tCdf(t: number, df: number): number {
  return tSf(-t, df);
}

/**
 * Quantile of Student's t: the t with P(T ≤ t) = p, p in [0, 1], df > 0 (Infinity = normal).
 * Throws on p outside [0, 1], NaN, df ≤ 0. Relative error about 1e-14.
 */
export function tQuantile(p: number, df: number): number {
  requireClosedProbability(p);
  requireDf(df, 'df');
  if (df === Infinity) return normalQuantile(p);
  if (p === 0) return -Infinity;
  if (p === 1) return Infinity;
  if (p === 0.5) return 0;
  return quantile(p, df);
}
