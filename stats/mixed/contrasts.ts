import { EigenvalueDecomposition, Matrix, solve } from 'ml-matrix';
import { requireFinite, requireFiniteArray, requireProbability } from '../check';
import { fSf, studentizedRangeQuantile, studentizedRangeSf, tQuantile, tTwoSided } from '../distributions';
import { StatsError } from '../errors';
import type { Pair } from '../comparisons';
import type { ProfileModel } from './profile-model';
import { productTrace } from './likelihood';

/** How the uncertainty of the variances is allowed for in standard errors and degrees of freedom. */
export type DfMethod = 'satterthwaite' | 'kenward_roger';

/** A weighted sum of product means with its standard error and degrees of freedom. Units: the score's. */
export interface Contrast {
  readonly estimate: number;
  readonly standardError: number;
  readonly df: number;
}

/** The test that all products are alike. `scaling` is Kenward and Roger's factor on F, 1 for Satterthwaite. */
export interface ProductTest {
  readonly f: number;
  readonly df: readonly [number, number];
  readonly p: number;
  readonly scaling: number;
}

/** A product's estimated marginal mean with its limits. */
export interface MarginalMean extends Contrast {
  readonly low: number;
  readonly high: number;
}

function requireMethod(model: ProfileModel, method: DfMethod): void {
  if (method === 'satterthwaite' && model.isSingular) {
    throw new StatsError('not_estimable', 'A variance is estimated 0, where Satterthwaite’s degrees of freedom are not defined; use Kenward and Roger’s');
  }
}

/**
 * A weighted sum of the products' means. `weights`: one for each product, not all 0.
 * Satterthwaite: the model's standard error, df = 2v² / Var(v) with the observed information of the
 * variances. Kenward–Roger: the adjusted standard error, the same df with the expected information.
 * @throws StatsError `not_estimable` for Satterthwaite on a singular fit, `shape` on the wrong number of weights
 * Source: Giesbrecht & Burns (1985) Biometrics 41:477; Kenward & Roger (1997) Biometrics 53:983.
 */
export function contrast(model: ProfileModel, weights: ArrayLike<number>, method: DfMethod): Contrast {
  requireMethod(model, method);
  requireFiniteArray(weights, 'weights');
  if (weights.length !== model.products) throw new StatsError('shape', 'There must be one weight for each product');
  return contrastOf(model, Float64Array.from(weights), method);
}

function contrastOf(model: ProfileModel, weights: Float64Array, method: DfMethod): Contrast {
  let estimate = 0;
  for (let j = 0; j < weights.length; j += 1) estimate += weights[j] * model.means[j];
  const kept: number[] = [];
  weights.forEach((weight, j) => weight !== 0 && kept.push(j));
  const form = (matrix: Matrix): number => {
    let sum = 0;
    for (const j of kept) for (const k of kept) sum += weights[j] * weights[k] * matrix.get(j, k);
    return sum;
  };
  const variance = form(model.covariance);
  if (!(variance > 0)) throw new StatsError('out_of_range', 'The weights of a contrast can’t all be 0');
  const slopes = model.sensitivities.map(form);
  const uncertainty = method === 'satterthwaite' ? model.observedUncertainty! : model.expectedUncertainty;
  let spread = 0;
  for (let k = 0; k < slopes.length; k += 1) for (let l = 0; l < slopes.length; l += 1) spread += slopes[k] * slopes[l] * uncertainty.get(k, l);
  const standardError = Math.sqrt(method === 'satterthwaite' ? variance : form(model.adjustedCovariance));
  return { estimate, standardError, df: (2 * variance ** 2) / spread };
}

/** The products' estimated marginal means with confidence limits at `level`. Errors as {@link contrast}. */
export function marginalMeans(model: ProfileModel, method: DfMethod, level = 0.95): MarginalMean[] {
  requireMethod(model, method);
  requireProbability(level, 'level');
  return Array.from(model.means, (_, j) => {
    const mean = contrastOf(model, unit(model.products, j), method);
    const reach = tQuantile((1 + level) / 2, mean.df) * mean.standardError;
    return { ...mean, low: mean.estimate - reach, high: mean.estimate + reach };
  });
}

function unit(length: number, at: number, minus?: number): Float64Array {
  const weights = new Float64Array(length);
  weights[at] = 1;
  if (minus !== undefined) weights[minus] = -1;
  return weights;
}

/** A pair of products under the mixed model: each has its own standard error and degrees of freedom. */
export interface ModelPair extends Pair {
  readonly df: number;
  /** Without a guard for many pairs (least significant difference). */
  readonly pUnadjusted: number;
}

/**
 * All pairs of products, Tukey-adjusted: |difference| / standard error against the studentized range with
 * the pair's own degrees of freedom. `difference` = second − first. Errors as {@link contrast}.
 */
