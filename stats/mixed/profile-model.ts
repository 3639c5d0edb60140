import { EigenvalueDecomposition, Matrix, inverse, solve } from 'ml-matrix';
import { StatsError } from '../errors';
import type { LongScores } from '../anova/balanced-scores';
import { cellTable, type CellTable } from './cell-table';
import { COMPONENTS, derivativesAt, likelihoodAt, patternsOf, type Derivatives, type Likelihood, type Pattern, type Variances } from './likelihood';

/** A fitted mixed model of one descriptor: assessors random, their interaction with products random, products fixed. */
export interface ProfileModel {
  readonly assessors: number;
  readonly products: number;
  readonly scores: number;
  /** Pairs of assessor and product that have a score, and how many there could be. */
  readonly cells: number;
  readonly possibleCells: number;
  /** REML variances, never below 0. Interaction is null when it was left out: with one score a cell, residual and it are one. */
  readonly components: { readonly assessor: number; readonly interaction: number | null; readonly residual: number };
  readonly logLikelihood: number;
  /** A variance is estimated 0. Satterthwaite's degrees of freedom are then not defined; Kenward and Roger's are. */
  readonly isSingular: boolean;
  /** Generalised least squares means of the products: what each would score if everyone had tasted all. */
  readonly means: Float64Array;
  /** Number of scores of each product, and their plain mean. */
  readonly counts: Int32Array;
  readonly plainMeans: Float64Array;
  /** Covariance of the means: the model's, and with Kenward and Roger's correction for estimated variances. */
  readonly covariance: Matrix;
  readonly adjustedCovariance: Matrix;
  /** ΦX′V⁻¹V_kV⁻¹XΦ for each variance in the model: what the degrees of freedom are made of. */
  readonly sensitivities: readonly Matrix[];
  /** Covariance of the variances: from the observed information (null when singular) and from the expected one. */
  readonly observedUncertainty: Matrix | null;
  readonly expectedUncertainty: Matrix;
}

/** `interaction: false` leaves assessor × product out even where repeated scores could tell it from the residual. */
export interface ProfileModelOptions {
  readonly interaction?: boolean;
}

const MOST_STEPS = 200;

/**
 * Fits score = product + assessor + assessor × product + residual by restricted maximum likelihood, with
 * any pattern of missing scores and empty cells. The interaction is left out when no assessor has scored
 * a product twice. Units: the score's, squared for variances.
 *
 * @throws StatsError as for a table that can't be read; `constant` when nothing is left of the scores
 * after products and assessors, or replicates never differ; `no_convergence` when the likelihood has no maximum in reach
 *
 * Method: Newton steps on the three variances, kept at or above 0, over cell means and the sum of squares
 * within cells, so that time grows with the scores. Source: Patterson & Thompson (1971) Biometrika 58:545;
 * Kenward & Roger (1997) Biometrics 53:983. Checked against lmerTest, pbkrtest and emmeans.
 */
export function fitProfileModel(scores: LongScores, options: ProfileModelOptions = {}): ProfileModel {
  const table = cellTable(scores);
  const patterns = patternsOf(table);
  const hasInteraction = options.interaction !== false && table.scores > table.filled;
  const active = hasInteraction ? [0, 1, 2] : [0, 2];
  requireSpread(table, hasInteraction);
  const { at, derivatives } = maximise(table, patterns, active);

  const total = at.variances[0] + at.variances[1] + at.variances[2];
  const isSingular = active.some((k) => at.variances[k] < 1e-7 * total);
  const sensitivities = active.map((k) => at.covariance.mmul(derivatives.first[k]).mmul(at.covariance));
  const expectedUncertainty = inverse(sub(derivatives.expected, active));
  return {
    assessors: patterns.reduce((sum, pattern) => sum + pattern.members.length, 0),
    products: table.products,
    scores: table.scores,
    cells: table.filled,
    possibleCells: patterns.reduce((sum, pattern) => sum + pattern.members.length, 0) * table.products,
    components: { assessor: at.variances[0], interaction: hasInteraction ? at.variances[1] : null, residual: at.variances[2] },
    logLikelihood: at.logLikelihood,
    isSingular,
    means: at.means.map((mean) => mean + table.level),
    ...plain(table),
    covariance: at.covariance,
    adjustedCovariance: adjust(at.covariance, derivatives, active, expectedUncertainty),
    sensitivities,
    observedUncertainty: isSingular ? null : inverse(sub(derivatives.observed, active)),
    expectedUncertainty,
  };
}

