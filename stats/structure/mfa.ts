import { Matrix } from 'ml-matrix';
import { requireInteger } from '../check';
import { StatsError } from '../errors';
import { crossInner } from '../panel/rv';
import { centre, columnSpread, fixSigns, thinSvd, toMatrix } from './svd';

/** One group of variables on the objects that all groups share. */
export interface MfaGroup {
  /** Rows = objects, columns = variables of the group. */
  table: ReadonlyArray<ArrayLike<number>>;
  /** Divide each variable by its standard deviation (divisor n). */
  scale: boolean;
}

/** Multiple factor analysis. */
export interface MfaResult {
  eigenvalues: number[];
  percent: number[];
  cumulativePercent: number[];
  /** First eigenvalue of each group's own principal components (divisor n); the group is divided by its root. */
  separateFirstEigenvalues: number[];
  /** Objects x axes. */
  coordinates: number[][];
  /** Groups x objects x axes: where the group alone would place the object; their mean is `coordinates`. */
  partialCoordinates: number[][][];
  /** Groups x axes, each from 0 to 1: how much of the axis the group carries. */
  groupCoordinates: number[][];
  /** Groups x groups: RV coefficient between the groups' configurations. */
  rv: number[][];
}

/**
 * Multiple factor analysis: one map of the objects out of several groups of variables with balanced weight.
 *
 * Each group is centred (and scaled if asked), divided by the square root of the first eigenvalue of its own principal
 * components (weights 1/n), and all are put side by side for one global principal component analysis. Signs as in a map
 * are arbitrary; the object with the coordinate of greatest size on an axis is positive.
 *
 * @param groups at least one, all with the same objects in the same order; no missing values.
 * @param axes axes to report in full; all if left out.
 * @throws StatsError `empty`, `shape`, `not_finite`, `too_few`, `constant` (a variable to be scaled, or a whole group, does
 * not vary), `not_integer`, `out_of_range`.
 * Source: Escofier & Pages (1994) Comput. Stat. Data Anal. 18:121. Checked against FactoMineR 2.7 to 1e-7.
 */
export function multipleFactorAnalysis(groups: ReadonlyArray<MfaGroup>, axes?: number): MfaResult {
  if (groups.length === 0) throw new StatsError('empty', 'There are no groups of variables');
  if (axes !== undefined) requireInteger(axes, 'The number of axes', 1);
  const separateFirstEigenvalues: number[] = [];
  const weighted = groups.map((group, g) => {
    const { matrix, first } = weigh(group, g);
    separateFirstEigenvalues.push(first);
    return matrix;
  });
  const n = weighted[0].rows;
  if (weighted.some((matrix) => matrix.rows !== n)) throw new StatsError('shape', 'All groups must describe the same objects');
  const width = weighted.reduce((sum, matrix) => sum + matrix.columns, 0);
  const joined = new Matrix(n, width);
  let start = 0;
  for (const matrix of weighted) {
    joined.setSubMatrix(matrix, 0, start);
    start += matrix.columns;
  }
  const { u, s, v } = fixSigns(thinSvd(joined.mul(1 / Math.sqrt(n))), 'u');
  const eigenvalues = s.map((value) => value * value);
  const total = eigenvalues.reduce((sum, value) => sum + value, 0);
  const percent = eigenvalues.map((value) => (100 * value) / total);
  let running = 0;
  const k = Math.min(axes ?? s.length, s.length);
  const root = Math.sqrt(n);
  const coordinates = Array.from({ length: n }, (_, i) => Array.from({ length: k }, (_, a) => root * u.get(i, a) * s[a]));
  const groupCoordinates: number[][] = [];
  const partialCoordinates: number[][][] = [];
  start = 0;
  for (const matrix of weighted) {
    const vg = v.subMatrix(start, start + matrix.columns - 1, 0, k - 1);
    groupCoordinates.push(
      Array.from({ length: k }, (_, a) => eigenvalues[a] * vg.getColumn(a).reduce((sum, value) => sum + value * value, 0)),
    );
    partialCoordinates.push(matrix.mmul(vg).mul(groups.length).to2DArray());
    start += matrix.columns;
  }
  return {
    eigenvalues,
    percent,
    cumulativePercent: percent.map((value) => (running += value)),
    separateFirstEigenvalues,
    coordinates,
    partialCoordinates,
    groupCoordinates,
    rv: rvMatrix(weighted),
  };
}

function weigh({ table, scale }: MfaGroup, g: number): { matrix: Matrix; first: number } {
  const matrix = toMatrix(table, `Group ${g + 1}`);
  const n = matrix.rows;
  if (n < 2) throw new StatsError('too_few', 'A map needs at least two objects');
  const means = centre(matrix);
  const sd = columnSpread(matrix, means, n);
  sd.forEach((value, j) => {
    if (value > 0) return;
    if (scale) throw new StatsError('constant', `Variable ${j + 1} of group ${g + 1} does not vary over the objects and cannot be scaled`);
    for (let i = 0; i < n; i += 1) matrix.set(i, j, 0);
  });
  if (sd.every((value) => value === 0)) throw new StatsError('constant', `Group ${g + 1} tells no two objects apart`);
  if (scale) matrix.divRowVector(sd);
  const first = thinSvd(matrix).s[0] ** 2 / n;
  return { matrix: matrix.div(Math.sqrt(first)), first };
}

/** RV = tr(Wa Wb)/sqrt(tr(Wa Wa) tr(Wb Wb)), with W = X X'. */
function rvMatrix(tables: Matrix[]): number[][] {
  const own = tables.map((x) => crossInner(x, x));
  return tables.map((a, i) => tables.map((b, j) => (i === j ? 1 : crossInner(a, b) / Math.sqrt(own[i] * own[j]))));
}
