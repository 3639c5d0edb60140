import { Matrix } from 'ml-matrix';
import { chiSquareSf } from '../distributions';
import { StatsError } from '../errors';
import { fixSigns, thinSvd, toMatrix } from '../structure/svd';

/** The rows, or the columns, of a correspondence analysis. */
export interface CorrespondencePoints {
  /** Share of the grand total. */
  mass: number[];
  /** Points x axes, principal coordinates. */
  coordinates: number[][];
  /** Points x axes: share of the axis due to the point, in percent. */
  contributions: number[][];
  /** Points x axes: share of the point's own inertia on the axis; null for a point at the centre. */
  cos2: (number | null)[][];
}

/** Correspondence analysis of a table of counts. */
export interface CorrespondenceResult {
  /** Grand total. */
  n: number;
  /** Pearson's chi-square of the table; its p is only a guide when one person ticks several terms. */
  chiSquare: number;
  df: number;
  p: number;
  /** Chi-square over n. */
  totalInertia: number;
  /** Inertia of each axis, only those above 0, and its share in percent. */
  eigenvalues: number[];
  percent: number[];
  rows: CorrespondencePoints;
  columns: CorrespondencePoints;
}

/**
 * Simple correspondence analysis: a map of the rows (products) and columns (terms) of a table of counts.
 *
 * Singular value decomposition of (P - r c')/sqrt(r c'), with P the shares of the grand total and r, c its margins. Rows
 * and columns are both in principal coordinates (symmetric map): distances among rows, and among columns, are chi-square
 * distances; a distance between a row and a column has no meaning. Signs are arbitrary; the row with the coordinate of
 * greatest size is positive.
 *
 * @param table counts (or other amounts from 0 up), at least 2 x 2.
 * @throws StatsError `empty`, `shape`, `not_finite`, `too_few`, `out_of_range` (below 0), `constant` (a row or a column is all
 * 0: leave it out; or rows and columns are exactly independent, so that there is no axis).
 * Source: Greenacre, Correspondence Analysis in Practice, 3rd ed. Checked against FactoMineR 2.7 and ade4 1.7-22 to 1e-8.
 */
export function correspondenceAnalysis(table: ReadonlyArray<ArrayLike<number>>): CorrespondenceResult {
  const counts = toMatrix(table, 'The table of counts');
  const { rows: rowCount, columns: columnCount } = counts;
  if (rowCount < 2 || columnCount < 2) throw new StatsError('too_few', 'The table must have at least two rows and two columns');
  if (counts.min() < 0) throw new StatsError('out_of_range', 'Counts must not be below 0');
  const n = counts.sum();
  if (!Number.isFinite(n)) throw new StatsError('out_of_range', 'The values are too large to compute with');
  const r = counts.sum('row').map((sum) => sum / n);
  const c = counts.sum('column').map((sum) => sum / n);
  r.forEach((mass, i) => {
    if (!(mass > 0)) throw new StatsError('constant', `Row ${i + 1} of the table holds no counts`);
  });
  c.forEach((mass, j) => {
    if (!(mass > 0)) throw new StatsError('constant', `Column ${j + 1} of the table holds no counts`);
  });
  const residuals = new Matrix(rowCount, columnCount);
  let totalInertia = 0;
  for (let i = 0; i < rowCount; i += 1) {
    for (let j = 0; j < columnCount; j += 1) {
      const expected = r[i] * c[j];
      const residual = (counts.get(i, j) / n - expected) / Math.sqrt(expected);
      residuals.set(i, j, residual);
      totalInertia += residual * residual;
    }
  }
  if (totalInertia < 1e-28) throw new StatsError('constant', 'All rows have one profile, so there are no axes to find');
  const { u, s, v } = fixSigns(scaledByMass(thinSvd(residuals), r, c), 'u');
  const axes = s.slice(0, Math.min(rowCount, columnCount) - 1);
  const eigenvalues = axes.map((value) => value * value);
  const df = (rowCount - 1) * (columnCount - 1);
  const points = (vectors: Matrix, mass: number[]): CorrespondencePoints => {
    const coordinates = mass.map((_, i) => axes.map((value, a) => vectors.get(i, a) * value));
    return {
      mass,
      coordinates,
      contributions: coordinates.map((row, i) => row.map((f, a) => (100 * mass[i] * f * f) / eigenvalues[a])),
      cos2: coordinates.map((row) => {
        const squares = row.reduce((sum, f) => sum + f * f, 0);
        return row.map((f) => (squares > 0 ? (f * f) / squares : null));
      }),
    };
  };
  const chiSquare = n * totalInertia;
  return {
    n,
    chiSquare,
    df,
    p: chiSquareSf(chiSquare, df),
    totalInertia,
    eigenvalues,
    percent: eigenvalues.map((value) => (100 * value) / totalInertia),
    rows: points(u, r),
    columns: points(v, c),
  };
}

/** Standard coordinates: singular vectors over the roots of the masses. */
function scaledByMass({ u, s, v }: ReturnType<typeof thinSvd>, r: number[], c: number[]): ReturnType<typeof thinSvd> {
  return { u: u.divColumnVector(r.map(Math.sqrt)), s, v: v.divColumnVector(c.map(Math.sqrt)) };
}