function requireSpread({ means, counts, filled, within, scores, products, assessors }: CellTable, hasInteraction: boolean): void {
  let size = 0;
  for (let cell = 0; cell < means.length; cell += 1) size += counts[cell] * means[cell] ** 2;
  if (hasInteraction && within <= 1e-24 * (size + within)) {
    throw new StatsError('constant', size === 0 ? 'All scores are the same' : 'Repeated scores never differ, so there is no error to judge differences by');
  }
  if (!hasInteraction && scores <= products + assessors - 1) throw new StatsError('too_few', 'There are too few scores for a residual');
  if (!hasInteraction && filled > 0 && size === 0) throw new StatsError('constant', 'All scores are the same');
}

/** Variances by the method of moments on cell means, where the search starts: with complete data they are the answer. */
function start(table: CellTable, active: readonly number[]): Variances {
  const { means, counts, assessors: I, products: J } = table;
  const filled = (i: number, j: number) => counts[i * J + j] > 0;
  const centre = Float64Array.from({ length: J }, (_, j) => meanOver(I, (i) => (filled(i, j) ? means[i * J + j] : null)));
  let ssAssessor = 0;
  let ssRest = 0;
  let present = 0;
  let reciprocals = 0;
  for (let i = 0; i < I; i += 1) {
    const own = meanOver(J, (j) => (filled(i, j) ? means[i * J + j] - centre[j] : null));
    if (Number.isNaN(own)) continue;
    present += 1;
    for (let j = 0; j < J; j += 1) {
      if (!filled(i, j)) continue;
      ssAssessor += own ** 2;
      ssRest += (means[i * J + j] - centre[j] - own) ** 2;
      reciprocals += 1 / counts[i * J + j];
    }
  }
  const rest = ssRest / Math.max(1, table.filled - present - J + 1);
  const withInteraction = active.length === COMPONENTS;
  const residual = withInteraction ? table.within / (table.scores - table.filled) : ((rest * table.filled) / reciprocals || 0);
  const spread = rest + ssAssessor + residual;
  if (spread <= 0) throw new StatsError('constant', 'Assessors differ in nothing but the products’ means, so there is no error to judge differences by');
  const least = 1e-3 * spread;
  const interaction = withInteraction ? Math.max(least, rest - (residual * reciprocals) / table.filled) : 0;
  const assessor = Math.max(least, (ssAssessor / (present - 1) - rest) / (table.filled / present));
  return [assessor, interaction, Math.max(least * 1e-3, residual)];
}

function meanOver(n: number, value: (at: number) => number | null): number {
  let sum = 0;
  let count = 0;
  for (let at = 0; at < n; at += 1) {
    const own = value(at);
    if (own === null) continue;
    sum += own;
    count += 1;
  }
  return count === 0 ? NaN : sum / count;
}

