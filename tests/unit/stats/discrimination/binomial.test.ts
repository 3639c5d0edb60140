import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialPmf, binomialSf, binomialTest, CHANCE, minimumCorrect, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';
import { total, wholeProbabilities } from '../distributions/support/whole-numbers';

const close = (actual: number, expected: number) => expect(Math.abs(actual / expected - 1)).toBeLessThan(1e-11);

/** The protocols' chances as "1 in". */
const ONE_IN = [2, 3, 10];

describe('the chances', () => {
  it('are those of counting the ways to answer', () => {
    expect(CHANCE).toEqual({ triangle: 1 / 3, tetrad: 2 / 6, three_afc: 1 / 3, duo_trio: 1 / 2, two_afc: 1 / 2, two_out_of_five: 1 / ((5 * 4) / 2) });
  });
});

describe('the binomial test', () => {
  it.each([
    // Byer & Abrams 1953 (Hollander & Wolfe, example 2.2): 25 of 50 in triangles. R 4.2: pbinom(24, 50, 1/3, lower.tail = FALSE)
    [25, 50, 1 / 3, 0.010826684448816],
    // Meilgaard, Civille & Carr, from memory: malt, tissue boxes, bitterness. R 4.2: pbinom(x - 1, n, p, lower.tail = FALSE)
    [8, 12, 1 / 3, 0.0187584322624713],
    [21, 40, 1 / 2, 0.43731465619021],
    [22, 30, 1 / 2, 0.008062400855124],
  ])('%i of %i at %f', (correct, n, chance, p) => close(binomialTest({ correct, n, chance }).p, p));

  it.each([
    // R 4.2: binom.test(x, n, p)$p.value
    [7, 30, 1 / 3, 0.332793923352224],
    [18, 30, 1 / 3, 0.00310841738517807],
    [3, 16, 1 / 3, 0.292446548948525],
    [4, 30, 1 / 10, 0.536255847400756],
    [0, 30, 1 / 10, 0.0682179469371262],
    [21, 30, 1 / 2, 0.0427739452570677],
    [290, 1000, 1 / 3, 0.00350766236735576],
  ])('%i of %i at %f, both sides by likelihood', (correct, n, chance, p) => close(binomialTest({ correct, n, chance }).twoSidedByLikelihood, p));

  const outcome = fc.integer({ min: 1, max: 80 }).chain((n) => fc.record({ n: fc.constant(n), correct: fc.integer({ min: 0, max: n }) }));

  it('adds up every outcome that is no more likely', () => {
    fc.assert(
      fc.property(outcome, fc.constantFrom(...ONE_IN), ({ n, correct }, oneIn) => {
        const whole = wholeProbabilities(n, 1, oneIn);
        const unlikely = whole.filter((ways) => ways <= whole[correct]).reduce((a, b) => a + b, 0n);
        // One millionth of a millionth as the unit: whole numbers throughout, one division.
        const expected = Number((unlikely * 10n ** 12n) / total(whole)) / 1e12;
        expect(binomialTest({ correct, n, chance: 1 / oneIn }).twoSidedByLikelihood).toBeCloseTo(expected, 10);
      }),
      { seed: 1 },
    );
  });

  it('is the same for right and wrong where guessing is even', () => {
    fc.assert(
      fc.property(outcome, ({ n, correct }) => {
        const one = binomialTest({ correct, n, chance: 0.5 });
        const other = binomialTest({ correct: n - correct, n, chance: 0.5 });
        expect(other.twoSided).toBeCloseTo(one.twoSided, 12);
        expect(one.twoSidedByLikelihood).toBeCloseTo(one.twoSided, 12);
        // The two one-sided tails share the outcome itself.
        expect(one.p + other.p).toBeCloseTo(1 + binomialPmf(correct, n, 0.5), 12);
      }),
      { seed: 2 },
    );
  });

  it('holds at its ends', () => {
    expect(binomialTest({ correct: 0, n: 9, chance: 1 / 3 }).p).toBe(1);
    close(binomialTest({ correct: 9, n: 9, chance: 1 / 3 }).p, 3 ** -9);
    expect(binomialTest({ correct: 1, n: 2, chance: 0.5 })).toMatchObject({ twoSided: 1, twoSidedByLikelihood: 1 });
  });
});

