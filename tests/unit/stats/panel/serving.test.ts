import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drift, scaleUse, servingEffect, StatsError } from '@/stats';

/** Made in R (set.seed(4)): 5 assessors × 4 products × 2, three scores taken out, position in the flight noted. */
const assessor = [0, 1, 3, 4, 0, 1, 2, 3, 4, 0, 1, 2, 3, 4, 0, 2, 3, 4, 0, 1, 2, 3, 4, 0, 1, 2, 3, 0, 1, 2, 3, 4, 0, 1, 2, 3, 4];
const product = [0, 0, 0, 0, 1, 1, 1, 1, 1, 2, 2, 2, 2, 2, 3, 3, 3, 3, 0, 0, 0, 0, 0, 1, 1, 1, 1, 2, 2, 2, 2, 2, 3, 3, 3, 3, 3];
const position = [0, 1, 3, 1, 2, 3, 0, 2, 3, 0, 1, 3, 0, 1, 2, 1, 3, 2, 1, 0, 3, 2, 2, 1, 0, 3, 3, 1, 0, 0, 2, 1, 3, 3, 1, 2, 0];
const score = [
  54.2, 52.4, 56.8, 64.9, 55.6, 50.2, 59.9, 65.2, 65.3, 61.2, 60, 60.1, 65.4, 66.1, 60, 64.9, 63.7, 66.6, 56.6, 56, 56.9, 60.4, 60.3, 54.2, 62.3, 58.7, 55.2, 58.5, 64.7, 61.2, 58.1, 68.6, 56.8,
  59.3, 67.8, 64.1, 68.6,
];
const served = { assessor, product, score };

describe('the effect of position', () => {
  // R 4.2: car::Anova(lm(y ~ factor(a) + factor(p) + factor(pos)), type = 2)
  it('has the type II test of car::Anova', () => {
    const effect = servingEffect(served, position);
    expect(effect.f).toBeCloseTo(4.20306, 4);
    expect(effect.df).toEqual([3, 26]);
    expect(effect.p).toBeCloseTo(0.01497733, 7);
  });

  // coef(lm(y ~ factor(a) + factor(p) + C(factor(pos), contr.sum)))
  it('has the effects of sum-to-zero coding', () => {
    const { effects } = servingEffect(served, position);
    [2.03689640574326, 1.0186222362907, -0.572141322835313, -2.48337731919864].forEach((value, i) => expect(effects[i]).toBeCloseTo(value, 8));
  });

  it('does not change with the names of the levels', () => {
    fc.assert(
      fc.property(fc.shuffledSubarray([0, 1, 2, 3], { minLength: 4 }), (names) => {
        expect(servingEffect(served, position.map((at) => names[at])).f).toBeCloseTo(servingEffect(served, position).f, 8);
      }),
      { seed: 1, numRuns: 10 },
    );
  });

  it.each([
    ['levels that are the products', () => servingEffect(served, product)],
    ['one level', () => servingEffect(served, position.map(() => 0))],
    ['a score too few', () => servingEffect({ assessor: [0, 0, 1], product: [0, 1, 0], score: [1, 2, 4] }, [0, 1, 1])],
    ['a model that leaves nothing', () => servingEffect({ assessor, product, score: score.map(() => 3) }, position)],
    ['lists of different lengths', () => servingEffect(served, [1, 2])],
    ['NaN', () => servingEffect({ ...served, score: score.map(() => NaN) }, position)],
  ])('refuses %s', (_, work) => expect(work).toThrow(StatsError));
});

describe('drift', () => {
  // R 4.2: lm of (y − mean of its product) on position, first assessor.
  it('is the slope of lm, with its limits', () => {
    const [first] = drift(served, position.map((at) => at + 1));
    expect(first!.slope).toBeCloseTo(-1.14162962962963, 10);
    expect(first!.standardError).toBeCloseTo(0.54260272690995, 10);
    expect(first!.p).toBeCloseTo(0.0800351900175325, 10);
    expect(first!.low).toBeCloseTo(-2.46933067256916, 8);
    expect(first!.high).toBeCloseTo(0.186071413309905, 8);
  });

  it('is not told of an assessor with two scores, or all at one time', () => {
    const own = drift({ assessor: [0, 0, 1, 1, 1], product: [0, 1, 0, 1, 0], score: [1, 2, 3, 5, 4] }, [1, 2, 3, 3, 3]);
    expect(own).toEqual([null, null]);
  });
});

describe('scale use', () => {
  it('counts what lies at the ends', () => {
    expect(scaleUse([0, 1, 50, 99, 100], { low: 0, high: 100 })).toMatchObject({ n: 5, mean: 50, least: 0, most: 100, share: 1, atEnds: 0.8, distinct: 5 });
    expect(scaleUse([40], { low: 0, high: 100 }).sd).toBeNull();
  });

  it.each([
    ['no scores', () => scaleUse([], { low: 0, high: 100 })],
    ['a score beyond the end', () => scaleUse([101], { low: 0, high: 100 })],
    ['a scale without length', () => scaleUse([1], { low: 1, high: 1 })],
    ['NaN', () => scaleUse([NaN], { low: 0, high: 100 })],
  ])('refuses %s', (_, work) => expect(work).toThrow(StatsError));
});
