import { EigenvalueDecomposition, Matrix, SingularValueDecomposition } from 'ml-matrix';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { requireInteger } from '../check';
import { StatsError } from '../errors';
import { normalDraws, shuffled } from './draws';
import { centre, toMatrix } from './svd';

export interface ProcrustesOptions {
  /** Let each set stretch or shrink as a whole (isotropic scaling), the total kept. Default true. */
  scale?: boolean;
  /** Starting arrangements to try; the best is kept. Default 20. */
  starts?: number;
  /** Seed of the starts after the first. */
  seed?: number;
  /** Stop when the residual (of a total equal to the number of sets) falls by less than this in one round. */
  tolerance?: number;
}

/** Generalized Procrustes analysis. Sums of squares are parts of `totalSs`, which is the number of sets. */
export interface ProcrustesResult {
  totalSs: number;
  consensusSs: number;
  residualSs: number;
  /** Share of the total that the consensus explains, in percent. */
  consensusPercent: number;
  /** Factor by which each set was multiplied after the common scaling; all 1 without `scale`. */
  scalingFactors: number[];
  residualBySet: number[];
  residualByObject: number[];
  consensusByObject: number[];
  /** Objects x dimensions, turned to its principal axes. */
  consensus: number[][];
  /** Share of the consensus along each of those axes, in percent. */
  consensusAxesPercent: number[];
  /** Sets x objects x dimensions, turned with the consensus. */
  configurations: number[][][];
  /** Consensus percent of each different optimum that the starts reached, best first. */
  optima: number[];
}

const MOST_ROUNDS = 5000;
/** Scores over all sets; each round of each start goes through all of them. */
const MOST_SCORES = 200_000;

/**
 * Generalized Procrustes analysis: brings the assessors' own configurations of the products to one consensus.
 *
 * Each set is centred; all are scaled together so that the total sum of squares is the number of sets; then each is turned or
 * reflected to the consensus (and, with `scale`, stretched) until the residual stops falling. The criterion has local
 * optima, so several starts are tried: sets added in their order, in random orders, and from random turns. The result is
 * the best one reached; `optima` says how many others there were. Sets may have different variables: narrower ones are
 * filled with columns of 0.
 *
 * @param sets at least two, each objects (rows, at least two, in one order) by variables; no missing values; at most
 * 200,000 scores in all.
 * @throws StatsError `empty`, `too_few`, `shape`, `not_finite`, `constant` (a set tells no two objects apart),
 * `no_convergence`, `not_integer`, `out_of_range`.
 * Source: Gower (1975) Psychometrika 40:33; Ten Berge (1977) Psychometrika 42:267. Checked against R 4.2.2 to 1e-6.
 */
export function generalizedProcrustes(
  sets: ReadonlyArray<ReadonlyArray<ArrayLike<number>>>,
  { scale = true, starts = 20, seed = 1, tolerance = 1e-12 }: ProcrustesOptions = {},
): ProcrustesResult {
  requireInteger(starts, 'The number of starts', 1, 1000);
  requireInteger(seed, 'The seed');
  if (!(tolerance > 0)) throw new StatsError('out_of_range', 'The tolerance must be above 0');
  const xs = prepared(sets);
  const m = xs.length;
  const width = xs[0].columns;
  const generator = xoroshiro128plus(seed);
  let best: Fit | null = null;
  const reached: number[] = [];
  for (let start = 0; start < starts; start += 1) {
    const order = Array.from({ length: m }, (_, i) => i);
    const begin =
      start % 2 === 0
        ? joinedUp(xs, start === 0 ? order : shuffled(order, generator))
        : xs.map((x) => x.mmul(randomRotation(width, generator)));
    const fit = fitFrom(begin, scale, tolerance);
    reached.push((100 * fit.consensusSs) / m);
    if (!best || fit.residualSs < best.residualSs) best = fit;
  }
  return described(best as Fit, reached);
}

interface Fit {
  configurations: Matrix[];
  consensus: Matrix;
  factors: number[];
  consensusSs: number;
  residualSs: number;
}

function prepared(sets: ReadonlyArray<ReadonlyArray<ArrayLike<number>>>): Matrix[] {
  if (sets.length < 2) throw new StatsError('too_few', 'A consensus needs at least two sets');
  const scores = sets.reduce((sum, set) => sum + set.length * (set[0]?.length ?? 0), 0);
  if (scores > MOST_SCORES) throw new StatsError('out_of_range', `A consensus is computed for at most ${MOST_SCORES} scores; there are ${scores}`);
  const tables = sets.map((set, i) => toMatrix(set, `Set ${i + 1}`));
  const n = tables[0].rows;
  const width = Math.max(...tables.map((table) => table.columns));
  if (n < 2) throw new StatsError('too_few', 'A map needs at least two objects');
  let total = 0;
  const filled = tables.map((table, i) => {
    if (table.rows !== n) throw new StatsError('shape', 'All sets must describe the same objects');
    const largest = Math.max(Math.abs(table.max()), Math.abs(table.min()));
    centre(table);
    const squares = table.norm() ** 2;
    if (!Number.isFinite(squares)) throw new StatsError('out_of_range', 'The values are too large to compute with');
    if (squares <= (1e-13 * largest) ** 2) throw new StatsError('constant', `Set ${i + 1} tells no two objects apart`);
    total += squares;
    return Matrix.zeros(n, width).setSubMatrix(table, 0, 0);
  });
  const common = Math.sqrt(sets.length / total);
  return filled.map((table) => table.mul(common));
}

