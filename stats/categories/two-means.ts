import { tTwoSided } from '../distributions';

/** A t test of two means: difference first less second. */
export interface TwoMeansTest {
  t: number;
  df: number;
  /** Two-sided. */
  p: number;
}

/** Welch's and the pooled t test of two independent groups. */
export interface TwoMeans {
  difference: number;
  welch: TwoMeansTest;
  pooled: TwoMeansTest;
}

/** Mean and sum of squares about it, in two passes. */
function moments(values: ArrayLike<number>): { n: number; mean: number; squares: number } {
  const n = values.length;
  let mean = 0;
  for (let i = 0; i < n; i += 1) mean += values[i] / n;
  let squares = 0;
  for (let i = 0; i < n; i += 1) squares += (values[i] - mean) ** 2;
  return { n, mean, squares };
}

/**
 * Compares two groups of values; null when a group has fewer than two values or neither varies.
 *
 * Source: Welch (1947) Biometrika 34:28, and Student's pooled t. Checked against R's t.test to 1e-10.
 */
export function twoMeans(first: ArrayLike<number>, second: ArrayLike<number>): TwoMeans | null {
  if (first.length < 2 || second.length < 2) return null;
  const a = moments(first);
  const b = moments(second);
  if (a.squares + b.squares <= 1e-24 * (a.n * a.mean ** 2 + b.n * b.mean ** 2)) return null;
  const difference = a.mean - b.mean;
  const va = a.squares / (a.n - 1) / a.n;
  const vb = b.squares / (b.n - 1) / b.n;
  const welchDf = (va + vb) ** 2 / (va ** 2 / (a.n - 1) + vb ** 2 / (b.n - 1));
  const pooledDf = a.n + b.n - 2;
  const pooledSe = Math.sqrt(((a.squares + b.squares) / pooledDf) * (1 / a.n + 1 / b.n));
  const test = (t: number, df: number): TwoMeansTest => ({ t, df, p: tTwoSided(t, df) });
  return { difference, welch: test(difference / Math.sqrt(va + vb), welchDf), pooled: test(difference / pooledSe, pooledDf) };
}
