import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { requireInteger, requireProbability } from '../check';
import { StatsError } from '../errors';
import { rankBlocks, type RankedBlocks } from './midranks';

/** Friedman's test by the permutation of ranks within assessors. */
export interface FriedmanPermutation {
  /** Probability of a spread of rank sums at least as great as the one seen. */
  p: number;
  /** `exact`: every arrangement was counted. `simulated`: a seeded sample of them was drawn. */
  method: 'exact' | 'simulated';
  /** Number of random draws (0 when exact). */
  draws: number;
  /** Standard error of a simulated `p` (0 when exact). */
  standardError: number;
}

export interface PermutationOptions {
  /** Most steps the count may take before random draws replace it. */
  budget?: number;
  /** Random draws when the count is too long. */
  draws?: number;
  /** Seed of the generator of the draws; the answer repeats with it. */
  seed?: number;
}

/** All orders of eight ranks fit; of nine they would fill the memory of a phone. */
const MOST_ARRANGEMENTS = 50_000;

/**
 * Exact permutation p of Friedman's test, given the mid-ranks each assessor gave (ties allowed).
 *
 * Under the hypothesis of no difference all arrangements of an assessor's own ranks are equally likely. The distribution of
 * the rank sums is built up assessor by assessor; as it does not change when products trade places, only sorted rank
 * sums are kept. Beyond `budget` steps (about 10 assessors x 5 products, fewer with many ties), or eight products, seeded
 * draws are used, p = (1 + hits)/(1 + draws).
 *
 * @param matrix rows = assessors, columns = products; scores or ranks, no missing values.
 * @param options budget of steps (default 6e6), draws (default 20000), seed (default 1).
 * @throws StatsError `empty`, `too_few`, `shape`, `not_finite`, `constant` as {@link friedman}; `out_of_range` for options.
 * Source: Hollander, Wolfe & Chicken, 3rd ed., sec. 7.1. Exact p to about 1e-13 relative.
 */
export function friedmanPermutation(
  matrix: ReadonlyArray<ArrayLike<number>>,
  { budget = 6e6, draws = 20_000, seed = 1 }: PermutationOptions = {},
): FriedmanPermutation {
  requireInteger(budget, 'The budget of steps', 0);
  requireInteger(draws, 'The number of draws', 100, 1e7);
  requireInteger(seed, 'The seed');
  const ranked = rankBlocks(matrix);
  if (ranked.blocks < 2) throw new StatsError('too_few', 'A comparison of products by ranks needs at least two assessors');
  const { blocks: b, treatments: k, tieSum } = ranked;
  if (tieSum === b * (k * k * k - k)) throw new StatsError('constant', 'No assessor told any two products apart');
  const seen = spread(ranked.rankSums.map((sum) => 2 * sum));
  const distribution = spreadDistribution(doubledRows(ranked), k, budget);
  if (distribution) {
    let p = 0;
    for (const [value, probability] of distribution) if (value >= seen) p += probability;
    return { p: Math.min(1, p), method: 'exact', draws: 0, standardError: 0 };
  }
  const hits = simulate(ranked, seen, draws, seed);
  const p = (hits + 1) / (draws + 1);
  return { p, method: 'simulated', draws, standardError: Math.sqrt((p * (1 - p)) / draws) };
}

/**
 * Smallest attainable Friedman chi-square (no ties) whose exact upper tail is at most alpha, for k products and n assessors.
 *
 * @returns the critical value and its exact p, or null when even complete agreement is not that improbable.
 * @throws StatsError `out_of_range`, `not_integer`, and `not_estimable` when the count would take more than `budget` steps.
 * Source: tables of Hollander & Wolfe (A.22) follow from the same enumeration; checked against R 4.2.2 to 1e-9.
 */
export function friedmanCriticalValue(
  k: number,
  n: number,
  alpha: number,
  budget = 2e7,
): { chiSquare: number; p: number } | null {
  requireInteger(k, 'The number of products', 2, 12);
  requireInteger(n, 'The number of assessors', 2, 1000);
  requireProbability(alpha, 'The significance level');
  const row = Array.from({ length: k }, (_, j) => 2 * (j + 1));
  const distribution = spreadDistribution(Array.from({ length: n }, () => row), k, budget);
  if (!distribution) throw new StatsError('not_estimable', 'The exact distribution for so many assessors and products is too long to count');
  const values = [...distribution.keys()].sort((a, b) => b - a);
  const mean = n * (k + 1);
  let tail = 0;
  let best: { chiSquare: number; p: number } | null = null;
  for (const value of values) {
    tail += distribution.get(value) as number;
    if (tail > alpha * (1 + 1e-12)) break;
    best = { chiSquare: (3 * (value - k * mean * mean)) / (n * k * (k + 1)), p: tail };
  }
  return best;
}

