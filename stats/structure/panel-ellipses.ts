import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { requireInteger, requireProbability } from '../check';
import { StatsError } from '../errors';
import { cloudEllipse, type Ellipse } from './ellipse';
import { pca, type PcaResult } from './pca';
import { centre, thinSvd } from './svd';

export interface PanelEllipseOptions {
  /** Divide each attribute by the standard deviation of its product means (correlation matrix). */
  scale?: boolean;
  /** The two axes to draw, from 0. Default the first two. */
  axes?: [number, number];
  /** Virtual panels to draw. Default 500. */
  resamples?: number;
  /** Share of the virtual panels inside each ellipse. Default 0.95. */
  level?: number;
  /** Seed of the draws; the ellipses repeat with it. */
  seed?: number;
  /**
   * `rotated`: each virtual panel gets its own components, turned to the map (total bootstrap). `projected`: virtual
   * panels are put on the axes of the map as they are (partial bootstrap); quicker, ellipses somewhat too small.
   */
  method?: 'rotated' | 'projected';
}

/** A map of the products with the ellipses of virtual panels. */
export interface PanelEllipses {
  pca: PcaResult;
  /** One for each product, in the order of the products. */
  ellipses: Ellipse[];
}

/**
 * Principal components of a panel's product means, with bootstrap ellipses that show how far another panel of the kind
 * might move each product.
 *
 * Virtual panels are drawn from the assessors with replacement. Ellipses describe the panel, not single tastings: products
 * whose ellipses lie apart are told apart by the panel; overlap is not proof that they are alike. With few assessors
 * (below about eight) the ellipses are too small.
 *
 * @param scores assessors x products x attributes, means over repeats, no missing values.
 * @throws StatsError `too_few` (fewer than three assessors or products), `shape`, `not_finite`, `constant`, `out_of_range`,
 * `not_integer`.
 * Source: Husson, Le Dien & Pages (2005) Food Qual. Pref. 16:245; Cadoret & Husson (2013) Food Qual. Pref. 28:106.
 */
export function panelEllipses(
  scores: ReadonlyArray<ReadonlyArray<ArrayLike<number>>>,
  { scale = false, axes = [0, 1], resamples = 500, level = 0.95, seed = 1, method = 'rotated' }: PanelEllipseOptions = {},
): PanelEllipses {
  requireInteger(resamples, 'The number of resamples', 20, 100_000);
  requireInteger(seed, 'The seed');
  requireProbability(level, 'The level');
  const { flat, people, products, attributes } = flattened(scores);
  const map = pca(meanTable(flat, people, products, attributes, null), { scale });
  axes.forEach((axis) => requireInteger(axis, 'An axis', 0, map.eigenvalues.length - 1));
  const divisors = scale ? map.sd : new Array<number>(attributes).fill(1);
  const kept = Math.min(map.eigenvalues.length, Math.max(axes[0], axes[1]) + 1);
  const target = new Matrix(map.scores).subMatrix(0, products - 1, 0, kept - 1);
  const vectors = new Matrix(map.eigenvectors).subMatrix(0, attributes - 1, 0, kept - 1);
  const xs = Array.from({ length: products }, () => new Float64Array(resamples));
  const ys = Array.from({ length: products }, () => new Float64Array(resamples));
  const generator = xoroshiro128plus(seed);
  const drawn = new Int32Array(people);
  for (let sample = 0; sample < resamples; sample += 1) {
    for (let i = 0; i < people; i += 1) drawn[i] = uniformInt(generator, 0, people - 1);
    const table = new Matrix(meanTable(flat, people, products, attributes, drawn));
    centre(table);
    table.divRowVector(divisors);
    const points = method === 'projected' ? table.mmul(vectors) : rotatedScores(table, target);
    for (let j = 0; j < products; j += 1) {
      xs[j][sample] = points.get(j, axes[0]);
      ys[j][sample] = points.get(j, axes[1]);
    }
  }
  return { pca: map, ellipses: xs.map((x, j) => cloudEllipse(x, ys[j], level)) };
}

/** The table's own leading components, turned and reflected (not stretched) to the target's. */
function rotatedScores(table: Matrix, target: Matrix): Matrix {
  // A virtual panel of one assessor drawn over and over may tell no products apart: its products lie at the centre.
  if (table.norm() < 1e-12) return Matrix.zeros(target.rows, target.columns);
  const { u, s } = thinSvd(table);
  const own = Matrix.zeros(target.rows, target.columns);
  for (let a = 0; a < Math.min(s.length, target.columns); a += 1) {
    for (let i = 0; i < target.rows; i += 1) own.set(i, a, u.get(i, a) * s[a]);
  }
  const svd = new SingularValueDecomposition(own.transpose().mmul(target));
  return own.mmul(svd.leftSingularVectors).mmul(svd.rightSingularVectors.transpose());
}

function flattened(scores: ReadonlyArray<ReadonlyArray<ArrayLike<number>>>) {
  const people = scores.length;
  const products = people === 0 ? 0 : scores[0].length;
  if (people < 3) throw new StatsError('too_few', 'Ellipses need at least three assessors');
  if (products < 3) throw new StatsError('too_few', 'A map with ellipses needs at least three products');
  const attributes = scores[0][0].length;
  if (attributes < 2) throw new StatsError('too_few', 'A map needs at least two attributes');
  const flat = new Float64Array(people * products * attributes);
  let at = 0;
  for (const table of scores) {
    if (table.length !== products) throw new StatsError('shape', 'Every assessor must have scored every product');
    for (const row of table) {
      if (row.length !== attributes) throw new StatsError('shape', 'Every product must have a score for every attribute');
      for (let j = 0; j < attributes; j += 1, at += 1) {
        if (!Number.isFinite(row[j])) throw new StatsError('not_finite', 'Every score must be a finite number');
        flat[at] = row[j];
      }
    }
  }
  return { flat, people, products, attributes };
}

/** Product means over the drawn assessors, or over all of them. */
function meanTable(flat: Float64Array, people: number, products: number, attributes: number, drawn: Int32Array | null): number[][] {
  const size = products * attributes;
  const sums = new Float64Array(size);
  for (let i = 0; i < people; i += 1) {
    const start = (drawn ? drawn[i] : i) * size;
    for (let c = 0; c < size; c += 1) sums[c] += flat[start + c];
  }
  return Array.from({ length: products }, (_, j) =>
    Array.from(sums.subarray(j * attributes, (j + 1) * attributes), (sum) => sum / people),
  );
}
