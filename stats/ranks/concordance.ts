import { StatsError } from '../errors';
import { rankBlocks } from './midranks';

/** Kendall's coefficient of concordance and the quantities that follow from it. */
export interface Concordance {
  /** Concordance corrected for ties, from 0 (no agreement) to 1 (every assessor ranks alike). */
  w: number;
  /** Concordance by the plain formula, smaller than `w` when there are ties. */
  wWithoutTieCorrection: number;
  /** Sum of squared deviations of the rank sums from their mean. */
  s: number;
  /**
   * Mean Spearman correlation over all pairs of assessors, (mW - 1)/(m - 1): exact without ties, an approximation with
   * them. Null for a single assessor.
   */
  meanSpearman: number | null;
  assessors: number;
  products: number;
  /** Rank sum of each product, 1 = lowest score. */
  rankSums: number[];
}

/**
 * Kendall's W: how far the assessors of a panel put the products in one order.
 *
 * W = 12 S / (m^2 (k^3 - k) - m sum(t^3 - t)), where m is the number of assessors, k of products, S the sum of squared
 * deviations of the rank sums and t the size of each group of ties within an assessor. It has no unit.
 * With one assessor W is 1 by definition and says nothing.
 *
 * @param matrix rows = assessors, columns = products; scores or ranks, each row is ranked with mid-ranks. No missing values.
 * @throws StatsError `empty`, `too_few` (fewer than two products), `shape`, `not_finite`, and `constant` when every
 * assessor scores all products alike, for then W is 0/0.
 * Source: Kendall & Gibbons, Rank Correlation Methods, 5th ed., ch. 6. Checked against Friedman's chi-square in R 4.2.2,
 * W = chi-square/(m(k - 1)), to 1e-12.
 */
export function kendallW(matrix: ReadonlyArray<ArrayLike<number>>): Concordance {
  const { blocks: m, treatments: k, rankSums, tieSum } = rankBlocks(matrix);
  const mean = (m * (k + 1)) / 2;
  let s = 0;
  for (const sum of rankSums) s += (sum - mean) * (sum - mean);
  const largest = m * m * (k * k * k - k);
  const corrected = largest - m * tieSum;
  if (corrected <= 0) throw new StatsError('constant', 'No assessor told any two products apart, so agreement has no value');
  const w = (12 * s) / corrected;
  return {
    w,
    wWithoutTieCorrection: (12 * s) / largest,
    s,
    meanSpearman: m > 1 ? (m * w - 1) / (m - 1) : null,
    assessors: m,
    products: k,
    rankSums,
  };
}
