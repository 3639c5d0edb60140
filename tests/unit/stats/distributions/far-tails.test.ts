import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { betaCdf, betaSf, binomialCdf, binomialPmf, binomialSf, chiSquareCdf, chiSquareSf, fCdf, fSf, normalCdf, normalLogCdf, normalSf, tCdf, tSf, tTwoSided } from '@/stats';

/** Relative, since an absolute tolerance would pass any tail that is 0. */
const close = (actual: number, expected: number, relative = 1e-11) => expect(Math.abs(actual / expected - 1)).toBeLessThan(relative);

describe('tails too small for 1 − cdf, against R 4.2', () => {
  it.each([
    ['pnorm(-37.5)', normalCdf(-37.5), 4.60535300958196e-308],
    ['pnorm(-8.3)', normalSf(8.3), 5.20556974489026e-17],
    ['pnorm(6, lower.tail = FALSE)', normalSf(6), 9.86587645037698e-10],
    ['pnorm(-200, log.p = TRUE)', normalLogCdf(-200), -20006.2172808982],
    ['pnorm(3, log.p = TRUE)', normalLogCdf(3), -0.00135080996474819],
    ['pt(-40, 5)', tCdf(-40, 5), 9.20598108588648e-8],
    ['pt(-150, 12)', tCdf(-150, 12), 2.58811911965427e-21],
    ['pt(9, 0.7, lower.tail = FALSE)', tSf(9, 0.7), 0.0666388803218355],
    ['pt(-7, 250.5)', tCdf(-7, 250.5), 1.16882273949457e-11],
    ['pf(900, 2, 30, lower.tail = FALSE)', fSf(900, 2, 30), 1.65978744375569e-27],
    ['pf(1e-4, 12, 8)', fCdf(1e-4, 12, 8), 9.55583200068182e-22],
    ['pf(25, 6, 400, lower.tail = FALSE)', fSf(25, 6, 400), 3.38810173756236e-25],
    ['pchisq(900, 20, lower.tail = FALSE)', chiSquareSf(900, 20), 7.85935043969591e-178],
    ['pchisq(0.01, 9)', chiSquareCdf(0.01, 9), 8.40875536938891e-13],
    ['pchisq(600, 300, lower.tail = FALSE)', chiSquareSf(600, 300), 3.29083661361717e-22],
    ['pchisq(3.5, 0.4, lower.tail = FALSE)', chiSquareSf(3.5, 0.4), 0.0180670556500592],
    ['pbeta(0.001, 8, 3)', betaCdf(0.001, 8, 3), 4.49200360000002e-23],
    ['pbeta(0.999, 4, 60, lower.tail = FALSE)', betaSf(0.999, 4, 60), 3.95939352521818e-176],
    ['pbeta(0.02, 0.3, 0.6)', betaCdf(0.02, 0.3, 0.6), 0.247726364177916],
    ['pbinom(179, 200, 1/3, lower.tail = FALSE)', binomialSf(180, 200, 1 / 3), 6.74128408015589e-63],
    ['pbinom(5, 300, 1/2)', binomialCdf(5, 300, 1 / 2), 9.7779956846131e-81],
    ['pbinom(9999, 30000, 1/3)', binomialCdf(9999, 30_000, 1 / 3), 0.497828446350117],
    ['dbinom(0, 500, 1/10)', binomialPmf(0, 500, 1 / 10), 1.32207081948082e-23],
    ['dbinom(250, 1000, 1/3)', binomialPmf(250, 1000, 1 / 3), 2.16045347278272e-9],
    ['dbinom(4999, 10000, 1/2)', binomialPmf(4999, 10_000, 1 / 2), 0.0079770507292363],
  ])('%s', (_, actual, expected) => close(actual, expected));
});

describe('closed forms', () => {
  const x = fc.double({ min: 0.01, max: 60, noNaN: true });

  it('of t on one and two degrees of freedom', () => {
    fc.assert(
      fc.property(x, (t) => {
        // Cauchy: P(T > t) = arctan(1/t)/π for t > 0.
        close(tSf(t, 1), Math.atan2(1, t) / Math.PI);
        // P(T > t) = (1 − t/√(2 + t²))/2, written without its cancellation.
        const root = Math.sqrt(2 + t * t);
        close(tSf(t, 2), 1 / (root * (root + t)));
      }),
      { seed: 1 },
    );
  });

  it('of chi-square on two and four, of F on two and any', () => {
    fc.assert(
      fc.property(x, fc.double({ min: 1, max: 200, noNaN: true }), (value, df) => {
        close(chiSquareSf(value, 2), Math.exp(-value / 2));
        close(chiSquareSf(value, 4), Math.exp(-value / 2) * (1 + value / 2));
        close(fSf(value, 2, df), Math.exp((-df / 2) * Math.log1p((2 * value) / df)));
      }),
      { seed: 2 },
    );
  });

  it('of the beta with one shape of 1', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 0.999, noNaN: true }), fc.double({ min: 0.1, max: 90, noNaN: true }), (value, shape) => {
        close(betaCdf(value, shape, 1), value ** shape);
        close(betaSf(value, 1, shape), (1 - value) ** shape);
      }),
      { seed: 3 },
    );
  });
});

describe('the ends', () => {
  it('hold 0 and 1 themselves, not something near them', () => {
    expect([normalSf(Infinity), normalSf(-Infinity), normalLogCdf(-Infinity)]).toEqual([0, 1, -Infinity]);
    expect([tSf(Infinity, 3), tSf(-Infinity, 3), tTwoSided(-Infinity, 3), tTwoSided(0, 3)]).toEqual([0, 1, 0, 1]);
    expect([fSf(Infinity, 2, 3), fSf(0, 2, 3), fSf(-1, 2, 3), fCdf(-1, 2, 3)]).toEqual([0, 1, 1, 0]);
    expect([chiSquareSf(Infinity, 3), chiSquareSf(-2, 3), chiSquareCdf(0, 3)]).toEqual([0, 1, 0]);
    expect([betaCdf(-1, 2, 3), betaCdf(2, 2, 3), betaSf(0, 2, 3), betaSf(1, 2, 3)]).toEqual([0, 1, 1, 0]);
    expect([binomialSf(0, 5, 0.3), binomialSf(6, 5, 0.3), binomialCdf(-1, 5, 0.3), binomialCdf(5, 5, 0.3)]).toEqual([1, 0, 0, 1]);
  });

  it('keep the log of the normal tail finite where the tail itself is 0', () => {
    expect(normalCdf(-45)).toBe(0);
    // Mills' ratio lies between 1/z − 1/z³ and 1/z.
    const leading = -0.5 * 45 ** 2 - 0.5 * Math.log(2 * Math.PI) - Math.log(45);
    expect(normalLogCdf(-45)).toBeLessThan(leading);
    expect(normalLogCdf(-45)).toBeGreaterThan(leading + Math.log1p(-1 / 45 ** 2));
  });

  it('of degrees of freedom are the limiting distributions', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 6, noNaN: true }), fc.integer({ min: 1, max: 40 }), (value, df) => {
        close(tSf(value, Infinity), normalSf(value));
        close(fSf(value, df, Infinity), chiSquareSf(df * value, df));
        close(fSf(value, Infinity, df), chiSquareCdf(df / value, df));
        // Near the limit the tail must be near its limit too.
        close(tSf(value, 1e9), normalSf(value), 1e-5);
        close(fSf(value, df, 1e9), chiSquareSf(df * value, df), 1e-4);
      }),
      { seed: 4 },
    );
  });
});
