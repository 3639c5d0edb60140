import { requireFiniteArray } from '../check';
import { StatsError } from '../errors';

/** Columns centred; rows = products, columns = descriptors. */
function centred(table: readonly ArrayLike<number>[]): number[][] {
  const columns = table[0]?.length ?? 0;
  if (table.length < 2 || columns < 1) throw new StatsError('too_few', 'RV needs at least two products and one descriptor');
  const means = new Float64Array(columns);
  for (const row of table) {
    if (row.length !== columns) throw new StatsError('shape', 'Every product needs a value for every descriptor');
    requireFiniteArray(row, 'table');
    for (let j = 0; j < columns; j += 1) means[j] += row[j] / table.length;
  }
  return table.map((row) => Array.from(row, (value, j) => value - means[j]));
}

const crossProducts = (table: number[][]): number[][] => table.map((a) => table.map((b) => a.reduce((sum, value, j) => sum + value * b[j], 0)));

const inner = (a: number[][], b: number[][]): number => a.reduce((sum, row, i) => sum + row.reduce((s, value, j) => s + value * b[i][j], 0), 0);

/**
 * RV coefficient of two tables over the same products (descriptors may differ), columns centred and
 * not scaled: 1 = the same configuration up to turning and size, 0 = nothing in common.
 * @throws StatsError `shape`, `too_few`, `constant` (a table in which no product differs)
 * Source: Robert and Escoufier (1976), Applied Statistics 25:257.
 */
export function rvCoefficient(x: readonly ArrayLike<number>[], y: readonly ArrayLike<number>[]): number {
  if (x.length !== y.length) throw new StatsError('shape', 'The two tables must have the same products');
  const a = crossProducts(centred(x));
  const b = crossProducts(centred(y));
  const scale = Math.sqrt(inner(a, a) * inner(b, b));
  if (scale === 0) throw new StatsError('constant', 'A table has no difference between products');
  return inner(a, b) / scale;
}
