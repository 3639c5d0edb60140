import { compactLetters, fitProfileModel, marginalMeans, modelComparisons, productTest, twoWayTypes, type LongScores, type ProductTest, type SumOfSquares } from '@/stats';
import { levels } from './09-anova-balanced';
import type { Answerer } from './types';

interface Inputs {
  response: string;
  assessor: string;
  product: string;
  random: string;
}

const line = ({ ss, df }: SumOfSquares) => ({ SS: ss, df });
const lines = (split: object) => Object.fromEntries(Object.entries(split).map(([name, part]) => [name, line(part as SumOfSquares)]));
const fTest = ({ f, df, p }: ProductTest) => ({ F: f, ndf: df[0], ddf: df[1], p });

export const answers: Answerer[] = [
  {
    matches: (c) => typeof c.inputs.random === 'string' && /REML/.test(c.inputs.random),
    answer(c, load) {
      const inputs = c.inputs as unknown as Inputs;
      const table = load(c.data!);
      // Products and assessors stand in the order of the whole file; a row without a score is left out.
      const order = (column: string) => levels(table.rows.map((row) => row[column])).names;
      const rows = table.rows.filter((row) => row[inputs.response] !== null);
      const assessors = order(inputs.assessor);
      const products = order(inputs.product).filter((name) => rows.some((row) => String(row[inputs.product]) === name));
      const scores: LongScores = {
        assessor: rows.map((row) => assessors.indexOf(String(row[inputs.assessor]))),
        product: rows.map((row) => products.indexOf(String(row[inputs.product]))),
        score: rows.map((row) => Number(row[inputs.response])),
      };
      const model = fitProfileModel(scores, { interaction: /assessor:product/.test(inputs.random) });
      const satterthwaite = !model.isSingular;
      const kr = marginalMeans(model, 'kenward_roger', 0.95);
      const sw = satterthwaite ? marginalMeans(model, 'satterthwaite', 0.95) : null;
      const pairs = modelComparisons(model, { alpha: 0.05, method: 'kenward_roger' });
      const pairsSw = satterthwaite ? modelComparisons(model, { alpha: 0.05, method: 'satterthwaite' }) : null;
      const f = productTest(model, 'kenward_roger');
      const letters = compactLetters(model.means, pairs.filter((pair) => pair.isShown).map((pair) => [pair.first, pair.second] as const));
      const types = twoWayTypes(scores);
      const { assessor, interaction, residual } = model.components;
      return {
        n_scores: model.scores,
        n_cells: model.cells,
        n_cells_possible: model.possibleCells,
        singular_fit: model.isSingular,
        reml: {
          variance_components: interaction === null ? { assessor, residual } : { assessor, interaction, residual },
          logLik: model.logLikelihood,
          minus2logLik: -2 * model.logLikelihood,
        },
        product_F: {
          satterthwaite: satterthwaite ? fTest(productTest(model, 'satterthwaite')) : null,
          kenward_roger: { ...fTest(f), F_scaling: f.scaling },
        },
        emmeans: {
          product: products,
          emmean: [...model.means],
          se_kr: kr.map((mean) => mean.standardError),
          df_kr: kr.map((mean) => mean.df),
          lower95_kr: kr.map((mean) => mean.low),
          upper95_kr: kr.map((mean) => mean.high),
          se_model: Array.from(model.means, (_, j) => Math.sqrt(model.covariance.get(j, j))),
          df_satterthwaite: products.map((_, j) => sw?.[j].df ?? null),
          arithmetic_mean: [...model.plainMeans],
          n: [...model.counts],
        },
        pairs: {
          a: pairs.map((pair) => products[pair.first]),
          b: pairs.map((pair) => products[pair.second]),
          // The cases print first minus second.
          diff: pairs.map((pair) => -pair.difference),
          se_kr: pairs.map((pair) => pair.standardError),
          df_kr: pairs.map((pair) => pair.df),
          t_kr: pairs.map((pair) => -pair.difference / pair.standardError),
          p_unadjusted_kr: pairs.map((pair) => pair.pUnadjusted),
          p_tukey_kr: pairs.map((pair) => pair.p),
          se_model: pairs.map(({ first, second }) => Math.sqrt(model.covariance.get(first, first) + model.covariance.get(second, second) - 2 * model.covariance.get(first, second))),
          df_satterthwaite: pairs.map((_, i) => pairsSw?.[i].df ?? null),
        },
        letters_tukey_kr: Object.fromEntries(products.map((name, j) => [name, letters[j]])),
        ...(types.typeI && types.typeII && types.typeIII
          ? { fixed_model_ss: { type_I_assessor_first: lines(types.typeI), type_II: lines(types.typeII), type_III_sum_to_zero: lines(types.typeIII) } }
          : { fixed_additive_type_II: lines(types.additive) }),
      };
    },
  },
];
