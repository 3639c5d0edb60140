import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { minimumCorrect, power, powerCurve, type PowerPlan, proportionFromDistinguishers, smallestPanel, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';
import { ratio, total, wholeProbabilities } from '../distributions/support/whole-numbers';

const triangle: PowerPlan = { alpha: 0.05, chance: 1 / 3, pc: 0.6 };
const paired: PowerPlan = { alpha: 0.05, chance: 1 / 2, pc: 0.7, twoSided: true };

const plans = fc.record({
  alpha: fc.constantFrom(0.2, 0.1, 0.05, 0.01),
  chance: fc.constantFrom(1 / 3, 1 / 2, 1 / 10),
  pc: fc.double({ min: 0.02, max: 0.98, noNaN: true }),
});

describe('the proportion correct behind a share who can tell', () => {
  it('is the share plus the guesses of the rest', () => {
    expect(proportionFromDistinguishers(0, 1 / 3)).toBe(1 / 3);
    expect(proportionFromDistinguishers(1, 1 / 3)).toBe(1);
    // Of 60 people 18 can tell, and 14 of the other 42 guess right.
    expect(proportionFromDistinguishers(18 / 60, 1 / 3)).toBeCloseTo((18 + 14) / 60, 12);
  });
});

describe('power', () => {
  it('of 30 triangles at .6 correct is .903', () => {
    // R 4.2: 1 - pbinom(qbinom(0.95, 30, 1/3), 30, 0.6)
    expect(power(30, triangle)).toBeCloseTo(0.902943156179251, 12);
  });

  it('agrees with whole numbers', () => {
    for (const [n, tenths] of [[5, 6], [17, 7], [44, 6], [80, 5]]) {
      const whole = wholeProbabilities(n, tenths, 10);
      const all = 10n ** BigInt(n);
      const one = minimumCorrect(n, 0.05, 0.5)!;
      expect(power(n, { alpha: 0.05, chance: 0.5, pc: tenths / 10 })).toBeCloseTo(ratio(total(whole, one), all), 12);
      const both = minimumCorrect(n, 0.2, 0.5, { twoSided: true })!;
      expect(power(n, { alpha: 0.2, chance: 0.5, pc: tenths / 10, twoSided: true })).toBeCloseTo(ratio(total(whole, both) + total(whole, 0, n - both + 1), all), 12);
    }
  });

  it('is certain when everyone is right, and nothing when nobody is', () => {
    expect(power(10, { ...triangle, pc: 1 })).toBe(1);
    expect(power(10, { ...triangle, pc: 0 })).toBe(0);
    // To both sides nobody right is as clear a sign as everybody.
    expect(power(10, { ...paired, pc: 0 })).toBe(1);
    expect(power(10, { ...paired, pc: 1 })).toBe(1);
  });

  it('is 0 for a panel that can’t show anything', () => {
    expect(power(2, triangle)).toBe(0);
    expect(power(5, paired)).toBe(0);
  });

  it('grows with the accepted risk and with the proportion correct', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 300 }), plans, (n, plan) => {
        const here = power(n, plan);
        expect(power(n, { ...plan, alpha: plan.alpha * 1.7 })).toBeGreaterThanOrEqual(here - 1e-12);
        expect(power(n, { ...plan, pc: plan.pc + 0.02 })).toBeGreaterThanOrEqual(here - 1e-12);
        expect(here).toBeGreaterThanOrEqual(0);
        expect(here).toBeLessThanOrEqual(1);
      }),
      { seed: 1 },
    );
  });

  it('to both sides is the same for a preference of either product, and least without one', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 200 }), fc.double({ min: 0, max: 1, noNaN: true }), (n, pc) => {
        const at = (p: number) => power(n, { ...paired, pc: p });
        expect(at(1 - pc)).toBeCloseTo(at(pc), 11);
        expect(at(0.5)).toBeLessThanOrEqual(at(pc) + 1e-12);
        expect(at(0.5)).toBeLessThanOrEqual(0.05);
      }),
      { seed: 2 },
    );
  });
});

describe('the power curve', () => {
  it.each<[string, PowerPlan]>([
    ['one side', triangle],
    ['two sides', paired],
    ['two-out-of-five at a small risk', { alpha: 0.001, chance: 0.1, pc: 0.3 }],
    ['everyone right', { ...triangle, pc: 1 }],
    ['nobody right, two sides', { ...paired, pc: 0 }],
  ])('is the same as point by point, past its fresh starts: %s', (_, plan) => {
    const curve = powerCurve(1, 1100, plan);
    expect(curve.map(({ n }) => n)).toEqual(Array.from({ length: 1100 }, (__, i) => i + 1));
    for (const { n, minimumCorrect: x, power: size } of curve.filter((point) => point.n < 40 || point.n % 61 === 0 || point.n % 512 < 2)) {
      expect(x, `n ${n}`).toBe(minimumCorrect(n, plan.alpha, plan.chance, plan));
      expect(size, `n ${n}`).toBeCloseTo(power(n, plan), 11);
    }
  });

  it('does not depend on where it starts', () => {
    const whole = powerCurve(1, 700, triangle);
    for (const from of [2, 37, 511, 512, 513]) {
      powerCurve(from, 700, triangle).forEach((point, i) => {
        expect(point.minimumCorrect).toBe(whole[from - 1 + i].minimumCorrect);
        expect(point.power).toBeCloseTo(whole[from - 1 + i].power, 11);
      });
    }
    expect(powerCurve(9, 9, triangle)).toHaveLength(1);
  });

  it('names no number where none is significant', () => {
    expect(powerCurve(1, 3, triangle)).toMatchObject([{ minimumCorrect: null, power: 0 }, { minimumCorrect: null, power: 0 }, { minimumCorrect: 3 }]);
  });

  it('drops only where the critical number steps up', () => {
    // A small difference, so that the power stays away from 1, where a drop is too small for a double.
    const curve = powerCurve(3, 400, { ...triangle, pc: 0.4 });
    let drops = 0;
    curve.slice(1).forEach((point, i) => {
      const stepped = point.minimumCorrect! > curve[i].minimumCorrect!;
      if (stepped) drops += 1;
      expect(point.power < curve[i].power).toBe(stepped);
    });
    expect(drops).toBeGreaterThan(100);
  });
});

