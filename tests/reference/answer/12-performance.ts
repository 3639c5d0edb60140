import {
  assessorPerformance, balancedScores, intraclassCorrelations, kendallW, krippendorffAlpha, linConcordance, rvCoefficient, steadyMean, type Icc, type Metric,
} from '@/stats';
import { levels } from './09-anova-balanced';
import type { Answerer, Table } from './types';

const form = (icc: Icc) => ({ ICC: icc.icc, F: icc.f, df1: icc.df1, df2: icc.df2, p: icc.p, lower: icc.lower, upper: icc.upper });

function iccOf(table: number[][], alpha: number) {
  const all = intraclassCorrelations(table, alpha);
  return {
    n_targets: all.targets, k_judges: all.judges, MS_rows: all.msRows, MS_columns: all.msColumns, MS_within: all.msWithin, MS_residual: all.msResidual, alpha,
    ICC1_1: form(all.one), ICC2_1: form(all.twoRandom), ICC3_1: form(all.twoFixed), ICC1_k: form(all.oneMean), ICC2_k: form(all.twoRandomMean), ICC3_k: form(all.twoFixedMean),
  };
}

/** Cronbach's α is ICC(3,k). */
const alphaOf = (table: number[][]) => intraclassCorrelations(table).twoFixedMean.icc;

const transposed = (table: number[][]): number[][] => table[0]!.map((_, j) => table.map((row) => row[j]!));
const intervalAlpha = (table: number[][]) => krippendorffAlpha(transposed(table), 'interval').alpha;

/**
 * The cases rank exact means but count ties on their 15 printed digits (R's `table`), where means that
 * differ in the last bit fall together; the tie term is counted so here too.
 */
function wOf(table: number[][]): number {
  const { s, assessors: m, products: k } = kendallW(table);
  let ties = 0;
  for (const row of table) {
    const counts = new Map<string, number>();
    for (const mean of row) counts.set(mean.toPrecision(15), (counts.get(mean.toPrecision(15)) ?? 0) + 1);
    for (const count of counts.values()) ties += count ** 3 - count;
  }
  return (12 * s) / (m * m * (k ** 3 - k) - m * ties);
}

/** Means over replicates: rows = products, columns = assessors. */
function productMeans(table: Table, response: string, assessor: string, product: string) {
  const who = levels(table.rows.map((row) => row[assessor]));
  const what = levels(table.rows.map((row) => row[product]));
  const cells = what.names.map(() => who.names.map((): number[] => []));
  table.rows.forEach((row, i) => {
    cells[what.index[i]!]![who.index[i]!]!.push(Number(row[response]));
  });
  return { who, what, means: cells.map((row) => row.map(steadyMean)) };
}

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('12') && 'columns_are_judges' in c.inputs,
    answer(c, load) {
      const { columns_are_judges: judges, alpha } = c.inputs as { columns_are_judges: string[]; alpha: number };
      const table = load(c.data!).rows.map((row) => judges.map((judge) => Number(row[judge])));
      return { ...iccOf(table, alpha), cronbach_alpha: alphaOf(table), krippendorff_alpha_interval: intervalAlpha(table) };
    },
  },
  {
    matches: (c) => c.file.startsWith('12') && 'response' in c.inputs,
    answer(c, load) {
      const { response, assessor, product } = c.inputs as { response: string; assessor: string; product: string };
      const data = load(c.data!);
      const { who, what, means } = productMeans(data, response, assessor, product);
      const all = assessorPerformance(balancedScores({ assessor: who.index, product: what.index, score: data.rows.map((row) => Number(row[response])) }));
      const first = means.map((row) => row[0]!);
      const rest = means.map((row) => row.slice(1).reduce((sum, value) => sum + value, 0) / (row.length - 1));
      const lin = linConcordance(first, rest);
      return {
        assessors: Object.fromEntries(all.map((one, i) => [who.names[i], {
          mean: one.mean, sd_of_scores: one.sdOfScores, MS_product: one.msProduct, MS_error: one.msError, RMSE: one.repeatability, F: one.f, p: one.p, df: one.df,
          r_leave_one_out: one.agreement, r_with_panel_mean: one.agreementWithPanel, spearman_leave_one_out: one.rankAgreement, range_used: one.rangeUsed, sd_of_product_means: one.sdOfProductMeans,
        }])),
        icc_on_product_means: iccOf(means, 0.05),
        cronbach_alpha: alphaOf(means),
        krippendorff_alpha_interval: intervalAlpha(means),
        kendall_W_on_product_means: wOf(transposed(means)),
        lin_ccc_first_vs_rest: { ccc_n: lin.ccc, ccc_n_minus_1: lin.cccUnbiased, pearson: lin.pearson, bias_correction_Cb: lin.biasCorrection, scale_shift: lin.scaleShift, location_shift: lin.locationShift },
      };
    },
  },
  {
    matches: (c) => c.file.startsWith('12') && 'metrics' in c.inputs,
    answer(c, load) {
      const { columns, rows } = load(c.data!);
      const table = rows.map((row) => columns.slice(1).map((unit) => (row[unit] === null ? null : Number(row[unit]))));
      const one = (metric: Metric) => {
        const { alpha, observed, expected, pairable } = krippendorffAlpha(table, metric);
        return { alpha, Do: observed, De: expected, n_pairable: pairable };
      };
      return { nominal: one('nominal'), ordinal: one('ordinal'), interval: one('interval'), ratio: one('ratio') };
    },
  },
  {
    matches: (c) => c.file.startsWith('12') && 'attributes' in c.inputs,
    answer(c, load) {
      const { attributes, assessor, product } = c.inputs as { attributes: string[]; assessor: string; product: string };
      const data = load(c.data!);
      const byAttribute = attributes.map((attribute) => productMeans(data, attribute, assessor, product));
      const { who, what } = byAttribute[0]!;
      const configuration = (pick: (row: number[]) => number) => what.names.map((_, j) => byAttribute.map(({ means }) => pick(means[j]!)));
      const own = who.names.map((_, i) => configuration((row) => row[i]!));
      const mean = configuration((row) => row.reduce((sum, value) => sum + value, 0) / row.length);
      const others = who.names.map((_, i) => configuration((row) => row.reduce((sum, value, k) => (k === i ? sum : sum + value), 0) / (row.length - 1)));
      return {
        labels: who.names,
        rv_matrix: own.map((a) => own.map((b) => rvCoefficient(a, b))),
        rv_with_mean_configuration: own.map((a) => rvCoefficient(a, mean)),
        rv_with_mean_of_others: own.map((a, i) => rvCoefficient(a, others[i]!)),
      };
    },
  },
];
