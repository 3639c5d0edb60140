import { chiSquareSf } from '../distributions';
import { StatsError } from '../errors';
import { friedmanPermutation, type FriedmanPermutation, type PermutationOptions } from '../ranks/friedman-exact';
import { requireAnswer } from './mcnemar';

/** Cochran's Q and its counts. */
export interface CochranQResult {
  /** Number of yes answers for each product. */
  columnTotals: number[];
  /** All assessors, and those who ticked some but not all products; only the latter carry weight. */
  blocks: number;
  informativeBlocks: number;
  q: number;
  df: number;
  /** Upper tail of chi-square; trust it when informative blocks times products reach about 24. */
  p: number;
}

/**
 * Cochran's Q: do the products get yes equally often, when each assessor answered for all of them?
 *
 * Q = (k - 1)(k sum G^2 - (sum G)^2)/(k sum L - sum L^2), G the column totals, L the row totals; chi-square on k - 1.
 *
 * @param matrix rows = assessors, columns = products, 0 or 1, no missing answers.
 * @throws StatsError `empty`, `too_few` (fewer than two products), `shape`, `out_of_range` (neither 0 nor 1), `constant`
 * (no assessor ticked some products and left others).
 * Source: Cochran (1950) Biometrika 37:256. Checked against R 4.2.2 to 1e-10. For few assessors see {@link cochranQPermutation}.
 */
export function cochranQ(matrix: ReadonlyArray<ArrayLike<number>>): CochranQResult {
  if (matrix.length === 0) throw new StatsError('empty', 'The table of answers holds no assessors');
  const k = matrix[0].length;
  if (k < 2) throw new StatsError('too_few', 'The comparison needs at least two products');
  const columnTotals = new Array<number>(k).fill(0);
  let total = 0;
  let rowSquares = 0;
  let informativeBlocks = 0;
  for (const row of matrix) {
    if (row.length !== k) throw new StatsError('shape', 'Every assessor must have one answer for every product');
    let yes = 0;
    for (let j = 0; j < k; j += 1) {
      requireAnswer(row[j]);
      columnTotals[j] += row[j];
      yes += row[j];
    }
    total += yes;
    rowSquares += yes * yes;
    if (yes > 0 && yes < k) informativeBlocks += 1;
  }
  if (informativeBlocks === 0) throw new StatsError('constant', 'No assessor ticked some products and left others, so there is nothing to compare');
  let columnSquares = 0;
  for (const sum of columnTotals) columnSquares += sum * sum;
  const q = ((k - 1) * (k * columnSquares - total * total)) / (k * total - rowSquares);
  return { columnTotals, blocks: matrix.length, informativeBlocks, q, df: k - 1, p: chiSquareSf(q, k - 1) };
}

/**
 * Cochran's Q by permutation of each assessor's ticks over the products: exact for small panels, seeded draws beyond.
 *
 * With two values in a row, mid-ranks are a straight line in the ticks, so this is Friedman's permutation test.
 *
 * @throws StatsError as {@link cochranQ} and {@link friedmanPermutation}.
 * Source: Patil (1975) J. Am. Stat. Assoc. 70:186.
 */
export function cochranQPermutation(matrix: ReadonlyArray<ArrayLike<number>>, options?: PermutationOptions): FriedmanPermutation {
  const { informativeBlocks } = cochranQ(matrix);
  const k = matrix[0].length;
  const informative = matrix.filter((row) => {
    let yes = 0;
    for (let j = 0; j < k; j += 1) yes += row[j];
    return yes > 0 && yes < k;
  });
  if (informativeBlocks === 1) return { p: 1, method: 'exact', draws: 0, standardError: 0 };
  return friedmanPermutation(informative, options);
}
