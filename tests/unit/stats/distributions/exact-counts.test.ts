import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialCdf, binomialPmf, binomialSf } from '@/stats';
import { ratio, total, wholeProbabilities } from './support/whole-numbers';

const close = (actual: number, expected: number) => expect(Math.abs(actual / expected - 1)).toBeLessThan(1e-12);

describe('binomial probabilities', () => {
  it('are those of whole numbers: triangle, duo-trio and two-out-of-five panels', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 90 }), fc.constantFrom(2, 3, 10), fc.nat(90), (n, oneIn, any) => {
        const k = any % (n + 1);
        const whole = wholeProbabilities(n, 1, oneIn);
        const all = BigInt(oneIn) ** BigInt(n);
        const sum = (from: number, to: number) => ratio(total(whole, from, to), all);
        close(binomialPmf(k, n, 1 / oneIn), sum(k, k + 1));
        close(binomialSf(k, n, 1 / oneIn), sum(k, n + 1));
        close(binomialCdf(k, n, 1 / oneIn), sum(0, k + 1));
      }),
      { seed: 1 },
    );
  });

  const n = fc.integer({ min: 1, max: 5000 });
  const p = fc.double({ min: 0.001, max: 0.999, noNaN: true });

  it('mirror when right and wrong change places', () => {
    fc.assert(
      fc.property(n, p, p, (size, chance, at) => {
        const k = Math.floor(at * size);
        const upper = binomialSf(k, size, chance);
        fc.pre(upper > 1e-280);
        // 1 − chance is rounded, and n of those roundings add up.
        expect(Math.abs(binomialCdf(size - k, size, 1 - chance) / upper - 1)).toBeLessThan(1e-9);
      }),
      { seed: 2 },
    );
  });

  it('obey the recurrence from n to n + 1', () => {
    fc.assert(
      fc.property(n, p, p, (size, chance, at) => {
        const k = Math.max(1, Math.floor(at * size));
        const step = chance * binomialSf(k - 1, size, chance) + (1 - chance) * binomialSf(k, size, chance);
        fc.pre(step > 1e-280);
        expect(Math.abs(binomialSf(k, size + 1, chance) / step - 1)).toBeLessThan(1e-10);
      }),
      { seed: 3 },
    );
  });

  it('are sure things at 0 and 1, and nothing outside 0 to n', () => {
    expect([0, 1, 4].map((k) => binomialPmf(k, 4, 0))).toEqual([1, 0, 0]);
    expect([0, 3, 4].map((k) => binomialPmf(k, 4, 1))).toEqual([0, 0, 1]);
    expect([binomialSf(1, 4, 0), binomialSf(4, 4, 1), binomialCdf(0, 4, 0), binomialCdf(3, 4, 1)]).toEqual([0, 1, 1, 0]);
    expect([binomialPmf(-1, 4, 0.5), binomialPmf(5, 4, 0.5)]).toEqual([0, 0]);
    // Nobody asked: nobody was right, for sure.
    expect([binomialPmf(0, 0, 0.5), binomialSf(0, 0, 0.5), binomialSf(1, 0, 0.5), binomialCdf(0, 0, 0.5)]).toEqual([1, 1, 0, 1]);
  });

  it('keep their sum near one million answers', () => {
    // 12 standard deviations to both sides leave less than 1e-30 out.
    const size = 1_000_000;
    let sum = 0;
    for (let k = 333_333 - 5700; k <= 333_333 + 5700; k += 1) sum += binomialPmf(k, size, 1 / 3);
    expect(sum).toBeCloseTo(1, 11);
  });
});
