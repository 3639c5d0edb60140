import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialTest, CHANCE, clopperPearson, dPrime, inversePsychometric, normalCdf, normalPdf, normalQuantile, proportionCorrect, psychometricSlope, type Protocol, type StatsErrorCode, type ThurstoneProtocol } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

const PROTOCOLS: ThurstoneProtocol[] = ['triangle', 'tetrad', 'three_afc', 'duo_trio', 'two_afc'];
const protocol = fc.constantFrom(...PROTOCOLS);

/** Simpson’s rule. */
function integral(f: (z: number) => number, from: number, to: number): number {
  const steps = 2000;
  const step = (to - from) / steps;
  let sum = f(from) + f(to);
  for (let i = 1; i < steps; i += 1) sum += (i % 2 === 1 ? 4 : 2) * f(from + i * step);
  return (sum * step) / 3;
}

describe('the proportion correct', () => {
  it.each<[ThurstoneProtocol, number]>([
    // Ennis (1993) J. Sensory Stud. 8:353 and Ennis & Jesionka (2011) for the tetrad, at d′ = 1; from memory, to three digits.
    ['two_afc', 0.76],
    ['three_afc', 0.634],
    ['duo_trio', 0.582],
    ['triangle', 0.418],
    ['tetrad', 0.494],
  ])('of %s at d′ 1 is %f', (name, pc) => expect(Math.round(1000 * proportionCorrect(name, 1)) / 1000).toBe(pc));

  it('is the integral that defines it', () => {
    for (const d of [0, 0.3, 1, 1.9, 3.4, 6]) {
      const close = (name: ThurstoneProtocol, pc: number) => expect(proportionCorrect(name, d), `${name} at ${d}`).toBeCloseTo(pc, 10);
      close('three_afc', integral((z) => normalCdf(z) ** 2 * normalPdf(z - d), -9, 16));
      close('tetrad', 1 - 2 * integral((z) => normalPdf(z) * (2 * normalCdf(z) * normalCdf(z - d) - normalCdf(z - d) ** 2), -9, 9));
      // The odd glass from the mean of the others is one normal, the others from each other a second.
      close('triangle', 2 * integral((z) => (normalCdf(-z * Math.sqrt(3) + d * Math.sqrt(2 / 3)) + normalCdf(-z * Math.sqrt(3) - d * Math.sqrt(2 / 3))) * normalPdf(z), 0, 9));
      const [a, b] = [normalCdf(d / Math.SQRT2), normalCdf(d / Math.sqrt(6))];
      close('duo_trio', a * b + (1 - a) * (1 - b));
      close('two_afc', a);
    }
  });

  it('keeps the order of the methods: naming the attribute helps, and the tetrad beats the triangle', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 5, noNaN: true }), (d) => {
        expect(proportionCorrect('three_afc', d)).toBeGreaterThan(proportionCorrect('tetrad', d));
        expect(proportionCorrect('tetrad', d)).toBeGreaterThan(proportionCorrect('triangle', d));
        expect(proportionCorrect('two_afc', d)).toBeGreaterThan(proportionCorrect('duo_trio', d));
      }),
      { seed: 1 },
    );
  });

  it('ends at 1', () => {
    for (const name of PROTOCOLS) {
      for (const d of [20, 40, 1e9, Number.MAX_VALUE]) {
        expect(proportionCorrect(name, d)).toBeCloseTo(1, 12);
        expect(proportionCorrect(name, d)).toBeLessThanOrEqual(1);
      }
      expect(psychometricSlope(name, 60)).toBeLessThan(1e-12);
    }
  });

  it('is flat at 0 but for the forced choices', () => {
    expect(PROTOCOLS.filter((name) => psychometricSlope(name, 0) === 0)).toEqual(['triangle', 'tetrad', 'duo_trio']);
    expect(psychometricSlope('two_afc', 0)).toBeCloseTo(1 / (2 * Math.sqrt(Math.PI)), 12);
  });
});

