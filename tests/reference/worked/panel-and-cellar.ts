import {
  balancedScores,
  bestEstimateThreshold,
  convertAcidity,
  fleissKappa,
  flightEthanol,
  freeSo2For,
  intraclassCorrelations,
  oneWayAnova,
  profileAnova,
  yearlyLoss,
} from '@/stats';
import type { WorkedAnswerer } from './types';

type Matrix = number[][];

/** A table of [assessor][product] or [assessor][product][replicate] laid out as long data. */
const long = (table: (number | number[])[][]) => {
  const rows = table.flatMap((products, assessor) => products.flatMap((cell, product) => [cell].flat().map((score) => ({ assessor, product, score }))));
  return { assessor: rows.map((row) => row.assessor), product: rows.map((row) => row.product), score: rows.map((row) => row.score) };
};

export const answers: WorkedAnswerer[] = [
  {
    matches: ({ inputs }) => 'targets_x_judges' in inputs,
    answer({ inputs }) {
      const forms = intraclassCorrelations(inputs.targets_x_judges as Matrix);
      return {
        BMS: forms.msRows,
        WMS: forms.msWithin,
        JMS: forms.msColumns,
        EMS: forms.msResidual,
        'ICC(1,1)': forms.one.icc,
        'ICC(2,1)': forms.twoRandom.icc,
        'ICC(3,1)': forms.twoFixed.icc,
        [`ICC(1,${forms.judges})`]: forms.oneMean.icc,
        [`ICC(2,${forms.judges})`]: forms.twoRandomMean.icc,
        [`ICC(3,${forms.judges})`]: forms.twoFixedMean.icc,
      };
    },
  },
  {
    matches: ({ inputs }) => 'counts' in inputs && 'raters' in inputs,
    answer: ({ inputs }) => ({ kappa: fleissKappa(inputs.counts as Matrix).kappa }),
  },
  {
    matches: ({ inputs }) => Array.isArray(inputs.scores),
    answer({ inputs }) {
      const scores = inputs.scores as Matrix;
      const { assessor, product, score } = long(scores);
      const a = profileAnova(balancedScores({ assessor, product, score }));
      return {
        totals: [...a.productMeans].map((mean) => mean * scores.length),
        SS_products: a.product.ss,
        SS_assessors: a.assessor.ss,
        SS_error: a.interaction.ss,
        F_products: a.product.f,
        df: [a.product.df, a.interaction.df],
        p: a.product.p,
        F_assessors: a.assessor.f,
        one_way_F: oneWayAnova(product, score).between.f,
      };
    },
  },
  {
    matches: ({ inputs }) => 'scores_by_assessor' in inputs,
    answer({ inputs }) {
      const people = Object.entries(inputs.scores_by_assessor as Record<string, Matrix>);
      const single = people.map(([, samples]) => oneWayAnova(samples.flatMap((repeats, sample) => repeats.map(() => sample)), samples.flat()));
      const a = profileAnova(balancedScores(long(people.map(([, samples]) => samples))));
      const over = (ms: number) => ms / a.error!.ms;
      return {
        sample_means: [...a.productMeans],
        assessor_means: [...a.assessorMeans],
        grand_mean: a.grandMean,
        MS_and_F: Object.fromEntries(people.map(([name], i) => [name, [single[i].between.ms, single[i].between.f]])),
        per_assessor: Object.fromEntries(
          people.map(([name], i) => {
            const { between, within } = single[i];
            return [name, { mean: a.assessorMeans[i], MS_between: between.ms, F: between.f, MS_within: within.ms, residual_sd: Math.sqrt(within.ms), p: between.p }];
          }),
        ),
        combined: {
          MS_sample: a.product.ms,
          MS_assessor: a.assessor.ms,
          MS_interaction: a.interaction.ms,
          MS_error: a.error!.ms,
          F_sample_vs_error: over(a.product.ms),
          F_assessor_vs_error: over(a.assessor.ms),
          F_interaction: a.interaction.f,
          F_sample_vs_interaction: a.product.f,
        },
      };
    },
  },
  {
    matches: ({ inputs }) => 'concentrations' in inputs,
    answer({ inputs }) {
      const { individual, group, log10Sd } = bestEstimateThreshold(inputs.concentrations as number[], (inputs.correct as Matrix).map((row) => row.map(Boolean)));
      return { individual, group, log10_sd: log10Sd };
    },
  },
  {
    matches: ({ inputs }) => 'pKa' in inputs && 'pH' in inputs,
    answer({ test, inputs }) {
      const targets = [...test.matchAll(/\d\.\d+/g)].map(([target]) => target);
      return Object.fromEntries(targets.map((target) => [target, (inputs.pH as number[]).map((pH) => freeSo2For(Number(target), pH, inputs.pKa as number))]));
    },
  },
  {
    matches: ({ inputs }) => 'meq_per_L' in inputs,
    answer: ({ inputs }) => ({ g_per_L_acetic: (inputs.meq_per_L as number[]).map((meq) => convertAcidity(meq, 'meq', 'acetic')) }),
  },
  {
    matches: ({ inputs }) => 'acetic_g_per_L' in inputs,
    answer({ inputs }) {
      const to = (unit: 'sulphuric' | 'tartaric' | 'meq') => convertAcidity(inputs.acetic_g_per_L as number, 'acetic', unit);
      return { sulfuric: to('sulphuric'), tartaric: to('tartaric'), meq: to('meq') };
    },
  },
  {
    matches: ({ inputs }) => 'glasses' in inputs,
    answer({ inputs }) {
      const { glasses, mL, abv_pct } = inputs as { glasses: number; mL: number; abv_pct: number };
      const { millilitres, grams } = flightEthanol({ glasses, millilitres: mL, abv: abv_pct });
      // A British unit is 10 mL of ethanol, which its name rounds to 8 g.
      return { grams, uk_units_8g: millilitres / 10, us_drinks_14g: grams / 14 };
    },
  },
  {
    matches: ({ inputs }) => 'mL_per_day' in inputs,
    answer({ inputs }) {
      const { mL_per_day, volume_L } = inputs as { mL_per_day: number; volume_L: number };
      const { litres, percent } = yearlyLoss(mL_per_day, volume_L);
      return { mL_per_day, L_per_year: litres, percent_per_year: percent };
    },
  },
];
