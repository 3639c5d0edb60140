import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { betaBinomial, betaQuantile, gaussLegendre, logBeta, logChoose, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

/** Thirty people with eight triangles each: made with seed 11 by the reference scripts, which fit it in R 4.2. */
const TRIANGLES = [5, 6, 1, 7, 2, 5, 4, 3, 3, 3, 5, 4, 2, 5, 5, 7, 1, 4, 4, 6, 5, 6, 6, 4, 3, 2, 5, 4, 0, 3];

const people = fc.array(fc.tuple(fc.integer({ min: 2, max: 9 }), fc.nat(9)).map(([n, any]) => [any % (n + 1), n] as const), { minLength: 4, maxLength: 25 });
const fit = (rows: readonly (readonly [number, number])[], chance?: number) => betaBinomial(rows.map(([x]) => x), rows.map(([, n]) => n), { chance });

/** The plain model’s log-likelihood by its beta functions, which the fit itself does not use. */
function plainLogLik(rows: readonly (readonly [number, number])[], mu: number, gamma: number): number {
  const sum = 1 / gamma - 1;
  const [a, b] = [mu * sum, (1 - mu) * sum];
  return rows.reduce((total, [x, n]) => total + logChoose(n, x) + logBeta(x + a, n - x + b) - logBeta(a, b), 0);
}

/** The corrected model’s by integrating over the people’s shares, for shapes that leave the density finite. */
function correctedLogLik(rows: readonly (readonly [number, number])[], mu: number, gamma: number, chance: number): number {
  const sum = 1 / gamma - 1;
  const [a, b] = [mu * sum, (1 - mu) * sum];
  const { nodes, weights } = gaussLegendre(200);
  return rows.reduce((total, [x, n]) => {
    let mean = 0;
    nodes.forEach((node, i) => {
      // By the fourth root of the share, so that the density starts flat enough for the quadrature.
      const root = (node + 1) / 2;
      const share = root ** 4;
      const right = chance + (1 - chance) * share;
      const density = Math.exp((a - 1) * Math.log(share) + (b - 1) * Math.log1p(-share) - logBeta(a, b));
      mean += (weights[i] / 2) * 4 * root ** 3 * density * right ** x * (1 - right) ** (n - x);
    });
    return total + logChoose(n, x) + Math.log(mean);
  }, 0);
}

describe('the beta-binomial fit', () => {
  it('agrees with plain numerical integration of both models at its own estimates', () => {
    const rows = TRIANGLES.map((x) => [x, 8] as const);
    const plain = fit(rows);
    expect(plain.logLik).toBeCloseTo(plainLogLik(rows, plain.mu, plain.gamma), 8);
    const corrected = fit(rows, 1 / 3);
    expect(corrected.logLik).toBeCloseTo(correctedLogLik(rows, corrected.mu, corrected.gamma, 1 / 3), 8);
    // And nothing near is better.
    for (const [dm, dg] of [[0.01, 0], [-0.01, 0], [0, 0.01], [0, -0.01], [0.007, 0.007], [-0.007, 0.007]]) {
      expect(plainLogLik(rows, plain.mu + dm, plain.gamma + dg)).toBeLessThan(plain.logLik);
      expect(correctedLogLik(rows, corrected.mu + dm, corrected.gamma + dg, 1 / 3)).toBeLessThan(corrected.logLik);
    }
  });

  it('agrees with R 4.2: the reference scripts’ own maximum, for the plain model also VGAM’s betabinomial', () => {
    const eights = TRIANGLES.map(() => 8);
    const plain = betaBinomial(TRIANGLES, eights);
    expect(plain.mu).toBeCloseTo(0.499096922321829, 6);
    expect(plain.gamma).toBeCloseTo(0.0762962114280892, 6);
    expect(plain.seMu).toBeCloseTo(0.0399772781, 5);
    expect(plain.seGamma).toBeCloseTo(0.0485761815, 5);
    expect(plain.logLik).toBeCloseTo(-59.0101431117491, 8);
    const corrected = betaBinomial(TRIANGLES, eights, { chance: 1 / 3 });
    expect(corrected.mu).toBeCloseTo(0.253890462819499, 6);
    expect(corrected.gamma).toBeCloseTo(0.154917290291655, 6);
    expect(corrected.seMu).toBeCloseTo(0.0560203861, 5);
    expect(corrected.logLik).toBeCloseTo(-59.5609886563436, 8);
    expect(corrected.logLikGuessing).toBeCloseTo(-75.0508981340892, 8);
  });

  it('finds the top of the plain likelihood, whatever the counts', () => {
    fc.assert(
      fc.property(people, (rows) => {
        const { mu, gamma, boundary, logLik, logLikBinomial } = fit(rows);
        expect(logLik).toBeGreaterThanOrEqual(logLikBinomial - 1e-9);
        for (let m = 0.05; m < 1; m += 0.1) {
          for (let g = 0.02; g < 1; g += 0.07) expect(plainLogLik(rows, m, g)).toBeLessThanOrEqual(logLik + 1e-6);
        }
        if (!boundary && gamma > 0.001) expect(plainLogLik(rows, mu, gamma)).toBeCloseTo(logLik, 6);
      }),
      { seed: 1, numRuns: 60 },
    );
  });

  it('takes its standard errors from the curvature', () => {
    const rows = TRIANGLES.map((x) => [x, 8] as const);
    const { mu, gamma, seMu, seGamma, covariance } = fit(rows);
    const h = 1e-4;
    const at = (i: number, j: number) => plainLogLik(rows, mu + i * h, gamma + j * h);
    const mm = (at(1, 0) - 2 * at(0, 0) + at(-1, 0)) / h ** 2;
    const gg = (at(0, 1) - 2 * at(0, 0) + at(0, -1)) / h ** 2;
    const mg = (at(1, 1) - at(1, -1) - at(-1, 1) + at(-1, -1)) / (4 * h ** 2);
    const determinant = mm * gg - mg ** 2;
    expect(seMu! / Math.sqrt(-gg / determinant)).toBeCloseTo(1, 3);
    expect(seGamma! / Math.sqrt(-mm / determinant)).toBeCloseTo(1, 3);
    expect(covariance!).toBeCloseTo(mg / determinant, 6);
  });

  it('does not care who comes first, nor about people who tasted nothing', () => {
    fc.assert(
      fc.property(people, fc.constantFrom(undefined, 1 / 3, 1 / 2), (rows, chance) => {
        const one = fit(rows, chance);
        // Where everybody is always or never right, gamma runs into its upper edge: the surface is flat and digits go there.
        const isSharp = one.gamma < 0.99;
        for (const other of [fit(rows.toReversed(), chance), fit([[0, 0], ...rows, [0, 0]], chance)]) {
          expect(other.logLik).toBeCloseTo(one.logLik, isSharp ? 9 : 7);
          expect(other.boundary).toBe(one.boundary);
          if (isSharp) expect(other.mu).toBeCloseTo(one.mu, 6);
          if (isSharp) expect(other.gamma).toBeCloseTo(one.gamma, 6);
        }
      }),
      { seed: 2, numRuns: 40 },
    );
  });

  it('turns round when right and wrong change places', () => {
    fc.assert(
      fc.property(people, (rows) => {
        const one = fit(rows);
        const other = fit(rows.map(([x, n]) => [n - x, n] as const));
        expect(other.logLik).toBeCloseTo(one.logLik, 8);
        if (one.gamma < 0.99) expect(other.mu).toBeCloseTo(1 - one.mu, 5);
      }),
      { seed: 3, numRuns: 40 },
    );
  });

  it('says the same in shapes, and tests by its own likelihoods', () => {
    const { mu, gamma, alpha, beta, pc, logLik, logLikBinomial, logLikGuessing, logLikWithoutCoefficients, lrOverdispersion, lrDifference, pOverdispersion, pOverdispersionChiSquare, pDifference } = betaBinomial(TRIANGLES, TRIANGLES.map(() => 8), { chance: 1 / 3 });
    expect(alpha! / (alpha! + beta!)).toBeCloseTo(mu, 10);
    expect(1 / (alpha! + beta! + 1)).toBeCloseTo(gamma, 10);
    expect(pc).toBeCloseTo(1 / 3 + (2 / 3) * mu, 12);
    expect(lrOverdispersion).toBeCloseTo(2 * (logLik - logLikBinomial), 9);
    expect(lrDifference).toBeCloseTo(2 * (logLik - logLikGuessing!), 9);
    expect(pOverdispersion).toBeCloseTo(pOverdispersionChiSquare / 2, 12);
    // Chi-square on two degrees of freedom is an exponential.
    expect(pDifference! / Math.exp(-lrDifference! / 2)).toBeCloseTo(1, 9);
    // 8 over x, one person at a time.
    const ways = [1, 8, 28, 56, 70, 56, 28, 8, 1];
    expect(logLik - logLikWithoutCoefficients).toBeCloseTo(TRIANGLES.reduce((sum, x) => sum + Math.log(ways[x]), 0), 8);
    const right = TRIANGLES.reduce((sum, x) => sum + x, 0);
    expect(logLikGuessing! - (logLik - logLikWithoutCoefficients)).toBeCloseTo(right * Math.log(1 / 3) + (240 - right) * Math.log(2 / 3), 8);
  });

  it('finds the people it was drawn from, to four standard errors', () => {
    const generator = xoroshiro128plus(41);
    const uniform = () => uniformInt(generator, 1, 999_999) / 1_000_000;
    // Beta(2, 3): a mean share of .4, gamma 1/6.
    const shares = Array.from({ length: 400 }, () => betaQuantile(uniform(), 2, 3));
    const correct = shares.map((share) => Array.from({ length: 10 }, () => uniform() < 1 / 3 + (2 / 3) * share).filter(Boolean).length);
    const found = betaBinomial(correct, correct.map(() => 10), { chance: 1 / 3 });
    expect(Math.abs(found.mu - 0.4)).toBeLessThan(4 * found.seMu!);
    expect(Math.abs(found.gamma - 1 / 6)).toBeLessThan(4 * found.seGamma!);
    expect(found.pDifference!).toBeLessThan(1e-6);
  });

  it('is the binomial where people are more alike than chance makes them', () => {
    const even = betaBinomial([4, 4, 4, 4, 4], [8, 8, 8, 8, 8]);
    expect(even).toMatchObject({ boundary: true, gamma: 0, mu: 0.5, seMu: null, seGamma: null, covariance: null, alpha: null, beta: null, lrOverdispersion: 0, pOverdispersionChiSquare: 1, logLikGuessing: null, lrDifference: null, pDifference: null });
    // All below chance: nobody can tell, and guessing explains everything.
    expect(betaBinomial([2, 2, 3, 2], [8, 8, 8, 8], { chance: 1 / 2 })).toMatchObject({ boundary: true, mu: 0, pc: 0.5, lrDifference: 0, pDifference: 1 });
  });

  it('holds where all or none are right', () => {
    expect(betaBinomial([8, 8, 8], [8, 8, 8], { chance: 1 / 3 })).toMatchObject({ boundary: true, mu: 1, pc: 1, logLik: 0 });
    expect(betaBinomial([0, 0, 0], [8, 8, 8])).toMatchObject({ boundary: true, mu: 0, logLik: 0 });
  });
});

describe('hostile input', () => {
  it.each<[string, number[], number[], number | undefined, StatsErrorCode]>([
    ['nobody', [], [], undefined, 'too_few'],
    ['one person', [3], [8], undefined, 'too_few'],
    ['one person who tasted', [3, 0], [8, 0], undefined, 'too_few'],
    ['lists of two lengths', [3, 4], [8], undefined, 'shape'],
    ['more right than answers', [3, 9], [8, 8], undefined, 'out_of_range'],
    ['a negative count', [3, -1], [8, 8], undefined, 'out_of_range'],
    ['half an answer', [3, 2.5], [8, 8], undefined, 'not_integer'],
    ['half a test', [3, 2], [8, 8.5], undefined, 'not_integer'],
    ['NaN', [3, NaN], [8, 8], undefined, 'not_finite'],
    ['an endless series', [3, 2], [8, Infinity], undefined, 'not_finite'],
    ['more tests than anyone takes', [3, 2], [8, 10_001], undefined, 'out_of_range'],
    ['nobody more than once', [1, 0, 1], [1, 1, 1], undefined, 'not_estimable'],
    ['a chance of 0', [3, 4], [8, 8], 0, 'out_of_range'],
    ['a chance of 1', [3, 4], [8, 8], 1, 'out_of_range'],
    ['a chance of NaN', [3, 4], [8, 8], NaN, 'not_finite'],
  ])('%s is refused', (_, correct, n, chance, code) => expectRefusal(() => betaBinomial(correct, n, { chance }), code));
});
