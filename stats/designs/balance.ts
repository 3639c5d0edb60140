import { requireInteger } from '../check';
import { StatsError } from '../errors';

/** What a serving plan balances, by counting. Matrices are rows of counts. */
export interface Balance {
  /** Number of rows (assessors or blocks). */
  readonly sequences: number;
  /** Positions in the longest row. */
  readonly length: number;
  readonly treatments: number;
  /** How often each sample is served in all. */
  readonly replication: number[];
  /** [sample][position]: how often the sample stands there. */
  readonly positionCounts: number[][];
  /** Every sample equally often in every position. */
  readonly positionBalanced: boolean;
  /** [a][b]: how often b comes directly after a. */
  readonly carryOver: number[][];
  /** Every ordered pair of different samples equally often, and none directly after itself. */
  readonly carryOverBalanced: boolean;
  /** That common count; null when the counts of ordered pairs differ. */
  readonly carryOverCount: number | null;
  /** [a][b]: sum over rows of (times a) × (times b); off the diagonal, how often a and b meet in a row. */
  readonly concurrence: number[][];
  /** No sample twice in a row, equal replication, every pair meeting equally often. */
  readonly balancedIncompleteBlock: boolean;
}

const table = (rows: number, columns: number) => Array.from({ length: rows }, () => new Array<number>(columns).fill(0));

/**
 * Counts position, first-order carry-over and joint appearance in a serving plan.
 * `plan`: rows of samples 0..treatments − 1 in serving order; rows may be of unequal length.
 * Throws on an empty plan, an empty row, or a sample that is not one of the treatments (2 to 1000).
 * Exact. Definitions: Williams (1949) for carry-over; Cochran & Cox (1957) ch. 11 for incomplete blocks.
 */
export function checkBalance(plan: readonly (readonly number[])[], treatments: number): Balance {
  requireInteger(treatments, 'number of treatments', 2, 1000);
  if (plan.length === 0) throw new StatsError('empty', 'The plan holds no rows');
  const length = plan.reduce((longest, row) => Math.max(longest, row.length), 0);
  const positionCounts = table(treatments, length);
  const carryOver = table(treatments, treatments);
  const concurrence = table(treatments, treatments);
  let repeats = false;
  for (const row of plan) {
    if (row.length === 0) throw new StatsError('empty', 'A row of the plan holds no samples');
    const served = new Map<number, number>();
    row.forEach((sample, position) => {
      requireInteger(sample, 'sample in the plan', 0, treatments - 1);
      positionCounts[sample][position] += 1;
      if (position > 0) carryOver[row[position - 1]][sample] += 1;
      served.set(sample, (served.get(sample) ?? 0) + 1);
    });
    for (const [a, times] of served) {
      if (times > 1) repeats = true;
      for (const [b, others] of served) concurrence[a][b] += times * others;
    }
  }
  const pairs = offDiagonal(carryOver);
  const equalPairs = allEqual(pairs);
  return {
    sequences: plan.length,
    length,
    treatments,
    replication: positionCounts.map((counts) => counts.reduce((a, b) => a + b, 0)),
    positionCounts,
    positionBalanced: allEqual(positionCounts.flat()),
    carryOver,
    carryOverBalanced: equalPairs && carryOver.every((row, i) => row[i] === 0),
    carryOverCount: equalPairs ? pairs[0] : null,
    concurrence,
    balancedIncompleteBlock:
      !repeats && allEqual(offDiagonal(concurrence)) && allEqual(concurrence.map((row, i) => row[i])),
  };
}

function offDiagonal(matrix: number[][]): number[] {
  return matrix.flatMap((row, i) => row.filter((_, j) => j !== i));
}

function allEqual(values: number[]): boolean {
  return values.every((value) => value === values[0]);
}
