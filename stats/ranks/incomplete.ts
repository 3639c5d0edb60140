import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { chiSquareSf } from '../distributions';
import { StatsError } from '../errors';
import { midranks } from './midranks';

/** One assessor's products and the mid-ranks among them. */
export interface ServedRow {
  products: number[];
  ranks: number[];
}

export interface ServedRanks {
  products: number;
  rows: ServedRow[];
  rankSums: number[];
  /** Sum of the squared ranks. */
  squares: number;
}

/**
 * Ranks each assessor's products among those the assessor had; assessors with fewer than two are left out.
 *
 * @param matrix rows = assessors, columns = products, null = not served or not scored.
 * @throws StatsError `empty`, `too_few`, `shape`, `not_finite`.
 */
export function rankServed(matrix: ReadonlyArray<ReadonlyArray<number | null>>): ServedRanks {
  if (matrix.length === 0) throw new StatsError('empty', 'The table of scores holds no assessors');
  const products = matrix[0].length;
  if (products < 2) throw new StatsError('too_few', 'Ranking needs at least two products');
  const rankSums = new Array<number>(products).fill(0);
  const rows: ServedRow[] = [];
  let squares = 0;
  for (const scores of matrix) {
    if (scores.length !== products) throw new StatsError('shape', 'Every assessor must have a place for every product');
    const had: number[] = [];
    const values: number[] = [];
    scores.forEach((score, j) => {
      if (score === null) return;
      had.push(j);
      values.push(score);
    });
    if (had.length < 2) {
      if (values.some((v) => !Number.isFinite(v))) throw new StatsError('not_finite', 'Every score must be a finite number');
      continue;
    }
    const ranks = midranks(values);
    ranks.forEach((rank, i) => {
      rankSums[had[i]] += rank;
      squares += rank * rank;
    });
    rows.push({ products: had, ranks });
  }
  if (rows.length === 0) throw new StatsError('too_few', 'No assessor scored two products');
  return { products, rows, rankSums, squares };
}

/** Rank test of any connected incomplete plan. */
export interface IncompleteRankResult {
  assessors: number;
  products: number;
  /** Rank sum of each product less what it would be if the products did not differ. */
  excess: number[];
  chiSquare: number;
  df: number;
  p: number;
}

/**
 * Friedman's test for any plan with gaps (Benard & van Elteren): products missing for some assessors, by plan or by chance.
 *
 * chi-square = u' V^- u, with u the rank sums less their expectation and V their permutation covariance, ties included. It is
 * Friedman's tie-corrected chi-square on complete data and Durbin's on a balanced plan without ties. Assessors with
 * fewer than two scores are left out. Assumes that gaps have nothing to do with the scores.
 *
 * @param matrix rows = assessors, columns = products, null where there is no score.
 * @throws StatsError `empty`, `too_few`, `shape`, `not_finite`, `not_estimable` (some products are never compared, even
 * by way of others, or are tied throughout).
 * Source: Benard & van Elteren (1953) Indag. Math. 15:358; Prentice (1979) Biometrika 66:167.
 */
export function incompleteRankTest(matrix: ReadonlyArray<ReadonlyArray<number | null>>): IncompleteRankResult {
  const { products: t, rows } = rankServed(matrix);
  const excess = new Array<number>(t).fill(0);
  const v = Matrix.zeros(t - 1, t - 1);
  for (const { products, ranks } of rows) {
    const k = products.length;
    const mean = (k + 1) / 2;
    let squares = 0;
    for (const rank of ranks) squares += (rank - mean) * (rank - mean);
    const variance = squares / (k - 1);
    for (let i = 0; i < k; i += 1) {
      const a = products[i];
      excess[a] += ranks[i] - mean;
      if (a === t - 1) continue;
      for (let j = 0; j < k; j += 1) {
        const b = products[j];
        if (b < t - 1) v.set(a, b, v.get(a, b) + variance * ((i === j ? 1 : 0) - 1 / k));
      }
    }
  }
  // The last product follows from the others, so it is left out of the quadratic form.
  const cholesky = new CholeskyDecomposition(v);
  const largest = Math.max(...v.diagonal());
  const smallest = Math.min(...cholesky.lowerTriangularMatrix.diagonal().map((d) => d * d));
  if (!cholesky.isPositiveDefinite() || !(smallest > 1e-10 * largest)) {
    throw new StatsError('not_estimable', 'Some products were never compared with the others, so no test joins them');
  }
  const u = Matrix.columnVector(excess.slice(0, t - 1));
  const chiSquare = u.transpose().mmul(cholesky.solve(u)).get(0, 0);
  return { assessors: rows.length, products: t, excess, chiSquare, df: t - 1, p: chiSquareSf(chiSquare, t - 1) };
}
