import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { distinguishers, similarityMaximum, similarityMaximumNormal, similarityVerdict, type SimilarityPlan, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';
import { total, wholeProbabilities } from '../distributions/support/whole-numbers';

const plan = { beta: 0.05, pd: 0.3, chance: 1 / 3 };

const plans = fc.record({
  beta: fc.constantFrom(0.2, 0.1, 0.05, 0.01, 0.001),
  pd: fc.double({ min: 0.05, max: 0.95, noNaN: true }),
  chance: fc.constantFrom(1 / 2, 1 / 3, 1 / 10),
});
const outcome = fc.integer({ min: 1, max: 200 }).chain((n) => fc.record({ n: fc.constant(n), correct: fc.integer({ min: 0, max: n }) }));

describe('the most correct answers that still show similarity', () => {
  it('agrees with whole numbers for triangles of every size to 70', () => {
    for (const tenths of [1, 2, 3, 4, 5]) {
      // 1/3 + pd · 2/3 in thirtieths.
      const right = 10 + 2 * tenths;
      for (let n = 1; n <= 70; n += 1) {
        const whole = wholeProbabilities(n, right, 30);
        const all = 30n ** BigInt(n);
        const largest = (below: bigint) => {
          let x = -1;
          while (x < n && total(whole, 0, x + 2) * below <= all) x += 1;
          return x < 0 ? null : x;
        };
        for (const below of [5, 20, 1000]) expect(similarityMaximum(n, { beta: 1 / below, pd: tenths / 10, chance: 1 / 3 }), `n ${n}, pd ${tenths}/10, 1 in ${below}`).toBe(largest(BigInt(below)));
      }
    }
  });

  it('is 25 of 60 at β .05 for a share of .3', () => {
    // R 4.2: pbinom(25, 60, 1/3 + 0.3*2/3) is 0.0464, pbinom(26, …) 0.0775; the panel of 60 is one of ISO 4120 table A.2.
    expect(similarityMaximum(60, plan)).toBe(25);
    expect(similarityVerdict(25, 60, plan).p).toBeCloseTo(0.0463792570089152, 12);
    expect(similarityVerdict(26, 60, plan).p).toBeCloseTo(0.0774669645419335, 12);
  });

  it('rises with the panel, the risk and the share', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 400 }), plans, (n, at) => {
        const here = similarityMaximum(n, at) ?? -1;
        const next = similarityMaximum(n + 1, at) ?? -1;
        expect([here, here + 1]).toContain(next);
        expect(similarityMaximum(n, { ...at, beta: at.beta * 2 }) ?? -1).toBeGreaterThanOrEqual(here);
        expect(similarityMaximum(n, { ...at, pd: at.pd + 0.04 }) ?? -1).toBeGreaterThanOrEqual(here);
      }),
      { seed: 1 },
    );
  });

  it('does not exist for a panel too small to show anything', () => {
    // Even none right of three has (7/15)³ = .10 under the share.
    expect(similarityMaximum(3, plan)).toBeNull();
    // The normal limit has no width at none right, so it always finds that 0 would do.
    expect(similarityMaximumNormal(1, { beta: 0.001, pd: 0.05, chance: 1 / 2 })).toBe(0);
    expect(similarityVerdict(0, 3, plan)).toMatchObject({ verdict: 'not_shown', maximum: null });
  });

  it('is anything but all right when everyone would be able to tell', () => {
    expect(similarityMaximum(12, { ...plan, pd: 1 })).toBe(11);
    expect(similarityVerdict(12, 12, { ...plan, pd: 1 }).verdict).toBe('not_shown');
  });
});

describe('the maximum by the normal limit', () => {
  it('is the last number whose one-sided upper limit is below the share', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 150 }), plans, (n, at) => {
        const upper = (correct: number) => distinguishers({ correct, n, chance: at.chance, level: 1 - at.beta }).normal.pd.oneSidedUpper;
        const x = similarityMaximumNormal(n, at)!;
        fc.pre(Math.abs(upper(x) - at.pd) > 1e-9);
        expect(upper(x)).toBeLessThan(at.pd);
        for (let more = x + 1; more <= n; more += 1) expect(upper(more)).toBeGreaterThanOrEqual(at.pd - 1e-9);
      }),
      { seed: 2 },
    );
  });

  it('stays near the exact one', () => {
    for (const n of [30, 60, 90, 120]) expect(Math.abs(similarityMaximumNormal(n, plan)! - similarityMaximum(n, plan)!)).toBeLessThanOrEqual(1);
  });
});

describe('the verdict', () => {
  it('is similar exactly when p is within β, and silent below guessing', () => {
    fc.assert(
      fc.property(outcome, plans, ({ n, correct }, at) => {
        const { verdict, maximum, p, upperLimit } = similarityVerdict(correct, n, at);
        fc.pre(Math.abs(p - at.beta) > 1e-10);
        const within = p <= at.beta;
        expect(maximum !== null && correct <= maximum).toBe(within);
        expect(verdict !== 'not_shown').toBe(within);
        if (within) expect(verdict).toBe(correct < n * at.chance - 1e-9 ? 'no_conclusion' : 'similar');
        // The exact upper limit says the same in other words.
        expect(upperLimit < at.pd).toBe(within);
      }),
      { seed: 3, numRuns: 400 },
    );
  });

  it('counts exactly what guessing gives as a conclusion', () => {
    // 30 · 1/3 is not a whole number in floating point for every panel; 10, 30 and 33 right must not fall below it.
    for (const n of [30, 90, 99]) expect(similarityVerdict(n / 3, n, { ...plan, beta: 0.2, pd: 0.5 }).verdict).toBe('similar');
    expect(similarityVerdict(32, 99, { ...plan, beta: 0.2, pd: 0.5 }).verdict).toBe('no_conclusion');
  });
});

describe('hostile input', () => {
  const cases: [string, number, SimilarityPlan, StatsErrorCode][] = [
    ['nobody', 0, plan, 'out_of_range'],
    ['half an answer', 9.5, plan, 'not_integer'],
    ['a panel of NaN', NaN, plan, 'not_finite'],
    ['an endless panel', Infinity, plan, 'not_finite'],
    ['a risk of 0', 30, { ...plan, beta: 0 }, 'out_of_range'],
    ['a risk of 1', 30, { ...plan, beta: 1 }, 'out_of_range'],
    ['a risk of NaN', 30, { ...plan, beta: NaN }, 'not_finite'],
    ['a share of 0', 30, { ...plan, pd: 0 }, 'out_of_range'],
    ['a share above 1', 30, { ...plan, pd: 1.01 }, 'out_of_range'],
    ['a share of NaN', 30, { ...plan, pd: NaN }, 'not_finite'],
    ['a chance of 0', 30, { ...plan, chance: 0 }, 'out_of_range'],
    ['a chance of 1', 30, { ...plan, chance: 1 }, 'out_of_range'],
    ['a chance of NaN', 30, { ...plan, chance: NaN }, 'not_finite'],
  ];

  it.each(cases)('%s is refused', (_, n, at, code) => {
    expectRefusal(() => similarityMaximum(n, at), code);
    expectRefusal(() => similarityMaximumNormal(n, at), code);
    expectRefusal(() => similarityVerdict(0, n, at), code);
  });

  it('more right than answers have no verdict', () => {
    expectRefusal(() => similarityVerdict(31, 30, plan), 'out_of_range');
    expectRefusal(() => similarityVerdict(-1, 30, plan), 'out_of_range');
    expectRefusal(() => similarityVerdict(NaN, 30, plan), 'not_finite');
  });
});
