import { describe, expect, it } from 'vitest';
import { compareRankSums, conoverLsd, rankSumHsd, rankSumLsd, StatsError } from '@/stats';

describe('limits of rank sums', () => {
  it('LSD agrees with the four sweeteners of Meilgaard, Civille & Carr: 24.8', () => {
    expect(rankSumLsd(48, 4)).toBeCloseTo(24.8, 1);
  });

  it('HSD agrees with Basker (1988), 20 assessors and 4 samples at 5 %: 21.0', () => {
    expect(rankSumHsd(20, 4)).toBeCloseTo(21.0, 1);
  });

  it('is one limit for two products', () => {
    // The range of two is the difference itself, so nothing is left to correct for.
    expect(rankSumHsd(13, 2)).toBeCloseTo(rankSumLsd(13, 2), 7);
  });

  it('grows with assessors, with products and with confidence', () => {
    expect(rankSumLsd(20, 4)).toBeGreaterThan(rankSumLsd(10, 4));
    expect(rankSumHsd(20, 6)).toBeGreaterThan(rankSumHsd(20, 4));
    expect(rankSumHsd(20, 4, 0.01)).toBeGreaterThan(rankSumHsd(20, 4, 0.05));
    expect(rankSumHsd(20, 4)).toBeGreaterThan(rankSumLsd(20, 4));
  });

  it('Conover’s limit is 0 when all assessors agree', () => {
    expect(conoverLsd([[1, 2, 3], [1, 2, 3], [2, 3, 9]])).toBe(0);
  });

  it('compares every pair once', () => {
    const { pairs, lsd } = compareRankSums([[1, 2, 3, 4], [2, 1, 3, 4], [1, 2, 4, 3], [1, 2, 3, 4]]);
    expect(pairs.map(({ a, b }) => `${a}${b}`)).toEqual(['01', '02', '03', '12', '13', '23']);
    for (const pair of pairs) expect(pair.exceedsLsd).toBe(Math.abs(pair.difference) > lsd);
  });

  it.each([[0, 4, 0.05], [10, 1, 0.05], [10.5, 4, 0.05], [10, 4, 0], [10, 4, 1], [NaN, 4, 0.05]])(
    'refuses %f assessors, %f products, level %f',
    (assessors, products, alpha) => {
      expect(() => rankSumLsd(assessors, products, alpha)).toThrow(StatsError);
      expect(() => rankSumHsd(assessors, products, alpha)).toThrow(StatsError);
    },
  );
});
