import { chiSquareSf, fSf, normalQuantile } from '../distributions';
import { requireInteger, requireProbability } from '../check';
import { StatsError } from '../errors';
import { rankServed } from './incomplete';

/** Durbin's test of a balanced incomplete block design. */
export interface DurbinResult {
  /** Number of products t, assessors (blocks) b, products per assessor k, assessors per product r, per pair lambda. */
  products: number;
  assessors: number;
  perAssessor: number;
  perProduct: number;
  perPair: number;
  rankSums: number[];
  /** Durbin's statistic without correction for ties. */
  d: number;
  /** The same corrected for ties (Conover's T1), and its chi-square upper tail. */
  chiSquare: number;
  df: number;
  p: number;
  /** Conover's F (T2), the better approximation; `f` is Infinity when the ranks agree completely. */
  f: number;
  df1: number;
  df2: number;
  pF: number;
}

/**
 * Durbin's rank test: do the products differ, when each assessor had only k of the t products in a balanced plan?
 *
 * D = 12 sum (R - r(k + 1)/2)^2 / (lambda t(k + 1)); T1 = (t - 1) sum (R - r(k + 1)/2)^2 / (A - b k(k + 1)^2/4), A the sum of
 * squared mid-ranks; T2 = (T1/(t - 1)) / ((b(k - 1) - T1)/(bk - b - t + 1)).
 *
 * @param matrix rows = assessors, columns = products, null where a product was not served to an assessor.
 * @throws StatsError `empty`, `too_few`, `shape`, `not_finite`, `not_balanced` (use {@link incompleteRankTest} then),
 * `constant` (no assessor tells products apart).
 * Source: Conover, Practical Nonparametric Statistics, 3rd ed., sec. 5.9. Checked against R 4.2.2 to 1e-10.
 */
export function durbin(matrix: ReadonlyArray<ReadonlyArray<number | null>>): DurbinResult {
  const served = rankServed(matrix);
  const { products: t, rows, rankSums, squares } = served;
  const b = rows.length;
  const k = rows[0].products.length;
  const together = new Int32Array(t * t);
  for (const row of rows) {
    if (row.products.length !== k) throw new StatsError('not_balanced', 'Not every assessor had the same number of products');
    for (const i of row.products) for (const j of row.products) together[i * t + j] += 1;
  }
  const r = together[0];
  const lambda = together[1];
  for (let i = 0; i < t; i += 1) {
    for (let j = 0; j < t; j += 1) {
      if (together[i * t + j] !== (i === j ? r : lambda)) {
        throw new StatsError('not_balanced', 'Products, or pairs of products, were not served equally often');
      }
    }
  }
  if (b < 2 || lambda === 0) throw new StatsError('too_few', 'The plan holds too few assessors to compare the products');
  let s = 0;
  for (const sum of rankSums) s += (sum - (r * (k + 1)) / 2) ** 2;
  const within = squares - (b * k * (k + 1) * (k + 1)) / 4;
  if (within <= 0) throw new StatsError('constant', 'No assessor told any two products apart');
  const chiSquare = ((t - 1) * s) / within;
  const df1 = t - 1;
  const df2 = b * k - b - t + 1;
  const left = b * (k - 1) - chiSquare;
  const f = left <= 1e-12 * b * (k - 1) ? Infinity : chiSquare / df1 / (left / df2);
  return {
    products: t,
    assessors: b,
    perAssessor: k,
    perProduct: r,
    perPair: lambda,
    rankSums,
    d: (12 * s) / (lambda * t * (k + 1)),
    chiSquare,
    df: df1,
    p: chiSquareSf(chiSquare, df1),
    f,
    df1,
    df2,
    pF: f === Infinity ? 0 : fSf(f, df1, df2),
  };
}

/**
 * Least significant difference of rank sums in a balanced incomplete block plan: z sqrt((k + 1)(r(k - 1) + lambda) / 6).
 *
 * @param perAssessor k. @param perProduct r. @param perPair lambda. @param alpha two-sided level.
 * @throws StatsError `not_integer`, `out_of_range`.
 * Source: the form of ISO 8587 for incomplete blocks; no tie correction.
 */
export function durbinLsd(perAssessor: number, perProduct: number, perPair: number, alpha = 0.05): number {
  requireInteger(perAssessor, 'The number of products per assessor', 2);
  requireInteger(perProduct, 'The number of assessors per product', 1);
  requireInteger(perPair, 'The number of assessors per pair', 1);
  requireProbability(alpha, 'The significance level');
  return normalQuantile(1 - alpha / 2) * Math.sqrt(((perAssessor + 1) * (perProduct * (perAssessor - 1) + perPair)) / 6);
}
