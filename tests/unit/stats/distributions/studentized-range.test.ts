import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { StatsError, studentizedRangeCdf, studentizedRangeQuantile, studentizedRangeSf, studentizedRangeTail, tTwoSided } from '@/stats';

describe('the studentized range', () => {
  it('agrees with R 4.2 where R is good to eight digits', () => {
    expect(studentizedRangeSf(3.5, 4, 20)).toBeCloseTo(0.0949584505485567, 8); // ptukey(3.5, 4, 20, lower = FALSE)
    expect(studentizedRangeSf(3.5, 4, Infinity)).toBeCloseTo(0.0638763338592404, 8); // ptukey(3.5, 4, Inf, lower = FALSE)
    expect(studentizedRangeSf(4.2, 6, 99)).toBeCloseTo(0.0422055826935827, 8); // ptukey(4.2, 6, 99, lower = FALSE)
  });

  it('has the critical values of the printed tables (Pearson & Hartley, from memory)', () => {
    expect(studentizedRangeQuantile(0.95, 3, 10)).toBeCloseTo(3.88, 2);
    expect(studentizedRangeQuantile(0.95, 10, 20)).toBeCloseTo(5.01, 2);
    expect(studentizedRangeQuantile(0.99, 5, 30)).toBeCloseTo(5.05, 2);
    expect(studentizedRangeQuantile(0.95, 4, Infinity)).toBeCloseTo(3.63, 2);
  });

  // Direct quadrature of the definition in R: 40-point Gauss–Legendre on 10 pieces of s and 24 of z.
  it.each([
    [8, 1.60639088263e-5],
    [10, 4.11947029991e-8],
    [12, 8.2572121015e-11],
  ])('keeps the far tail that R’s ptukey loses: q = %d, k = 12, df = 76.3', (q, expected) => {
    expect(Math.abs(studentizedRangeSf(q, 12, 76.3) / expected - 1)).toBeLessThan(1e-9);
  });

  const k = fc.integer({ min: 2, max: 30 });
  const df = fc.double({ min: 2, max: 400, noNaN: true });

  it('is a t distribution for two means, and its sides make 1', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 9, noNaN: true }), k, df, (q, means, freedom) => {
        expect(studentizedRangeSf(q, 2, freedom)).toBeCloseTo(tTwoSided(q / Math.SQRT2, freedom), 11);
        expect(studentizedRangeSf(q, means, freedom) + studentizedRangeCdf(q, means, freedom)).toBeCloseTo(1, 10);
      }),
      { seed: 1, numRuns: 60 },
    );
  });

  it('turns round by its quantile, which grows with the number of means', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.5, max: 0.999, noNaN: true }), k, df, (p, means, freedom) => {
        const q = studentizedRangeQuantile(p, means, freedom);
        expect(studentizedRangeCdf(q, means, freedom)).toBeCloseTo(p, 9);
        expect(studentizedRangeQuantile(p, means + 1, freedom)).toBeGreaterThan(q);
      }),
      { seed: 2, numRuns: 40 },
    );
  });

  it('reads the same from its table', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 30, noNaN: true }), k, fc.integer({ min: 4, max: 300 }), (q, means, freedom) => {
        const direct = studentizedRangeSf(q, means, freedom);
        fc.pre(direct > 1e-250);
        expect(Math.abs(studentizedRangeTail(means, freedom)(q) / direct - 1)).toBeLessThan(1e-10);
      }),
      { seed: 3, numRuns: 60 },
    );
  });

  it.each([
    ['one mean', () => studentizedRangeSf(3, 1, 10)],
    ['half a mean', () => studentizedRangeSf(3, 2.5, 10)],
    ['no degrees of freedom', () => studentizedRangeSf(3, 3, 0)],
    ['NaN', () => studentizedRangeSf(NaN, 3, 10)],
    ['NaN from the table', () => studentizedRangeTail(3, 10)(NaN)],
    ['a probability above 1', () => studentizedRangeQuantile(1.5, 3, 10)],
  ])('refuses %s', (_, work) => expect(work).toThrow(StatsError));
});
