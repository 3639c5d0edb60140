import { requireFiniteArray, requireInteger } from '../check';
import { StatsError } from '../errors';
import type { LongScores } from '../anova/balanced-scores';

/**
 * What an assessor × product table with gaps amounts to: how many scores each cell holds, their mean,
 * and what is left between replicates. Cell (i, j) stands at i·products + j; an empty one has count 0 and mean 0.
 */
export interface CellTable {
  readonly assessors: number;
  readonly products: number;
  readonly scores: number;
  /** Cells that hold a score. */
  readonly filled: number;
  readonly counts: Int32Array;
  /** Less `level`, so that a large common level costs no digits. */
  readonly means: Float64Array;
  readonly level: number;
  /** Sum of squares of the scores about their cell's mean. */
  readonly within: number;
}

const MOST_CELLS = 4_000_000;

/**
 * Counts and averages scores by assessor and product; levels are whole numbers from 0, scores finite.
 * A missing score is a row that isn't there.
 * @throws StatsError `shape` on arrays of different lengths, `empty` on none, `too_few` when there are
 * fewer than two assessors or products, or a product has no score at all
 */
export function cellTable({ assessor, product, score }: LongScores): CellTable {
  const n = score.length;
  if (assessor.length !== n || product.length !== n) throw new StatsError('shape', 'Assessors, products and scores must be equally many');
  requireFiniteArray(score, 'scores');
  let assessors = 0;
  let products = 0;
  let level = 0;
  for (let r = 0; r < n; r += 1) {
    requireInteger(assessor[r], 'assessor', 0, 999_999);
    requireInteger(product[r], 'product', 0, 999_999);
    if (assessor[r] >= assessors) assessors = assessor[r] + 1;
    if (product[r] >= products) products = product[r] + 1;
    level += (score[r] - level) / (r + 1);
  }
  if (products < 2) throw new StatsError('too_few', 'A comparison needs at least two products');
  if (assessors < 2) throw new StatsError('too_few', 'A panel needs at least two assessors');
  if (assessors * products > MOST_CELLS) throw new StatsError('out_of_range', `There are more than ${MOST_CELLS} pairs of assessor and product`);
  const counts = new Int32Array(assessors * products);
  const means = new Float64Array(assessors * products);
  for (let r = 0; r < n; r += 1) {
    const cell = assessor[r] * products + product[r];
    counts[cell] += 1;
    means[cell] += score[r] - level;
  }
  let filled = 0;
  for (let cell = 0; cell < counts.length; cell += 1) {
    if (counts[cell] === 0) continue;
    filled += 1;
    means[cell] /= counts[cell];
  }
  requireAnswered(counts, assessors, products);
  let within = 0;
  for (let r = 0; r < n; r += 1) within += (score[r] - level - means[assessor[r] * products + product[r]]) ** 2;
  return { assessors, products, scores: n, filled, counts, means, level, within };
}

/** Every product needs a score, or it has no mean to compare; an assessor without any is left out by the caller. */
function requireAnswered(counts: Int32Array, assessors: number, products: number): void {
  const ofProduct = new Int32Array(products);
  let present = 0;
  for (let i = 0; i < assessors; i += 1) {
    let own = 0;
    for (let j = 0; j < products; j += 1) {
      own += counts[i * products + j];
      ofProduct[j] += counts[i * products + j];
    }
    if (own > 0) present += 1;
  }
  if (present < 2) throw new StatsError('too_few', 'A panel needs at least two assessors with scores');
  const empty = ofProduct.indexOf(0);
  if (empty >= 0) throw new StatsError('too_few', `Product ${empty + 1} has no score`);
}
