import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compactLetters, lsdComparisons, StatsError, studentizedRangeQuantile, tukeyComparisons } from '@/stats';

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

  it.each([
    ['one mean', { means: [1], n: 4, ms: 1, df: 5, alpha: 0.05 }],
    ['no error', { means: [1, 2], n: 4, ms: 0, df: 5, alpha: 0.05 }],
    ['no degrees of freedom', { means: [1, 2], n: 4, ms: 1, df: 0, alpha: 0.05 }],
    ['a mean without scores', { means: [1, 2], n: [4, 0], ms: 1, df: 5, alpha: 0.05 }],
    ['NaN', { means: [1, NaN], n: 4, ms: 1, df: 5, alpha: 0.05 }],
    ['α = 1', { means: [1, 2], n: 4, ms: 1, df: 5, alpha: 1 }],
  ])('refuse %s', (_, bad) => {
    expect(() => tukeyComparisons(bad)).toThrow(StatsError);
    expect(() => lsdComparisons(bad)).toThrow(StatsError);
  });
});

describe('letters', () => {
  /** Any pattern of shown pairs, also ones that no ordering of means explains. */
  const pattern = fc.integer({ min: 2, max: 8 }).chain((k) =>
    fc.record({
      means: fc.array(fc.integer({ min: 0, max: 50 }), { minLength: k, maxLength: k }),
      shown: fc.subarray(Array.from({ length: k }, (_, a) => Array.from({ length: k - a - 1 }, (_, b) => [a, a + b + 1] as const)).flat()),
    }),
  );

  it('are shared by two products exactly when their difference was not shown', () => {
    fc.assert(
      fc.property(pattern, ({ means, shown }) => {
        const letters = compactLetters(means, shown);
        const isShown = (a: number, b: number) => shown.some(([x, y]) => (x === a && y === b) || (x === b && y === a));
        for (let a = 0; a < means.length; a += 1) {
          for (let b = a + 1; b < means.length; b += 1) expect([...letters[a]].some((letter) => letters[b].includes(letter))).toBe(!isShown(a, b));
        }
      }),
      { seed: 3, numRuns: 400 },
    );
  });

  it('have no letter that says what another says already', () => {
    fc.assert(
      fc.property(pattern, ({ means, shown }) => {
        const letters = compactLetters(means, shown);
        const all = [...new Set(letters.join(''))];
        const members = all.map((letter) => letters.flatMap((own, product) => (own.includes(letter) ? [product] : [])));
        members.forEach((group, i) => members.forEach((other, j) => i !== j && expect(group.every((product) => other.includes(product))).toBe(false)));
      }),
      { seed: 4, numRuns: 400 },
    );
  });

  it('begin with the highest mean', () => {
    expect(compactLetters([2, 9, 5], [[0, 1], [1, 2], [0, 2]])).toEqual(['c', 'a', 'b']);
    expect(compactLetters([2, 9, 5], [])).toEqual(['a', 'a', 'a']);
  });

  it.each([[[0, 0] as const], [[0, 7] as const], [[-1, 1] as const]])('refuse the pair %j', (pair) => expect(() => compactLetters([1, 2, 3], [pair])).toThrow(StatsError));
});