function maximise(table: CellTable, patterns: readonly Pattern[], active: readonly number[]): { at: Likelihood; derivatives: Derivatives } {
  let at = likelihoodAt(table, patterns, start(table, active));
  let derivatives = derivativesAt(table, patterns, at);
  for (let step = 0; step < MOST_STEPS; step += 1) {
    // A variance at 0 whose likelihood falls away from 0 stays there.
    const free = active.filter((k) => at.variances[k] > 0 || derivatives.score[k] > 0);
    const move = direction(derivatives, free);
    // What the step could still gain is beyond the digits of the likelihood.
    const gain = free.reduce((sum, k, f) => sum + move[f] * derivatives.score[k], 0);
    if (Math.abs(gain) < 1e-22) return { at, derivatives };
    const next = lineSearch(table, patterns, at, free, move);
    if (!next) return { at, derivatives };
    const moved = Math.max(...free.map((k) => Math.abs(next.variances[k] - at.variances[k]) / Math.max(next.variances[k], 1e-9 * next.variances[2])));
    if (next.variances[2] < 1e-12 * (next.variances[0] + next.variances[1])) {
      throw new StatsError('constant', 'Nothing is left of the scores once assessors and products are allowed for, so there is no error to judge differences by');
    }
    at = next;
    derivatives = derivativesAt(table, patterns, at);
    if (moved < 1e-11) return { at, derivatives };
  }
  throw new StatsError('no_convergence', 'The mixed model did not settle; look for a product or an assessor with hardly any scores');
}

/** Newton's step where the likelihood curves downwards, Fisher's elsewhere. */
function direction({ score, observed, expected }: Derivatives, free: readonly number[]): Float64Array {
  const rhs = Matrix.columnVector(free.map((k) => score[k]));
  for (const information of [observed, expected]) {
    const part = sub(information, free);
    const curvature = new EigenvalueDecomposition(part, { assumeSymmetric: true }).realEigenvalues;
    if (Math.min(...curvature) <= 1e-9 * Math.max(...curvature)) continue;
    return Float64Array.from(solve(part, rhs).getColumn(0));
  }
  return Float64Array.from(free, (k) => score[k] / expected.get(k, k));
}

/** The longest halving of the step that does not lose likelihood; null when none gains any more. */
function lineSearch(table: CellTable, patterns: readonly Pattern[], at: Likelihood, free: readonly number[], move: Float64Array): Likelihood | null {
  for (let share = 1; share > 1e-9; share /= 2) {
    const variances: [number, number, number] = [...at.variances];
    free.forEach((k, f) => {
      const next = variances[k] + share * move[f];
      variances[k] = k === COMPONENTS - 1 ? Math.max(next, variances[k] / 10) : Math.max(0, next);
    });
    const next = likelihoodAt(table, patterns, variances);
    if (next.logLikelihood >= at.logLikelihood - 1e-12 * Math.abs(at.logLikelihood)) return next;
  }
  return null;
}

function sub(matrix: Matrix, kept: readonly number[]): Matrix {
  return new Matrix(kept.map((k) => kept.map((l) => matrix.get(k, l))));
}

/** Φ + 2Φ[Σ w_kl (Q_kl − P_kΦP_l)]Φ. */
function adjust(covariance: Matrix, { first, second }: Derivatives, active: readonly number[], weights: Matrix): Matrix {
  const middle = Matrix.zeros(covariance.rows, covariance.columns);
  active.forEach((k, a) => {
    active.forEach((l, b) => {
      if (b > a) return;
      // second[k][l] holds the symmetric half of Q_kl and Q_lk.
      const crossed = first[k].mmul(covariance).mmul(first[l]);
      const both = Matrix.sub(second[k][l], crossed.add(crossed.transpose()).mul(0.5));
      middle.add(both.mul(weights.get(a, b) * (a === b ? 1 : 2)));
    });
  });
  return Matrix.add(covariance, covariance.mmul(middle).mmul(covariance).mul(2));
}

function plain({ counts, means, level, products: J }: CellTable): { counts: Int32Array; plainMeans: Float64Array } {
  const n = new Int32Array(J);
  const sums = new Float64Array(J);
  counts.forEach((count, cell) => {
    n[cell % J] += count;
    sums[cell % J] += count * means[cell];
  });
  return { counts: n, plainMeans: sums.map((sum, j) => level + sum / n[j]) };
}
