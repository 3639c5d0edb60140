import { fSf } from '../distributions';
import { requireBalancedScores, type BalancedScores } from './balanced-scores';
import { cellMeans } from './cell-means';

/** One line of the table of analysis of variance. `ms` = `ss` / `df`. */
export interface AnovaLine {
  readonly ss: number;
  readonly df: number;
  readonly ms: number;
}

/** A line with its test. F is Infinity when its error is 0 and it is not; null when both are 0. */
export interface TestedLine extends AnovaLine {
  readonly f: number | null;
  readonly p: number | null;
}

export interface ProfileAnova {
  readonly assessors: number;
  readonly products: number;
  readonly replicates: number;
  readonly grandMean: number;
  readonly productMeans: Float64Array;
  readonly assessorMeans: Float64Array;
  /** Assessor over interaction: the unrestricted mixed model. */
  readonly assessor: TestedLine;
  /** Assessor over error: the restricted model; null with one replicate. */
  readonly assessorOverError: TestedLine | null;
  /** Product over interaction: assessors are a random sample of people. */
  readonly product: TestedLine;
  /** Interaction over error; with one replicate it is the residual, and `f` and `p` are null. */
  readonly interaction: TestedLine;
  /** Between replicates of one cell; null with one replicate. */
  readonly error: AnovaLine | null;
  readonly total: { readonly ss: number; readonly df: number };
  /** Method of moments, not cut at 0. Interaction and error are null with one replicate. */
  readonly components: { readonly assessor: number; readonly interaction: number | null; readonly error: number | null };
  /** True with one replicate: repeatability and interaction can't be told apart. */
  readonly isInteractionResidual: boolean;
}

/** F and p of a line over an error line. */
export function testLine(line: AnovaLine, error: AnovaLine): TestedLine {
  if (error.ms === 0) return { ...line, f: line.ms === 0 ? null : Infinity, p: line.ms === 0 ? null : 0 };
  const f = line.ms / error.ms;
  return { ...line, f, p: fSf(f, line.df, error.df) };
}

const lineOf = (ss: number, df: number): AnovaLine => ({ ss, df, ms: ss / df });

/**
 * Mixed two-way analysis of variance of one descriptor: assessors random, products fixed, their
 * interaction random, replicates within. score = μ + assessor + product + interaction + error;
 * F(product) = MS product / MS interaction on (J − 1, (I − 1)(J − 1)) degrees of freedom.
 * Complete tables only: a table with gaps is refused, and the caller drops assessors or products until it is whole.
 *
 * Units: the score's. Sums of squares are taken about means (two passes), so that a large common
 * level costs no digits. Throws what `requireBalancedScores` throws.
 * Source: the definitions of ISO 13299 panels as in any text on mixed models; checked against R's aov
 * with Error strata to 1e-9.
 */
export function profileAnova(table: BalancedScores): ProfileAnova {
  requireBalancedScores(table);
  const { scores, assessors: I, products: J, replicates: K } = table;
  const { cells, assessorMeans, productMeans, grandMean } = cellMeans(table);

  let ssAssessor = 0;
  for (let i = 0; i < I; i += 1) ssAssessor += (assessorMeans[i] - grandMean) ** 2;
  ssAssessor *= J * K;
  let ssProduct = 0;
  for (let j = 0; j < J; j += 1) ssProduct += (productMeans[j] - grandMean) ** 2;
  ssProduct *= I * K;
  let ssInteraction = 0;
  let ssError = 0;
  for (let i = 0; i < I; i += 1) {
    for (let j = 0; j < J; j += 1) {
      const cell = i * J + j;
      ssInteraction += (cells[cell] - assessorMeans[i] - productMeans[j] + grandMean) ** 2;
      if (K > 1) for (let k = 0; k < K; k += 1) ssError += (scores[cell * K + k] - cells[cell]) ** 2;
    }
  }
  ssInteraction *= K;

  const assessor = lineOf(ssAssessor, I - 1);
  const product = lineOf(ssProduct, J - 1);
  const interaction = lineOf(ssInteraction, (I - 1) * (J - 1));
  const error = K > 1 ? lineOf(ssError, I * J * (K - 1)) : null;
  return {
    assessors: I,
    products: J,
    replicates: K,
    grandMean,
    productMeans,
    assessorMeans,
    assessor: testLine(assessor, interaction),
    assessorOverError: error && testLine(assessor, error),
    product: testLine(product, interaction),
    interaction: error ? testLine(interaction, error) : { ...interaction, f: null, p: null },
    error,
    total: { ss: ssAssessor + ssProduct + ssInteraction + ssError, df: I * J * K - 1 },
    components: {
      assessor: (assessor.ms - interaction.ms) / (J * K),
      interaction: error && (interaction.ms - error.ms) / K,
      error: error && error.ms,
    },
    isInteractionResidual: K === 1,
  };
}
