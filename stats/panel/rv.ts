import { Matrix } from 'ml-matrix';
import { requireFiniteArray } from '../check';
import { StatsError } from '../errors';

/** Columns centred; rows = products, columns = descriptors. */
function centred(table: readonly ArrayLike<number>[]): Matrix {
  const columns = table[0]?.length ?? 0;
  if (table.length < 2 || columns < 1) throw new StatsError('too_few', 'RV needs at least two products and one descriptor');
  const means = new Float64Array(columns);
  for (const row of table) {
    if (row.length !== columns) throw new StatsError('shape', 'Every product needs a value for every descriptor');
    requireFiniteArray(row, 'table');
    for (let j = 0; j < columns; j += 1) means[j] += row[j] / table.length;
  }
  return new Matrix(table.map((row) => Array.from(row, (value, j) => value - means[j])));
}

/**
 * tr(XX′YY′), the squares of X′Y: from the products' cross-products where products are few, from the
 * descriptors' where those are, so that neither a long nor a wide table is squared.
 */
export function crossInner(x: Matrix, y: Matrix): number {
  if (x.rows > Math.max(x.columns, y.columns)) return x.transpose().mmul(y).norm('frobenius') ** 2;
  return Matrix.mul(x.mmul(x.transpose()), y.mmul(y.transpose())).sum();
}

/**
 * RV coefficient of two tables over the same products (descriptors may differ), columns centred and
 * not scaled: 1 = the same configuration up to turning and size, 0 = nothing in common.
 * @throws StatsError `shape`, `too_few`, `constant` (a table in which no product differs)
 * Source: Robert and Escoufier (1976), Applied Statistics 25:257.
 */
export function rvCoefficient(x: readonly ArrayLike<number>[], y: readonly ArrayLike<number>[]): number {
  if (x.length !== y.length) throw new StatsError('shape', 'The two tables must have the same products');
  const [a, b] = [centred(x), centred(y)];
  const scale = Math.sqrt(crossInner(a, a) * crossInner(b, b));
  if (scale === 0) throw new StatsError('constant', 'A table has no difference between products');
  return crossInner(a, b) / scale;
}
