import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  balancedScores,
  contrast,
  fitProfileModel,
  marginalMeans,
  modelComparisons,
  productTest,
  profileAnova,
  StatsError,
  tukeyComparisons,
  twoWayTypes,
  type LongScores,
} from '@/stats';

/** Four assessors, three samples, one to two scores a cell. */
const GAPS: LongScores = {
  assessor: [0, 0, 0, 0, 1, 1, 1, 1, 1, 2, 2, 2, 2, 3, 3, 3, 3, 3, 3],
  product: [0, 0, 1, 2, 0, 1, 1, 2, 2, 0, 1, 2, 2, 0, 0, 1, 1, 2, 2],
  score: [41, 44, 52, 60, 38, 47, 50, 61, 58, 55, 59, 70, 66, 49, 47, 61, 57, 59, 64],
};

/** Whole tables in which products, assessors and their interaction all show. */
const complete = fc
  .record({ I: fc.integer({ min: 2, max: 6 }), J: fc.integer({ min: 2, max: 5 }), noise: fc.infiniteStream(fc.integer({ min: -60, max: 60 })) })
  .map(({ I, J, noise }) => {
    const table: { assessor: number[]; product: number[]; score: number[] } = { assessor: [], product: [], score: [] };
    const next = () => (noise.next().value as number) / 10;
    for (let i = 0; i < I; i += 1) {
      const own = 3 * next();
      for (let j = 0; j < J; j += 1) {
        const cell = 50 + own + 4 * j + 3 * next();
        for (let k = 0; k < 2; k += 1) {
          table.assessor.push(i);
          table.product.push(j);
          table.score.push(cell + next());
        }
      }
    }
    return table;
  });

describe('the mixed model with gaps', () => {
  const model = fitProfileModel(GAPS);

  // R 4.2, lme4 1.1-31, lmerTest 3.1-3, emmeans 1.8.4: lmer(y ~ p + (1|a) + (1|a:p)), optimiser bobyqa with rhoend 1e-12.
  it('has the variances and likelihood of lmer', () => {
    expect(model.components.assessor).toBeCloseTo(24.171221802, 3);
    expect(model.components.interaction).toBeCloseTo(2.500883381, 3);
    expect(model.components.residual).toBeCloseTo(6.187415109, 3);
    expect(model.logLikelihood).toBeCloseTo(-45.900635847439, 8);
  });

  it('has the tests of lmerTest and pbkrtest', () => {
    const kr = productTest(model, 'kenward_roger');
    expect(kr.f).toBeCloseTo(39.60219, 3);
    expect(kr.df[1]).toBeCloseTo(5.675078981, 3);
    expect(kr.p).toBeCloseTo(0.00046384, 6);
    const satterthwaite = productTest(model, 'satterthwaite');
    expect(satterthwaite.f).toBeCloseTo(40.67313, 3);
    // The joint df depends on the basis of the contrasts; the one here is differences from the first product.
    expect(Math.abs(satterthwaite.df[1] / 6.283583307 - 1)).toBeLessThan(0.01);
  });

  it('has the marginal means of emmeans', () => {
    const [first, , last] = marginalMeans(model, 'kenward_roger');
    expect(first.estimate).toBeCloseTo(45.83056618, 4);
    expect(first.standardError).toBeCloseTo(2.799527367, 4);
    expect(first.df).toBeCloseTo(4.09, 2);
    expect(last.low).toBeCloseTo(54.47368372, 3);
    expect(last.high).toBeCloseTo(69.95842906, 3);
  });
});

