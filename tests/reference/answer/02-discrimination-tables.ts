import { minimumCorrect, proportionCorrect, proportionFromDistinguishers, similarityMaximum, similarityMaximumNormal, smallestPanel, CHANCE, type ThurstoneProtocol } from '@/stats';
import type { Answerer, CaseInput } from './types';

type Rows = Record<string, (number | string)[]>;
const numbers = (rows: Rows, name: string) => rows[name] as number[];

/** p0 is printed with 15 digits; the fraction that is meant is used. */
const fraction = (p0: number): number => {
  for (const denominator of [2, 3, 10]) if (Math.abs(p0 - 1 / denominator) < 1e-12) return 1 / denominator;
  return p0;
};

const PROTOCOLS: Record<string, ThurstoneProtocol> = { triangle: 'triangle', duotrio: 'duo_trio', duo_trio: 'duo_trio', twoafc: 'two_afc', two_afc: 'two_afc', threeafc: 'three_afc', three_afc: 'three_afc', tetrad: 'tetrad' };

const inFile = (c: CaseInput) => c.file.startsWith('02');

export const answers: Answerer[] = [
  {
    matches: (c) => inFile(c) && 'alpha' in c.inputs && 'n' in c.inputs,
    answer(c) {
      const { p0, two_tailed: twoSided, n, alpha } = c.inputs as { p0: number; two_tailed: boolean; n: number[]; alpha: string[] };
      return { minimum_correct_by_alpha: Object.fromEntries(alpha.map((level) => [level, n.map((size) => minimumCorrect(size, Number(level), fraction(p0), { twoSided }))])) };
    },
  },
  {
    matches: (c) => inFile(c) && 'beta' in c.inputs && 'pd' in c.inputs,
    answer(c) {
      const { p0, n, beta, pd } = c.inputs as { p0: number; n: number[]; beta: number[]; pd: number[] };
      const table = (find: typeof similarityMaximum) =>
        Object.fromEntries(beta.map((b) => [String(b), Object.fromEntries(pd.map((d) => [String(d), n.map((size) => find(size, { beta: b, pd: d, chance: fraction(p0) }))]))]));
      return { maximum_correct_exact_by_beta_pd: table(similarityMaximum), maximum_correct_normal_limit_by_beta_pd: table(similarityMaximumNormal) };
    },
  },
  {
    matches: (c) => inFile(c) && 'p1' in c.inputs,
    answer(c) {
      const { p0, two_tailed: twoSided } = c.inputs as { p0: number; two_tailed: boolean };
      const { rows } = c.given as { rows: Rows };
      const chance = fraction(p0);
      const sizes = numbers(rows, 'alpha').map((alpha, i) => smallestPanel(1 - numbers(rows, 'beta')[i]!, { alpha, chance, pc: proportionFromDistinguishers(numbers(rows, 'pd')[i]!, chance), twoSided }));
      return { rows: { ...rows, n_first: sizes.map((s) => s.first), n_stable: sizes.map((s) => s.stable), power_at_first: sizes.map((s) => s.powerAtFirst), power_at_stable: sizes.map((s) => s.powerAtStable) } };
    },
  },
  {
    matches: (c) => inFile(c) && 'd_prime' in ((c.given as { rows?: Rows } | undefined)?.rows ?? {}),
    answer(c) {
      const { rows } = c.given as { rows: Rows };
      const protocols = (rows.method as string[]).map((method) => PROTOCOLS[method.replaceAll('-', '').toLowerCase()]!);
      const pc = protocols.map((protocol, i) => proportionCorrect(protocol, numbers(rows, 'd_prime')[i]!));
      const sizes = protocols.map((protocol, i) => smallestPanel(numbers(rows, 'power')[i]!, { alpha: numbers(rows, 'alpha')[i]!, chance: CHANCE[protocol], pc: pc[i]! }));
      return { rows: { ...rows, pc, n_first: sizes.map((s) => s.first), n_stable: sizes.map((s) => s.stable), power_at_first: sizes.map((s) => s.powerAtFirst) } };
    },
  },
];
