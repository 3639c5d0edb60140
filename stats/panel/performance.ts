import { requireBalancedScores, type BalancedScores } from '../anova/balanced-scores';
import { cellMeans } from '../anova/cell-means';
import { fSf } from '../distributions';
import { midranks } from '../ranks/midranks';
import { pearson } from './pearson';
import { steadyMeanOf } from './steady-mean';

/** How one assessor did on one descriptor. Units: the score's, squared for mean squares. */
export interface AssessorPerformance {
  readonly mean: number;
  /** Standard deviation (n − 1) of all the assessor's scores. */
  readonly sdOfScores: number;
  /** Largest less smallest score. */
  readonly rangeUsed: number;
  readonly sdOfProductMeans: number;
  readonly msProduct: number;
  /** Between replicates of one product; null with one replicate. */
  readonly msError: number | null;
  /** √ msError: repeatability standard deviation (ISO 11132); null with one replicate. */
  readonly repeatability: number | null;
  /** Discrimination: the assessor's own one-way F of products; null with one replicate, Infinity when replicates never differ. */
  readonly f: number | null;
  readonly p: number | null;
  readonly df: readonly [number, number];
  /** Agreement: correlation of the product means with the mean of the OTHER assessors'; null when one is constant. */
  readonly agreement: number | null;
  /** The same with the panel's mean, the assessor included. */
  readonly agreementWithPanel: number | null;
  /** Spearman's correlation with the mean of the others. */
  readonly rankAgreement: number | null;
}

/**
 * Discrimination, repeatability, agreement and scale use of each assessor on one descriptor, in the
 * order of the table. Complete tables only; throws what `requireBalancedScores` throws.
 * Source: ISO 11132:2021 in outline; checked against R's aov and cor to 1e-9.
 */
export function assessorPerformance(table: BalancedScores): AssessorPerformance[] {
  requireBalancedScores(table);
  const { scores, assessors: I, products: J, replicates: K } = table;
  const { assessorMeans, productMeans } = cellMeans(table);
  // Ranks hang on ties, so these means are summed to the last digit.
  const cells = new Float64Array(I * J);
  for (let cell = 0; cell < I * J; cell += 1) cells[cell] = steadyMeanOf(K, (k) => scores[cell * K + k]);
  const own = new Float64Array(J);
  const others = new Float64Array(J);
  const perAssessor = J * K;
  return Array.from({ length: I }, (_, i) => {
    const mean = assessorMeans[i];
    let ssProduct = 0;
    let ssError = 0;
    let ssTotal = 0;
    let least = Infinity;
    let most = -Infinity;
    for (let j = 0; j < J; j += 1) {
      const cell = cells[i * J + j];
      own[j] = cell;
      others[j] = steadyMeanOf(I - 1, (k) => cells[(k < i ? k : k + 1) * J + j]);
      ssProduct += (cell - mean) ** 2;
      for (let k = 0; k < K; k += 1) {
        const score = scores[(i * J + j) * K + k];
        ssError += (score - cell) ** 2;
        ssTotal += (score - mean) ** 2;
        if (score < least) least = score;
        if (score > most) most = score;
      }
    }
    const msProduct = (K * ssProduct) / (J - 1);
    const df = [J - 1, J * (K - 1)] as const;
    const msError = K > 1 ? ssError / df[1] : null;
    const f = msError === null ? null : msError > 0 ? msProduct / msError : msProduct > 0 ? Infinity : null;
    return {
      mean,
      sdOfScores: Math.sqrt(ssTotal / (perAssessor - 1)),
      rangeUsed: most - least,
      sdOfProductMeans: Math.sqrt(ssProduct / (J - 1)),
      msProduct,
      msError,
      repeatability: msError === null ? null : Math.sqrt(msError),
      f,
      p: f === null ? null : f === Infinity ? 0 : fSf(f, df[0], df[1]),
      df,
      agreement: pearson(own, others),
      agreementWithPanel: pearson(own, productMeans),
      rankAgreement: pearson(midranks(own), midranks(others)),
    };
  });
}
