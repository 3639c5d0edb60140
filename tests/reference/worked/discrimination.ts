import {
  binomialTest,
  CHANCE,
  distinguishers,
  minimumCorrect,
  normalSf,
  proportionCorrect,
  proportionFromDistinguishers,
  sequentialLines,
  sequentialTest,
  similarityMaximum,
  smallestPanel,
  sortingChance,
  type Protocol,
  type SequentialPlan,
  type ThurstoneProtocol,
} from '@/stats';
import type { WorkedAnswerer } from './types';

/** Words by which a test's name says its protocol. Where it lists several, they share one chance and the first will do. */
const WORDS: readonly (readonly [RegExp, Protocol])[] = [
  [/triangle|guessing 1\/3/, 'triangle'],
  [/duo-trio/, 'duo_trio'],
  [/paired|directional|2-AFC/, 'two_afc'],
  [/tetrad/, 'tetrad'],
  [/3-AFC/, 'three_afc'],
  [/two[- ](out[- ])?of[- ]five/, 'two_out_of_five'],
];

/** The protocol that a test's name says. */
function protocolOf(test: string): Protocol {
  const found = WORDS.find(([word]) => word.test(test));
  if (!found) throw new Error(`${test} names no protocol`);
  return found[1];
}

/** Names of `inputs` under which some examples keep the data of one protocol, and of its part of the answer. */
const NAMED_PROTOCOLS: readonly (readonly [string, string, Protocol])[] = [
  ['triangle', 'triangle', 'triangle'],
  ['duo_trio', 'duo', 'duo_trio'],
];

const THURSTONE: Readonly<Record<string, ThurstoneProtocol>> = {
  '2-AFC': 'two_afc',
  '3-AFC': 'three_afc',
  'duo-trio': 'duo_trio',
  triangle: 'triangle',
  tetrad: 'tetrad',
};

/** Panels whose tables the examples print: the sizes stand only in the results, so all are computed. */
const SIZES = Array.from({ length: 500 }, (_, i) => i + 1);
/** Shares of distinguishers whose tables the examples print: they stand only in the results, so all are computed. */
const SHARES = [0.6, 0.5, 0.4, 0.3, 0.2, 0.1];

/** The numbers of a heading such as "alpha 0.20 0.10 0.05". */
const numbersOf = (heading: unknown): number[] => [...String(heading).matchAll(/\d*\.\d+/g)].map(([number]) => Number(number));

interface Counted {
  n: number;
  correct?: number;
  agreeing?: number;
  alpha?: number;
}