describe('the mixed model', () => {
  it('is the balanced analysis on complete data: F, df, pairs', () => {
    fc.assert(
      fc.property(complete, (table) => {
        const a = profileAnova(balancedScores(table));
        const { assessor, interaction } = a.components;
        fc.pre(assessor > 0.5 && interaction! > 0.5 && a.error!.ms > 0.01);
        const model = fitProfileModel(table);
        expect(model.components.assessor / assessor).toBeCloseTo(1, 8);
        expect(model.components.interaction! / interaction!).toBeCloseTo(1, 8);
        for (const method of ['satterthwaite', 'kenward_roger'] as const) {
          const test = productTest(model, method);
          expect(test.f / a.product.f!).toBeCloseTo(1, 8);
          expect(test.df[1] / a.interaction.df).toBeCloseTo(1, 6);
        }
        const pairs = modelComparisons(model, { alpha: 0.05, method: 'kenward_roger' });
        const tukey = tukeyComparisons({ means: a.productMeans, n: 2 * a.assessors, ms: a.interaction.ms, df: a.interaction.df, alpha: 0.05 });
        tukey.pairs.forEach((pair, i) => {
          expect(pairs[i].difference).toBeCloseTo(pair.difference, 8);
          expect(pairs[i].standardError).toBeCloseTo(pair.standardError, 8);
          expect(pairs[i].p).toBeCloseTo(pair.p, 7);
        });
      }),
      { seed: 1, numRuns: 60 },
    );
  });

  it('does not care in which order scores stand, nor how people and products are numbered', () => {
    const turned: LongScores = {
      assessor: Array.from(GAPS.assessor, (i) => 3 - i).toReversed(),
      product: Array.from(GAPS.product, (j) => [2, 0, 1][j]).toReversed(),
      score: Array.from(GAPS.score).toReversed(),
    };
    const [a, b] = [fitProfileModel(GAPS), fitProfileModel(turned)];
    expect(b.logLikelihood).toBeCloseTo(a.logLikelihood, 8);
    expect([b.means[2], b.means[0], b.means[1]].map((mean) => mean.toFixed(6))).toEqual([...a.means].map((mean) => mean.toFixed(6)));
    expect(productTest(b, 'kenward_roger').df[1]).toBeCloseTo(productTest(a, 'kenward_roger').df[1], 6);
  });

  it('moves with the scores’ level and unit', () => {
    const moved = fitProfileModel({ ...GAPS, score: Array.from(GAPS.score, (y) => 1e6 + 10 * y) });
    const model = fitProfileModel(GAPS);
    expect(productTest(moved, 'kenward_roger').f).toBeCloseTo(productTest(model, 'kenward_roger').f, 5);
    expect(contrast(moved, [1, -1, 0], 'satterthwaite').standardError).toBeCloseTo(10 * contrast(model, [1, -1, 0], 'satterthwaite').standardError, 5);
  });

  it('stays at 0 where the likelihood has its edge, and then has no Satterthwaite', () => {
    // Every person shifts the same products: no interaction beyond the replicates' noise.
    const score = [10, 14, 20, 24, 30, 34, 13, 17, 23, 27, 33, 37, 11, 15, 21, 25, 31, 35];
    const table = { assessor: score.map((_, r) => Math.floor(r / 6)), product: score.map((_, r) => Math.floor(r / 2) % 3), score };
    const model = fitProfileModel(table);
    expect(model.components.interaction).toBe(0);
    expect(model.isSingular).toBe(true);
    expect(() => productTest(model, 'satterthwaite')).toThrow(StatsError);
    expect(Number.isFinite(productTest(model, 'kenward_roger').p)).toBe(true);
  });

  it('leaves the interaction out where nobody scored a product twice', () => {
    const table = { assessor: [0, 0, 0, 1, 1, 1, 2, 2, 3, 3, 3], product: [0, 1, 2, 0, 1, 2, 0, 2, 0, 1, 2], score: [3, 5, 8, 4, 5, 9, 2, 7, 5, 6, 8] };
    expect(fitProfileModel(table).components.interaction).toBeNull();
  });
});

describe('hostile tables', () => {
  it.each([
    ['nothing', { assessor: [], product: [], score: [] }],
    ['one product', { assessor: [0, 1, 0, 1], product: [0, 0, 0, 0], score: [1, 2, 3, 4] }],
    ['one assessor', { assessor: [0, 0, 0, 0], product: [0, 1, 0, 1], score: [1, 2, 3, 4] }],
    ['all scores alike', { assessor: [0, 0, 1, 1, 0, 0, 1, 1], product: [0, 1, 0, 1, 0, 1, 0, 1], score: Array(8).fill(5) }],
    ['replicates that never differ', { assessor: [0, 0, 0, 0, 1, 1, 1, 1], product: [0, 0, 1, 1, 0, 0, 1, 1], score: [1, 1, 4, 4, 2, 2, 9, 9] }],
    ['NaN', { assessor: [0, 0, 1, 1], product: [0, 1, 0, 1], score: [1, NaN, 3, 4] }],
    ['an infinite score', { assessor: [0, 0, 1, 1], product: [0, 1, 0, 1], score: [1, Infinity, 3, 4] }],
    ['a product without a score', { assessor: [0, 0, 1, 1, 0, 1], product: [0, 2, 0, 2, 0, 2], score: [1, 2, 3, 4, 2, 5] }],
    ['a negative number of a person', { assessor: [0, -1, 1, 1], product: [0, 1, 0, 1], score: [1, 2, 3, 4] }],
    ['lists of different lengths', { assessor: [0, 0, 1], product: [0, 1, 0, 1], score: [1, 2, 3, 4] }],
    ['nothing but products and assessors', { assessor: [0, 0, 1, 1], product: [0, 1, 0, 1], score: [1, 2, 3, 4] }],
  ])('of %s are refused by both analyses', (_, table) => {
    expect(() => productTest(fitProfileModel(table), 'kenward_roger')).toThrow(StatsError);
    if (table.score.length < 2 || new Set(table.product).size < 2 || table.score.some((y) => !Number.isFinite(y))) expect(() => twoWayTypes(table)).toThrow(StatsError);
  });

  it('with a million scores are answered', () => {
    const n = 1_000_000;
    const assessor = Int32Array.from({ length: n }, (_, r) => Math.floor(r / 100) % 1000);
    const product = Int32Array.from({ length: n }, (_, r) => r % 10);
    const score = Float64Array.from({ length: n }, (_, r) => 50 + (r % 10) + 5 * Math.sin(r * 12.9898) + 3 * Math.sin(assessor[r] * 78.233) + 2 * Math.sin(assessor[r] * 37.719 + product[r] * 11.1));
    const test = productTest(fitProfileModel({ assessor, product, score }), 'kenward_roger');
    expect(test.p).toBeGreaterThanOrEqual(0);
    expect(Number.isFinite(test.f)).toBe(true);
  });

  it('that fall apart have no common sums of squares', () => {
    const apart = { assessor: [0, 0, 1, 1, 2, 2, 3, 3], product: [0, 1, 0, 1, 2, 3, 2, 3], score: [1, 2, 3, 4, 5, 6, 7, 9] };
    expect(() => twoWayTypes(apart)).toThrow(/no assessor links/);
  });
});
