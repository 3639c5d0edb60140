import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { requireFiniteArray, requireInteger } from '../check';
import { fSf } from '../distributions';
import { StatsError } from '../errors';

/** Scores with who gave them, of which product, and how they were served. Levels are whole numbers from 0. */
export interface ServedScores {
  readonly assessor: ArrayLike<number>;
  readonly product: ArrayLike<number>;
  readonly score: ArrayLike<number>;
}

/** What a way of serving (position, session, flight, the glass before) does to scores. Units: the score's. */
export interface ServingEffect {
  readonly f: number;
  readonly df: readonly [number, number];
  readonly p: number;
  /** Each level's departure from the mean of all levels, with products and assessors allowed for. */
  readonly effects: Float64Array;
  /** Greatest less smallest effect. */
  readonly span: number;
}

const MOST_LEVELS = 500;

/**
 * Tests a way of serving: score = assessor + product + level, all fixed, the level after the other two (type II).
 * `level`: position in the flight, session, flight, or the product tasted before. Any pattern of gaps.
 * @throws StatsError `not_estimable` when levels can't be told from products and assessors, or nothing is
 * left for the error; `constant` when the model leaves no residual; `shape`, `not_finite`, `not_integer`
 * Source: additive least squares, any text on linear models; checked against R's car::Anova type II.
 */
export function servingEffect({ assessor, product, score }: ServedScores, level: ArrayLike<number>): ServingEffect {
  const n = requireServed({ assessor, product, score }, level);
  const sizes = [assessor, product, level].map((codes) => highest(codes, n) + 1);
  const total = sizes[0] + sizes[1] + sizes[2];
  if (total > MOST_LEVELS) throw new StatsError('out_of_range', `There are more than ${MOST_LEVELS} assessors, products and levels together`);
  let mean = 0;
  for (let i = 0; i < n; i += 1) mean += (score[i] - mean) / (i + 1);
  const cross = Matrix.zeros(total, total);
  const rhs = new Float64Array(total);
  let ssTotal = 0;
  for (let i = 0; i < n; i += 1) {
    const columns = [assessor[i], sizes[0] + product[i], sizes[0] + sizes[1] + level[i]];
    for (const a of columns) {
      rhs[a] += score[i] - mean;
      for (const b of columns) cross.set(a, b, cross.get(a, b) + 1);
    }
    ssTotal += (score[i] - mean) ** 2;
  }
  const without = sizes[0] + sizes[1];
  const full = explained(cross, rhs, total);
  const reduced = explained(cross, rhs, without);
  const df1 = full.rank - reduced.rank;
  const df2 = n - full.rank;
  if (df1 < 1) throw new StatsError('not_estimable', 'How the samples were served can’t be told from who tasted what');
  if (df2 < 1) throw new StatsError('not_estimable', 'There are too few scores to judge how the samples were served');
  const error = ssTotal - full.ss;
  if (error <= 1e-12 * ssTotal) throw new StatsError('constant', 'Assessors, products and serving explain every score, so there is no error to judge by');
  const f = Math.max(0, full.ss - reduced.ss) / df1 / (error / df2);
  const effects = full.solution.subarray(without);
  const centre = effects.reduce((a, b) => a + b, 0) / effects.length;
  const centred = effects.map((effect) => effect - centre);
  return { f, df: [df1, df2], p: fSf(f, df1, df2), effects: centred, span: Math.max(...centred) - Math.min(...centred) };
}

/** Sum of squares and rank of the first `size` columns, by the eigenvectors of their cross-products. */
function explained(cross: Matrix, rhs: Float64Array, size: number): { ss: number; rank: number; solution: Float64Array } {
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(cross.subMatrix(0, size - 1, 0, size - 1), { assumeSymmetric: true });
  const limit = 1e-9 * Math.max(...realEigenvalues);
  const solution = new Float64Array(size);
  let ss = 0;
  let rank = 0;
  realEigenvalues.forEach((value, axis) => {
    if (value <= limit) return;
    rank += 1;
    let dot = 0;
    for (let a = 0; a < size; a += 1) dot += eigenvectorMatrix.get(a, axis) * rhs[a];
    ss += dot ** 2 / value;
    for (let a = 0; a < size; a += 1) solution[a] += (eigenvectorMatrix.get(a, axis) * dot) / value;
  });
  return { ss, rank, solution };
}

/** Checks what was served; the three lists of levels and the scores are equally many. @returns their number */
export function requireServed({ assessor, product, score }: ServedScores, level: ArrayLike<number>): number {
  const n = score.length;
  requireFiniteArray(score, 'scores');
  for (const [codes, name] of [[assessor, 'assessor'], [product, 'product'], [level, 'level']] as const) {
    if (codes.length !== n) throw new StatsError('shape', 'Assessors, products, levels and scores must be equally many');
    for (let i = 0; i < n; i += 1) requireInteger(codes[i], name, 0, MOST_LEVELS);
  }
  return n;
}

/** The highest level. */
export function highest(codes: ArrayLike<number>, n: number): number {
  let most = 0;
  for (let i = 0; i < n; i += 1) if (codes[i] > most) most = codes[i];
  return most;
}