/** Sum of squares: for a fixed total it orders rank sums as chi-square does, and stays a whole number for doubled ranks. */
function spread(sums: ArrayLike<number>): number {
  let total = 0;
  for (let j = 0; j < sums.length; j += 1) total += sums[j] * sums[j];
  return total;
}

function doubledRows({ blocks, treatments, ranks }: RankedBlocks): number[][] {
  return Array.from({ length: blocks }, (_, i) =>
    Array.from(ranks.subarray(i * treatments, (i + 1) * treatments), (r) => 2 * r).sort((a, b) => a - b),
  );
}

/**
 * Distribution of the sum of squared (doubled) rank sums, or null once more than `budget` steps are needed.
 * States are sorted rank sums packed into one number; the last sum follows from the others.
 */
function spreadDistribution(rows: number[][], k: number, budget: number): Map<number, number> | null {
  const base = rows.length * 2 * k + 1;
  if ((k - 1) * Math.log2(base) > 52) return null;
  let states = new Map<number, number>([[pack(rows[0], base), 1]]);
  const sums = new Float64Array(k);
  const next = new Float64Array(k);
  let total = k * (k + 1);
  let steps = 0;
  const cache = new Map<string, number[][] | null>();
  for (let i = 1; i < rows.length; i += 1) {
    const key = rows[i].join();
    let arrangements = cache.get(key);
    if (arrangements === undefined) {
      arrangements = distinctArrangements(rows[i], MOST_ARRANGEMENTS);
      cache.set(key, arrangements);
    }
    if (!arrangements) return null;
    const share = 1 / arrangements.length;
    // States only grow in number: a count that is hopeless is given up before it starts.
    if (steps + states.size * arrangements.length * (rows.length - i) > budget) return null;
    steps += states.size * arrangements.length;
    const grown = new Map<number, number>();
    // After the last assessor only the spread matters, which needs neither sorting nor packing.
    const last = i === rows.length - 1;
    for (const [state, probability] of states) {
      unpack(state, base, total, sums);
      for (const arrangement of arrangements) {
        for (let j = 0; j < k; j += 1) next[j] = sums[j] + arrangement[j];
        if (!last) sortSmall(next);
        const to = last ? spread(next) : pack(next, base);
        grown.set(to, (grown.get(to) ?? 0) + probability * share);
      }
    }
    states = grown;
    total += k * (k + 1);
  }
  return states;
}

function pack(sorted: ArrayLike<number>, base: number): number {
  let code = 0;
  for (let j = 0; j < sorted.length - 1; j += 1) code = code * base + sorted[j];
  return code;
}

function unpack(code: number, base: number, total: number, out: Float64Array): void {
  let rest = total;
  for (let j = out.length - 2; j >= 0; j -= 1) {
    out[j] = code % base;
    code = (code - out[j]) / base;
    rest -= out[j];
  }
  out[out.length - 1] = rest;
}

/** Insertion sort: the arrays are short and nearly sorted. */
function sortSmall(values: Float64Array): void {
  for (let i = 1; i < values.length; i += 1) {
    const value = values[i];
    let j = i - 1;
    for (; j >= 0 && values[j] > value; j -= 1) values[j + 1] = values[j];
    values[j + 1] = value;
  }
}

/** All different orders of a sorted list, or null if there are more than `most`. */
function distinctArrangements(sorted: number[], most: number): number[][] | null {
  const result: number[][] = [];
  const current = [...sorted];
  for (;;) {
    if (result.length >= most) return null;
    result.push([...current]);
    let i = current.length - 2;
    while (i >= 0 && current[i] >= current[i + 1]) i -= 1;
    if (i < 0) return result;
    let j = current.length - 1;
    while (current[j] <= current[i]) j -= 1;
    [current[i], current[j]] = [current[j], current[i]];
    for (let a = i + 1, z = current.length - 1; a < z; a += 1, z -= 1) [current[a], current[z]] = [current[z], current[a]];
  }
}

function simulate({ blocks, treatments: k, ranks }: RankedBlocks, seen: number, draws: number, seed: number): number {
  const generator = xoroshiro128plus(seed);
  const doubled = Int32Array.from(ranks, (r) => 2 * r);
  const sums = new Float64Array(k);
  let hits = 0;
  for (let draw = 0; draw < draws; draw += 1) {
    sums.fill(0);
    for (let i = 0; i < blocks; i += 1) {
      const start = i * k;
      for (let j = k - 1; j >= 0; j -= 1) {
        // Shuffling the ranks where they stand: any starting order leads to uniform arrangements.
        const swap = j === 0 ? 0 : uniformInt(generator, 0, j);
        const value = doubled[start + swap];
        doubled[start + swap] = doubled[start + j];
        doubled[start + j] = value;
        sums[j] += value;
      }
    }
    if (spread(sums) >= seen) hits += 1;
  }
  return hits;
}
