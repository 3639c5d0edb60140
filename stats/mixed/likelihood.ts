import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import type { CellTable } from './cell-table';

/** Variances of assessors, of their interaction with products, and of the residual, in this order. */
export type Variances = readonly [assessor: number, interaction: number, residual: number];

/** The covariance of one assessor's cell means is V = assessor·11′ + diag(interaction + residual / n). */
export const COMPONENTS = 3;

/** Assessors whose cells hold the same numbers of scores share V; complete data have one pattern. */
export interface Pattern {
  readonly counts: Int32Array;
  readonly members: readonly number[];
}

/** Groups assessors by the numbers of scores in their cells; those without any score are left out. */
export function patternsOf({ assessors, products, counts }: CellTable): Pattern[] {
  const groups = new Map<string, { counts: Int32Array; members: number[] }>();
  for (let i = 0; i < assessors; i += 1) {
    const row = counts.subarray(i * products, (i + 1) * products);
    if (row.every((count) => count === 0)) continue;
    const key = row.join();
    const group = groups.get(key);
    if (group) group.members.push(i);
    else groups.set(key, { counts: row, members: [i] });
  }
  return [...groups.values()];
}

/** V⁻¹ of one pattern as diag(w) − c·ww′, with what is needed of it again and again. Empty cells have w = 0. */
interface Inverse {
  readonly w: Float64Array;
  readonly c: number;
  /** V⁻¹1 = g·w. */
  readonly g: number;
  /** ln |V|. */
  readonly logDet: number;
}

function invert({ counts }: Pattern, [assessor, interaction, residual]: Variances): Inverse {
  const w = new Float64Array(counts.length);
  let sum = 0;
  let logDet = 0;
  for (let j = 0; j < w.length; j += 1) {
    if (counts[j] === 0) continue;
    const d = interaction + residual / counts[j];
    w[j] = 1 / d;
    sum += w[j];
    logDet += Math.log(d);
  }
  const g = 1 / (1 + assessor * sum);
  return { w, c: assessor * g, g, logDet: logDet - Math.log(g) };
}

/** The REML likelihood at some variances, with the pieces that its derivatives and the tests are made of. */
export interface Likelihood {
  readonly variances: Variances;
  readonly logLikelihood: number;
  /** Generalised least squares means of the products, less the table's level. */
  readonly means: Float64Array;
  /** Φ = (X′V⁻¹X)⁻¹: the model's covariance of the means. */
  readonly covariance: Matrix;
  /** V⁻¹ of each pattern. */
  readonly inverses: readonly Inverse[];
}

/** Evaluates the restricted likelihood: of cell means (whose covariance splits by assessor) and of what is within cells. */
export function likelihoodAt(table: CellTable, patterns: readonly Pattern[], variances: Variances): Likelihood {
  const { products: J, means: y, scores: N, filled, within } = table;
  const inverses = patterns.map((pattern) => invert(pattern, variances));
  const information = Matrix.zeros(J, J);
  const rhs = new Float64Array(J);
  let logDet = (N - filled) * Math.log(variances[2]);
  patterns.forEach(({ members, counts }, p) => {
    const { w, c, logDet: own } = inverses[p];
    const m = members.length;
    logDet += m * own;
    for (let j = 0; j < J; j += 1) {
      if (counts[j] > 0) logDet += m * Math.log(counts[j]);
      for (let k = 0; k <= j; k += 1) {
        const value = information.get(j, k) - m * c * w[j] * w[k] + (j === k ? m * w[j] : 0);
        information.set(j, k, value);
        information.set(k, j, value);
      }
    }
    for (const i of members) {
      let dot = 0;
      for (let j = 0; j < J; j += 1) dot += w[j] * y[i * J + j];
      for (let j = 0; j < J; j += 1) rhs[j] += w[j] * (y[i * J + j] - c * dot);
    }
  });
  const { covariance, logDet: logDetInformation } = inverseOf(information);
  const means = new Float64Array(J);
  for (let j = 0; j < J; j += 1) for (let k = 0; k < J; k += 1) means[j] += covariance.get(j, k) * rhs[k];
  let quadratic = within / variances[2];
  patterns.forEach(({ members, counts }, p) => {
    const { w, c } = inverses[p];
    for (const i of members) {
      let dot = 0;
      for (let j = 0; j < J; j += 1) {
        if (counts[j] === 0) continue;
        const r = y[i * J + j] - means[j];
        quadratic += w[j] * r * r;
        dot += w[j] * r;
      }
      quadratic -= c * dot * dot;
    }
  });
  const logLikelihood = -0.5 * ((N - J) * Math.log(2 * Math.PI) + logDet + logDetInformation + quadratic);
  return { variances, logLikelihood, means, covariance, inverses };
}

