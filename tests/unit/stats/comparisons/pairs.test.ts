import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lsdComparisons, studentizedRangeQuantile, tukeyComparisons } from '@/stats';

const question = fc.record({
  means: fc.array(fc.integer({ min: 0, max: 1000 }).map((m) => m / 10), { minLength: 2, maxLength: 9 }),
  n: fc.integer({ min: 2, max: 40 }),
  ms: fc.double({ min: 0.5, max: 60, noNaN: true }),
  df: fc.integer({ min: 3, max: 120 }),
  alpha: fc.constantFrom(0.1, 0.05, 0.01),
});

describe('pairs', () => {
  it('are shown by Tukey exactly when they differ by more than the honest difference', () => {
    fc.assert(
      fc.property(question, (q) => {
        const { pairs, criticalDifference } = tukeyComparisons(q);
        expect(criticalDifference).toBeCloseTo(studentizedRangeQuantile(1 - q.alpha, q.means.length, q.df) * Math.sqrt(q.ms / q.n), 8);
        for (const pair of pairs) {
          fc.pre(Math.abs(Math.abs(pair.difference) - criticalDifference!) > 1e-6);
          expect(pair.isShown).toBe(Math.abs(pair.difference) > criticalDifference!);
          expect(pair.isShown).toBe(pair.low > 0 || pair.high < 0);
        }
      }),
      { seed: 1 },
    );
  });

  it('are never easier to show by Tukey than by least differences, and the same for two means', () => {
    fc.assert(
      fc.property(question, (q) => {
        const tukey = tukeyComparisons(q);
        const lsd = lsdComparisons(q);
        tukey.pairs.forEach((pair, i) => {
          expect(pair.p).toBeGreaterThanOrEqual(lsd.pairs[i].p - 1e-9);
          if (q.means.length === 2) expect(pair.p).toBeCloseTo(lsd.pairs[i].p, 9);
        });
      }),
      { seed: 2 },
    );
  });

  it('take each mean’s own number of scores (Tukey–Kramer)', () => {
    const { pairs, criticalDifference } = tukeyComparisons({ means: [1, 2, 3], n: [4, 8, 2], ms: 2, df: 11, alpha: 0.05 });
    expect(criticalDifference).toBeNull();
    expect(pairs[0].standardError).toBeCloseTo(Math.sqrt(2 * (1 / 4 + 1 / 8)), 12);
  });
});
