import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  betaCdf,
  betaQuantile,
  betaSf,
  binomialCdf,
  binomialPmf,
  binomialSf,
  chiSquareCdf,
  chiSquareQuantile,
  chiSquareSf,
  fCdf,
  fQuantile,
  fSf,
  gaussLegendre,
  logBeta,
  logChoose,
  logGamma,
  normalCdf,
  normalLogCdf,
  normalPdf,
  normalQuantile,
  normalSf,
  tCdf,
  tQuantile,
  tSf,
  tTwoSided,
} from '@/stats';

const close = (actual: number, expected: number, relative = 1e-12) => expect(Math.abs(actual / expected - 1)).toBeLessThan(relative);

describe('tails against R 4.2', () => {
  it.each([
    ['pt(-3.2, 7)', tCdf(-3.2, 7), 0.00753290567124465],
    ['pt(12, 2.5, lower = FALSE)', tSf(12, 2.5), 0.00141810751503916],
    ['2 * pt(-4, 1)', tTwoSided(4, 1), 0.155958260754739],
    ['pf(8.5, 3, 17, lower = FALSE)', fSf(8.5, 3, 17), 0.00113955744773907],
    ['pf(0.2, 4, 9)', fCdf(0.2, 4, 9), 0.0679211046824697],
    ['pchisq(40, 11)', chiSquareCdf(40, 11), 0.999964224875472],
    ['pchisq(40, 11, lower = FALSE)', chiSquareSf(40, 11), 3.57751245276552e-5],
    ['pbinom(7, 30, 1/3)', binomialCdf(7, 30, 1 / 3), 0.166782895504943],
    ['pbinom(14, 30, 1/3, lower = FALSE)', binomialSf(15, 30, 1 / 3), 0.0434822757279195],
    ['dbinom(10, 30, 1/3)', binomialPmf(10, 30, 1 / 3), 0.153015243192491],
    ['dnorm(1.7)', normalPdf(1.7), 0.0940490773768869],
    ['pnorm(-30, log.p = TRUE)', normalLogCdf(-30), -454.321243956343],
    ['lchoose(200, 66)', logChoose(200, 66), 124.020732181847],
    ['lbeta(3.5, 80)', logBeta(3.5, 80), -14.1901357231739],
  ])('%s', (_, actual, expected) => close(actual, expected));
});

describe('tails', () => {
  const df = fc.double({ min: 1, max: 300, noNaN: true });
  const x = fc.double({ min: 0.01, max: 40, noNaN: true });

  it('of both sides make 1', () => {
    fc.assert(
      fc.property(x, df, df, (value, a, b) => {
        expect(fCdf(value, a, b) + fSf(value, a, b)).toBeCloseTo(1, 12);
        expect(chiSquareCdf(value, a) + chiSquareSf(value, a)).toBeCloseTo(1, 12);
        expect(tCdf(value, a) + tSf(value, a)).toBeCloseTo(1, 12);
        expect(normalCdf(value) + normalSf(value)).toBeCloseTo(1, 12);
        expect(betaCdf(value / 41, a, b) + betaSf(value / 41, a, b)).toBeCloseTo(1, 12);
      }),
      { seed: 1 },
    );
  });

  it('are linked: t² is F on 1, F is a beta, a normal squared is chi-square on 1', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 8, noNaN: true }), df, df, (value, a, b) => {
        close(tTwoSided(value, b), fSf(value * value, 1, b), 1e-9);
        close(fSf(value, a, b), betaCdf(b / (b + a * value), b / 2, a / 2), 1e-9);
        close(2 * normalSf(value), chiSquareSf(value * value, 1), 1e-9);
      }),
      { seed: 2 },
    );
  });

  it('turn round by their quantiles', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 0.999, noNaN: true }), df, df, (p, a, b) => {
        close(fCdf(fQuantile(p, a, b), a, b), p, 1e-9);
        close(tCdf(tQuantile(p, a), a), p, 1e-9);
        close(chiSquareCdf(chiSquareQuantile(p, a), a), p, 1e-9);
        close(betaCdf(betaQuantile(p, a, b), a, b), p, 1e-9);
        close(normalCdf(normalQuantile(p)), p, 1e-12);
      }),
      { seed: 3 },
    );
  });

  it('of counts are sums of the single probabilities', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), fc.double({ min: 0.01, max: 0.99, noNaN: true }), fc.nat(60), (n, p, k) => {
        const at = Math.min(k, n);
        let sum = 0;
        for (let i = 0; i <= at; i += 1) sum += binomialPmf(i, n, p);
        expect(binomialCdf(at, n, p)).toBeCloseTo(sum, 12);
        expect(binomialSf(at + 1, n, p)).toBeCloseTo(1 - sum, 12);
      }),
      { seed: 4 },
    );
  });
});

describe('quadrature', () => {
  it('is exact for polynomials up to degree 2n − 1', () => {
    for (const n of [1, 2, 5, 20]) {
      const { nodes, weights } = gaussLegendre(n);
      for (let degree = 0; degree < 2 * n; degree += 1) {
        let sum = 0;
        nodes.forEach((node, i) => (sum += weights[i] * node ** degree));
        expect(sum).toBeCloseTo(degree % 2 === 0 ? 2 / (degree + 1) : 0, 12);
      }
    }
  });

  it('knows the factorials', () => close(Math.exp(logGamma(11)), 3_628_800));
});
