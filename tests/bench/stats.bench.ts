import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, it } from 'vitest';
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
 * `npm run bench:stats`: the whole analysis of a study, beside the same in R where Rscript is present
 * (stats.R). Medians of five after one warm-up, each timed inside its own process.
 */
const ROUNDS = 5;
const SIZE = { assessors: 12, products: 10, replicates: 3, descriptors: 30 };

function median(work: () => void, rounds = ROUNDS): number {
  work();
  const times = Array.from({ length: rounds }, () => {
    const began = performance.now();
    work();
    return performance.now() - began;
  });
  return times.sort((a, b) => a - b)[Math.floor(rounds / 2)];
}

const ms = (value: number): string => `${value.toFixed(value < 10 ? 2 : 1)} ms`;
const say = (line: string): void => void process.stdout.write(`${line}\n`);

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

function inR(study: Study): Record<string, number> | null {
  const folder = mkdtempSync(join(tmpdir(), 'tercet-bench-'));
  try {
    const file = join(folder, 'study.csv');
    writeFileSync(file, studyCsv(study));
    const { status, stdout, stderr } = spawnSync('Rscript', [fileURLToPath(new URL('./stats.R', import.meta.url)), file], { encoding: 'utf8' });
    if (status === null) return null;
    if (status !== 0) throw new Error(stderr);
    return Object.fromEntries([...stdout.matchAll(/^(\w+) ([\d.e-]+)/gm)].map(([, name, seconds]) => [name, 1000 * Number(seconds)]));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

it('the whole analysis, its growth, the mixed model and power curves', { timeout: 600_000 }, () => {
  const study = makeStudy(SIZE);
  const large = makeStudy({ ...SIZE, assessors: 10 * SIZE.assessors });
  const plan = { alpha: 0.05, chance: CHANCE.triangle, pc: proportionFromDistinguishers(0.3, CHANCE.triangle) };
  const whole = median(() => analyse(study));
  const grown = median(() => analyse(large));
  const mixed = median(() => analyseMixed(study));
  const mixedGrown = median(() => analyseMixed(large));
  const curve = median(() => powerCurve(3, 200, plan));
  say(`whole analysis, 12 assessors x 10 samples x 3 replicates x 30 descriptors: ${ms(whole)}`);
  say(`the same with 120 assessors: ${ms(grown)}, ${(grown / whole).toFixed(1)} times as long for 10 times the scores`);
  say(`mixed model with Satterthwaite, means and pairs, 30 descriptors: ${ms(mixed)}; 120 assessors: ${ms(mixedGrown)}`);
  say(`power curve, n = 3 to 200: ${ms(curve)}`);
  const r = inR(study);
  if (r) {
    say(`R, aov with Error strata: ${ms(r.aov)}, ${(r.aov / whole).toFixed(1)} times ours (goal 20)`);
    say(`R, closed forms: ${ms(r.closed)}, ${(r.closed / whole).toFixed(1)} times ours (goal 10)`);
    if (r.mixed) say(`R, lmerTest with emmeans: ${ms(r.mixed)}, ${(r.mixed / mixed).toFixed(1)} times ours (goal 50)`);
    else say('R has no lmerTest or emmeans: the mixed model is not compared');
  } else say('Rscript is not here: nothing is compared');
  expect(curve).toBeLessThan(5);
  expect(grown).toBeLessThan(13 * whole);
});