/** Turns each set, one after the other, to the sum of those before it. */
function joinedUp(xs: Matrix[], order: number[]): Matrix[] {
  const result = [...xs];
  const sum = xs[order[0]].clone();
  for (const i of order.slice(1)) {
    result[i] = turned(xs[i], sum);
    sum.add(result[i]);
  }
  return result;
}

/** The set turned and reflected to come closest to the target. */
function turned(x: Matrix, target: Matrix): Matrix {
  const svd = new SingularValueDecomposition(x.transpose().mmul(target));
  return x.mmul(svd.leftSingularVectors.mmul(svd.rightSingularVectors.transpose()));
}

function fitFrom(begin: Matrix[], scale: boolean, tolerance: number): Fit {
  const m = begin.length;
  let y = begin;
  let factors = new Array<number>(m).fill(1);
  let consensus = mean(y);
  let before = Infinity;
  for (let round = 0; round < MOST_ROUNDS; round += 1) {
    const target = consensus;
    y = y.map((set) => turned(set, target));
    if (scale) {
      const stretch = stretches(y);
      y.forEach((set, i) => set.mul(stretch[i]));
      factors = factors.map((factor, i) => factor * stretch[i]);
    }
    consensus = mean(y);
    const consensusSs = m * consensus.norm() ** 2;
    const residualSs = y.reduce((sum, set) => sum + Matrix.sub(set, consensus).norm() ** 2, 0);
    if (before - residualSs < tolerance) return { configurations: y, consensus, factors, consensusSs, residualSs };
    before = residualSs;
  }
  throw new StatsError('no_convergence', 'The configurations did not settle on a consensus');
}

function mean(sets: Matrix[]): Matrix {
  const sum = sets[0].clone();
  for (const set of sets.slice(1)) sum.add(set);
  return sum.div(sets.length);
}

/**
 * Best factors with the total kept: with t_ij = tr(Yi'Yj), factor i = sqrt(sum t / t_ii) e_i, where e is the first
 * eigenvector of t_ij/sqrt(t_ii t_jj).
 */
function stretches(y: Matrix[]): number[] {
  const m = y.length;
  const t = Matrix.zeros(m, m);
  const flat = y.map((set) => set.to1DArray());
  for (let i = 0; i < m; i += 1) {
    for (let j = i; j < m; j += 1) {
      let dot = 0;
      for (let a = 0; a < flat[i].length; a += 1) dot += flat[i][a] * flat[j][a];
      t.set(i, j, dot);
      t.set(j, i, dot);
    }
  }
  const own = t.diagonal();
  const total = own.reduce((sum, value) => sum + value, 0);
  const correlation = Matrix.zeros(m, m);
  for (let i = 0; i < m; i += 1) for (let j = 0; j < m; j += 1) correlation.set(i, j, t.get(i, j) / Math.sqrt(own[i] * own[j]));
  const eigen = new EigenvalueDecomposition(correlation, { assumeSymmetric: true });
  const first = eigen.realEigenvalues.indexOf(Math.max(...eigen.realEigenvalues));
  const vector = eigen.eigenvectorMatrix.getColumn(first);
  const side = Math.sign(vector.reduce((sum, value) => sum + value, 0)) || 1;
  return vector.map((e, i) => side * Math.sqrt(total / own[i]) * e);
}

function randomRotation(size: number, generator: ReturnType<typeof xoroshiro128plus>): Matrix {
  const draws = normalDraws(size * size, generator);
  const svd = new SingularValueDecomposition(Matrix.from1DArray(size, size, draws));
  return svd.leftSingularVectors.mmul(svd.rightSingularVectors.transpose());
}

function described(fit: Fit, reached: number[]): ProcrustesResult {
  const { configurations, consensus, factors, consensusSs, residualSs } = fit;
  const m = configurations.length;
  const n = consensus.rows;
  const residualByObject = new Array<number>(n).fill(0);
  const residualBySet = configurations.map((set) => {
    const difference = Matrix.sub(set, consensus);
    for (let i = 0; i < n; i += 1) residualByObject[i] += sumOfSquares(difference.getRow(i));
    return difference.norm() ** 2;
  });
  const svd = new SingularValueDecomposition(consensus, { autoTranspose: true });
  const axes = svd.diagonal.map((s) => s * s);
  const explained = axes.reduce((sum, value) => sum + value, 0);
  const dimensions = axes.filter((value) => value > 1e-10).length;
  const axesOnly = svd.rightSingularVectors.subMatrix(0, consensus.columns - 1, 0, dimensions - 1);
  const optima: number[] = [];
  for (const value of [...reached].sort((a, b) => b - a)) {
    if (optima.length === 0 || optima[optima.length - 1] - value > 1e-4) optima.push(value);
  }
  return {
    totalSs: consensusSs + residualSs,
    consensusSs,
    residualSs,
    consensusPercent: (100 * consensusSs) / (consensusSs + residualSs),
    scalingFactors: factors,
    residualBySet,
    residualByObject,
    consensusByObject: Array.from({ length: n }, (_, i) => m * sumOfSquares(consensus.getRow(i))),
    consensus: consensus.mmul(axesOnly).to2DArray(),
    consensusAxesPercent: axes.slice(0, dimensions).map((value) => (100 * value) / explained),
    configurations: configurations.map((set) => set.mmul(axesOnly).to2DArray()),
    optima,
  };
}

function sumOfSquares(values: number[]): number {
  return values.reduce((sum, value) => sum + value * value, 0);
}
