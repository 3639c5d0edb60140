import {
  cochranQ,
  durbin,
  friedman,
  friedmanFromRankSums,
  kendallW,
  page,
  pageCriticalL,
  rankSumHsd,
  rankSumLsd,
  studentizedRangeQuantile,
} from '@/stats';
import type { WorkedAnswerer } from './types';

type Matrix = number[][];

export const answers: WorkedAnswerer[] = [
  {
    matches: (e) => 'rank_sums' in e.inputs && 'assessors' in e.inputs,
    answer({ inputs }) {
      const { assessors, samples, rank_sums } = inputs as { assessors: number; samples: number; rank_sums: number[] };
      const f = friedmanFromRankSums(assessors, rank_sums);
      return { T: f.chiSquare, df: f.df, p: f.p, LSD: rankSumLsd(assessors, samples) };
    },
  },
  {
    matches: (e) => Object.keys(e.inputs).some((key) => /^data_\d+x\d+$/.test(key)) && /Friedman/.test(e.test),
    answer({ inputs }) {
      const f = friedman(Object.values(inputs)[0] as Matrix);
      return { chi2: f.chiSquare, df: f.df, p: f.p };
    },
  },
  {
    matches: (e) => /rank-sum difference/.test(e.test),
    answer({ inputs }) {
      const { assessors, samples, alpha } = inputs as { assessors: number; samples: number; alpha: number };
      return {
        difference: rankSumHsd(assessors, samples, alpha),
        q_inf: studentizedRangeQuantile(1 - alpha, samples, Infinity),
        LSD_unprotected: rankSumLsd(assessors, samples, alpha),
      };
    },
  },
  {
    matches: (e) => 'raw_ranks' in e.inputs && 'predicted' in e.inputs,
    answer({ inputs }) {
      const { raw_ranks, predicted } = inputs as { raw_ranks: Matrix; predicted: number[] };
      const order = predicted.map((_, place) => predicted.indexOf(place + 1));
      const result = page(raw_ranks, order);
      return {
        L: result.l,
        chi2: result.z ** 2,
        p_two_sided: 2 * Math.min(result.p, 1 - result.p),
        exact_one_sided: result.pExact,
        critical_L_1pct: pageCriticalL(predicted.length, raw_ranks.length, 0.01),
      };
    },
  },
  {
    matches: (e) => /^Page [\d.]+ % limits, \d+ conditions/.test(e.test),
    answer({ test, inputs }) {
      const [percent, conditions] = /^Page ([\d.]+) % limits, (\d+) conditions/.exec(test)!.slice(1).map(Number);
      return { L: (inputs.subjects as number[]).map((n) => pageCriticalL(conditions, n, percent / 100)) };
    },
  },
  {
    matches: (e) => 'variety' in e.inputs && 'lambda' in e.inputs,
    answer({ inputs }) {
      const { t, k, b, variety, rank } = inputs as { t: number; k: number; b: number; variety: number[]; rank: number[] };
      const matrix = Array.from({ length: b }, (_, i) => {
        const row = new Array<number | null>(t).fill(null);
        for (let j = i * k; j < (i + 1) * k; j += 1) row[variety[j] - 1] = rank[j];
        return row;
      });
      const result = durbin(matrix);
      return { T: result.chiSquare, df: result.df, p: result.p, rank_sums: result.rankSums };
    },
  },
  {
    matches: (e) => 'ranks' in e.inputs && /concordance/.test(e.test),
    answer({ inputs }) {
      const { w, s } = kendallW(inputs.ranks as Matrix);
      return { W: w, s };
    },
  },
  {
    matches: (e) => 'data' in e.inputs && /Cochran/.test(e.test),
    answer({ inputs }) {
      const result = cochranQ(inputs.data as Matrix);
      return { totals: result.columnTotals, Q: result.q, p: result.p };
    },
  },
];
