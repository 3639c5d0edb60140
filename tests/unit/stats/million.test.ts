import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import {
  assessorPerformance,
  balancedScores,
  betaBinomial,
  cochranQ,
  correspondenceAnalysis,
  drift,
  fitProfileModel,
  fleissKappa,
  friedman,
  intraclassCorrelations,
  jarPenalties,
  kendallW,
  krippendorffAlpha,
  linConcordance,
  mcnemarOfAnswers,
  midranks,
  mixedAssessorModel,
  oneWayAnova,
  page,
  pca,
  pearson,
  profileAnova,
  rvCoefficient,
  scaleUse,
  servingEffect,
  StatsError,
  steadyMean,
  trendOverPulls,
  twoWayTypes,
  wilcoxonSignedRank,
  cloudEllipse,
  compareRankSums,
  durbin,
  generalizedProcrustes,
  incompleteRankTest,
  lsdComparisons,
  multipleFactorAnalysis,
  tukeyComparisons,
  wardClusters,
} from '@/stats';

/*
 * Nobody tastes a million glasses; a wrong file may hold as many rows. Each function answers within
 * seconds or says in a typed error why it doesn't: no overflow of the stack, no NaN.
 */
const N = 1_000_000;
const generator = xoroshiro128plus(29);
const score = Float64Array.from({ length: N }, () => uniformInt(generator, 0, 100));
const other = Float64Array.from({ length: N }, () => uniformInt(generator, 0, 100));
const index = Float64Array.from({ length: N }, (_, i) => i);
/** 10 assessors × 10 products × 10,000 replicates. */
const long = { assessor: index.map((i) => Math.floor(i / 100_000)), product: index.map((i) => i % 10), score };
/** 100,000 rows of 10. */
const wide = Array.from({ length: N / 10 }, (_, row) => Array.from(score.subarray(row * 10, row * 10 + 10)));
const yesNo = wide.map((row) => row.map((value) => (value > 50 ? 1 : 0)));

/** Every number in an answer, however deep. */
function* numbersIn(answer: unknown): Generator<number> {
  if (typeof answer === 'number') yield answer;
  else if (ArrayBuffer.isView(answer) || Array.isArray(answer)) for (const value of answer as unknown as Iterable<unknown>) yield* numbersIn(value);
  else if (answer !== null && typeof answer === 'object') for (const value of Object.values(answer)) yield* numbersIn(value);
}

const WORK: [string, () => unknown][] = [
  ['balancedScores', () => balancedScores(long).replicates],
  ['profileAnova', () => profileAnova(balancedScores(long))],
  ['mixedAssessorModel', () => mixedAssessorModel(balancedScores(long))],
  ['assessorPerformance', () => assessorPerformance(balancedScores(long))],
  ['oneWayAnova', () => oneWayAnova(long.product, score)],
  ['twoWayTypes', () => twoWayTypes(long)],
  ['fitProfileModel', () => fitProfileModel(long).components],
  ['servingEffect', () => servingEffect(long, index.map((i) => Math.floor(i / 10) % 10))],
  ['drift', () => drift(long, index)],
  ['drift of one person', () => drift({ assessor: new Int32Array(N), product: new Int32Array(N), score }, index)],
  ['scaleUse', () => scaleUse(score, { low: 0, high: 100 })],
  ['steadyMean', () => steadyMean(score)],
  ['trendOverPulls', () => trendOverPulls(index, score)],
  ['midranks', () => midranks(score)],
  ['friedman', () => friedman(wide)],
  ['kendallW', () => kendallW(wide)],
  ['page', () => page(wide)],
  ['cochranQ', () => cochranQ(yesNo)],
  ['mcnemarOfAnswers', () => mcnemarOfAnswers(yesNo.flat(), Array.from(other, (value) => (value > 40 ? 1 : 0)))],
  ['wilcoxonSignedRank', () => wilcoxonSignedRank(score.map((value, i) => value - other[i]))],
  ['jarPenalties', () => jarPenalties(score.map((value) => 1 + (value % 5)), other)],
  ['correspondenceAnalysis', () => correspondenceAnalysis(wide.map((row) => row.map((value) => value + 1)))],
  ['intraclassCorrelations', () => intraclassCorrelations(wide)],
  ['krippendorffAlpha', () => krippendorffAlpha(Array.from({ length: 10 }, (_, j) => wide.map((row) => row[j])), 'interval')],
  ['fleissKappa', () => fleissKappa(wide.map(() => [3, 4, 5]))],
  ['linConcordance', () => linConcordance(score, other)],
  ['pearson', () => pearson(score, other)],
  ['rvCoefficient', () => rvCoefficient(wide, wide.map((row) => row.toReversed()))],
  ['pca', () => pca(wide)],
  ['wardClusters', () => wardClusters(wide)],
  ['multipleFactorAnalysis', () => multipleFactorAnalysis([{ table: wide, scale: true }, { table: wide, scale: false }])],
  ['generalizedProcrustes', () => generalizedProcrustes([wide, wide.map((row) => row.toReversed())])],
  ['cloudEllipse', () => cloudEllipse(score, other, 0.95)],
  ['durbin', () => durbin(wide)],
  ['incompleteRankTest', () => incompleteRankTest(wide)],
  ['compareRankSums', () => compareRankSums(wide)],
  ['lsdComparisons of as many means', () => lsdComparisons({ means: score, n: 2, ms: 1, df: N, alpha: 0.05 })],
  ['tukeyComparisons of as many means', () => tukeyComparisons({ means: score, n: 2, ms: 1, df: N, alpha: 0.05 })],
  ['friedman of as many products', () => friedman([Array.from(score), Array.from(other)])],
  ['correspondenceAnalysis of as many columns', () => correspondenceAnalysis([score.map((value) => value + 1), other.map((value) => value + 1)])],
  ['pca of as many variables', () => pca([score, other])],
  ['betaBinomial', () => betaBinomial(Array.from(score, (value) => value % 9), Array.from(score, () => 8), { chance: 1 / 3 })],
];

describe('a million scores', () => {
  it.each(WORK)('%s', { timeout: 60_000 }, (_, work) => {
    let answer: unknown;
    try {
      answer = work();
    } catch (error) {
      expect(error).toBeInstanceOf(StatsError);
      return;
    }
    let seen = 0;
    let wrong = 0;
    for (const value of numbersIn(answer)) {
      seen += 1;
      if (Number.isNaN(value)) wrong += 1;
    }
    expect(seen).toBeGreaterThan(0);
    expect(wrong).toBe(0);
  });
});
