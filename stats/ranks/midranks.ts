import { StatsError } from '../errors';

/**
 * Mid-ranks of a list of values: 1 for the smallest, and the mean of the places they share for equal values.
 *
 * @param values finite numbers, at least one. The input is not changed.
 * @returns ranks in the order of `values`; they sum to n(n + 1)/2.
 * @throws StatsError `empty` on no values, `not_finite` on NaN or an infinite value (nothing is dropped here).
 * @example midranks([10, 20, 20, 5]) // [2, 3.5, 3.5, 1]
 * Source: Hollander & Wolfe, Nonparametric Statistical Methods, ch. 1. Exact: every rank is a whole or half number.
 */
export function midranks(values: ArrayLike<number>): number[] {
  const n = values.length;
  if (n === 0) throw new StatsError('empty', 'There are no values to rank');
  const order = new Array<number>(n);
  for (let i = 0; i < n; i += 1) {
    if (!Number.isFinite(values[i])) throw new StatsError('not_finite', 'Every value to rank must be a finite number');
    order[i] = i;
  }
  order.sort((a, b) => values[a] - values[b]);
  const ranks = new Array<number>(n);
  for (let start = 0; start < n; ) {
    let end = start + 1;
    while (end < n && values[order[end]] === values[order[start]]) end += 1;
    const shared = (start + 1 + end) / 2;
    for (let i = start; i < end; i += 1) ranks[order[i]] = shared;
    start = end;
  }
  return ranks;
}

/** Every block of a complete block design turned into ranks, with the sums that the rank tests share. */
export interface RankedBlocks {
  /** Number of blocks (assessors). */
  blocks: number;
  /** Number of treatments (products). */
  treatments: number;
  /** Mid-ranks, block after block (row-major, `blocks` x `treatments`). */
  ranks: Float64Array;
  /** Sum of the ranks of each treatment. */
  rankSums: number[];
  /** Sum over all groups of ties of t^3 - t, where t is the size of the group; 0 without ties. */
  tieSum: number;
  /** Sum of the squared ranks. */
  squares: number;
}

/**
 * Ranks each row of a complete table on its own, smallest value = rank 1, mid-ranks for ties.
 *
 * @param matrix rows = blocks (assessors), columns = treatments (products), at least 1 x 2. Scores or ranks, any unit.
 * @returns the ranks and their sums.
 * @throws StatsError `empty`, `too_few` (fewer than two treatments), `shape` (ragged rows), `not_finite` (missing values
 * must be dealt with by the caller: drop the block, or use {@link durbin} for a design that is incomplete by plan).
 * Source: Conover, Practical Nonparametric Statistics, 3rd ed., sec. 5.8. Exact.
 */
export function rankBlocks(matrix: ReadonlyArray<ArrayLike<number>>): RankedBlocks {
  const blocks = matrix.length;
  if (blocks === 0) throw new StatsError('empty', 'The table of scores holds no assessors');
  const treatments = matrix[0].length;
  if (treatments < 2) throw new StatsError('too_few', 'Ranking needs at least two products');
  const ranks = new Float64Array(blocks * treatments);
  const rankSums = new Array<number>(treatments).fill(0);
  const order = new Int32Array(treatments);
  let tieSum = 0;
  let squares = 0;
  for (let b = 0; b < blocks; b += 1) {
    const row = matrix[b];
    if (row.length !== treatments) throw new StatsError('shape', 'Every assessor must have one score for every product');
    for (let j = 0; j < treatments; j += 1) {
      if (!Number.isFinite(row[j])) throw new StatsError('not_finite', 'Every score must be a finite number');
      order[j] = j;
    }
    order.sort((x, y) => row[x] - row[y]);
    for (let start = 0; start < treatments; ) {
      let end = start + 1;
      while (end < treatments && row[order[end]] === row[order[start]]) end += 1;
      const size = end - start;
      const shared = (start + 1 + end) / 2;
      if (size > 1) tieSum += size * size * size - size;
      for (let i = start; i < end; i += 1) {
        ranks[b * treatments + order[i]] = shared;
        rankSums[order[i]] += shared;
      }
      squares += size * shared * shared;
      start = end;
    }
  }
  return { blocks, treatments, ranks, rankSums, tieSum, squares };
}
