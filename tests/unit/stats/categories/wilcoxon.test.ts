import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { StatsError, wilcoxonSignedRank } from '@/stats';

describe('wilcoxonSignedRank', () => {
  it('agrees with Hollander & Wolfe (1973) 29f: V = 40, one-sided p = .01953', () => {
    const before = [1.83, 0.5, 1.62, 2.48, 1.68, 1.88, 1.55, 3.06, 1.3];
    const after = [0.878, 0.647, 0.598, 2.05, 1.06, 1.29, 1.06, 3.14, 1.29];
    const result = wilcoxonSignedRank(before.map((value, i) => value - after[i]));
    expect(result.vPlus).toBe(40);
    expect(result.exact?.greater).toBeCloseTo(0.01953125, 12);
  });

  it('counts every choice of signs, ties included', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -4, max: 4 }), { minLength: 1, maxLength: 9 }), (differences) => {
        const kept = differences.filter((d) => d !== 0);
        fc.pre(kept.length > 0);
        const seen = wilcoxonSignedRank(differences);
        let greater = 0;
        for (let signs = 0; signs < 2 ** kept.length; signs += 1) {
          const turned = kept.map((d, i) => (signs & (1 << i) ? Math.abs(d) : -Math.abs(d)));
          if (wilcoxonSignedRank(turned).vPlus >= seen.vPlus) greater += 1;
        }
        expect(seen.exact?.greater).toBeCloseTo(greater / 2 ** kept.length, 12);
        expect(seen.zeros).toBe(differences.length - kept.length);
      }),
      { numRuns: 25, seed: 2 },
    );
  });

  it('turns round with the sign', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -9, max: 9 }), { minLength: 1, maxLength: 60 }), (differences) => {
        fc.pre(differences.some((d) => d !== 0));
        const one = wilcoxonSignedRank(differences);
        const other = wilcoxonSignedRank(differences.map((d) => -d));
        expect(other.vPlus).toBe(one.vMinus);
        expect(other.exact?.greater).toBeCloseTo(one.exact!.less, 12);
        expect(other.exact?.twoSided).toBeCloseTo(one.exact!.twoSided, 12);
      }),
    );
  });

  it('sees through the rounding of decimal scores', () => {
    const differences = [8.3 - 7.1, 7.3 - 6.1, -(1.2)];
    expect(wilcoxonSignedRank(differences).ties).toBe(true);
    expect(wilcoxonSignedRank(differences, 0).vPlus).not.toBe(wilcoxonSignedRank(differences).vPlus);
  });

  it('leaves the exact p out where it would take too long', () => {
    const many = Array.from({ length: 100_000 }, (_, i) => (i % 11) - 4);
    const result = wilcoxonSignedRank(many);
    expect(result.exact).toBeNull();
    expect(result.p).toBeLessThan(0.05);
  });

  it.each([['no pairs', []], ['only zeros', [0, 0]], ['a missing value', [1, NaN]], ['an infinite value', [1, Infinity]]])('refuses %s', (_, list) => {
    expect(() => wilcoxonSignedRank(list)).toThrow(StatsError);
  });
});
