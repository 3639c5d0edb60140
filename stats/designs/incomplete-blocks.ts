import { requireInteger } from '../check';
import { StatsError } from '../errors';
import { blockParameters, type BlockParameters } from './block-parameters';

/** A balanced incomplete block design: its parameters and its blocks of samples 0..t − 1. */
export interface BlockDesign extends BlockParameters {
  readonly blocks: readonly (readonly number[])[];
}

/** Moves every sample one on within its cycle; cycles stand one after another: [5, 1] is 0…4 turning and 5 fixed. */
function turn(cycles: readonly number[]): number[] {
  let from = 0;
  return cycles.flatMap((length) => {
    const start = from;
    from += length;
    return Array.from({ length }, (_, i) => start + ((i + 1) % length));
  });
}

/** All blocks that base blocks become when the samples turn; a block that comes back sooner gives fewer. */
function developed(bases: readonly (readonly number[])[], cycles: readonly number[]): number[][] {
  const next = turn(cycles);
  return bases.flatMap((base) => {
    const orbit: number[][] = [];
    const seen = new Set<string>();
    for (let block = ascending(base); !seen.has(block.join()); block = ascending(block.map((sample) => next[sample]))) {
      seen.add(block.join());
      orbit.push(block);
    }
    return orbit;
  });
}

const ascending = (block: readonly number[]): number[] => [...block].sort((x, y) => x - y);

function complements(blocks: readonly (readonly number[])[], t: number): number[][] {
  return blocks.map((block) => Array.from({ length: t }, (_, sample) => sample).filter((sample) => !block.includes(sample)));
}

/** Every choice of k among t samples. */
function combinations(t: number, k: number): number[][] {
  if (k === 0) return [[]];
  return Array.from({ length: t }, (_, first) => first).flatMap((first) =>
    combinations(t - first - 1, k - 1).map((rest) => [first, ...rest.map((sample) => sample + first + 1)]),
  );
}

/** Base blocks and how the samples turn. Difference families are classical; the rest was searched for and counted. */
const BASES: readonly { readonly cycles: readonly number[]; readonly bases: readonly (readonly number[])[]; readonly complement?: true }[] = [
  { cycles: [5, 1], bases: [[0, 1, 4], [0, 3, 5]] },
  { cycles: [7], bases: [[0, 1, 3]], complement: true },
  { cycles: [7, 1], bases: [[0, 1, 3, 7], [2, 4, 5, 6]] },
  { cycles: [8, 1], bases: [[0, 1, 3], [0, 4, 8]], complement: true },
  { cycles: [9], bases: [[0, 1, 2, 7], [1, 3, 6, 7]], complement: true },
  { cycles: [5, 5], bases: [[5, 6, 8], [3, 4, 9], [1, 3, 9], [0, 4, 9], [0, 2, 9], [1, 8, 9]] },
  { cycles: [5, 5], bases: [[3, 5, 8, 9], [0, 1, 5, 8], [1, 3, 4, 7]], complement: true },
  { cycles: [9, 1], bases: [[1, 3, 4, 5, 7], [1, 5, 6, 7, 9]] },
  { cycles: [11], bases: [[1, 3, 4, 5, 9]], complement: true },
  { cycles: [13], bases: [[0, 1, 4], [0, 2, 7]] },
  { cycles: [13], bases: [[0, 1, 3, 9]], complement: true },
  { cycles: [15], bases: [[0, 1, 4], [0, 2, 8], [0, 5, 10]] },
  { cycles: [15], bases: [[0, 1, 2, 4, 5, 8, 10]], complement: true },
  { cycles: [15, 1], bases: [[0, 1, 3, 7], [0, 5, 10, 15]] },
  { cycles: [8, 8], bases: [[2, 5, 6, 7, 11, 13], [3, 5, 8, 12, 13, 15]], complement: true },
  {
    cycles: [3, 3, 3, 3, 3, 1],
    bases: [[0, 2, 4, 9, 12, 15], [0, 3, 9, 10, 13, 14], [1, 2, 7, 8, 12, 13], [2, 4, 6, 7, 10, 15], [3, 6, 11, 12, 13, 15], [4, 6, 8, 10, 11, 13], [2, 3, 4, 5, 8, 14], [1, 2, 5, 6, 9, 10]],
  },
];

function design(t: number, blocks: number[][]): BlockDesign {
  const k = blocks[0].length;
  const b = blocks.length;
  const r = (b * k) / t;
  return { t, k, b, r, lambda: (r * (k - 1)) / (t - 1), blocks };
}

const MOST_SAMPLES = 16;
const MOST_REPEATS = 10;
let catalogue: BlockDesign[] | undefined;

/**
 * Balanced incomplete block designs with at most 16 samples and 10 repeats that are not just copies of a
 * smaller one, by t, k and r. Blocks are sets: serve them in an order that `arrangeRows` has balanced.
 * Each is counted by a test. Source: the usual parameters as in Cochran & Cox (1957) plans 11.1 ff.
 */
export function blockDesigns(): readonly BlockDesign[] {
  return (catalogue ??= buildCatalogue());
}

function buildCatalogue(): BlockDesign[] {
  const made = BASES.flatMap(({ cycles, bases, complement }) => {
    const t = cycles.reduce((sum, length) => sum + length, 0);
    const blocks = developed(bases, cycles);
    return complement ? [design(t, blocks), design(t, complements(blocks, t))] : [design(t, blocks)];
  });
  const usual = blockParameters(MOST_SAMPLES, MOST_REPEATS)
    .filter(({ t, k, b }) => b === choose(t, k) && t <= 12)
    .map(({ t, k }) => design(t, combinations(t, k)));
  const keep = new Map([...usual, ...made].filter(({ r }) => r <= MOST_REPEATS).map((entry) => [`${entry.t},${entry.k},${entry.r}`, entry]));
  return [...keep.values()].sort((x, y) => x.t - y.t || x.k - y.k || x.r - y.r);
}

function choose(t: number, k: number): number {
  let result = 1;
  for (let i = 1; i <= k; i += 1) result = (result * (t - k + i)) / i;
  return Math.round(result);
}

/**
 * The design for t samples of which each palate takes k, with the fewest blocks; k = t gives one block of
 * all. 2 ≤ k ≤ t ≤ 100.
 * @throws StatsError `not_estimable` when the catalogue has none: another k, or all samples over several flights
 */
export function findBlockDesign(t: number, k: number): BlockDesign {
  requireInteger(t, 'number of samples', 2, 100);
  requireInteger(k, 'samples per palate', 2, t);
  if (k === t) return { t, k, b: 1, r: 1, lambda: 1, blocks: [Array.from({ length: t }, (_, sample) => sample)] };
  const found = blockDesigns().find((entry) => entry.t === t && entry.k === k);
  if (!found) throw new StatsError('not_estimable', `No balanced plan is known here for ${t} samples of which each person takes ${k}`);
  return found;
}
