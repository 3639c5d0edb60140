import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { durbin, friedman, incompleteRankTest, StatsError } from '@/stats';

/** Conover, Practical Nonparametric Statistics, p. 391: seven ice creams, three to an assessor. */
const varieties = [[1, 2, 4], [2, 3, 5], [3, 4, 6], [4, 5, 7], [1, 5, 6], [2, 6, 7], [1, 3, 7]];
const ranks = [[2, 3, 1], [3, 1, 2], [2, 1, 3], [1, 2, 3], [3, 1, 2], [3, 1, 2], [3, 1, 2]];
const iceCream = varieties.map((served, i) =>
  Array.from({ length: 7 }, (_, j) => {
    const at = served.indexOf(j + 1);
    return at < 0 ? null : ranks[i][at];
  }),
);

describe('durbin', () => {
  it('agrees with Conover: T = 12 on 6 degrees of freedom', () => {
    const result = durbin(iceCream);
    expect(result.chiSquare).toBeCloseTo(12, 10);
    expect(result.d).toBeCloseTo(12, 10);
    expect(result.df).toBe(6);
    expect(result).toMatchObject({ perAssessor: 3, perProduct: 3, perPair: 1 });
  });

  it('is Friedman’s test when everyone had everything', () => {
    const rows = [[1, 2, 3, 4], [2, 1, 4, 3], [1, 3, 2, 4], [2, 2, 5, 7], [1, 4, 2, 9]];
    expect(durbin(rows).chiSquare).toBeCloseTo(friedman(rows).chiSquare, 10);
    expect(durbin(rows).f).toBeCloseTo(friedman(rows).imanDavenport.f, 10);
  });

  it('refuses a plan that is not balanced', () => {
    const broken = iceCream.map((row) => [...row]);
    broken[0][0] = null;
    expect(() => durbin(broken)).toThrow(expect.objectContaining({ code: 'not_balanced' }));
    expect(() => durbin([[1, 2, null], [1, null, 2]])).toThrow(expect.objectContaining({ code: 'not_balanced' }));
  });

  it('refuses hostile tables', () => {
    for (const rows of [[], [[1]], [[1, 2], [1]], [[1, NaN]], [[null, null]], [[1, 1], [2, 2]]]) {
      expect(() => durbin(rows)).toThrow(StatsError);
    }
  });
});

describe('incompleteRankTest', () => {
  it('is Durbin’s test on a balanced plan without ties', () => {
    expect(incompleteRankTest(iceCream).chiSquare).toBeCloseTo(12, 10);
  });

  it('is Friedman’s tie-corrected test on a complete table', () => {
    const rows = fc.array(fc.tuple(fc.nat(5), fc.nat(5), fc.nat(5), fc.nat(5)), { minLength: 3, maxLength: 8 });
    fc.assert(
      fc.property(rows.filter((all) => all.some((row) => new Set(row).size > 1)), (matrix) => {
        expect(incompleteRankTest(matrix).chiSquare).toBeCloseTo(friedman(matrix).chiSquare, 8);
      }),
    );
  });

  it('does not mind an assessor with one score', () => {
    const more = [...iceCream, [5, null, null, null, null, null, null]];
    expect(incompleteRankTest(more).chiSquare).toBeCloseTo(12, 10);
  });

  it('refuses two islands of products', () => {
    const islands = [[1, 2, null, null], [2, 1, null, null], [null, null, 1, 2], [null, null, 1, 2]];
    expect(() => incompleteRankTest(islands)).toThrow(expect.objectContaining({ code: 'not_estimable' }));
  });
});
