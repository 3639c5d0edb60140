import { requireInteger } from '../check';
import { StatsError } from '../errors';
import { centre, columnSpread, fixSigns, thinSvd, toMatrix } from './svd';

export interface PcaOptions {
  /** True: correlation matrix (each variable divided by its standard deviation). False: covariance matrix. */
  scale?: boolean;
  /** Axes to report in full; all if left out. */
  axes?: number;
}

/** Principal components of a table of objects (rows) by variables (columns). */
export interface PcaResult {
  centre: number[];
  /** Standard deviation of each variable, divisor n - 1. */
  sd: number[];
  /** Variance along each axis, divisor n - 1; as many as the table has dimensions. */
  eigenvalues: number[];
  percent: number[];
  cumulativePercent: number[];
  /** Variables x axes, unit length each; the element of greatest size is positive. */
  eigenvectors: number[][];
  /** Objects x axes, in the unit of the (scaled) variables. */
  scores: number[][];
  /** Variables x axes: correlation of the variable with the scores; null for a constant variable. */
  correlations: (number | null)[][];
  /** Objects x axes: squared cosine, the share of the object's distance from the centre; null at the centre itself. */
  cos2: (number | null)[][];
  /** Objects x axes: share of the axis due to the object, in percent. */
  contributions: number[][];
}

/**
 * Principal component analysis by singular value decomposition of the centred table.
 *
 * Eigenvalues have divisor n - 1 (those with divisor n are (n - 1)/n times as large). The sign of an axis is arbitrary and
 * fixed here only so that the answer repeats. Axes with a standard deviation below 1e-9 of the first are not reported.
 *
 * @param table rows = objects (products), columns = variables (attributes), no missing values.
 * @throws StatsError `empty`, `shape`, `not_finite`, `too_few` (fewer than two objects), `constant` (all objects alike, or,
 * with `scale`, a variable that does not vary: leave it out), `out_of_range`, `not_integer`.
 * Source: Jolliffe, Principal Component Analysis, 2nd ed. Checked against R's prcomp to 1e-8.
 */
export function pca(table: ReadonlyArray<ArrayLike<number>>, { scale = false, axes }: PcaOptions = {}): PcaResult {
  const x = toMatrix(table, 'The table');
  const { rows: n, columns: p } = x;
  if (n < 2) throw new StatsError('too_few', 'Principal components need at least two objects');
  if (axes !== undefined) requireInteger(axes, 'The number of axes', 1);
  const means = centre(x);
  const sd = columnSpread(x, means, n - 1);
  for (let j = 0; j < p; j += 1) {
    if (sd[j] === 0) {
      if (scale) throw new StatsError('constant', `Variable ${j + 1} does not vary over the objects and cannot be scaled`);
      for (let i = 0; i < n; i += 1) x.set(i, j, 0);
    }
  }
  if (scale) x.divRowVector(sd);
  const { u, s, v } = fixSigns(thinSvd(x), 'v');
  const eigenvalues = s.map((value) => (value * value) / (n - 1));
  const total = eigenvalues.reduce((sum, value) => sum + value, 0);
  const percent = eigenvalues.map((value) => (100 * value) / total);
  let running = 0;
  const cumulativePercent = percent.map((value) => (running += value));
  const k = Math.min(axes ?? s.length, s.length);
  const first = Array.from({ length: k }, (_, a) => a);
  const scores: number[][] = [];
  const cos2: (number | null)[][] = [];
  const contributions: number[][] = [];
  for (let i = 0; i < n; i += 1) {
    let squares = 0;
    for (let j = 0; j < p; j += 1) squares += x.get(i, j) ** 2;
    const row = first.map((a) => u.get(i, a) * s[a]);
    scores.push(row);
    cos2.push(row.map((value) => (squares > 0 ? (value * value) / squares : null)));
    contributions.push(first.map((a) => 100 * u.get(i, a) ** 2));
  }
  const eigenvectors: number[][] = [];
  const correlations: (number | null)[][] = [];
  for (let j = 0; j < p; j += 1) {
    const spread = scale ? 1 : sd[j];
    eigenvectors.push(first.map((a) => v.get(j, a)));
    correlations.push(first.map((a) => (sd[j] > 0 ? (v.get(j, a) * Math.sqrt(eigenvalues[a])) / spread : null)));
  }
  return { centre: means, sd, eigenvalues, percent, cumulativePercent, eigenvectors, scores, correlations, cos2, contributions };
}
