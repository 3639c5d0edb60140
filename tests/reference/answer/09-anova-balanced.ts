import { balancedScores, compactLetters, lsdComparisons, mixedAssessorModel, profileAnova, tukeyComparisons, type TestedLine } from '@/stats';
import type { Answerer, CaseInput } from './types';

interface Inputs {
  response: string;
  assessor: string;
  product: string;
  alpha: number;
}

/** Levels in order of appearance, as numbers from 0. */
export function levels(values: readonly unknown[]): { names: string[]; index: number[] } {
  const names: string[] = [];
  const known = new Map<string, number>();
  const index = values.map((value) => {
    const name = String(value);
    let at = known.get(name);
    if (at === undefined) {
      at = names.length;
      known.set(name, at);
      names.push(name);
    }
    return at;
  });
  return { names, index };
}

const line = ({ ss, df, ms }: TestedLine) => ({ SS: ss, df, MS: ms });

export const answers: Answerer[] = [
  {
    matches: (c: CaseInput) => 'error_for_products' in c.inputs,
    answer(c, load) {
      const inputs = c.inputs as unknown as Inputs;
      const { rows } = load(c.data!);
      const assessor = levels(rows.map((row) => row[inputs.assessor]));
      const product = levels(rows.map((row) => row[inputs.product]));
      const table = balancedScores({ assessor: assessor.index, product: product.index, score: rows.map((row) => Number(row[inputs.response])) });
      const a = profileAnova(table);
      const question = { means: a.productMeans, n: a.assessors * a.replicates, ms: a.interaction.ms, df: a.interaction.df, alpha: inputs.alpha };
      const tukey = tukeyComparisons(question);
      const lsd = lsdComparisons(question);
      const model = mixedAssessorModel(table);
      const name = (i: number) => product.names[i]!;
      const byAssessor = (values: Float64Array) => Object.fromEntries(assessor.names.map((who, i) => [who, values[i]]));
      const letters = (pairs: typeof tukey) => {
        const all = compactLetters(a.productMeans, pairs.pairs.filter((pair) => pair.isShown).map((pair) => [pair.first, pair.second] as const));
        return Object.fromEntries(product.names.map((who, i) => [who, all[i]]));
      };
      return {
        n_assessors: a.assessors,
        n_products: a.products,
        n_replicates: a.replicates,
        grand_mean: a.grandMean,
        anova: {
          assessor: { ...line(a.assessor), F_over_interaction: a.assessor.f, p_over_interaction: a.assessor.p, F_over_error: a.assessorOverError!.f, p_over_error: a.assessorOverError!.p },
          product: { ...line(a.product), F: a.product.f, p: a.product.p },
          interaction: { ...line(a.interaction), F: a.interaction.f, p: a.interaction.p },
          error: { SS: a.error!.ss, df: a.error!.df, MS: a.error!.ms },
          total: { SS: a.total.ss, df: a.total.df },
          variance_components_anova_untruncated: a.components,
        },
        posthoc: {
          alpha: inputs.alpha,
          se_of_difference: tukey.pairs[0]!.standardError,
          df: a.interaction.df,
          q_critical: tukey.critical,
          HSD: tukey.criticalDifference,
          LSD: lsd.criticalDifference,
          means: [...a.productMeans],
          pairs: {
            a: tukey.pairs.map((pair) => name(pair.first)),
            b: tukey.pairs.map((pair) => name(pair.second)),
            // The cases print first minus second.
            diff: tukey.pairs.map((pair) => -pair.difference),
            t: tukey.pairs.map((pair) => -pair.difference / pair.standardError),
            p_lsd: lsd.pairs.map((pair) => pair.p),
            lsd_lo: lsd.pairs.map((pair) => -pair.high),
            lsd_hi: lsd.pairs.map((pair) => -pair.low),
            q_stat: tukey.pairs.map((pair) => (Math.abs(pair.difference) / pair.standardError) * Math.SQRT2),
            p_tukey: tukey.pairs.map((pair) => pair.p),
            hsd_lo: tukey.pairs.map((pair) => -pair.high),
            hsd_hi: tukey.pairs.map((pair) => -pair.low),
          },
          letters_tukey: letters(tukey),
          letters_lsd: letters(lsd),
        },
        mixed_assessor_model: {
          scaling_slope: byAssessor(model.slopes),
          disagreement_SS_per_assessor: byAssessor(model.disagreementOf),
          scaling: { ...line(model.scaling), F: model.scaling.f, p: model.scaling.p },
          disagreement: { ...line(model.disagreement), F: model.disagreement.f, p: model.disagreement.p },
          product: { MS: model.product.ms, F_over_disagreement: model.product.f, p: model.product.p },
        },
      };
    },
  },
];
