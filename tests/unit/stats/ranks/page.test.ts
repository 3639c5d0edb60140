import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { page, pageCriticalL, StatsError } from '@/stats';

/** Page (1963), the worked example. */
const original = [[2, 1, 3, 4], [1, 3, 4, 2], [1, 3, 2, 4], [1, 4, 2, 3], [3, 1, 2, 4], [1, 2, 4, 3]];

/** All orders of a list, by place. */
function orders(values: number[]): number[][] {
  if (values.length === 0) return [[]];
  return values.flatMap((value, i) => orders(values.filter((_, j) => j !== i)).map((rest) => [value, ...rest]));
}

describe('page', () => {
  it('agrees with Page (1963): L = 168, chi-square 6.48, two-sided p .0109', () => {
    const result = page(original);
    expect(result.l).toBe(168);
    expect(result.z ** 2).toBeCloseTo(6.48, 2);
    expect(2 * result.p).toBeCloseTo(0.0109095, 7);
  });

  it('has an exact tail that agrees with counting every arrangement, ties included', () => {
    const score = fc.integer({ min: 1, max: 3 });
    const rows = fc.tuple(fc.tuple(score, score, score, score), fc.tuple(score, score, score, score));
    fc.assert(
      fc.property(rows.filter(([a]) => new Set(a).size > 1), ([a, b]) => {
        const seen = page([a, b]).l;
        const all = orders(a).flatMap((x) => orders(b).map((y) => page([x, y]).l));
        const share = all.filter((l) => l >= seen - 1e-9).length / all.length;
        expect(page([a, b]).pExact).toBeCloseTo(share, 10);
      }),
      { numRuns: 12, seed: 5 },
    );
  });

  it('turns round with the predicted order', () => {
    const up = page(original);
    const down = page(original, [3, 2, 1, 0]);
    expect(down.z).toBeCloseTo(-up.z, 12);
  });

  it.each([[[0, 1, 2]], [[0, 1, 2, 2]], [[0, 1, 2, 4]]])('refuses the order %j', (order) => {
    expect(() => page(original, order)).toThrow(StatsError);
  });

  it('refuses a panel that tells nothing apart', () => {
    expect(() => page([[2, 2, 2], [1, 1, 1]])).toThrow(StatsError);
  });
});

describe('pageCriticalL', () => {
  it.each([
    // Page (1963), table 1, 5 % limits for three conditions.
    [4, 54], [5, 66], [7, 91], [10, 128], [15, 190], [20, 251],
  ])('three products, %i assessors: %i', (n, l) => {
    expect(pageCriticalL(3, n, 0.05)).toBe(l);
  });

  it('four products, six assessors, 1 %: 167', () => {
    expect(pageCriticalL(4, 6, 0.01)).toBe(167);
  });

  it('is the first L whose exact p is at most alpha', () => {
    const l = pageCriticalL(4, 6, 0.05)!;
    const rowsByL = new Map(orders([1, 2, 3, 4]).map((row) => [page([row]).l, row]));
    const at = (target: number) => {
      // Six orders whose single L add up to the target.
      const rows = original.map((_, i) => rowsByL.get(Math.floor(target / 6) + (i < target % 6 ? 1 : 0))!);
      expect(page(rows).l).toBe(target);
      return page(rows).pExact!;
    };
    expect(at(l)).toBeLessThanOrEqual(0.05);
    expect(at(l - 1)).toBeGreaterThan(0.05);
  });

  it('is null when even the predicted order of everyone is too likely', () => {
    expect(pageCriticalL(3, 1, 0.05)).toBeNull();
  });
});
