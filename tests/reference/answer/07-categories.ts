import { cochranQ, jarPenalties, mcnemar, mcnemarOfAnswers, wilcoxonSignedRank, type JarPenalty, type McnemarResult } from '@/stats';
import { blockTable, complete, values } from './cross-tables';
import { at, caseRows, numbers } from './tables';
import type { Answerer, CaseInput, Table } from './types';

const mcnemarFields = (m: McnemarResult) => ({
  b: m.b,
  c: m.c,
  chisq_uncorrected: m.chiSquare,
  p_chisq_uncorrected: m.p,
  chisq_continuity: m.chiSquareContinuity,
  p_chisq_continuity: m.pContinuity,
  p_exact_two_sided: m.pExact,
  p_mid: m.pMid,
});

const side = (group: JarPenalty) => ({
  n: group.n,
  percent: group.percent,
  mean_liking: group.meanLiking,
  mean_drop: group.meanDrop,
  weighted_penalty: group.weightedPenalty,
  welch_t: group.welch?.t,
  welch_df: group.welch?.df,
  welch_p: group.welch?.p,
  pooled_t: group.pooled?.t,
  pooled_df: group.pooled?.df,
  pooled_p: group.pooled?.p,
});

/** The rows of the set that the case is named after, when the file holds several. */
function namedSet(c: CaseInput, load: (csv: string) => Table): Table {
  const table = caseRows(c, load);
  if (!table.columns.includes('set')) return table;
  const name = values(table, 'set')
    .filter((set) => c.case.toLowerCase().includes(set.toLowerCase().replaceAll('_', ' ')))
    .sort((a, b) => b.length - a.length)[0];
  return name === undefined ? table : { columns: table.columns, rows: table.rows.filter((row) => String(row.set) === name) };
}

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('07') && Array.isArray(c.inputs.columns),
    answer(c, load) {
      const { names, rows } = blockTable(c, load);
      const matrix = complete(rows);
      const q = cochranQ(matrix);
      const column = (j: number) => matrix.map((row) => row[j]);
      return {
        column_totals: q.columnTotals,
        n_blocks: q.blocks,
        n_informative_blocks: q.informativeBlocks,
        Q: q.q,
        df: q.df,
        p: q.p,
        mcnemar_pairs: names.flatMap((a, i) =>
          names.slice(i + 1).map((other, j) => ({ a, b_col: other, ...mcnemarFields(mcnemarOfAnswers(column(i), column(i + 1 + j))) })),
        ),
      };
    },
  },
  {
    matches: (c) => c.file.startsWith('07') && c.data === null && at(c.given, 'rows') !== undefined,
    answer: (c) => ({
      rows: (at(c.given, 'rows') as { b: number; c: number }[]).map((counts) => mcnemarFields(mcnemar(counts.b, counts.c))),
    }),
  },
  {
    matches: (c) => c.file.startsWith('07') && 'difference' in c.inputs,
    answer(c, load) {
      const table = namedSet(c, load);
      const x = numbers(table, 'x');
      const y = numbers(table, 'y');
      // The reference compares differences bit for bit.
      const w = wilcoxonSignedRank(x.map((value, i) => value - y[i]), 0);
      return {
        n_zero_dropped: w.zeros,
        n: w.n,
        V: w.vPlus,
        W_minus: w.vMinus,
        z_tie_corrected: w.z,
        p_normal_two_sided: w.p,
        z_continuity: w.zContinuity,
        p_normal_continuity_two_sided: w.pContinuity,
        p_exact_greater: w.exact?.greater,
        p_exact_less: w.exact?.less,
        p_exact_two_sided: w.exact?.twoSided,
        ties: w.ties,
      };
    },
  },
  {
    matches: (c) => c.file.startsWith('07') && typeof c.inputs.columns === 'string' && c.inputs.columns.includes('jar_'),
    answer(c, load) {
      const table = caseRows(c, load);
      const attributes = table.columns.filter((column) => column.startsWith('jar_'));
      return {
        rows: values(table, 'product').flatMap((product) =>
          attributes.map((attribute) => {
            const own = { columns: table.columns, rows: table.rows.filter((row) => String(row.product) === product) };
            const jar = jarPenalties(numbers(own, attribute), numbers(own, 'liking'));
            return {
              product,
              attribute,
              n_total: jar.n,
              jar: { n: jar.jar.n, percent: jar.jar.percent, mean_liking: jar.jar.meanLiking },
              too_low: side(jar.tooLow),
              too_high: side(jar.tooHigh),
              overall_penalty: {
                mean_jar_minus_not_jar: jar.overall.meanDrop,
                welch_t: jar.overall.welch?.t,
                welch_df: jar.overall.welch?.df,
                welch_p: jar.overall.welch?.p,
                pooled_t: jar.overall.pooled?.t,
                pooled_p: jar.overall.pooled?.p,
              },
            };
          }),
        ),
      };
    },
  },
];
