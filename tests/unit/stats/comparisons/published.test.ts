import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compactLetters, lsdComparisons, type PairQuestion, studentizedRangeQuantile, type StatsErrorCode, tQuantile, tTwoSided, tukeyComparisons } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

/** Weights of chicks by feed (McNeil 1977; R’s chickwts): casein, horsebean, linseed, meatmeal, soybean, sunflower. */
const chicks: PairQuestion = {
  means: [323.583333333333, 160.2, 218.75, 276.909090909091, 246.428571428571, 328.916666666667],
  n: [12, 10, 12, 11, 14, 12],
  ms: 3008.5541691642,
  df: 65,
  alpha: 0.05,
};

const pairsOf = (k: number) => Array.from({ length: k }, (_, a) => Array.from({ length: k - a - 1 }, (__, b) => [a, a + b + 1])).flat();

describe('Tukey', () => {
  it('agrees with R 4.2: TukeyHSD(aov(breaks ~ wool + tension, warpbreaks), "tension"), Tippett (1950)', () => {
    const { pairs, criticalDifference } = tukeyComparisons({ means: [36.3888888888889, 26.3888888888889, 21.6666666666667], n: 18, ms: 134.957777777778, df: 50, alpha: 0.05 });
    const expected = [
      [-10, -19.3534207268, -0.646579273156, 0.033626218911],
      [-14.7222222222, -24.0756429491, -5.368801495379, 0.001121787717],
      [-4.7222222222, -14.0756429491, 4.631198504621, 0.447421021431],
    ];
    pairs.forEach(({ difference, low, high, p }, i) => [difference, low, high, p].forEach((value, j) => expect(value).toBeCloseTo(expected[i][j], 5)));
    expect(criticalDifference).toBeCloseTo(9.35342072684355, 5);
    expect(pairs.map(({ isShown }) => isShown)).toEqual([true, true, false]);
  });

  it('agrees with R 4.2 for unequal numbers: TukeyHSD(aov(weight ~ feed, chickwts))', () => {
    const { pairs } = tukeyComparisons(chicks);
    const expected = [
      [-163.383333333333, -232.346876204447, -94.4197904622199, 3.07019679679499e-8],
      [-104.833333333333, -170.587491482774, -39.0791751838921, 2.10015132161567e-4],
      [-46.6742424242424, -113.906206623052, 20.5577217745669, 0.332458415973003],
      [-77.1547619047619, -140.517054139431, -13.7924696700929, 8.36530868305818e-3],
      [5.33333333333331, -60.4208248161078, 71.0874914827744, 0.999890217393269],
      [58.55, -10.4135428711133, 127.513542871113, 0.141332894456581],
      [116.709090909091, 46.3351046540537, 187.083077164128, 1.06209151476522e-4],
      [86.2285714285713, 19.541683597261, 152.915459259882, 4.21665424383666e-3],
      [168.716666666667, 99.7531237955532, 237.68020953778, 1.21988666945683e-8],
      [58.1590909090908, -9.07287328971853, 125.3910551079, 0.127696481749042],
      [27.6785714285713, -35.6837208060977, 91.0408636632403, 0.793285316154053],
      [110.166666666667, 44.4125085172254, 175.920824816108, 8.84323280399002e-5],
      [-30.4805194805194, -95.3751091881357, 34.4140702270968, 0.739135571505953],
      [52.0075757575758, -15.2243884412335, 119.239539956385, 0.220696236210412],
      [82.4880952380952, 19.1258030034262, 145.850387472765, 3.8845212072347e-3],
    ];
    expect(pairs.map(({ first, second }) => [first, second])).toEqual(pairsOf(6));
    pairs.forEach(({ difference, low, high, p }, i) => {
      [difference, low, high].forEach((value, j) => expect(value).toBeCloseTo(expected[i][j], 4));
      expect(p).toBeCloseTo(expected[i][3], 8);
    });
    // The smallest chance, of which ptukey keeps three digits, by quadrature of the definition in R: 60-point Gauss–Legendre on 10 pieces of s and 20 of z.
    expect(pairs[8].p / 1.21973395476794e-8).toBeCloseTo(1, 9);
    // R 4.2: multcompView::multcompLetters4
    expect(compactLetters(chicks.means, pairs.filter(({ isShown }) => isShown).map(({ first, second }) => [first, second]))).toEqual(['a', 'c', 'bc', 'ab', 'b', 'a']);
  });

  it('agrees with R 4.2 on Dobson’s plants: TukeyHSD(aov(weight ~ group, PlantGrowth))', () => {
    const { pairs } = tukeyComparisons({ means: [5.032, 4.661, 5.526], n: 10, ms: 0.388595925925926, df: 27, alpha: 0.05 });
    expect(pairs.map(({ p }) => p.toFixed(6))).toEqual(['0.390871', '0.197996', '0.012006']);
    expect(pairs[2].low).toBeCloseTo(0.17378394859, 6);
    expect(pairs[2].high).toBeCloseTo(1.55621605141, 6);
  });
});

describe('least significant differences', () => {
  it('agree with R 4.2: pairwise.t.test(weight, feed, p.adjust.method = "none") of chickwts', () => {
    const { pairs, critical, criticalDifference } = lsdComparisons(chicks);
    const expected = [2.06799661148703e-9, 1.49334401355744e-5, 0.0455667198069703, 6.65407881311862e-4, 0.812494918488017, 0.0152219747224179, 7.47801201305963e-6, 3.24626865748558e-4, 8.20377713159379e-10, 0.0134789392847129, 0.20414464673718, 6.21183633837634e-6, 0.172553914458505, 0.0264354778095015, 2.98043769286836e-4];
    pairs.forEach(({ p }, i) => expect(p / expected[i]).toBeCloseTo(1, 8));
    // R 4.2: emmeans, revpairwise
    expect(pairs[0].standardError).toBeCloseTo(23.4854905068377, 9);
    expect(pairs[14].standardError).toBeCloseTo(21.5779881777522, 9);
    expect(critical).toBeCloseTo(1.997137908392, 10);
    expect(criticalDifference).toBeNull();
  });
});