describe('the smallest panel', () => {
  it('of triangles for half who can tell, at both risks .05, is 23, and 29 for good', () => {
    // ISO 4120 table A.3 prints 23 (from memory); from 24 to 28 the power falls below .95 again.
    const plan = { alpha: 0.05, chance: 1 / 3, pc: proportionFromDistinguishers(0.5, 1 / 3) };
    expect(smallestPanel(0.95, plan)).toMatchObject({ first: 23, stable: 29 });
    expect(Math.min(...powerCurve(24, 28, plan).map((point) => point.power))).toBeLessThan(0.95);
  });

  it('says its own power', () => {
    fc.assert(
      fc.property(fc.constantFrom(0.5, 0.8, 0.9, 0.99), fc.double({ min: 0.2, max: 1, noNaN: true }), fc.boolean(), (goal, pd, twoSided) => {
        const plan = { alpha: 0.05, chance: 0.5, pc: proportionFromDistinguishers(pd, 0.5), twoSided };
        const { first, powerAtFirst, stable, powerAtStable } = smallestPanel(goal, plan);
        expect(first).toBeLessThanOrEqual(stable);
        expect(powerAtFirst).toBeCloseTo(power(first, plan), 10);
        expect(powerAtStable).toBeCloseTo(power(stable, plan), 10);
        expect(powerAtFirst).toBeGreaterThanOrEqual(goal);
      }),
      { seed: 3, numRuns: 50 },
    );
  });

  it('needs only enough answers to be significant when everyone is right', () => {
    // (1/3)³ = .037 is the first at or below .05; (1/2)⁶ · 2 = .031.
    expect(smallestPanel(0.99, { ...triangle, pc: 1 })).toMatchObject({ first: 3, stable: 3 });
    expect(smallestPanel(0.99, { ...paired, pc: 1 })).toMatchObject({ first: 6, stable: 6 });
  });
});

describe('hostile input', () => {
  it.each<[string, Partial<PowerPlan>, StatsErrorCode]>([
    ['a risk of 0', { alpha: 0 }, 'out_of_range'],
    ['a risk of 1', { alpha: 1 }, 'out_of_range'],
    ['a risk of NaN', { alpha: NaN }, 'not_finite'],
    ['a chance of 0', { chance: 0 }, 'out_of_range'],
    ['a chance of 1', { chance: 1 }, 'out_of_range'],
    ['a proportion above 1', { pc: 1.1 }, 'out_of_range'],
    ['a negative proportion', { pc: -0.1 }, 'out_of_range'],
    ['a proportion of NaN', { pc: NaN }, 'not_finite'],
    ['two sides where guessing is not even', { twoSided: true }, 'out_of_range'],
  ])('%s is refused', (_, spoiled, code) => {
    const plan = { ...triangle, ...spoiled };
    for (const work of [() => power(20, plan), () => powerCurve(1, 20, plan), () => smallestPanel(0.8, plan)]) expectRefusal(work, code);
  });

  it.each<[string, () => unknown, StatsErrorCode]>([
    ['nobody', () => power(0, triangle), 'out_of_range'],
    ['half an answer', () => power(9.5, triangle), 'not_integer'],
    ['an endless panel', () => power(Infinity, triangle), 'not_finite'],
    ['a curve from 0', () => powerCurve(0, 20, triangle), 'out_of_range'],
    ['a curve from NaN', () => powerCurve(NaN, 20, triangle), 'not_finite'],
    ['an endless curve', () => powerCurve(1, Infinity, triangle), 'not_finite'],
    ['a curve past a million', () => powerCurve(1, 1_000_001, triangle), 'out_of_range'],
    ['a power of 0', () => smallestPanel(0, triangle), 'out_of_range'],
    ['a power of NaN', () => smallestPanel(NaN, triangle), 'not_finite'],
    ['less than chance', () => smallestPanel(0.8, { ...triangle, pc: 0.2 }), 'out_of_range'],
    ['more than a million answers', () => smallestPanel(0.8, { ...triangle, pc: 1 / 3 + 1e-4 }), 'not_estimable'],
    ['a negative share', () => proportionFromDistinguishers(-0.1, 1 / 3), 'out_of_range'],
    ['a share of NaN', () => proportionFromDistinguishers(NaN, 1 / 3), 'not_finite'],
    ['a share with a chance of 1', () => proportionFromDistinguishers(0.5, 1), 'out_of_range'],
  ])('%s is refused', (_, work, code) => expectRefusal(work, code));
});
