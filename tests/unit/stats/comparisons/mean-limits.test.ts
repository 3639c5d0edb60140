import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { lsdComparisons, meanHalfWidth, normalQuantile, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

const asked = fc.record({
  ms: fc.double({ min: 0.01, max: 500, noNaN: true }),
  df: fc.double({ min: 1, max: 300, noNaN: true }),
  n: fc.integer({ min: 1, max: 200 }),
  level: fc.double({ min: 0.5, max: 0.999, noNaN: true }),
});

describe('half the width of a mean’s interval', () => {
  it('is that of one sample: R 4.2, t.test(ctrl)$conf.int of PlantGrowth (Dobson 1983)', () => {
    const ctrl = { ms: 0.339995555555556, df: 9, n: 10 };
    expect(5.032 - meanHalfWidth({ ...ctrl, level: 0.95 })).toBeCloseTo(4.61488155565504, 10);
    expect(5.032 + meanHalfWidth({ ...ctrl, level: 0.95 })).toBeCloseTo(5.44911844434496, 10);
    expect(5.032 - meanHalfWidth({ ...ctrl, level: 0.8 })).toBeCloseTo(4.77698376800187, 10);
  });

  it('is that of a pooled error: R 4.2, confint(emmeans(aov(weight ~ group, PlantGrowth), "group"))', () => {
    expect(5.526 - meanHalfWidth({ ms: 0.388595925925926, df: 27, n: 10, level: 0.95 })).toBeCloseTo(5.12152600344172, 10);
  });

  it('is 1/√2 of the least significant difference', () => {
    fc.assert(
      fc.property(asked, (question) => {
        const { criticalDifference } = lsdComparisons({ ...question, means: [0, 1], alpha: 1 - question.level });
        expect((meanHalfWidth(question) * Math.SQRT2) / criticalDifference!).toBeCloseTo(1, 8);
      }),
      { seed: 1 },
    );
  });

  it('grows with the level and the error, and shrinks with scores and degrees of freedom', () => {
    fc.assert(
      fc.property(asked, (question) => {
        const here = meanHalfWidth(question);
        expect(meanHalfWidth({ ...question, level: question.level + (1 - question.level) / 2 })).toBeGreaterThan(here);
        expect(meanHalfWidth({ ...question, ms: 4 * question.ms }) / here).toBeCloseTo(2, 10);
        expect(here / meanHalfWidth({ ...question, n: 9 * question.n })).toBeCloseTo(3, 10);
        expect(meanHalfWidth({ ...question, df: 2 * question.df })).toBeLessThan(here);
      }),
      { seed: 2 },
    );
  });

  it('covers the true mean as often as it says, to four standard errors', () => {
    const generator = xoroshiro128plus(17);
    const normal = () => normalQuantile((uniformInt(generator, 1, 1_000_000) - 0.5) / 1_000_000);
    const [n, runs, level] = [5, 10_000, 0.9];
    let covered = 0;
    for (let run = 0; run < runs; run += 1) {
      const values = Array.from({ length: n }, normal);
      const mean = values.reduce((a, b) => a + b) / n;
      const ms = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (n - 1);
      if (Math.abs(mean) <= meanHalfWidth({ ms, df: n - 1, n, level })) covered += 1;
    }
    expect(Math.abs(covered / runs - level)).toBeLessThan(4 * Math.sqrt((level * (1 - level)) / runs));
  });

  it('is 0 without error', () => expect(meanHalfWidth({ ms: 0, df: 9, n: 4, level: 0.95 })).toBe(0));

  it.each<[string, Partial<Parameters<typeof meanHalfWidth>[0]>, StatsErrorCode]>([
    ['a negative error', { ms: -1 }, 'out_of_range'],
    ['an error of NaN', { ms: NaN }, 'not_finite'],
    ['an infinite error', { ms: Infinity }, 'not_finite'],
    ['no degrees of freedom', { df: 0 }, 'too_few'],
    ['negative degrees of freedom', { df: -1 }, 'too_few'],
    ['degrees of freedom of NaN', { df: NaN }, 'not_finite'],
    ['no scores', { n: 0 }, 'out_of_range'],
    ['half a score', { n: 2.5 }, 'not_integer'],
    ['endless scores', { n: Infinity }, 'not_finite'],
    ['a level of 0', { level: 0 }, 'out_of_range'],
    ['a level of 1', { level: 1 }, 'out_of_range'],
    ['a level of NaN', { level: NaN }, 'not_finite'],
  ])('refuses %s', (_, spoiled, code) => expectRefusal(() => meanHalfWidth({ ms: 1, df: 9, n: 4, level: 0.95, ...spoiled }), code));
});
