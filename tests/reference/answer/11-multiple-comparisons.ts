import { compactLetters, lsdComparisons, oneWayAnova, tukeyComparisons, type Comparisons } from '@/stats';
import { levels } from './09-anova-balanced';
import type { Answerer } from './types';

const ALPHA = 0.05;

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('11') && 'group' in c.inputs && 'response' in c.inputs,
    answer(c, load) {
      const { response, group: name } = c.inputs as { response: string; group: string };
      const { rows } = load(c.data!);
      const group = levels(rows.map((row) => row[name]));
      const a = oneWayAnova(group.index, rows.map((row) => Number(row[response])));
      const question = { means: a.means, n: Array.from(a.counts), ms: a.within.ms, df: a.within.df, alpha: ALPHA };
      const tukey = tukeyComparisons(question);
      const lsd = lsdComparisons(question);
      const letters = (all: Comparisons) => {
        const made = compactLetters(a.means, all.pairs.filter((pair) => pair.isShown).map((pair) => [pair.first, pair.second] as const));
        return Object.fromEntries(group.names.map((who, i) => [who, made[i]]));
      };
      return {
        anova: { SS_between: a.between.ss, df_between: a.between.df, SS_within: a.within.ss, df_within: a.within.df, F: a.between.f, p: a.between.p },
        means: Array.from(a.means),
        n: Object.fromEntries(group.names.map((who, i) => [who, a.counts[i]])),
        q_critical: tukey.critical,
        pairs: {
          a: tukey.pairs.map((pair) => group.names[pair.first]),
          b: tukey.pairs.map((pair) => group.names[pair.second]),
          diff_b_minus_a: tukey.pairs.map((pair) => pair.difference),
          tukey_lo: tukey.pairs.map((pair) => pair.low),
          tukey_hi: tukey.pairs.map((pair) => pair.high),
          p_tukey: tukey.pairs.map((pair) => pair.p),
          p_lsd: lsd.pairs.map((pair) => pair.p),
          lsd_lo: lsd.pairs.map((pair) => pair.low),
          lsd_hi: lsd.pairs.map((pair) => pair.high),
        },
        letters_tukey: letters(tukey),
        letters_lsd: letters(lsd),
      };
    },
  },
];
