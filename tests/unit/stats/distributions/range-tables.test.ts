import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { normalCdf, normalQuantile, studentizedRangeCdf, studentizedRangeQuantile, studentizedRangeSf, studentizedRangeTail, tQuantile } from '@/stats';
import { expectRefusal } from './support/refusal';

describe('critical values of the studentized range', () => {
  it.each([
    // Printed to two or three digits (Harter 1960; Pearson & Hartley table 29, from memory); qtukey of R 4.2 rounds to the same.
    [0.95, 2, 1, 17.97],
    [0.95, 3, 2, 8.33],
    [0.95, 4, 2, 9.8],
    [0.95, 3, 5, 4.6],
    [0.95, 4, 10, 4.33],
    [0.95, 5, 20, 4.23],
    [0.95, 8, 24, 4.68],
    [0.95, 10, Infinity, 4.47],
    [0.95, 20, Infinity, 5.01],
    [0.99, 3, 10, 5.27],
    [0.99, 6, 12, 6.1],
    [0.99, 4, 20, 5.02],
    [0.99, 3, Infinity, 4.12],
  ])('p %f, %i means, %d degrees of freedom: %f', (p, k, df, printed) => {
    expect(studentizedRangeQuantile(p, k, df)).toBeCloseTo(printed, 2);
  });

  it.each([
    ['qtukey(0.95, 3, 5)', studentizedRangeQuantile(0.95, 3, 5), 4.60172544594284],
    ['qtukey(0.95, 8, 24)', studentizedRangeQuantile(0.95, 8, 24), 4.68375201305766],
    ['ptukey(2, 10, 15)', studentizedRangeCdf(2, 10, 15), 0.0953658629353657],
    ['ptukey(1.1, 6, 9)', studentizedRangeCdf(1.1, 6, 9), 0.0352878000592811],
    ['ptukey(0.6, 3, 30)', studentizedRangeCdf(0.6, 3, 30), 0.0941420027818099],
  ])('%s in R 4.2, whose own error is a few 1e-7', (_, actual, expected) => expect(Math.abs(actual / expected - 1)).toBeLessThan(1e-6));

  it('are √2 times those of t for two means', () => {
    for (const df of [1, 2.5, 7, 80]) expect(studentizedRangeQuantile(0.95, 2, df)).toBeCloseTo(Math.SQRT2 * tQuantile(0.975, df), 9);
  });
});

describe('the range of normals', () => {
  it.each([
    // Its mean is the d₂ of control charts: closed forms for 3 and 4, and the printed factors (ASTM MNL7, from memory).
    [3, 3 / Math.sqrt(Math.PI), 9],
    [4, (3 / Math.sqrt(Math.PI)) * (1 + (2 / Math.PI) * Math.asin(1 / 3)), 9],
    [5, 2.32593, 4],
    [10, 3.07751, 4],
    [25, 3.93063, 4],
  ])('of %i has the mean %f', (k, mean, digits) => {
    // Trapezoidal rule; the tail is flat at both ends, so it converges fast.
    const step = 1 / 64;
    let sum = step / 2;
    for (let w = step; w < 14; w += step) sum += step * studentizedRangeSf(w, k, Infinity);
    expect(sum).toBeCloseTo(mean, digits);
  });

  it('of three agrees with a plain sum over sorted triples', () => {
    // 3! times the chance that the lowest falls here, the middle there and the highest between it and w above the lowest.
    const w = 1.7;
    const step = 1 / 100;
    const density = (z: number) => Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);
    let sum = 0;
    for (let low = -8 + step / 2; low < 8; low += step) {
      for (let middle = low + step / 2; middle < low + w; middle += step) sum += 6 * step * step * density(low) * density(middle) * (normalCdf(low + w) - normalCdf(middle));
    }
    expect(studentizedRangeCdf(w, 3, Infinity)).toBeCloseTo(sum, 4);
  });
});

