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

/** The protocol that a test's name begins with. */
function protocolOf(test: string): Protocol {
  if (/^triangle|guessing 1\/3/.test(test)) return 'triangle';
  if (/duo-trio/.test(test)) return 'duo_trio';
  if (/paired|2-AFC/.test(test)) return 'two_afc';
  throw new Error(`${test} names no protocol`);
}

const THURSTONE: Readonly<Record<string, ThurstoneProtocol>> = {
  '2-AFC': 'two_afc',
  '3-AFC': 'three_afc',
  'duo-trio': 'duo_trio',
  triangle: 'triangle',
  tetrad: 'tetrad',
};

/** Panels whose tables the examples print. */
const SIZES = Array.from({ length: 200 }, (_, i) => i + 1);
const RISKS = [0.2, 0.1, 0.05, 0.01, 0.001];

interface Counted {
  n: number;
  correct?: number;
  agreeing?: number;
}

export const answers: WorkedAnswerer[] = [
  {
    matches: ({ inputs }) => typeof inputs.n === 'number' && ('correct' in inputs || 'agreeing' in inputs),
    answer({ test, inputs }) {
      const { n, correct, agreeing } = inputs as unknown as Counted;
      const chance = CHANCE[protocolOf(test)];
      const right = correct ?? agreeing!;
      const { p, twoSided } = binomialTest({ correct: right, n, chance });
      const smallest = minimumCorrect(n, 0.05, chance);
      const z = (right - n * chance) / Math.sqrt(n * chance * (1 - chance));
      return { p, p_exact: p, p_one: p, p_two: twoSided, min: smallest, min_correct: smallest, min_correct_5pct: smallest, min_5pct: smallest, z, large_sample_z: z, p_normal: normalSf(z) };
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
    answer({ test }) {
      const chance = CHANCE[protocolOf(test)];
      const size = (alpha: number, beta: number, pd: number) => smallestPanel(1 - beta, { alpha, chance, pc: proportionFromDistinguishers(pd, chance) }).first;
      return Object.fromEntries([0.5, 0.4, 0.3, 0.2, 0.1].map((pd) => [String(pd), RISKS.map((alpha) => RISKS.map((beta) => size(alpha, beta, pd)))]));
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
      const { triangle, duo_trio } = inputs as { triangle: [number, number][]; duo_trio: [number, number][] };
      const table = (pairs: [number, number][], chance: number) =>
        Object.fromEntries(
          pairs.map(([n, correct]) => {
            const { pd, standardError: s } = distinguishers({ correct, n, chance });
            // The examples reckon with the standard's printed z = 1.645; ours has all its digits.
            return [`${correct}/${n}`, { pd, s, lower: pd - 1.645 * s, upper: pd + 1.645 * s }];
          }),
        );
      return { triangle: table(triangle, CHANCE.triangle), duo: table(duo_trio, CHANCE.duo_trio) };
    },
  },
  {
    matches: ({ inputs }) => typeof inputs.triangle === 'string' && Array.isArray(inputs.n),
    answer({ inputs }) {
      const [beta, pd] = /beta ([\d.]+), pd ([\d.]+)/.exec(inputs.triangle as string)!.slice(1).map(Number);
      return Object.fromEntries((inputs.n as number[]).map((n) => [String(n), similarityMaximum(n, { beta, pd, chance: CHANCE.triangle })]));
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
