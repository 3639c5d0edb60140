import betainc from '@stdlib/math-base-special-betainc';
import quantile from '@stdlib/stats-base-dists-f-quantile';
import { requireClosedProbability, requireDf, requireNumber } from './arguments';
import { chiSquareCdf, chiSquareQuantile, chiSquareSf } from './chi-square';
import { remember } from './remember';

function tail(f: number, df1: number, df2: number, upper: boolean): number {
  requireNumber(f, 'F');
  requireDf(df1, 'df1');
  requireDf(df2, 'df2');
  if (f <= 0) return upper ? 1 : 0;
  if (f === Infinity) return upper ? 0 : 1;
  if (df2 === Infinity) {
    if (df1 === Infinity) return (f < 1) === upper ? 1 : 0;
    return upper ? chiSquareSf(df1 * f, df1) : chiSquareCdf(df1 * f, df1);
  }
  if (df1 === Infinity) return upper ? chiSquareCdf(df2 / f, df2) : chiSquareSf(df2 / f, df2);
  const numerator = df1 * f;
  return numerator < df2
    ? betainc(numerator / (numerator + df2), df1 / 2, df2 / 2, true, upper)
    : betainc(df2 / (numerator + df2), df2 / 2, df1 / 2, true, !upper);
}

/**
 * Upper tail of Fisher's F, P(F > f), degrees of freedom above zero and not necessarily whole;
 * either may be Infinity (the chi-square limit). f ≤ 0 gives 1. Computed directly.
 * Throws on NaN and on df ≤ 0. Relative error below 1e-9, usually 1e-14.
 */
export function fSf(f: number, df1: number, df2: number): number {
  return tail(f, df1, df2, true);
}

/** Distribution function of Fisher's F, P(F ≤ f). Domain and accuracy as {@link fSf}. */
export function fCdf(f: number, df1: number, df2: number): number {
  return tail(f, df1, df2, false);
}

/**
 * Quantile of Fisher's F: the f with P(F ≤ f) = p, p in [0, 1].
 * Throws on p outside [0, 1], NaN, df ≤ 0. Relative error below 1e-11.
 * The last 256 answers are kept.
 */
export function fQuantile(p: number, df1: number, df2: number): number {
  requireClosedProbability(p);
  requireDf(df1, 'df1');
  requireDf(df2, 'df2');
  if (p === 0) return 0;
  if (p === 1) return Infinity;
  if (df1 === Infinity && df2 === Infinity) return 1;
  if (df2 === Infinity) return chiSquareQuantile(p, df1) / df1;
  if (df1 === Infinity) return df2 / chiSquareQuantile(1 - p, df2);
  return solved(p, df1, df2);
}

const solved = remember(256, quantile);
