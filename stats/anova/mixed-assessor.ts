import { StatsError } from '../errors';
import { requireBalancedScores, type BalancedScores } from './balanced-scores';
import { cellMeans } from './cell-means';
import { profileAnova, testLine, type AnovaLine, type TestedLine } from './profile-anova';

export interface MixedAssessorModel {
  /** How much of the scale each assessor uses against the panel: mean 1; below 0 the line was read the other way round. */
  readonly slopes: Float64Array;
  /** Each assessor's part of the disagreement sum of squares. */
  readonly disagreementOf: Float64Array;
  /** Different use of the scale, tested over disagreement. */
  readonly scaling: TestedLine;
  /** What scaling leaves of the interaction, tested over error; `f` and `p` null with one replicate. */
  readonly disagreement: TestedLine;
  /** Products over disagreement: scaling no longer counts as noise. */
  readonly product: TestedLine;
}

/**
 * The mixed assessor model: interaction = scaling + disagreement. With x_j = product mean − grand
 * mean and m_ij the cell means, slope_i = Σ_j x_j (m_ij − m_i.) / Σ x², SS scaling =
 * K Σ x² Σ (slope_i − 1)² on I − 1, and SS disagreement the rest on (I − 1)(J − 2).
 * Throws `too_few` below three products and `constant` when the products have equal means (slopes
 * have no meaning then); otherwise as `profileAnova`.
 * Source: Brockhoff, Schlich and Skovgaard (2015), Food Quality and Preference 39:156.
 */
export function mixedAssessorModel(table: BalancedScores): MixedAssessorModel {
  requireBalancedScores(table);
  const { assessors: I, products: J, replicates: K } = table;
  if (J < 3) throw new StatsError('too_few', 'The mixed assessor model needs at least three products');
  const anova = profileAnova(table);
  const { cells, assessorMeans, productMeans, grandMean } = cellMeans(table);
  const x = Float64Array.from(productMeans, (mean) => mean - grandMean);
  let sxx = 0;
  for (const value of x) sxx += value * value;
  if (sxx <= 1e-20 * Math.max(1, grandMean * grandMean)) {
    throw new StatsError('constant', 'The products have equal means, so scale use can’t be compared');
  }
  const slopes = new Float64Array(I);
  const disagreementOf = new Float64Array(I);
  let ssScaling = 0;
  for (let i = 0; i < I; i += 1) {
    let sxy = 0;
    for (let j = 0; j < J; j += 1) sxy += x[j] * (cells[i * J + j] - assessorMeans[i]);
    const slope = sxy / sxx;
    slopes[i] = slope;
    ssScaling += K * sxx * (slope - 1) ** 2;
    for (let j = 0; j < J; j += 1) disagreementOf[i] += K * (cells[i * J + j] - assessorMeans[i] - slope * x[j]) ** 2;
  }
  let ssDisagreement = 0;
  for (const part of disagreementOf) ssDisagreement += part;
  const line = (ss: number, df: number): AnovaLine => ({ ss, df, ms: ss / df });
  const disagreement = line(ssDisagreement, (I - 1) * (J - 2));
  return {
    slopes,
    disagreementOf,
    scaling: testLine(line(ssScaling, I - 1), disagreement),
    disagreement: anova.error ? testLine(disagreement, anova.error) : { ...disagreement, f: null, p: null },
    product: testLine(anova.product, disagreement),
  };
}