function inverseOf(information: Matrix): { covariance: Matrix; logDet: number } {
  const cholesky = new CholeskyDecomposition(information);
  const lower = cholesky.lowerTriangularMatrix;
  let logDet = 0;
  for (let j = 0; j < lower.rows; j += 1) logDet += 2 * Math.log(lower.get(j, j));
  return { covariance: cholesky.solve(Matrix.eye(lower.rows)), logDet };
}

/** Derivatives of the restricted log-likelihood by the three variances. */
export interface Derivatives {
  readonly score: Float64Array;
  /** Observed information: minus the second derivatives. */
  readonly observed: Matrix;
  /** Expected information: ½ tr(P V_k P V_l). */
  readonly expected: Matrix;
  /** X′V⁻¹V_kV⁻¹X. */
  readonly first: readonly Matrix[];
  /** [k][l]: X′V⁻¹V_kV⁻¹V_lV⁻¹X, l ≤ k. */
  readonly second: readonly (readonly Matrix[])[];
}

/**
 * First and second derivatives at a point. V_k are 11′, the identity and diag(1/n); on the parts within
 * cells only the residual acts. Every product of V⁻¹ and V_k is a diagonal plus outer products, so a
 * pattern costs products² operations.
 */
export function derivativesAt(table: CellTable, patterns: readonly Pattern[], at: Likelihood): Derivatives {
  const { products: J } = table;
  const first = [0, 1, 2].map(() => Matrix.zeros(J, J));
  const second = [0, 1, 2].map((k) => Array.from({ length: k + 1 }, () => Matrix.zeros(J, J)));
  const traces = new Float64Array(COMPONENTS);
  const pairs = Matrix.zeros(COMPONENTS, COMPONENTS);
  patterns.forEach((pattern, p) => addPattern(pattern, at.inverses[p], { first, second, traces, pairs }));
  const { squares, crossed } = residualForms(table, patterns, at);
  const [, , residual] = at.variances;
  const free = table.scores - table.filled;
  // Within cells: ½[(N − C)/σ² − SS/σ⁴] and its derivative.
  traces[2] += free / residual;
  squares[2] += table.within / residual ** 2;
  pairs.set(2, 2, pairs.get(2, 2) + free / residual ** 2);
  crossed.set(2, 2, crossed.get(2, 2) + table.within / residual ** 3);

  const projected = first.map((matrix) => at.covariance.mmul(matrix));
  const score = new Float64Array(COMPONENTS);
  const observed = Matrix.zeros(COMPONENTS, COMPONENTS);
  const expected = Matrix.zeros(COMPONENTS, COMPONENTS);
  for (let k = 0; k < COMPONENTS; k += 1) {
    score[k] = -0.5 * (traces[k] - projected[k].trace() - squares[k]);
    for (let l = 0; l <= k; l += 1) {
      const trace = pairs.get(k, l) - 2 * dotProduct(at.covariance, second[k][l]) + productTrace(projected[k], projected[l]);
      expected.set(k, l, trace / 2).set(l, k, trace / 2);
      const seen = crossed.get(k, l) - trace / 2;
      observed.set(k, l, seen).set(l, k, seen);
    }
  }
  return { score, observed, expected, first, second };
}

interface Sums {
  readonly first: Matrix[];
  readonly second: Matrix[][];
  readonly traces: Float64Array;
  readonly pairs: Matrix;
}

function addPattern({ counts, members }: Pattern, { w, c, g }: Inverse, { first, second, traces, pairs }: Sums): void {
  const J = counts.length;
  const m = members.length;
  const v = [1, 2].map((k) => Float64Array.from(counts, (n) => (n === 0 ? 0 : k === 1 ? 1 : 1 / n)));
  const u = w.map((value) => g * value);
  const uSum = u.reduce((a, b) => a + b, 0);

  traces[0] += m * uSum;
  pairs.set(0, 0, pairs.get(0, 0) + m * uSum ** 2);
  addOuter(first[0], u, u, m);
  addOuter(second[0][0], u, u, m * uSum);
  for (let k = 1; k <= 2; k += 1) {
    const vk = v[k - 1];
    // V⁻¹ diag(d) V⁻¹ with d = v_k.
    addSandwich(first[k], w, c, vk, m);
    // V⁻¹ V_a V⁻¹ V_k V⁻¹ = u z′ with z = V⁻¹ (v_k ∘ u); the symmetric half is what is needed.
    const z = applyInverse(w, c, u.map((value, j) => value * vk[j]));
    addOuter(second[k][0], u, z, m / 2);
    addOuter(second[k][0], z, u, m / 2);
    let trace = 0;
    let crossing = 0;
    for (let j = 0; j < J; j += 1) {
      trace += vk[j] * (w[j] - c * w[j] ** 2);
      crossing += vk[j] * u[j] ** 2;
    }
    traces[k] += m * trace;
    pairs.set(k, 0, pairs.get(k, 0) + m * crossing);
    for (let l = 1; l <= k; l += 1) {
      const vl = v[l - 1];
      let sum = 0;
      let left = 0;
      let right = 0;
      const both = new Float64Array(J);
      for (let j = 0; j < J; j += 1) {
        both[j] = vk[j] * vl[j] * w[j];
        sum += vk[j] * vl[j] * (w[j] ** 2 - 2 * c * w[j] ** 3);
        left += vk[j] * w[j] ** 2;
        right += vl[j] * w[j] ** 2;
      }
      pairs.set(k, l, pairs.get(k, l) + m * (sum + c * c * left * right));
      // diag(v_k) V⁻¹ diag(v_l) = diag(v_k w v_l) − c (v_k w)(v_l w)′.
      addSandwich(second[k][l], w, c, both, m);
      const a = applyInverse(w, c, w.map((value, j) => value * vk[j]));
      const b = k === l ? a : applyInverse(w, c, w.map((value, j) => value * vl[j]));
      addOuter(second[k][l], a, b, (-m * c) / 2);
      addOuter(second[k][l], b, a, (-m * c) / 2);
    }
  }
}

