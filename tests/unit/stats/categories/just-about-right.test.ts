import { describe, expect, it } from 'vitest';
import { jarPenalties, StatsError } from '@/stats';

describe('jarPenalties', () => {
  const ratings = [3, 3, 3, 3, 1, 2, 2, 5];
  const liking = [8, 7, 8, 9, 5, 6, 4, 7];

  it('counts the sides and what they cost', () => {
    const result = jarPenalties(ratings, liking);
    expect(result.counts).toEqual([1, 2, 4, 0, 1]);
    expect(result.jar).toEqual({ n: 4, percent: 50, meanLiking: 8 });
    // Liking 5, 6, 4 against 8: a drop of 3 for 3 of 8 people.
    expect(result.tooLow.meanDrop).toBe(3);
    expect(result.tooLow.weightedPenalty).toBeCloseTo(9 / 8, 12);
    // Student's t by hand: pooled variance (2 + 2)/5, standard error sqrt(0.8 (1/4 + 1/3)).
    expect(result.tooLow.pooled?.t).toBeCloseTo(3 / Math.sqrt(0.8 * (1 / 4 + 1 / 3)), 12);
    expect(result.tooLow.pooled?.df).toBe(5);
    expect(result.overall.meanDrop).toBeCloseTo(8 - 22 / 4, 12);
  });

  it('tests nothing with one person on a side, and gives no mean for an empty one', () => {
    const result = jarPenalties(ratings, liking);
    expect(result.tooHigh).toMatchObject({ n: 1, meanDrop: 1, welch: null, pooled: null });
    const none = jarPenalties([3, 3, 1], [7, 8, 5]);
    expect(none.tooHigh).toMatchObject({ n: 0, meanLiking: null, meanDrop: null, weightedPenalty: null });
  });

  it('mirrors with the scale', () => {
    const turned = jarPenalties(ratings.map((point) => 6 - point), liking);
    expect(turned.tooHigh).toEqual(jarPenalties(ratings, liking).tooLow);
  });

  it('tests nothing when liking does not vary', () => {
    expect(jarPenalties([3, 3, 1, 1], [6, 6, 6, 6]).tooLow.welch).toBeNull();
  });

  it.each<[string, number[], number[], number]>([
    ['nobody', [], [], 5],
    ['lists of two lengths', [3, 3], [7], 5],
    ['a point off the scale', [6], [7], 5],
    ['half a point', [2.5], [7], 5],
    ['an even scale', [3], [7], 4],
    ['a missing liking', [3], [NaN], 5],
  ])('refuses %s', (_, points, likes, size) => {
    expect(() => jarPenalties(points, likes, size)).toThrow(StatsError);
  });
});
