import { binomialTest, distinguishers } from '@/stats';
import type { Answerer } from './types';

type Rows = Record<string, (number | string)[]>;

/** "1/3" → the fraction itself. */
function fractionOf(text: string): number {
  const [over, under] = text.split('/').map(Number);
  return over! / under!;
}

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('03') && 'p0_text' in ((c.given as { rows?: Rows } | undefined)?.rows ?? {}),
    answer(c) {
      const { rows } = c.given as { rows: Rows };
      const all = rows.x!.map((x, i) => {
        const question = { correct: Number(x), n: Number(rows.n![i]), chance: fractionOf(String(rows.p0_text![i])) };
        return { test: binomialTest(question), d: distinguishers({ ...question, level: 0.95 }) };
      });
      const column = (pick: (one: (typeof all)[number]) => number) => all.map(pick);
      return {
        rows: {
          ...rows,
          p_one_tailed: column(({ test }) => test.p),
          p_two_tailed_minlike: column(({ test }) => test.twoSidedByLikelihood),
          p_two_tailed_doubled: column(({ test }) => test.twoSided),
          pc: column(({ d }) => d.pc),
          pd_raw: column(({ d }) => d.pd),
          pd_truncated: column(({ d }) => Math.max(0, d.pd)),
          se_pd_wald: column(({ d }) => d.standardError),
          cp_lower95_one_sided_pc: column(({ d }) => d.exact.pc.oneSidedLower),
          cp_upper95_one_sided_pc: column(({ d }) => d.exact.pc.oneSidedUpper),
          cp_lower95_one_sided_pd: column(({ d }) => d.exact.pd.oneSidedLower),
          cp_upper95_one_sided_pd: column(({ d }) => d.exact.pd.oneSidedUpper),
          wald_lower95_one_sided_pd: column(({ d }) => d.normal.pd.oneSidedLower),
          wald_upper95_one_sided_pd: column(({ d }) => d.normal.pd.oneSidedUpper),
          cp_two_sided95_lower_pc: column(({ d }) => d.exact.pc.lower),
          cp_two_sided95_upper_pc: column(({ d }) => d.exact.pc.upper),
          wilson_two_sided95_lower_pc: column(({ d }) => d.wilson.pc.lower),
          wilson_two_sided95_upper_pc: column(({ d }) => d.wilson.pc.upper),
        },
      };
    },
  },
];