describe('the smallest significant number', () => {
  const alphas = [[1, 5], [1, 10], [1, 20], [1, 100], [1, 1000]];

  it('is that of whole numbers for every panel to 120, ties included', () => {
    for (const oneIn of ONE_IN) {
      for (let n = 1; n <= 120; n += 1) {
        const whole = wholeProbabilities(n, 1, oneIn);
        const all = BigInt(oneIn) ** BigInt(n);
        for (const [above, below] of alphas) {
          let smallest: number | null = null;
          let tail = 0n;
          for (let x = n; x > 0; x -= 1) {
            tail += whole[x];
            if (tail * BigInt(below) > all * BigInt(above)) break;
            smallest = x;
          }
          expect(minimumCorrect(n, above / below, 1 / oneIn), `n ${n}, alpha ${above}/${below}, 1 in ${oneIn}`).toBe(smallest);
        }
      }
    }
  });

  it('of both sides is that of half the risk', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 300 }), fc.constantFrom(0.2, 0.1, 0.05, 0.01), (n, alpha) => {
        expect(minimumCorrect(n, alpha, 0.5, { twoSided: true })).toBe(minimumCorrect(n, alpha / 2, 0.5));
        expect(minimumCorrect(n, alpha, 0.5, { twoSided: false })).toBe(minimumCorrect(n, alpha, 0.5));
      }),
      { seed: 3 },
    );
  });

  it('stays or grows by one with one more answer, and never falls with less risk', () => {
    fc.assert(
      fc.property(fc.integer({ min: 5, max: 20_000 }), fc.double({ min: 0.001, max: 0.5, noNaN: true }), fc.double({ min: 0.02, max: 0.95, noNaN: true }), (n, alpha, chance) => {
        const here = minimumCorrect(n, alpha, chance);
        fc.pre(here !== null);
        expect([here, here! + 1]).toContain(minimumCorrect(n + 1, alpha, chance));
        // No number at all is the strictest answer.
        expect(minimumCorrect(n, alpha / 3, chance) ?? n + 1).toBeGreaterThanOrEqual(here!);
      }),
      { seed: 4 },
    );
  });

  it('is the border for panels far beyond any table', () => {
    for (const n of [10_000, 1_000_000]) {
      const x = minimumCorrect(n, 0.05, 1 / 3)!;
      expect(binomialSf(x, n, 1 / 3)).toBeLessThanOrEqual(0.05);
      expect(binomialSf(x - 1, n, 1 / 3)).toBeGreaterThan(0.05);
    }
  });
});

describe('hostile input', () => {
  it.each<[string, number, number, number, StatsErrorCode]>([
    ['more right than answers', 13, 12, 0.5, 'out_of_range'],
    ['a negative count', -1, 12, 0.5, 'out_of_range'],
    ['half a right answer', 2.5, 12, 0.5, 'not_integer'],
    ['half an answer', 2, 12.5, 0.5, 'not_integer'],
    ['nobody', 0, 0, 0.5, 'out_of_range'],
    ['a negative panel', 0, -4, 0.5, 'out_of_range'],
    ['NaN right', NaN, 12, 0.5, 'not_finite'],
    ['a panel of NaN', 3, NaN, 0.5, 'not_finite'],
    ['an endless panel', 3, Infinity, 0.5, 'not_finite'],
    ['a chance of 0', 3, 12, 0, 'out_of_range'],
    ['a chance of 1', 3, 12, 1, 'out_of_range'],
    ['a negative chance', 3, 12, -0.5, 'out_of_range'],
    ['a chance of NaN', 3, 12, NaN, 'not_finite'],
  ])('%s is refused', (_, correct, n, chance, code) => expectRefusal(() => binomialTest({ correct, n, chance }), code));

  it.each<[string, Parameters<typeof minimumCorrect>, StatsErrorCode]>([
    ['nobody', [0, 0.05, 0.5], 'out_of_range'],
    ['half an answer', [9.5, 0.05, 0.5], 'not_integer'],
    ['a panel of NaN', [NaN, 0.05, 0.5], 'not_finite'],
    ['a risk of 0', [12, 0, 0.5], 'out_of_range'],
    ['a risk of 1', [12, 1, 0.5], 'out_of_range'],
    ['a risk of NaN', [12, NaN, 0.5], 'not_finite'],
    ['a chance of 1', [12, 0.05, 1], 'out_of_range'],
    ['two sides where guessing is not even', [12, 0.05, 1 / 3, { twoSided: true }], 'out_of_range'],
  ])('%s has no smallest number', (_, question, code) => expectRefusal(() => minimumCorrect(...question), code));
});
