import { requireFiniteArray, requireInteger } from '../check';
import { StatsError } from '../errors';

/**
 * A complete assessor × product × replicate table of one descriptor. `scores` is laid out with the
 * replicate running fastest: score(i, j, k) stands at (i·products + j)·replicates + k.
 */
export interface BalancedScores {
  readonly scores: ArrayLike<number>;
  readonly assessors: number;
  readonly products: number;
  readonly replicates: number;
}

/** Scores one by one; levels are whole numbers from 0. All four arrays have the same length. */
export interface LongScores {
  readonly assessor: ArrayLike<number>;
  readonly product: ArrayLike<number>;
  readonly score: ArrayLike<number>;
}

/**
 * Throws unless the table is whole: at least two assessors, two products, one replicate, every score
 * a finite number.
 */
export function requireBalancedScores(table: BalancedScores): void {
  requireInteger(table.replicates, 'number of replicates', 1, 1_000_000);
  requireInteger(table.products, 'number of products', 0, 1_000_000);
  requireInteger(table.assessors, 'number of assessors', 0, 1_000_000);
  if (table.products < 2) throw new StatsError('too_few', 'An analysis of variance needs at least two products');
  if (table.assessors < 2) throw new StatsError('too_few', 'An analysis of variance needs at least two assessors');
  requireFiniteArray(table.scores, 'scores');
  if (table.scores.length !== table.assessors * table.products * table.replicates) {
    throw new StatsError('shape', 'There must be one score for each assessor, product and replicate');
  }
}

/**
 * Lays long data out as a complete table. Within a cell the scores keep their order: the first is
 * replicate 1. Level counts are the highest level + 1.
 * @throws StatsError `not_balanced` when cells hold different numbers of scores (the message names
 * how many cells and the numbers), `shape` on arrays of different lengths
 */
export function balancedScores({ assessor, product, score }: LongScores): BalancedScores {
  const n = score.length;
  if (assessor.length !== n || product.length !== n) throw new StatsError('shape', 'Assessors, products and scores must be equally many');
  requireFiniteArray(score, 'scores');
  let assessors = 0;
  let products = 0;
  for (let r = 0; r < n; r += 1) {
    requireInteger(assessor[r], 'assessor', 0, 999_999);
    requireInteger(product[r], 'product', 0, 999_999);
    if (assessor[r] >= assessors) assessors = assessor[r] + 1;
    if (product[r] >= products) products = product[r] + 1;
  }
  if (assessors * products > 4 * n) throw new StatsError('not_balanced', 'Most assessors have no score for most products');
  const counts = new Int32Array(assessors * products);
  for (let r = 0; r < n; r += 1) counts[assessor[r] * products + product[r]] += 1;
  let least = Infinity;
  let most = 0;
  for (const count of counts) {
    if (count < least) least = count;
    if (count > most) most = count;
  }
  if (least !== most) {
    throw new StatsError('not_balanced', `Assessor and product pairs have from ${least} to ${most} scores; a balanced analysis needs as many for each`);
  }
  const scores = new Float64Array(n);
  const placed = new Int32Array(counts.length);
  for (let r = 0; r < n; r += 1) {
    const cell = assessor[r] * products + product[r];
    scores[cell * most + placed[cell]] = score[r];
    placed[cell] += 1;
  }
  return { scores, assessors, products, replicates: most };
}