describe('d′', () => {
  it.each<[ThurstoneProtocol, number, number, number, number]>([
    // R 4.2: uniroot on integrate() of the definitions, the error by a central difference.
    ['triangle', 15, 30, 1.466262780056, 0.47879328],
    // Also the example of sensR’s discrim(10, 15, "threeAFC"), from memory: 1.116, 0.436.
    ['three_afc', 10, 15, 1.115898341233, 0.435914718],
    ['duo_trio', 28, 40, 1.715301562311, 0.429895875],
    ['tetrad', 14, 24, 1.306917925545, 0.336391211],
    // R 4.2: sqrt(2) * qnorm(22/30)
    ['two_afc', 22, 30, 0.880950006114775, Math.sqrt((22 / 30) * (8 / 30) / 30) / (normalPdf(normalQuantile(22 / 30)) / Math.SQRT2)],
  ])('%s, %i of %i', (name, correct, n, estimate, error) => {
    const result = dPrime({ protocol: name, correct, n });
    expect(result.dPrime).toBeCloseTo(estimate, 9);
    expect(result.standardError).toBeCloseTo(error, 6);
  });

  const outcome = fc.integer({ min: 2, max: 120 }).chain((n) => fc.record({ protocol, n: fc.constant(n), correct: fc.integer({ min: 0, max: n }) }));

  it('has the p of the test itself', () => {
    fc.assert(
      fc.property(outcome, (asked) => {
        expect(dPrime(asked).p).toBe(binomialTest({ ...asked, chance: CHANCE[asked.protocol] }).p);
      }),
      { seed: 2 },
    );
  });

  it('has likelihood limits where the likelihood has fallen by half of the chi-square', () => {
    fc.assert(
      fc.property(outcome, ({ protocol: name, correct, n }) => {
        const { dPrime: best, likelihood, likelihoodPc } = dPrime({ protocol: name, correct, n });
        const log = (p: number) => (correct > 0 ? correct * Math.log(p) : 0) + (correct < n ? (n - correct) * Math.log(1 - p) : 0);
        const top = log(Math.max(correct / n, CHANCE[name]));
        // R 4.2: qchisq(0.95, 1)
        const fall = (p: number) => expect(2 * (top - log(p))).toBeCloseTo(3.84145882069412, 6);
        if (likelihoodPc.lower > CHANCE[name]) fall(likelihoodPc.lower);
        if (correct < n) fall(likelihoodPc.upper);
        expect(likelihood.lower).toBeLessThanOrEqual(best);
        if (correct < n && likelihood.upper < 8) expect(proportionCorrect(name, likelihood.upper)).toBeCloseTo(likelihoodPc.upper, 9);
      }),
      { seed: 3 },
    );
  });

  it('has exact limits that are those of the proportion', () => {
    fc.assert(
      fc.property(outcome, fc.constantFrom(0.8, 0.95), ({ protocol: name, correct, n }, level) => {
        const { exact } = dPrime({ protocol: name, correct, n, level });
        for (const [limit, upper] of [[exact.lower, false], [exact.upper, true]] as const) {
          const pc = clopperPearson(correct, n, (1 - level) / 2, upper);
          if (pc === 1) expect(limit).toBe(Infinity);
          else expect(proportionCorrect(name, limit)).toBeCloseTo(Math.max(pc, CHANCE[name]), 9);
        }
      }),
      { seed: 4 },
    );
  });

  it('has limits that close in with more answers and widen with the level', () => {
    fc.assert(
      fc.property(outcome, ({ protocol: name, correct, n }) => {
        fc.pre(correct < n && correct / n > CHANCE[name]);
        const width = (k: number, level: number) => {
          const { likelihoodPc } = dPrime({ protocol: name, correct: k * correct, n: k * n, level });
          return likelihoodPc.upper - likelihoodPc.lower;
        };
        expect(width(4, 0.95)).toBeLessThan(width(1, 0.95));
        expect(width(1, 0.99)).toBeGreaterThan(width(1, 0.9));
      }),
      { seed: 5 },
    );
  });

  it('has no standard error at its ends, and no NaN anywhere', () => {
    for (const name of PROTOCOLS) {
      expect(dPrime({ protocol: name, correct: 0, n: 10 })).toMatchObject({ dPrime: 0, standardError: null, exact: { lower: 0 }, likelihood: { lower: 0 }, p: 1 });
      expect(dPrime({ protocol: name, correct: 10, n: 10 })).toMatchObject({ dPrime: Infinity, standardError: null, exact: { upper: Infinity }, likelihood: { upper: Infinity } });
      const one = dPrime({ protocol: name, correct: 1, n: 1 });
      for (const value of [one.p, one.likelihood.lower, one.exact.lower, one.likelihoodPc.lower]) expect(Number.isFinite(value)).toBe(true);
    }
  });
});

describe('hostile input', () => {
  it.each<[string, () => unknown, StatsErrorCode]>([
    ['a test without a Thurstone model', () => dPrime({ protocol: 'two_out_of_five' satisfies Protocol as ThurstoneProtocol, correct: 3, n: 4 }), 'out_of_range'],
    ['a name of no test', () => proportionCorrect('sorting' as ThurstoneProtocol, 1), 'out_of_range'],
    ['more right than answers', () => dPrime({ protocol: 'triangle', correct: 5, n: 4 }), 'out_of_range'],
    ['nobody', () => dPrime({ protocol: 'triangle', correct: 0, n: 0 }), 'out_of_range'],
    ['a negative count', () => dPrime({ protocol: 'triangle', correct: -1, n: 4 }), 'out_of_range'],
    ['half an answer', () => dPrime({ protocol: 'triangle', correct: 1.5, n: 4 }), 'not_integer'],
    ['NaN', () => dPrime({ protocol: 'triangle', correct: NaN, n: 4 }), 'not_finite'],
    ['a level of 0', () => dPrime({ protocol: 'triangle', correct: 2, n: 4, level: 0 }), 'out_of_range'],
    ['a level of 1', () => dPrime({ protocol: 'triangle', correct: 2, n: 4, level: 1 }), 'out_of_range'],
    ['an infinite d′', () => proportionCorrect('tetrad', Infinity), 'not_finite'],
    ['a slope below 0', () => psychometricSlope('tetrad', -0.5), 'out_of_range'],
    ['a slope at NaN', () => psychometricSlope('tetrad', NaN), 'not_finite'],
    ['a proportion above 1', () => inversePsychometric('duo_trio', 1.01), 'out_of_range'],
    ['a proportion of NaN', () => inversePsychometric('duo_trio', NaN), 'not_finite'],
  ])('%s is refused', (_, work, code) => expectRefusal(work, code));
});
