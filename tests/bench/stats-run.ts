import {
  assessorPerformance,
  CHANCE,
  compactLetters,
  fitProfileModel,
  intraclassCorrelations,
  marginalMeans,
  modelComparisons,
  pca,
  powerCurve,
  productTest,
  profileAnova,
  proportionFromDistinguishers,
  tukeyComparisons,
  type BalancedScores,
} from '@/stats';
import { makeStudy, studyCsv, type Study } from './stats-study';

/*
 * The work of stats.bench.ts, run in a process of its own from a bundle, as the application ships it.
 * Prints one line of JSON: medians in milliseconds of five rounds after one warm-up, and the study as CSV.
 */
const ROUNDS = 5;
const SIZE = { assessors: 12, products: 10, replicates: 3, descriptors: 30 };

function median(work: () => void): number {
  work();
  const times = Array.from({ length: ROUNDS }, () => {
    const began = performance.now();
    work();
    return performance.now() - began;
  });
  return times.sort((a, b) => a - b)[Math.floor(ROUNDS / 2)];
}

/** Every descriptor's mixed analysis, Tukey with letters, panel performance and ICC; components of the means. */
function analyse({ assessors, products, replicates, scores }: Study): unknown[] {
  const means: Float64Array[] = [];
  const results: unknown[] = scores.map((own) => {
    const table: BalancedScores = { scores: own, assessors, products, replicates };
    const a = profileAnova(table);
    const tukey = tukeyComparisons({ means: a.productMeans, n: assessors * replicates, ms: a.interaction.ms, df: a.interaction.df, alpha: 0.05 });
    const letters = compactLetters(a.productMeans, tukey.pairs.filter((pair) => pair.isShown).map((pair) => [pair.first, pair.second] as const));
    means.push(a.productMeans);
    const cells = Array.from({ length: products }, (_, j) =>
      Float64Array.from({ length: assessors }, (_, i) => {
        let sum = 0;
        for (let k = 0; k < replicates; k += 1) sum += own[(i * products + j) * replicates + k];
        return sum / replicates;
      }),
    );
    return [a, tukey, letters, assessorPerformance(table), intraclassCorrelations(cells)];
  });
  results.push(pca(Array.from({ length: products }, (_, j) => means.map((mean) => mean[j]))));
  return results;
}

/** The same scores by REML: F with Satterthwaite's degrees of freedom, marginal means, all pairs. */
function analyseMixed({ assessors, products, replicates, scores }: Study): unknown[] {
  const n = assessors * products * replicates;
  const assessor = Int32Array.from({ length: n }, (_, at) => Math.floor(at / (products * replicates)));
  const product = Int32Array.from({ length: n }, (_, at) => Math.floor(at / replicates) % products);
  return scores.map((score) => {
    const model = fitProfileModel({ assessor, product, score });
    const method = model.isSingular ? 'kenward_roger' : 'satterthwaite';
    return [productTest(model, method), marginalMeans(model, method), modelComparisons(model, { alpha: 0.05, method })];
  });
}

const study = makeStudy(SIZE);
const large = makeStudy({ ...SIZE, assessors: 10 * SIZE.assessors });
const plan = { alpha: 0.05, chance: CHANCE.triangle, pc: proportionFromDistinguishers(0.3, CHANCE.triangle) };
const medians = {
  whole: median(() => analyse(study)),
  grown: median(() => analyse(large)),
  mixed: median(() => analyseMixed(study)),
  mixedGrown: median(() => analyseMixed(large)),
  curve: median(() => powerCurve(3, 200, plan)),
};
process.stdout.write(JSON.stringify({ medians, csv: studyCsv(study) }));
