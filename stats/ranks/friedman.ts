import { StatsError } from '../errors';
import { chiSquareSf, fSf } from '../distributions';
import { requireInteger } from '../check';
import { rankBlocks, type RankedBlocks } from './midranks';

/** Friedman's test of a complete block design and the quantities that go with it. */
export interface FriedmanResult {
  assessors: number;
  products: number;
  /** Sum of the ranks of each product, 1 = lowest score. */
  rankSums: number[];
  meanRanks: number[];
  /** Friedman's chi-square, corrected for ties. */
  chiSquare: number;
  df: number;
  /** Upper tail of `chiSquare`; an approximation that is too careful for small panels. */
  p: number;
  chiSquareWithoutTieCorrection: number;
  /** Iman and Davenport's F, the better approximation. `f` is Infinity when all assessors agree completely. */
  imanDavenport: { f: number; df1: number; df2: number; p: number };
  /** Kendall's coefficient of concordance, corrected for ties. */
  kendallW: number;
  /** Sum of t^3 - t over the groups of ties; 0 without ties. */
  tieSum: number;
}

/**
 * Friedman's rank test: do the products differ, when each assessor has ranked or scored all of them?
 *
 * chi-square = (k - 1)(sum R^2 - b^2 k(k + 1)^2 / 4) / (A - b k(k + 1)^2 / 4) over b, with b assessors, k products, R the
 * rank sums and A the sum of squared mid-ranks (Conover's tie-corrected form, that of R's friedman.test).
 * F = (b - 1) chi-square / (b(k - 1) - chi-square) on k - 1 and (b - 1)(k - 1) degrees of freedom (Iman & Davenport 1980).
 * When every assessor gives one and the same order F is infinite, and its p is the exact probability that all
 * assessors agree by chance, 1/a^(b - 1), with a the number of ways to arrange one assessor's ranks.
 *
 * @param matrix rows = assessors, columns = products; scores or ranks, no missing values.
 * @throws StatsError `empty`, `too_few` (fewer than two assessors or products), `shape`, `not_finite`, `constant`
 * (no assessor tells any two products apart).
 * Source: Conover, Practical Nonparametric Statistics, 3rd ed., sec. 5.8. Checked against R 4.2.2 to 1e-9.
 * For small panels use {@link friedmanPermutation}.
 */
export function friedman(matrix: ReadonlyArray<ArrayLike<number>>): FriedmanResult {
  return friedmanOfRanks(rankBlocks(matrix));
}

/** Friedman's test of blocks that are ranked already; see {@link friedman}. */
export function friedmanOfRanks(ranked: RankedBlocks): FriedmanResult {
  const { blocks: b, treatments: k, rankSums, tieSum } = ranked;
  if (b < 2) throw new StatsError('too_few', 'A comparison of products by ranks needs at least two assessors');
  const mean = (b * (k + 1)) / 2;
  let s = 0;
  for (const sum of rankSums) s += (sum - mean) * (sum - mean);
  const largest = b * b * (k * k * k - k);
  const corrected = largest - b * tieSum;
  if (corrected <= 0) throw new StatsError('constant', 'No assessor told any two products apart');
  const scale = b * (k - 1);
  // Numerator and denominator are whole multiples of 1/4, so complete agreement is met exactly, not nearly.
  const complete = 12 * s === corrected;
  const w = (12 * s) / corrected;
  const chiSquare = scale * w;
  const df1 = k - 1;
  const df2 = (b - 1) * (k - 1);
  const f = complete ? Infinity : ((b - 1) * w) / (1 - w);
  return {
    assessors: b,
    products: k,
    rankSums,
    meanRanks: rankSums.map((sum) => sum / b),
    chiSquare,
    df: df1,
    p: chiSquareSf(chiSquare, df1),
    chiSquareWithoutTieCorrection: (scale * 12 * s) / largest,
    imanDavenport: { f, df1, df2, p: complete ? agreementByChance(ranked) : fSf(f, df1, df2) },
    kendallW: w,
    tieSum,
  };
}

/**
 * Friedman's test when only the rank sums of a panel without ties are known, as printed tables give them.
 *
 * @param assessors whole number from 2. @param rankSums one for each product; together b k(k + 1)/2.
 * @throws StatsError `not_integer`, `out_of_range` (sums that cannot come from that many assessors), `too_few`, `not_finite`.
 */
export function friedmanFromRankSums(assessors: number, rankSums: ReadonlyArray<number>): FriedmanResult {
  requireInteger(assessors, 'The number of assessors', 2);
  const k = rankSums.length;
  if (k < 2) throw new StatsError('too_few', 'Ranking needs at least two products');
  let total = 0;
  for (const sum of rankSums) {
    requireInteger(sum, 'Every rank sum', assessors, assessors * k);
    total += sum;
  }
  if (total !== (assessors * k * (k + 1)) / 2) {
    throw new StatsError('out_of_range', 'The rank sums do not add up for that many assessors and products');
  }
  const ranks = Float64Array.from({ length: k }, (_, j) => j + 1);
  const squares = (assessors * k * (k + 1) * (2 * k + 1)) / 6;
  return friedmanOfRanks({ blocks: assessors, treatments: k, ranks, rankSums: [...rankSums], tieSum: 0, squares });
}

/** Probability that b - 1 assessors all repeat the first one's arrangement of ranks by chance. */
function agreementByChance({ blocks, treatments: k, ranks }: RankedBlocks): number {
  let arrangements = 1;
  const seen = new Map<number, number>();
  for (let j = 0; j < k; j += 1) {
    const count = (seen.get(ranks[j]) ?? 0) + 1;
    seen.set(ranks[j], count);
    arrangements *= (j + 1) / count;
  }
  return Math.pow(arrangements, 1 - blocks);
}