export function modelComparisons(model: ProfileModel, { alpha, method }: { alpha: number; method: DfMethod }): ModelPair[] {
  requireMethod(model, method);
  requireProbability(alpha, 'alpha');
  const k = model.products;
  const pairs: ModelPair[] = [];
  // Complete data give all pairs the same df but for rounding: one critical value then does.
  let known = { df: NaN, q: NaN };
  const criticalAt = (df: number): number => {
    if (!(Math.abs(df - known.df) <= 1e-12 * df)) known = { df, q: studentizedRangeQuantile(1 - alpha, k, df) };
    return known.q;
  };
  for (let first = 0; first < k; first += 1) {
    for (let second = first + 1; second < k; second += 1) {
      const { estimate, standardError, df } = contrastOf(model, unit(k, second, first), method);
      const t = Math.abs(estimate) / standardError;
      const rangeDf = Math.max(1, df);
      const reach = (criticalAt(rangeDf) / Math.SQRT2) * standardError;
      const p = studentizedRangeSf(t * Math.SQRT2, k, known.df);
      pairs.push({ first, second, difference: estimate, standardError, df, p, pUnadjusted: tTwoSided(t, df), low: estimate - reach, high: estimate + reach, isShown: p <= alpha });
    }
  }
  return pairs;
}

/**
 * F test that the products' means are all equal. Satterthwaite: independent contrasts from the
 * eigenvectors of their covariance, joined as F of Fai & Cornelius (1996) J. Stat. Comput. Simul. 54:363;
 * the denominator hangs a little (under 1 %) on the contrasts one begins with, here differences from the
 * first product. Kenward–Roger: as published, with F scaled.
 * @throws StatsError `not_estimable` for Satterthwaite on a singular fit
 */
export function productTest(model: ProfileModel, method: DfMethod): ProductTest {
  requireMethod(model, method);
  const differences = Matrix.zeros(model.products - 1, model.products);
  for (let r = 0; r < differences.rows; r += 1) differences.set(r, 0, -1).set(r, r + 1, 1);
  return method === 'satterthwaite' ? satterthwaite(model, differences) : kenwardRoger(model, differences);
}

function satterthwaite(model: ProfileModel, differences: Matrix): ProductTest {
  const q = differences.rows;
  const covariance = differences.mmul(model.covariance).mmul(differences.transpose());
  const eigen = new EigenvalueDecomposition(covariance, { assumeSymmetric: true });
  const rotated = eigen.eigenvectorMatrix.transpose().mmul(differences);
  let f = 0;
  let expected = 0;
  for (let r = 0; r < q; r += 1) {
    const { estimate, standardError, df } = contrastOf(model, Float64Array.from(rotated.getRow(r)), 'satterthwaite');
    f += (estimate / standardError) ** 2 / q;
    if (q === 1) return test(f, q, df, 1);
    if (df > 2) expected += df / (df - 2);
  }
  return test(f, q, expected > q ? (2 * expected) / (expected - q) : 2, 1);
}

function kenwardRoger(model: ProfileModel, differences: Matrix): ProductTest {
  const q = differences.rows;
  if (q === 1) {
    // One difference: F is t² of the adjusted standard error, and needs no scaling.
    const { estimate, standardError, df } = contrastOf(model, Float64Array.from(differences.getRow(0)), 'kenward_roger');
    return test((estimate / standardError) ** 2, 1, df, 1);
  }
  const turned = differences.transpose();
  const theta = turned.mmul(solve(differences.mmul(model.covariance).mmul(turned), differences));
  const parts = model.sensitivities.map((matrix) => theta.mmul(matrix));
  const traces = parts.map((part) => part.trace());
  let a1 = 0;
  let a2 = 0;
  for (let k = 0; k < parts.length; k += 1) {
    for (let l = 0; l < parts.length; l += 1) {
      const weight = model.expectedUncertainty.get(k, l);
      a1 += weight * traces[k] * traces[l];
      a2 += weight * productTrace(parts[k], parts[l]);
    }
  }
  const estimates = differences.mmul(Matrix.columnVector(model.means));
  const wald = estimates.transpose().mmul(solve(differences.mmul(model.adjustedCovariance).mmul(turned), estimates)).get(0, 0);
  const b = (a1 + 6 * a2) / (2 * q);
  const g = ((q + 1) * a1 - (q + 4) * a2) / ((q + 2) * a2);
  const base = 3 * q + 2 * (1 - g);
  // ρ = V* / 2E*² and the scaling are 0/0 where the denominator has two degrees of freedom; both are 1 there.
  const inverseMean = 1 - a2 / q;
  const spread = 1 - ((q - g) / base) * b;
  const ratio = Math.abs(inverseMean) < 1e-9 && Math.abs(spread) < 1e-9 ? 1 : inverseMean / spread;
  const rho = ((ratio ** 2 / q) * (1 + (g / base) * b)) / (1 - ((q + 2 - g) / base) * b);
  const df = 4 + (q + 2) / (q * rho - 1);
  const scaling = Math.abs(df - 2) < 1e-6 ? 1 : (df * inverseMean) / (df - 2);
  return test((scaling / q) * wald, q, df, scaling);
}

function test(f: number, df1: number, df2: number, scaling: number): ProductTest {
  requireFinite(f, 'F');
  requireFinite(df2, 'degrees of freedom');
  return { f, df: [df1, df2], p: fSf(f, df1, df2), scaling };
}
