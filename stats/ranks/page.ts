import { normalSf } from '../distributions';
import { requireInteger, requireProbability } from '../check';
import { StatsError } from '../errors';
import { rankBlocks } from './midranks';

/** Page's test of a predicted order. */
export interface PageResult {
  /** Sum over products of predicted place (1 = predicted lowest) times rank sum. */
  l: number;
  /** Mean of L when the products do not differ. */
  mean: number;
  /** Variance of L without ties, and z and upper-tail p from it. */
  variance: number;
  z: number;
  p: number;
  /** Variance given the mid-ranks that were seen, and z and upper-tail p from it. */
  varianceTieCorrected: number;
  zTieCorrected: number;
  pTieCorrected: number;
  /** Exact upper-tail p by permutation of the ranks seen; null when the count would be too long. */
  pExact: number | null;
}

const MOST_PRODUCTS_EXACT = 10;
const MOST_STEPS = 3e8;

/**
 * Page's L: do the scores rise in the order that was predicted before the tasting?
 *
 * L = sum_j j R_j, where R_j is the rank sum of the product predicted to be the j-th lowest (rank 1 = lowest score).
 * Mean b k(k + 1)^2 / 4, variance b k^2 (k + 1)(k^2 - 1) / 144 without ties; no continuity correction. One-sided: p is the
 * probability of an L at least as great. The order must be stated before the scores are seen.
 *
 * @param matrix rows = assessors, columns = products; scores or ranks, no missing values.
 * @param order column numbers (from 0) in the predicted order, lowest first; the order of the columns if left out.
 * @throws StatsError `empty`, `too_few`, `shape`, `not_finite`, `out_of_range` (order is not each column once), `constant`.
 * Source: Page (1963) J. Am. Stat. Assoc. 58:216; tie correction by permutation variance as in R's coin package.
 * Exact p to about 1e-12 relative, counted up to 10 products.
 */
export function page(matrix: ReadonlyArray<ArrayLike<number>>, order?: ReadonlyArray<number>): PageResult {
  const { blocks: b, treatments: k, ranks, rankSums, squares } = rankBlocks(matrix);
  const places = order ?? rankSums.map((_, j) => j);
  const seen = new Set(places);
  if (places.length !== k || seen.size !== k || places.some((j) => !Number.isInteger(j) || j < 0 || j >= k)) {
    throw new StatsError('out_of_range', 'The predicted order must name every product once');
  }
  let l = 0;
  places.forEach((column, j) => {
    l += (j + 1) * rankSums[column];
  });
  const mean = (b * k * (k + 1) * (k + 1)) / 4;
  const variance = (b * k * k * (k + 1) * (k * k - 1)) / 144;
  // Squares of the ranks less their mean, times the same for the places, over k - 1, summed over assessors.
  const within = squares - (b * k * (k + 1) * (k + 1)) / 4;
  if (within <= 0) throw new StatsError('constant', 'No assessor told any two products apart');
  const varianceTieCorrected = (within * k * (k + 1)) / 12;
  const z = (l - mean) / Math.sqrt(variance);
  const zTieCorrected = (l - mean) / Math.sqrt(varianceTieCorrected);
  const rows = Array.from({ length: b }, (_, i) => Array.from(ranks.subarray(i * k, (i + 1) * k), (r) => 2 * r));
  const tail = upperTail(rows, k);
  return {
    l,
    mean,
    variance,
    z,
    p: normalSf(z),
    varianceTieCorrected,
    zTieCorrected,
    pTieCorrected: normalSf(zTieCorrected),
    pExact: tail ? tail(2 * l) : null,
  };
}

/**
 * Smallest L (no ties) whose exact upper tail is at most alpha, for k products and n assessors; null when none is.
 *
 * @throws StatsError `not_integer`, `out_of_range`, `not_estimable` when the count would be too long.
 * Source: by enumeration; agrees with Page (1963), table 1.
 */
export function pageCriticalL(k: number, n: number, alpha: number): number | null {
  requireInteger(k, 'The number of products', 2, MOST_PRODUCTS_EXACT);
  requireInteger(n, 'The number of assessors', 1, 1000);
  requireProbability(alpha, 'The significance level');
  const row = Array.from({ length: k }, (_, j) => 2 * (j + 1));
  const tail = upperTail(Array.from({ length: n }, () => row), k);
  if (!tail) throw new StatsError('not_estimable', 'The exact distribution for so many assessors and products is too long to count');
  let l = (n * k * (k + 1) * (2 * k + 1)) / 6;
  if (tail(2 * l) > alpha * (1 + 1e-12)) return null;
  while (tail(2 * (l - 1)) <= alpha * (1 + 1e-12)) l -= 1;
  return l;
}

/** P(sum of place times doubled rank >= x) over all arrangements within the rows; null when too long to count. */
function upperTail(rows: number[][], k: number): ((x: number) => number) | null {
  if (k > MOST_PRODUCTS_EXACT) return null;
  const sorted = rows.map((row) => [...row].sort((a, b) => a - b));
  const bounds = sorted.map((row) => ({
    smallest: row.reduce((sum, r, j) => sum + r * (k - j), 0),
    largest: row.reduce((sum, r, j) => sum + r * (j + 1), 0),
  }));
  let steps = 0;
  let width = 1;
  for (const { smallest, largest } of bounds) {
    steps += width * (largest - smallest + 1);
    width += largest - smallest;
  }
  if (steps > MOST_STEPS) return null;
  const kinds = new Map<string, Float64Array>();
  let low = 0;
  let total: Float64Array = Float64Array.of(1);
  sorted.forEach((row, i) => {
    const key = row.join();
    let one = kinds.get(key);
    if (!one) {
      one = blockDistribution(row, bounds[i].smallest, bounds[i].largest);
      kinds.set(key, one);
    }
    const grown = new Float64Array(total.length + one.length - 1);
    for (let j = 0; j < one.length; j += 1) {
      if (one[j] === 0) continue;
      for (let at = 0; at < total.length; at += 1) grown[at + j] += total[at] * one[j];
    }
    total = grown;
    low += bounds[i].smallest;
  });
  const tail = new Float64Array(total.length + 1);
  for (let i = total.length - 1; i >= 0; i -= 1) tail[i] = tail[i + 1] + total[i];
  return (x) => (x <= low ? 1 : (tail[x - low] ?? 0));
}

/** Probabilities of sum of place times doubled rank for one assessor, from `smallest` up, place by place over subsets of ranks. */
function blockDistribution(sorted: number[], smallest: number, largest: number): Float64Array {
  const k = sorted.length;
  const width = largest + 1;
  let level = new Map<number, Float64Array>([[0, Float64Array.of(1)]]);
  for (let place = 1; place <= k; place += 1) {
    const grown = new Map<number, Float64Array>();
    for (const [used, counts] of level) {
      for (let item = 0; item < k; item += 1) {
        if (used & (1 << item)) continue;
        const key = used | (1 << item);
        let target = grown.get(key);
        if (!target) {
          target = new Float64Array(width);
          grown.set(key, target);
        }
        const step = place * sorted[item];
        for (let i = 0; i < counts.length; i += 1) if (counts[i] !== 0) target[i + step] += counts[i];
      }
    }
    level = grown;
  }
  const counts = level.get((1 << k) - 1) as Float64Array;
  const result = counts.slice(smallest, largest + 1);
  let sum = 0;
  for (const count of result) sum += count;
  return result.map((count) => count / sum);
}
