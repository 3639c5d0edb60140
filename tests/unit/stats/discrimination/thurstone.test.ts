import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { betaBinomial, CHANCE, dPrime, inversePsychometric, normalQuantile, proportionCorrect, psychometricSlope, StatsError, type ThurstoneProtocol } from '@/stats';

const protocols: ThurstoneProtocol[] = ['triangle', 'tetrad', 'three_afc', 'duo_trio', 'two_afc'];
const protocol = fc.constantFrom(...protocols);

describe('psychometric functions', () => {
  it('agree with simulated tasters who follow the decision rules, to four standard errors', () => {
    const generator = xoroshiro128plus(5);
    const normal = (mean: number) => mean + normalQuantile((uniformInt(generator, 1, 1_000_000) - 0.5) / 1_000_000);
    const d = 1.2;
    const rules: Record<ThurstoneProtocol, () => boolean> = {
      // The odd one is not in the closest pair.
      triangle: () => {
        const [odd, a, b] = [normal(d), normal(0), normal(0)];
        return Math.abs(a - b) < Math.min(Math.abs(odd - a), Math.abs(odd - b));
      },
      tetrad: () => {
        const [a, b, c, e] = [normal(0), normal(0), normal(d), normal(d)];
        return Math.max(a, b) < Math.min(c, e) || Math.max(c, e) < Math.min(a, b);
      },
      three_afc: () => normal(d) > Math.max(normal(0), normal(0)),
      duo_trio: () => {
        const [reference, same, other] = [normal(0), normal(0), normal(d)];
        return Math.abs(same - reference) < Math.abs(other - reference);
      },
      two_afc: () => normal(d) > normal(0),
    };
    const runs = 40_000;
    for (const name of protocols) {
      let right = 0;
      for (let run = 0; run < runs; run += 1) if (rules[name]()) right += 1;
      const pc = proportionCorrect(name, d);
      expect(Math.abs(right / runs - pc)).toBeLessThan(4 * Math.sqrt((pc * (1 - pc)) / runs));
    }
  });

  it('begin at chance, rise, and turn round by their inverse', () => {
    fc.assert(
      fc.property(protocol, fc.double({ min: 0.05, max: 5, noNaN: true }), (name, d) => {
        expect(proportionCorrect(name, 0)).toBeCloseTo(CHANCE[name], 12);
        const pc = proportionCorrect(name, d);
        expect(proportionCorrect(name, d + 0.05)).toBeGreaterThan(pc);
        expect(inversePsychometric(name, pc)).toBeCloseTo(d, 6);
      }),
      { seed: 1 },
    );
  });

  it('have the slope of their own differences', () => {
    for (const name of protocols) {
      const slope = (proportionCorrect(name, 1.3 + 1e-4) - proportionCorrect(name, 1.3 - 1e-4)) / 2e-4;
      expect(psychometricSlope(name, 1.3)).toBeCloseTo(slope, 7);
    }
  });
});

describe('d′', () => {
  it('lies within its likelihood limits and grows with the number right', () => {
    fc.assert(
      fc.property(protocol, fc.integer({ min: 8, max: 100 }), fc.double({ min: 0, max: 1, noNaN: true }), (name, n, at) => {
        const correct = Math.min(n - 1, Math.floor(at * n));
        const now = dPrime({ protocol: name, correct, n });
        expect(now.likelihood.lower).toBeLessThanOrEqual(now.dPrime + 1e-9);
        expect(now.likelihood.upper).toBeGreaterThanOrEqual(now.dPrime - 1e-9);
        expect(dPrime({ protocol: name, correct: correct + 1, n }).dPrime).toBeGreaterThanOrEqual(now.dPrime);
      }),
      { seed: 2 },
    );
  });

  it('is 0 at or below chance and infinite, with a finite lower limit, when all are right', () => {
    expect(dPrime({ protocol: 'triangle', correct: 5, n: 24 }).dPrime).toBe(0);
    const all = dPrime({ protocol: 'triangle', correct: 24, n: 24 });
    expect(all.dPrime).toBe(Infinity);
    expect(Number.isFinite(all.likelihood.lower)).toBe(true);
  });
});

describe('replicated tests', () => {
  it('show overdispersion when some people always know and others never do', () => {
    const eights = Array<number>(20).fill(8);
    const split = betaBinomial([...Array<number>(10).fill(8), ...Array<number>(10).fill(2)], eights, { chance: 1 / 3 });
    const even = betaBinomial(Array<number>(20).fill(5), eights, { chance: 1 / 3 });
    expect(split.pOverdispersion).toBeLessThan(0.001);
    expect(even.gamma).toBe(0);
  });
});

it.each([
  ['a proportion below 0', () => inversePsychometric('triangle', -0.1)],
  ['NaN', () => proportionCorrect('triangle', NaN)],
  ['a negative d′', () => proportionCorrect('triangle', -1)],
  ['more right than answers', () => dPrime({ protocol: 'triangle', correct: 9, n: 8 })],
])('%s is refused', (_, work) => expect(work).toThrow(StatsError));