const question = fc.record({
  means: fc.uniqueArray(fc.integer({ min: 0, max: 900 }).map((m) => m / 10), { minLength: 2, maxLength: 7 }),
  n: fc.integer({ min: 2, max: 30 }),
  ms: fc.double({ min: 0.5, max: 60, noNaN: true }),
  df: fc.integer({ min: 3, max: 120 }),
  alpha: fc.constantFrom(0.1, 0.05, 0.01),
});

describe.each([['Tukey', tukeyComparisons], ['LSD', lsdComparisons]] as const)('%s comparisons', (_, compare) => {
  it('turn with the order of products, and go with the unit of the scale', () => {
    fc.assert(
      fc.property(question, fc.double({ min: 0.01, max: 100, noNaN: true }), (asked, unit) => {
        const here = compare(asked);
        const last = asked.means.length - 1;
        const turned = compare({ ...asked, means: asked.means.toReversed() });
        const scaled = compare({ ...asked, means: asked.means.map((mean) => 7 + unit * mean), ms: unit ** 2 * asked.ms });
        here.pairs.forEach((pair, i) => {
          const other = turned.pairs.find(({ first, second }) => first === last - pair.second && second === last - pair.first)!;
          expect(other.difference).toBeCloseTo(-pair.difference, 10);
          expect(other.p).toBeCloseTo(pair.p, 12);
          expect(other.low).toBeCloseTo(-pair.high, 9);
          expect(scaled.pairs[i].p).toBeCloseTo(pair.p, 8);
          expect(scaled.pairs[i].high / unit).toBeCloseTo(pair.high, 6);
        });
        expect(scaled.criticalDifference! / unit).toBeCloseTo(here.criticalDifference!, 8);
      }),
      { seed: 1, numRuns: 40 },
    );
  });

  it('are shown exactly when p is at most α, which is when the limits leave 0 out', () => {
    fc.assert(
      fc.property(question, (asked) => {
        for (const { p, low, high, isShown } of compare(asked).pairs) {
          fc.pre(Math.abs(p - asked.alpha) > 1e-8);
          expect(isShown).toBe(p <= asked.alpha);
          expect(isShown).toBe(low > 0 || high < 0);
        }
      }),
      { seed: 2, numRuns: 40 },
    );
  });

  it('take one number for all as that number for each', () => {
    fc.assert(
      fc.property(question, (asked) => {
        const each = compare({ ...asked, n: asked.means.map(() => asked.n) });
        expect(each.pairs).toEqual(compare(asked).pairs);
      }),
      { seed: 3, numRuns: 30 },
    );
  });

  it('leave equal means alone', () => {
    const { pairs } = compare({ means: [4, 4, 4], n: 5, ms: 1, df: 8, alpha: 0.05 });
    pairs.forEach((pair) => expect(pair).toMatchObject({ difference: 0, p: 1, isShown: false, low: -pair.high }));
  });

  it.each<[string, Partial<PairQuestion>, StatsErrorCode]>([
    ['no means', { means: [] }, 'empty'],
    ['one product', { means: [3] }, 'too_few'],
    ['a mean of NaN', { means: [3, NaN, 4] }, 'not_finite'],
    ['an infinite mean', { means: [3, Infinity, 4] }, 'not_finite'],
    ['an error of 0', { ms: 0 }, 'constant'],
    ['a negative error', { ms: -1 }, 'constant'],
    ['an error of NaN', { ms: NaN }, 'not_finite'],
    ['an infinite error', { ms: Infinity }, 'not_finite'],
    ['no degrees of freedom', { df: 0 }, 'too_few'],
    ['negative degrees of freedom', { df: -2 }, 'too_few'],
    ['degrees of freedom of NaN', { df: NaN }, 'not_finite'],
    ['α of 0', { alpha: 0 }, 'out_of_range'],
    ['α of 1', { alpha: 1 }, 'out_of_range'],
    ['α in percent', { alpha: 5 }, 'out_of_range'],
    ['α of NaN', { alpha: NaN }, 'not_finite'],
    ['a number of scores too few', { n: [4, 4] }, 'shape'],
    ['no scores at all', { n: 0 }, 'out_of_range'],
    ['a negative number of scores', { n: [4, -4, 4] }, 'out_of_range'],
    ['a number of scores of NaN', { n: [4, NaN, 4] }, 'not_finite'],
    ['NaN for every number of scores', { n: NaN }, 'not_finite'],
  ])('refuse %s', (__, spoiled, code) => expectRefusal(() => compare({ means: [1, 2, 4], n: 4, ms: 1, df: 9, alpha: 0.05, ...spoiled }), code));
});

it('the critical value and the p of two means meet at α', () => {
  for (const alpha of [0.1, 0.05, 0.01]) {
    const asked = { means: [0, 1], n: 6, ms: 2, df: 10, alpha };
    // Two products need no guard for many pairs.
    expect(tukeyComparisons(asked).critical / Math.SQRT2).toBeCloseTo(lsdComparisons(asked).critical, 9);
    expect(lsdComparisons(asked).critical).toBeCloseTo(tQuantile(1 - alpha / 2, 10), 12);
    expect(tTwoSided(lsdComparisons(asked).critical, 10)).toBeCloseTo(alpha, 10);
    expect(tukeyComparisons({ ...asked, means: [0, 1, 2] }).critical).toBeCloseTo(studentizedRangeQuantile(1 - alpha, 3, 10), 12);
  }
});
