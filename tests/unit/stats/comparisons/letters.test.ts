import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compactLetters, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

type Pairs = (readonly [number, number])[];

const allPairs = (k: number): Pairs => Array.from({ length: k }, (_, a) => Array.from({ length: k - a - 1 }, (__, b) => [a, a + b + 1] as const)).flat();

/** Distinct means, so that the order of the letters has no ties to break, and any pattern of shown pairs. */
const pattern = fc.integer({ min: 2, max: 7 }).chain((k) =>
  fc.record({
    means: fc.uniqueArray(fc.integer({ min: 0, max: 500 }), { minLength: k, maxLength: k }),
    shown: fc.subarray(allPairs(k)),
    shuffle: fc.array(fc.integer(), { minLength: k, maxLength: k }).map((keys) => keys.map((_, i) => i).sort((a, b) => keys[a] - keys[b] || a - b)),
  }),
);

/** Letters past z carry a number: "za1" is z and a1. */
const lettersOf = (text: string): string[] => text.match(/[a-z]\d*/g) ?? [];

describe('compact letters', () => {
  it('stand for the largest sets without a shown pair, each once', () => {
    fc.assert(
      fc.property(pattern, ({ means, shown }) => {
        const k = means.length;
        const free = (set: number) => shown.every(([a, b]) => !(set & (1 << a) && set & (1 << b)));
        // Every subset of the products, as bits; those that no further product can join.
        const largest = Array.from({ length: 2 ** k }, (_, set) => set).filter((set) => set > 0 && free(set) && means.every((__, i) => set & (1 << i) || !free(set | (1 << i))));
        const sets = new Map<string, number>();
        compactLetters(means, shown).forEach((text, product) => lettersOf(text).forEach((letter) => sets.set(letter, (sets.get(letter) ?? 0) | (1 << product))));
        expect([...sets.values()].sort((a, b) => a - b)).toEqual(largest);
      }),
      { seed: 1, numRuns: 300 },
    );
  });

  it('do not depend on the order of the pairs, nor on which of a pair comes first, nor on saying it twice', () => {
    fc.assert(
      fc.property(pattern, ({ means, shown }) => {
        const letters = compactLetters(means, shown);
        expect(compactLetters(means, shown.toReversed())).toEqual(letters);
        expect(compactLetters(means, shown.map(([a, b]) => [b, a] as const))).toEqual(letters);
        expect(compactLetters(means, [...shown, ...shown])).toEqual(letters);
      }),
      { seed: 2 },
    );
  });

  it('go with their product when the products are listed in another order', () => {
    fc.assert(
      fc.property(pattern, ({ means, shown, shuffle }) => {
        const letters = compactLetters(means, shown);
        const place = shuffle.map((_, product) => shuffle.indexOf(product));
        const moved = compactLetters(shuffle.map((product) => means[product]), shown.map(([a, b]) => [place[a], place[b]] as const));
        expect(moved).toEqual(shuffle.map((product) => letters[product]));
      }),
      { seed: 3 },
    );
  });

  it('take nothing of the means but their order', () => {
    fc.assert(
      fc.property(pattern, ({ means, shown }) => {
        expect(compactLetters(means.map((mean) => mean ** 3 / 7 - 400), shown)).toEqual(compactLetters(means, shown));
      }),
      { seed: 4 },
    );
  });

  it('run along the means, without a gap, when every far pair is shown and every near one is not', () => {
    fc.assert(
      fc.property(fc.uniqueArray(fc.integer({ min: 0, max: 100 }), { minLength: 2, maxLength: 12 }), fc.integer({ min: 1, max: 60 }), (means, difference) => {
        const shown = allPairs(means.length).filter(([a, b]) => Math.abs(means[a] - means[b]) >= difference);
        const ranked = compactLetters(means, shown)
          .map((text, product) => ({ text, mean: means[product] }))
          .sort((a, b) => b.mean - a.mean);
        expect(ranked[0].text).toMatch(/^a/);
        // Each product’s letters follow one another, and never step back from those of the product above it.
        ranked.forEach(({ text }, i) => {
          const codes = lettersOf(text).map((letter) => letter.charCodeAt(0));
          codes.forEach((code, j) => expect(code).toBe(codes[0] + j));
          if (i > 0) expect(codes[0]).toBeGreaterThanOrEqual(ranked[i - 1].text.charCodeAt(0));
        });
      }),
      { seed: 5 },
    );
  });

  it('are as a text writes them', () => {
    // Highest and lowest apart, the middle with both.
    expect(compactLetters([5, 9, 1], [[1, 2]])).toEqual(['ab', 'a', 'b']);
    // The same with the ends of four, by plain reasoning: 9 and 7 differ from 1, 9 differs from 4.
    expect(compactLetters([9, 7, 4, 1], [[0, 2], [0, 3], [1, 3]])).toEqual(['a', 'ab', 'bc', 'c']);
    expect(compactLetters([3], [])).toEqual(['a']);
    expect(compactLetters(Float64Array.of(1, 2), new Set([[0, 1] as const]))).toEqual(['b', 'a']);
  });

  it('go on after z', () => {
    // Five pairs that differ, nothing else: one of each pair makes a set, 32 sets.
    const means = Array.from({ length: 10 }, (_, i) => 10 - i);
    const shown = [0, 2, 4, 6, 8].map((a) => [a, a + 1] as const);
    const letters = compactLetters(means, shown).map(lettersOf);
    const all = new Set(letters.flat());
    expect(all.size).toBe(32);
    expect(all).toContain('z');
    expect(all).toContain('a1');
    expect(all).toContain('f1');
    for (const [a, b] of allPairs(10)) expect(letters[a].some((letter) => letters[b].includes(letter))).toBe(!shown.some(([x, y]) => x === a && y === b));
  });

  it('leave their input alone', () => {
    const means = Object.freeze([1, 3, 2]);
    const shown = Object.freeze([Object.freeze([0, 1] as const)]);
    expect(() => compactLetters(means, shown)).not.toThrow();
  });

  it.each<[string, number[], Pairs, StatsErrorCode]>([
    ['no products', [], [], 'empty'],
    ['a mean of NaN', [1, NaN], [], 'not_finite'],
    ['an infinite mean', [1, Infinity], [], 'not_finite'],
    ['a product against itself', [1, 2], [[1, 1]], 'out_of_range'],
    ['a product that is not there', [1, 2], [[0, 2]], 'out_of_range'],
    ['a negative place', [1, 2], [[-1, 0]], 'out_of_range'],
    ['a place of NaN', [1, 2], [[NaN, 0]], 'out_of_range'],
    ['an infinite place', [1, 2], [[0, Infinity]], 'out_of_range'],
    ['a pair of one product', [3], [[0, 0]], 'out_of_range'],
  ])('refuse %s', (_, means, shown, code) => expectRefusal(() => compactLetters(means, shown), code));
});
