import { compareRankSums, durbin, durbinLsd, friedman, friedmanCriticalValue, friedmanPermutation, page } from '@/stats';
import { blockTable, complete, crossTable, values } from './cross-tables';
import { at, caseRows } from './tables';
import type { Answerer, Table } from './types';

/** Column of ranks, of treatments and of blocks in a long table of an incomplete design. */
function longColumns(table: Table, treatments: number): { rows: string; columns: string; value: string } {
  const named = (pattern: RegExp) => table.columns.find((column) => pattern.test(column));
  const columns = named(/^(treatment|product|variety|sample)$/i) ?? table.columns.find((column) => values(table, column).length === treatments)!;
  const rows = named(/^(block|assessor|judge|person|panelist)$/i) ?? table.columns.find((column) => column !== columns)!;
  const value = named(/^(rank|score|rating)$/i) ?? table.columns.find((column) => column !== columns && column !== rows)!;
  return { rows, columns, value };
}

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('06') && 'columns' in c.inputs && 'alpha' in c.inputs,
    answer(c, load) {
      const { names, rows } = blockTable(c, load);
      const matrix = complete(rows);
      const alpha = c.inputs.alpha as number;
      const f = friedman(matrix);
      const sums = compareRankSums(matrix, alpha);
      const b = f.assessors;
      const order = at(c.given, 'page', 'predicted_order_lowest_first') as string[] | undefined;
      const trend = order && page(matrix, order.map((name) => names.indexOf(name)));
      return {
        blocks: b,
        treatments: f.products,
        rank_sums: f.rankSums,
        mean_ranks: f.meanRanks,
        sum_t3_minus_t: f.tieSum,
        chisq: f.chiSquare,
        df: f.df,
        p_chisq: f.p,
        chisq_without_tie_correction: f.chiSquareWithoutTieCorrection,
        iman_davenport_F: f.imanDavenport.f,
        iman_davenport_df: [f.imanDavenport.df1, f.imanDavenport.df2],
        p_iman_davenport: f.imanDavenport.p,
        kendall_W: f.kendallW,
        kendall_W_without_tie_correction: f.chiSquareWithoutTieCorrection / (b * f.df),
        mean_spearman: (b * f.kendallW - 1) / (b - 1),
        lsd_rank_sum_normal: sums.lsd,
        hsd_rank_sum_nemenyi: sums.hsd,
        lsd_rank_sum_conover_t: sums.conover,
        alpha,
        columns: names,
        p_exact_permutation_no_ties: f.tieSum === 0 ? friedmanPermutation(matrix, { budget: 1e8 }).p : null,
        page: trend && {
          L: trend.l,
          mean: trend.mean,
          var: trend.variance,
          z: trend.z,
          p_upper: trend.p,
          var_tie_corrected: trend.varianceTieCorrected,
          z_tie_corrected: trend.zTieCorrected,
          p_upper_tie_corrected: trend.pTieCorrected,
          predicted_order_lowest_first: order,
          p_exact_upper: trend.pExact,
        },
        pairs: {
          a: sums.pairs.map((pair) => names[pair.a]),
          b: sums.pairs.map((pair) => names[pair.b]),
          abs_rank_sum_difference: sums.pairs.map((pair) => Math.abs(pair.difference)),
          exceeds_lsd_normal: sums.pairs.map((pair) => pair.exceedsLsd),
          exceeds_hsd_nemenyi: sums.pairs.map((pair) => pair.exceedsHsd),
          exceeds_conover: sums.pairs.map((pair) => pair.exceedsConover),
        },
      };
    },
  },
  {
    matches: (c) => c.file.startsWith('06') && 'lambda' in c.inputs && c.data !== null,
    answer(c, load) {
      const table = caseRows(c, load);
      const by = longColumns(table, c.inputs.t as number);
      // Treatments in alphabetical order, as a factor has them.
      const treatments = values(table, by.columns).sort();
      const result = durbin(crossTable(table, by, treatments));
      return {
        rank_sums: result.rankSums,
        D_ISO_style: result.d,
        D_conover_T1: result.chiSquare,
        df: result.df,
        p_chisq: result.p,
        conover_F_T2: result.f,
        df_F: [result.df1, result.df2],
        p_F: result.pF,
        lsd_rank_sum_normal_05: durbinLsd(result.perAssessor, result.perProduct, result.perPair, 0.05),
      };
    },
  },
  {
    matches: (c) => c.file.startsWith('06') && c.data === null && at(c.given, 'rows', 'k') !== undefined,
    answer(c) {
      const k = at(c.given, 'rows', 'k') as number[];
      const n = at(c.given, 'rows', 'n') as number[];
      const critical = (alpha: number) => k.map((products, i) => friedmanCriticalValue(products, n[i], alpha, 5e8));
      const five = critical(0.05);
      const one = critical(0.01);
      return {
        rows: {
          k,
          n,
          critical_05: five.map((value) => value?.chiSquare ?? null),
          p_at_critical_05: five.map((value) => value?.p ?? null),
          critical_01: one.map((value) => value?.chiSquare ?? null),
          p_at_critical_01: one.map((value) => value?.p ?? null),
        },
      };
    },
  },
];
