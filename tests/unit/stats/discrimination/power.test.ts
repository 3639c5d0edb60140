import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { CHANCE, minimumCorrect, power, powerCurve, proportionCorrect, proportionFromDistinguishers, smallestPanel, StatsError } from '@/stats';

const chance = fc.constantFrom(1 / 3, 1 / 2, 1 / 10);
const share = fc.double({ min: 0.05, max: 0.9, noNaN: true });

describe('power', () => {
  it('agrees with simulation to four standard errors', () => {
    const generator = xoroshiro128plus(11);
    const uniform = () => uniformInt(generator, 0, 999_999) / 1_000_000;
    const runs = 20_000;
    for (const [n, p0, pd, twoSided] of [[24, 1 / 3, 0.3, false], [40, 1 / 2, 0.25, false], [30, 1 / 2, 0.3, true]] as const) {
      const pc = proportionFromDistinguishers(pd, p0);
      const smallest = minimumCorrect(n, 0.05, p0, { twoSided })!;
      let shown = 0;
      for (let run = 0; run < runs; run += 1) {
        let right = 0;
        for (let i = 0; i < n; i += 1) if (uniform() < pc) right += 1;
        if (right >= smallest || (twoSided && n - right >= smallest)) shown += 1;
      }
      const computed = power(n, { alpha: 0.05, chance: p0, pc, twoSided });
      expect(Math.abs(shown / runs - computed)).toBeLessThan(4 * Math.sqrt((computed * (1 - computed)) / runs));
    }
  });

  it('is α at most when nobody can tell, and grows with the share who can', () => {
    fc.assert(
      fc.property(fc.integer({ min: 5, max: 120 }), chance, share, (n, p0, pd) => {
        expect(power(n, { alpha: 0.05, chance: p0, pc: p0 })).toBeLessThanOrEqual(0.05 * (1 + 1e-9));
        const at = (d: number) => power(n, { alpha: 0.05, chance: p0, pc: proportionFromDistinguishers(d, p0) });
        expect(at(Math.min(1, pd + 0.05))).toBeGreaterThanOrEqual(at(pd) - 1e-12);
      }),
      { seed: 1 },
    );
  });

  it('is the same along a curve as at single points', () => {
    const plan = { alpha: 0.05, chance: 1 / 3, pc: proportionFromDistinguishers(0.3, 1 / 3) };
    for (const point of powerCurve(3, 200, plan)) {
      expect(point.power).toBeCloseTo(power(point.n, plan), 10);
      expect(point.minimumCorrect).toBe(minimumCorrect(point.n, 0.05, 1 / 3));
    }
  });
});

describe('the smallest panel', () => {
  it('has the published sizes (ISO 4120 table A.3, from memory)', () => {
    const size = (alpha: number, beta: number, pd: number) => smallestPanel(1 - beta, { alpha, chance: 1 / 3, pc: proportionFromDistinguishers(pd, 1 / 3) }).first;
    expect([size(0.05, 0.05, 0.5), size(0.05, 0.05, 0.4), size(0.05, 0.05, 0.3), size(0.05, 0.05, 0.2), size(0.05, 0.05, 0.1)]).toEqual([23, 40, 66, 147, 572]);
  });

  it('reaches the goal first at `first`, and never falls below it after `stable`', () => {
    fc.assert(
      fc.property(chance, fc.double({ min: 0.25, max: 0.8, noNaN: true }), fc.constantFrom(0.8, 0.9, 0.95), (p0, pd, goal) => {
        const plan = { alpha: 0.05, chance: p0, pc: proportionFromDistinguishers(pd, p0) };
        const { first, stable } = smallestPanel(goal, plan);
        const curve = powerCurve(1, stable + 200, plan);
        expect(curve.find((point) => point.power >= goal)!.n).toBe(first);
        expect(curve.filter((point) => point.n >= stable).every((point) => point.power >= goal)).toBe(true);
        if (stable > first) expect(curve[stable - 2].power).toBeLessThan(goal);
      }),
      { seed: 2, numRuns: 30 },
    );
  });

  it('needs a third of the triangle’s for a tetrad at d′ = 1 (Ennis & Jesionka 2011, from memory)', () => {
    const size = (protocol: 'triangle' | 'tetrad') => smallestPanel(0.8, { alpha: 0.05, chance: CHANCE[protocol], pc: proportionCorrect(protocol, 1) }).first;
    expect(size('tetrad') / size('triangle')).toBeCloseTo(1 / 3, 1);
  });

  it.each([
    ['nothing to find', () => smallestPanel(0.8, { alpha: 0.05, chance: 1 / 3, pc: 1 / 3 })],
    ['a power of 1', () => smallestPanel(1, { alpha: 0.05, chance: 1 / 3, pc: 0.6 })],
    ['a difference too small for any panel', () => smallestPanel(0.9, { alpha: 0.05, chance: 1 / 3, pc: 1 / 3 + 1e-5 })],
    ['a curve that runs backwards', () => powerCurve(20, 10, { alpha: 0.05, chance: 1 / 3, pc: 0.6 })],
    ['a share above 1', () => proportionFromDistinguishers(1.1, 1 / 3)],
    ['NaN', () => power(20, { alpha: NaN, chance: 1 / 3, pc: 0.6 })],
  ])('refuses %s', (_, work) => expect(work).toThrow(StatsError));
});
