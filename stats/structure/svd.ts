import { EigenvalueDecomposition, Matrix, SingularValueDecomposition } from 'ml-matrix';
import { StatsError } from '../errors';

/** Singular value decomposition x = u diag(s) v', only the axes with s above a small share of the first. */
export interface ThinSvd {
  /** n x r, orthonormal columns. */
  u: Matrix;
  /** Falling, all above 0. */
  s: number[];
  /** p x r, orthonormal columns. */
  v: Matrix;
}

/** Beyond this many rows the cross-product is decomposed: a few digits fewer on the last axes, but time linear in the rows. */
const TALL = 2000;

/**
 * Thin singular value decomposition of a finite matrix; axes with s <= tolerance x first s are dropped.
 *
 * @throws StatsError `constant` when the matrix is all 0, `out_of_range` when its squares overflow.
 */
export function thinSvd(x: Matrix, tolerance = 1e-9): ThinSvd {
  const norm = x.norm();
  if (!Number.isFinite(norm)) throw new StatsError('out_of_range', 'The values are too large to compute with');
  if (norm === 0) throw new StatsError('constant', 'All objects are alike, so there are no axes to find');
  if (x.rows > TALL && x.rows > 4 * x.columns) return tallSvd(x, Math.max(tolerance, 1e-7));
  const svd = new SingularValueDecomposition(x, { autoTranspose: true });
  const all = svd.diagonal;
  const order = all.map((_, i) => i).sort((a, b) => all[b] - all[a]);
  const kept = order.filter((i) => all[i] > tolerance * all[order[0]]);
  return { u: pick(svd.leftSingularVectors, kept), s: kept.map((i) => all[i]), v: pick(svd.rightSingularVectors, kept) };
}

function tallSvd(x: Matrix, tolerance: number): ThinSvd {
  const eigen = new EigenvalueDecomposition(crossProduct(x), { assumeSymmetric: true });
  const all = eigen.realEigenvalues.map((value) => Math.sqrt(Math.max(0, value)));
  const order = all.map((_, i) => i).sort((a, b) => all[b] - all[a]);
  const kept = order.filter((i) => all[i] > tolerance * all[order[0]]);
  const s = kept.map((i) => all[i]);
  const v = pick(eigen.eigenvectorMatrix, kept);
  return { u: x.mmul(v).divRowVector(s), s, v };
}

/** x'x without a transposed copy of x. */
function crossProduct(x: Matrix): Matrix {
  const p = x.columns;
  const sums = new Float64Array(p * p);
  for (let i = 0; i < x.rows; i += 1) {
    const row = x.getRow(i);
    for (let a = 0; a < p; a += 1) for (let b = a; b < p; b += 1) sums[a * p + b] += row[a] * row[b];
  }
  const product = new Matrix(p, p);
  for (let a = 0; a < p; a += 1) {
    for (let b = a; b < p; b += 1) {
      product.set(a, b, sums[a * p + b]);
      product.set(b, a, sums[a * p + b]);
    }
  }
  return product;
}

function pick(matrix: Matrix, columns: number[]): Matrix {
  const result = new Matrix(matrix.rows, columns.length);
  for (let i = 0; i < matrix.rows; i += 1) columns.forEach((c, j) => result.set(i, j, matrix.get(i, c)));
  return result;
}

/** Turns each axis so that the element of `by` with the greatest size is positive; `by` is one of u and v. */
export function fixSigns(svd: ThinSvd, by: 'u' | 'v'): ThinSvd {
  const lead = svd[by];
  for (let a = 0; a < svd.s.length; a += 1) {
    let greatest = 0;
    for (let i = 0; i < lead.rows; i += 1) if (Math.abs(lead.get(i, a)) > Math.abs(greatest)) greatest = lead.get(i, a);
    if (greatest >= 0) continue;
    svd.u.mulColumn(a, -1);
    svd.v.mulColumn(a, -1);
  }
  return svd;
}

/**
 * Reads a table of finite numbers into a matrix.
 *
 * @throws StatsError `empty`, `shape` (ragged rows), `not_finite`.
 */
export function toMatrix(table: ReadonlyArray<ArrayLike<number>>, name: string): Matrix {
  if (table.length === 0 || table[0].length === 0) throw new StatsError('empty', `${name} holds no values`);
  const columns = table[0].length;
  const matrix = new Matrix(table.length, columns);
  for (let i = 0; i < table.length; i += 1) {
    const row = table[i];
    if (row.length !== columns) throw new StatsError('shape', `${name} has rows of different lengths`);
    for (let j = 0; j < columns; j += 1) {
      if (!Number.isFinite(row[j])) throw new StatsError('not_finite', `${name} holds a value that is not a finite number`);
      matrix.set(i, j, row[j]);
    }
  }
  return matrix;
}

/** Takes the column means off in place and returns them. */
export function centre(matrix: Matrix): number[] {
  const means = new Array<number>(matrix.columns).fill(0);
  for (let i = 0; i < matrix.rows; i += 1) for (let j = 0; j < means.length; j += 1) means[j] += matrix.get(i, j) / matrix.rows;
  for (let i = 0; i < matrix.rows; i += 1) for (let j = 0; j < means.length; j += 1) matrix.set(i, j, matrix.get(i, j) - means[j]);
  return means;
}

/** Root mean square of each column with the given divisor; exactly 0 for a column that is constant up to rounding. */
export function columnSpread(centred: Matrix, means: ReadonlyArray<number>, divisor: number): number[] {
  const squares = new Array<number>(centred.columns).fill(0);
  for (let i = 0; i < centred.rows; i += 1) for (let j = 0; j < squares.length; j += 1) squares[j] += centred.get(i, j) ** 2;
  return squares.map((sum, j) => {
    const spread = Math.sqrt(sum / divisor);
    return spread <= 1e-13 * Math.abs(means[j]) ? 0 : spread;
  });
}