describe('the studentized range', () => {
  it('agrees with simulation to four standard errors', () => {
    const generator = xoroshiro128plus(29);
    const normal = () => normalQuantile((uniformInt(generator, 1, 1_000_000) - 0.5) / 1_000_000);
    const [k, df, runs] = [5, 6, 20_000];
    const seen = Array.from({ length: runs }, () => {
      const values = Array.from({ length: k }, normal);
      let squares = 0;
      for (let i = 0; i < df; i += 1) squares += normal() ** 2;
      return (Math.max(...values) - Math.min(...values)) / Math.sqrt(squares / df);
    });
    for (const q of [1.5, 3, 4.9, 7]) {
      const p = studentizedRangeSf(q, k, df);
      const share = seen.filter((value) => value > q).length / runs;
      expect(Math.abs(share - p)).toBeLessThan(4 * Math.sqrt((p * (1 - p)) / runs));
    }
  });

  it('falls with q, rises with the number of means, and falls with the degrees of freedom far out', () => {
    const k = fc.integer({ min: 2, max: 40 });
    fc.assert(
      fc.property(fc.double({ min: 0.3, max: 12, noNaN: true }), k, fc.double({ min: 1, max: 200, noNaN: true }), (q, means, df) => {
        const here = studentizedRangeSf(q, means, df);
        fc.pre(here < 1 - 1e-9);
        expect(studentizedRangeSf(q * 1.01, means, df)).toBeLessThan(here);
        expect(studentizedRangeSf(q, means + 1, df)).toBeGreaterThan(here);
        if (here < 0.05) expect(studentizedRangeSf(q, means, df * 1.2)).toBeLessThan(here);
        // Bonferroni: at most the sum over pairs, at least one pair.
        const pair = studentizedRangeSf(q, 2, df);
        expect(here).toBeLessThanOrEqual(((means * (means - 1)) / 2) * pair * (1 + 1e-9));
        expect(here).toBeGreaterThanOrEqual(pair * (1 - 1e-9));
      }),
      { seed: 1, numRuns: 30 },
    );
  });

  it('comes to its limit with many degrees of freedom', () => {
    const limit = studentizedRangeSf(3.5, 4, Infinity);
    const gaps = [100, 1000, 10_000, 100_000].map((df) => studentizedRangeSf(3.5, 4, df) - limit);
    // The gap falls as 1/df.
    for (let i = 1; i < gaps.length; i += 1) expect(gaps[i - 1] / gaps[i]).toBeCloseTo(10, 0);
  });

  it('has its ends', () => {
    const table = studentizedRangeTail(4, 9);
    expect([table(0), table(-3), table(Infinity), studentizedRangeSf(0, 4, 9), studentizedRangeCdf(-1, 4, 9), studentizedRangeCdf(Infinity, 4, 9)]).toEqual([1, 1, 0, 1, 0, 1]);
    expect([studentizedRangeQuantile(0, 4, 9), studentizedRangeQuantile(1, 4, 9)]).toEqual([0, Infinity]);
    // Past the end of the table the tail is still falling, not cut.
    expect(table(45)).toBeGreaterThan(0);
    expect(table(45)).toBeLessThan(table(39.9));
    expect(table(45)).toBe(studentizedRangeSf(45, 4, 9));
  });

  it('refuses by code', () => {
    for (const work of [studentizedRangeSf, studentizedRangeCdf]) {
      expectRefusal(() => work(NaN, 3, 9), 'not_finite');
      expectRefusal(() => work(3, NaN, 9), 'not_finite');
      expectRefusal(() => work(3, Infinity, 9), 'not_finite');
      expectRefusal(() => work(3, 3, NaN), 'not_finite');
      expectRefusal(() => work(3, 3.5, 9), 'not_integer');
      expectRefusal(() => work(3, 201, 9), 'out_of_range');
      expectRefusal(() => work(3, -2, 9), 'out_of_range');
      expectRefusal(() => work(3, 3, 0.5), 'out_of_range');
      expectRefusal(() => work(3, 3, -9), 'out_of_range');
    }
    expectRefusal(() => studentizedRangeTail(1, 9), 'out_of_range');
    expectRefusal(() => studentizedRangeTail(3, NaN), 'not_finite');
    expectRefusal(() => studentizedRangeTail(2, 9)(NaN), 'not_finite');
    expectRefusal(() => studentizedRangeQuantile(NaN, 3, 9), 'not_finite');
    expectRefusal(() => studentizedRangeQuantile(-0.1, 3, 9), 'out_of_range');
    expectRefusal(() => studentizedRangeQuantile(0.95, 3, 0), 'out_of_range');
  });
});