/** V⁻¹x. */
function applyInverse(w: Float64Array, c: number, x: Float64Array): Float64Array {
  let dot = 0;
  for (let j = 0; j < w.length; j += 1) dot += w[j] * x[j];
  return w.map((value, j) => value * (x[j] - c * dot));
}

function addOuter(sum: Matrix, a: Float64Array, b: Float64Array, factor: number): void {
  for (let j = 0; j < a.length; j += 1) for (let k = 0; k < b.length; k += 1) sum.set(j, k, sum.get(j, k) + factor * a[j] * b[k]);
}

/** Adds factor · V⁻¹ diag(d) V⁻¹ = diag(w²d) − c(w ∘ (w²d)′ and its transpose) + c²(Σw²d) ww′. */
function addSandwich(sum: Matrix, w: Float64Array, c: number, d: Float64Array, factor: number): void {
  const s = w.map((value, j) => value * value * d[j]);
  const total = s.reduce((a, b) => a + b, 0);
  for (let j = 0; j < w.length; j += 1) {
    for (let k = 0; k < w.length; k += 1) {
      const value = c * (c * total * w[j] * w[k] - w[j] * s[k] - s[j] * w[k]) + (j === k ? s[j] : 0);
      sum.set(j, k, sum.get(j, k) + factor * value);
    }
  }
}

/** q′V_kq and q′V_kPV_lq with q = Py, over cell means. */
function residualForms(table: CellTable, patterns: readonly Pattern[], at: Likelihood): { squares: Float64Array; crossed: Matrix } {
  const { products: J, means: y } = table;
  const squares = new Float64Array(COMPONENTS);
  const crossed = Matrix.zeros(COMPONENTS, COMPONENTS);
  const projections = [0, 1, 2].map(() => new Float64Array(J));
  const r = new Float64Array(J);
  const parts = [0, 1, 2].map(() => new Float64Array(J));
  patterns.forEach(({ members, counts }, p) => {
    const { w, c } = at.inverses[p];
    for (const i of members) {
      for (let j = 0; j < J; j += 1) r[j] = counts[j] === 0 ? 0 : y[i * J + j] - at.means[j];
      const q = applyInverse(w, c, r);
      let sum = 0;
      for (let j = 0; j < J; j += 1) sum += q[j];
      for (let j = 0; j < J; j += 1) {
        parts[0][j] = counts[j] === 0 ? 0 : sum;
        parts[1][j] = q[j];
        parts[2][j] = counts[j] === 0 ? 0 : q[j] / counts[j];
      }
      const solved = parts.map((part) => applyInverse(w, c, part));
      for (let k = 0; k < COMPONENTS; k += 1) {
        for (let j = 0; j < J; j += 1) {
          squares[k] += q[j] * parts[k][j];
          projections[k][j] += solved[k][j];
        }
        for (let l = 0; l <= k; l += 1) {
          let dot = 0;
          for (let j = 0; j < J; j += 1) dot += parts[k][j] * solved[l][j];
          crossed.set(k, l, crossed.get(k, l) + dot);
        }
      }
    }
  });
  for (let k = 0; k < COMPONENTS; k += 1) {
    for (let l = 0; l <= k; l += 1) {
      let lost = 0;
      for (let a = 0; a < J; a += 1) for (let b = 0; b < J; b += 1) lost += projections[k][a] * at.covariance.get(a, b) * projections[l][b];
      crossed.set(k, l, crossed.get(k, l) - lost);
    }
  }
  return { squares, crossed };
}

/** tr(A′B). */
function dotProduct(a: Matrix, b: Matrix): number {
  let sum = 0;
  for (let j = 0; j < a.rows; j += 1) for (let k = 0; k < a.columns; k += 1) sum += a.get(j, k) * b.get(j, k);
  return sum;
}

/** tr(AB). */
export function productTrace(a: Matrix, b: Matrix): number {
  let sum = 0;
  for (let j = 0; j < a.rows; j += 1) for (let k = 0; k < a.columns; k += 1) sum += a.get(j, k) * b.get(k, j);
  return sum;
}