export const answers: WorkedAnswerer[] = [
  {
    matches: ({ inputs }) => typeof inputs.n === 'number' && ('correct' in inputs || 'agreeing' in inputs),
    answer({ test, inputs }) {
      const { n, correct, agreeing, alpha = 0.05 } = inputs as unknown as Counted;
      const chance = CHANCE[protocolOf(test)];
      const right = correct ?? agreeing!;
      const { p, twoSided } = binomialTest({ correct: right, n, chance });
      const smallest = minimumCorrect(n, alpha, chance);
      // Some names say the level themselves, whatever level the example was tested at.
      const atFive = minimumCorrect(n, 0.05, chance);
      const z = (right - n * chance) / Math.sqrt(n * chance * (1 - chance));
      return { p, p_exact: p, p_one: p, p_two: twoSided, min: smallest, min_correct: smallest, min_correct_5pct: atFive, min_5pct: atFive, z, large_sample_z: z, p_normal: normalSf(z) };
    },
  },
  {
    matches: ({ inputs }) => Array.isArray(inputs.alphas),
    answer({ test, inputs }) {
      const twoSided = /two-sided/.test(test);
      const chance = CHANCE[protocolOf(test)];
      const row = (n: number) => (inputs.alphas as number[]).map((alpha) => minimumCorrect(n, alpha, chance, { twoSided }));
      return Object.fromEntries(SIZES.map((n) => [String(n), row(n)]));
    },
  },
  {
    matches: ({ inputs }) => typeof inputs.rows === 'string' && /^alpha/.test(inputs.rows),
    answer({ test, inputs }) {
      const chance = CHANCE[protocolOf(test)];
      const [alphas, betas] = [numbersOf(inputs.rows), numbersOf(inputs.columns)];
      const size = (alpha: number, beta: number, pd: number) => smallestPanel(1 - beta, { alpha, chance, pc: proportionFromDistinguishers(pd, chance) }).first;
      return Object.fromEntries(SHARES.map((pd) => [String(pd), alphas.map((alpha) => betas.map((beta) => size(alpha, beta, pd)))]));
    },
  },
  {
    matches: ({ inputs }) => typeof inputs.pd === 'number' && typeof inputs.beta === 'number',
    answer({ test, inputs }) {
      const { alpha, beta, pd } = inputs as { alpha: number; beta: number; pd: number };
      const chance = CHANCE[protocolOf(test)];
      const n = smallestPanel(1 - beta, { alpha, chance, pc: proportionFromDistinguishers(pd, chance) }).first;
      return { n, min_correct: minimumCorrect(n, alpha, chance) };
    },
  },
  {
    matches: ({ inputs }) => Array.isArray(inputs.pd) && Array.isArray(inputs.beta),
    answer({ test, inputs }) {
      const { alpha, beta, pd } = inputs as { alpha: number; beta: number[]; pd: number[] };
      const chance = CHANCE[protocolOf(test)];
      const table = (twoSided: boolean) =>
        Object.fromEntries(pd.map((d) => [String(d), beta.map((b) => smallestPanel(1 - b, { alpha, chance, pc: proportionFromDistinguishers(d, chance), twoSided }).first)]));
      return { ...table(false), one_sided: table(false), two_sided: table(true) };
    },
  },
  {
    matches: ({ test }) => /proportion of distinguishers/.test(test),
    answer({ inputs }) {
      const table = (pairs: [number, number][], chance: number) =>
        Object.fromEntries(
          pairs.map(([n, correct]) => {
            const { pd, standardError: s } = distinguishers({ correct, n, chance });
            // The examples reckon with the standard's printed z = 1.645; ours has all its digits.
            return [`${correct}/${n}`, { pd, s, lower: pd - 1.645 * s, upper: pd + 1.645 * s }];
          }),
        );
      const present = NAMED_PROTOCOLS.filter(([key]) => key in inputs);
      return Object.fromEntries(present.map(([key, name, protocol]) => [name, table(inputs[key] as [number, number][], CHANCE[protocol])]));
    },
  },
  {
    matches: ({ inputs }) => NAMED_PROTOCOLS.some(([key]) => typeof inputs[key] === 'string') && Array.isArray(inputs.n),
    answer({ inputs }) {
      const [key, , protocol] = NAMED_PROTOCOLS.find(([name]) => typeof inputs[name] === 'string')!;
      const [beta, pd] = /beta ([\d.]+), pd ([\d.]+)/.exec(inputs[key] as string)!.slice(1).map(Number);
      return Object.fromEntries((inputs.n as number[]).map((n) => [String(n), similarityMaximum(n, { beta, pd, chance: CHANCE[protocol] })]));
    },
  },
  {
    matches: ({ test }) => /unspecified sorting/.test(test),
    answer: ({ inputs }) => ({ p: (inputs.n as number[]).map((n) => sortingChance(n)) }),
  },
  {
    matches: ({ inputs }) => typeof inputs.cups === 'number',
    answer: ({ inputs }) => ({ p: sortingChance((inputs.cups as number) / 2, true) }),
  },
  {
    matches: ({ inputs }) => 'dprime' in inputs,
    answer({ inputs }) {
      const of = (protocol: ThurstoneProtocol) =>
        Array.isArray(inputs.dprime) ? (inputs.dprime as number[]).map((d) => proportionCorrect(protocol, d)) : proportionCorrect(protocol, inputs.dprime as number);
      return Object.fromEntries(Object.entries(THURSTONE).map(([name, protocol]) => [name, of(protocol)]));
    },
  },
  {
    matches: ({ test }) => /^assessors needed at d'=/.test(test),
    answer({ test }) {
      const [d, alpha, power] = /d'=([\d.]+), alpha ([\d.]+), power ([\d.]+)/.exec(test)!.slice(1).map(Number);
      const size = (protocol: ThurstoneProtocol) => smallestPanel(power, { alpha, chance: CHANCE[protocol], pc: proportionCorrect(protocol, d) }).first;
      return Object.fromEntries(Object.entries(THURSTONE).map(([name, protocol]) => [name, size(protocol)]));
    },
  },
  {
    matches: ({ inputs }) => 'cumulative_correct' in inputs,
    answer({ inputs }) {
      const { cumulative_correct, alpha, beta, p0, p1 } = inputs as unknown as SequentialPlan & { cumulative_correct: Record<string, number[]> };
      const plan = { alpha, beta, p0, p1 };
      const lines = sequentialLines(plan);
      const paths = Object.entries(cumulative_correct).map(([name, counts]) => {
        const { decision, answers: taken } = sequentialTest(counts.map((count, i) => count > (counts[i - 1] ?? 0)), plan);
        return [name, [taken, decision === 'continue' ? 'no decision' : decision]];
      });
      return { ...Object.fromEntries(paths), intercepts: [lines.lowerIntercept, lines.upperIntercept], slope: lines.slope };
    },
  },
];
