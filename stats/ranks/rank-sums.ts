import { normalQuantile, studentizedRangeQuantile, tQuantile } from '../distributions';
import { requireInteger, requireProbability } from '../check';
import { StatsError } from '../errors';
import { rankBlocks, type RankedBlocks } from './midranks';

/**
 * Least significant difference of two rank sums, normal form: z sqrt(b k(k + 1) / 6), z the upper alpha/2 point.
 * Meant for pairs chosen beforehand, or after a significant Friedman test; it has no correction for ties.
 *
 * @param assessors b, whole number from 1. @param products k, whole number from 2. @param alpha two-sided level, in (0, 1).
 * @throws StatsError `not_integer`, `out_of_range`.
 * Source: the form of ISO 8587; Hollander & Wolfe, sec. 7.3. To the accuracy of the normal quantile (1e-13).
 */
export function rankSumLsd(assessors: number, products: number, alpha = 0.05): number {
  checkSizes(assessors, products, alpha);
  return normalQuantile(1 - alpha / 2) * Math.sqrt((assessors * products * (products + 1)) / 6);
}

/**
 * Honest significant difference of rank sums for all pairs (Nemenyi): q sqrt(b k(k + 1) / 12), with q the upper alpha
 * point of the studentized range for k groups and infinite degrees of freedom. No correction for ties.
 *
 * @throws StatsError `not_integer`, `out_of_range`.
 * Source: Nemenyi (1963); Hollander & Wolfe, sec. 7.3. To the accuracy of the range quantile (about 1e-10).
 */
export function rankSumHsd(assessors: number, products: number, alpha = 0.05): number {
  checkSizes(assessors, products, alpha);
  return studentizedRangeQuantile(1 - alpha, products, Infinity) * Math.sqrt((assessors * products * (products + 1)) / 12);
}

/**
 * Conover's least significant difference of rank sums, t form with the ties that were seen:
 * t sqrt(2(b A - sum R^2) / ((b - 1)(k - 1))), A the sum of squared mid-ranks, (b - 1)(k - 1) degrees of freedom.
 * 0 when all assessors agree completely.
 *
 * @param matrix rows = assessors, columns = products; no missing values.
 * @throws StatsError as {@link rankBlocks}, and `too_few` for a single assessor.
 * Source: Conover, Practical Nonparametric Statistics, 3rd ed., sec. 5.8. Checked against R 4.2.2 to 1e-9.
 */
export function conoverLsd(matrix: ReadonlyArray<ArrayLike<number>>, alpha = 0.05): number {
  requireProbability(alpha, 'The significance level');
  return conoverOfRanks(rankBlocks(matrix), alpha);
}

function conoverOfRanks({ blocks: b, treatments: k, rankSums, squares }: RankedBlocks, alpha: number): number {
  if (b < 2) throw new StatsError('too_few', 'A comparison of products by ranks needs at least two assessors');
  const df = (b - 1) * (k - 1);
  let sumOfSquares = 0;
  for (const sum of rankSums) sumOfSquares += sum * sum;
  return tQuantile(1 - alpha / 2, df) * Math.sqrt(Math.max(0, (2 * (b * squares - sumOfSquares)) / df));
}

/** One pair of products compared by rank sums. */
export interface RankSumPair {
  /** Column numbers from 0. */
  a: number;
  b: number;
  /** Rank sum of `a` less that of `b`. */
  difference: number;
  exceedsLsd: boolean;
  exceedsConover: boolean;
  exceedsHsd: boolean;
}

export interface RankSumComparison {
  rankSums: number[];
  lsd: number;
  conover: number;
  hsd: number;
  pairs: RankSumPair[];
}

/**
 * Compares every pair of rank sums with the three limits: {@link rankSumLsd}, {@link conoverLsd} and {@link rankSumHsd}.
 * Only the last keeps the chance of any false difference among all pairs at alpha.
 *
 * @param matrix rows = assessors, columns = products; no missing values.
 * @throws StatsError as {@link conoverLsd}.
 */
export function compareRankSums(matrix: ReadonlyArray<ArrayLike<number>>, alpha = 0.05): RankSumComparison {
  requireProbability(alpha, 'The significance level');
  const ranked = rankBlocks(matrix);
  const { rankSums, blocks, treatments } = ranked;
  const lsd = rankSumLsd(blocks, treatments, alpha);
  const conover = conoverOfRanks(ranked, alpha);
  const hsd = rankSumHsd(blocks, treatments, alpha);
  const pairs: RankSumPair[] = [];
  for (let a = 0; a < treatments - 1; a += 1) {
    for (let b = a + 1; b < treatments; b += 1) {
      const difference = rankSums[a] - rankSums[b];
      const size = Math.abs(difference);
      pairs.push({ a, b, difference, exceedsLsd: size > lsd, exceedsConover: size > conover, exceedsHsd: size > hsd });
    }
  }
  return { rankSums, lsd, conover, hsd, pairs };
}

function checkSizes(assessors: number, products: number, alpha: number): void {
  requireInteger(assessors, 'The number of assessors', 1);
  requireInteger(products, 'The number of products', 2);
  requireProbability(alpha, 'The significance level');
}
