import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { kendallW, midranks, StatsError } from '@/stats';

const panel = fc
  .tuple(fc.integer({ min: 2, max: 6 }), fc.integer({ min: 2, max: 6 }))
  .chain(([m, k]) => fc.array(fc.array(fc.integer({ min: 0, max: 9 }), { minLength: k, maxLength: k }), { minLength: m, maxLength: m }))
  .filter((rows) => rows.some((row) => new Set(row).size > 1));

describe('midranks', () => {
  it('shares places among equal values', () => {
    expect(midranks([10, 20, 20, 5])).toEqual([2, 3.5, 3.5, 1]);
  });

  it('always sums to n(n + 1)/2 and leaves its input alone', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -5, max: 5 }), { minLength: 1, maxLength: 40 }), (values) => {
        const frozen = Object.freeze([...values]);
        const sum = midranks(frozen).reduce((a, b) => a + b, 0);
        expect(sum).toBe((values.length * (values.length + 1)) / 2);
        expect(frozen).toEqual(values);
      }),
    );
  });

  it('refuses missing values', () => {
    expect(() => midranks([1, NaN])).toThrow(StatsError);
    expect(() => midranks([])).toThrow(StatsError);
  });
});

describe('kendallW', () => {
  it('agrees with Siegel (1956), three raters of six candidates: s = 25.5, W = .16', () => {
    const { s, w } = kendallW([
      [1, 6, 3, 2, 5, 4],
      [1, 5, 6, 4, 2, 3],
      [6, 3, 2, 5, 4, 1],
    ]);
    expect(s).toBe(25.5);
    expect(w).toBeCloseTo(0.16, 2);
  });

  it('is 1 when all assessors rank alike, ties or not', () => {
    expect(kendallW([[1, 2, 3], [10, 20, 30]]).w).toBe(1);
    expect(kendallW([[1, 1, 3, 5], [2, 2, 7, 9], [4, 4, 5, 6]]).w).toBe(1);
  });

  it('is 0 for two assessors in opposite order', () => {
    expect(kendallW([[1, 2, 3, 4], [4, 3, 2, 1]]).w).toBe(0);
  });

  it('stays within 0 and 1 and does not depend on the order of assessors or products', () => {
    fc.assert(
      fc.property(panel, (rows) => {
        const { w } = kendallW(rows);
        expect(w).toBeGreaterThanOrEqual(0);
        expect(w).toBeLessThanOrEqual(1);
        expect(kendallW([...rows].reverse()).w).toBeCloseTo(w, 12);
        expect(kendallW(rows.map((row) => [...row].reverse())).w).toBeCloseTo(w, 12);
        // Reversing every scale turns every rank round and changes no agreement.
        expect(kendallW(rows.map((row) => row.map((score) => -score))).w).toBeCloseTo(w, 12);
      }),
    );
  });

  it.each([
    ['no assessors', []],
    ['one product', [[1], [2]]],
    ['ragged rows', [[1, 2], [1]]],
    ['a missing score', [[1, NaN], [1, 2]]],
    ['an infinite score', [[1, Infinity], [1, 2]]],
    ['nothing but ties', [[3, 3, 3], [5, 5, 5]]],
  ])('refuses %s', (_, rows) => {
    expect(() => kendallW(rows)).toThrow(StatsError);
  });
});
