import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { betaCdf, betaQuantile, chiSquareQuantile, chiSquareSf, fCdf, fQuantile, logBeta, logChoose, logGamma, normalCdf, normalQuantile, tQuantile, tTwoSided } from '@/stats';

const close = (actual: number, expected: number, relative = 1e-11) => expect(Math.abs(actual / expected - 1)).toBeLessThan(relative);

describe('quantiles against R 4.2', () => {
  it.each([
    ['qnorm(0.975)', normalQuantile(0.975), 1.95996398454005],
    ['qnorm(1e-10)', normalQuantile(1e-10), -6.36134090240406],
    ['qnorm(1e-300)', normalQuantile(1e-300), -37.0470962993612],
    ['qt(0.975, 7)', tQuantile(0.975, 7), 2.36462425159278],
    ['qt(0.995, 1)', tQuantile(0.995, 1), 63.6567411628715],
    ['qt(1e-8, 3.3)', tQuantile(1e-8, 3.3), -297.963303522805],
    ['qt(0.9, 400)', tQuantile(0.9, 400), 1.2836715995703],
    ['qchisq(0.95, 11)', chiSquareQuantile(0.95, 11), 19.6751375726825],
    ['qchisq(1e-6, 4)', chiSquareQuantile(1e-6, 4), 0.00282976132295869],
    ['qchisq(0.999, 250)', chiSquareQuantile(0.999, 250), 324.832436568363],
    ['qf(0.95, 3, 17)', fQuantile(0.95, 3, 17), 3.19677684094334],
    ['qf(0.01, 4, 9)', fQuantile(0.01, 4, 9), 0.068216855716714],
    ['qf(0.999, 2.5, 60)', fQuantile(0.999, 2.5, 60), 6.82754791605057],
    ['qbeta(0.025, 13, 12)', betaQuantile(0.025, 13, 12), 0.328208075695178],
    ['qbeta(0.5, 0.5, 2)', betaQuantile(0.5, 0.5, 2), 0.120614758428183],
    ['qbeta(0.975, 100, 300)', betaQuantile(0.975, 100, 300), 0.293530601081301],
  ])('%s', (_, actual, expected) => close(actual, expected));
});

describe('quantiles', () => {
  const p = fc.double({ min: 0.001, max: 0.999, noNaN: true });
  const df = fc.double({ min: 1, max: 300, noNaN: true });

  it('give back the value whose probability was taken', () => {
    fc.assert(
      fc.property(fc.double({ min: -5, max: 5, noNaN: true }), fc.double({ min: 0.02, max: 6, noNaN: true }), df, df, (z, f, a, b) => {
        expect(normalQuantile(normalCdf(z))).toBeCloseTo(z, 8);
        const below = fCdf(f, a, b);
        // Close to 1 a probability has too few digits left to tell two values apart.
        fc.pre(below > 1e-200 && below < 1 - 1e-6);
        close(fQuantile(below, a, b), f, 1e-7);
        const share = f / (f + 1);
        const beta = betaCdf(share, a, b);
        fc.pre(beta > 1e-200 && beta < 1 - 1e-6);
        close(betaQuantile(beta, a, b), share, 1e-7);
      }),
      { seed: 1 },
    );
  });

  it('rise with p', () => {
    fc.assert(
      fc.property(p, df, df, (at, a, b) => {
        const more = at + (1 - at) / 100;
        expect(normalQuantile(more)).toBeGreaterThan(normalQuantile(at));
        expect(tQuantile(more, a)).toBeGreaterThan(tQuantile(at, a));
        expect(chiSquareQuantile(more, a)).toBeGreaterThan(chiSquareQuantile(at, a));
        expect(fQuantile(more, a, b)).toBeGreaterThan(fQuantile(at, a, b));
        expect(betaQuantile(more, a, b)).toBeGreaterThan(betaQuantile(at, a, b));
      }),
      { seed: 2 },
    );
  });

  it('mirror: t and normal about 0, the beta with its shapes, F with its degrees of freedom', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 0.49, noNaN: true }), df, df, (tail, a, b) => {
        close(tQuantile(1 - tail, a), -tQuantile(tail, a), 1e-9);
        close(normalQuantile(1 - tail), -normalQuantile(tail), 1e-9);
        close(betaQuantile(1 - tail, b, a), 1 - betaQuantile(tail, a, b), 1e-9);
        close(fQuantile(1 - tail, b, a), 1 / fQuantile(tail, a, b), 1e-9);
        // The quantile for both sides is the one that leaves half of the risk on each.
        close(tTwoSided(tQuantile(tail / 2, a), a), tail, 1e-9);
      }),
      { seed: 3 },
    );
  });

  it('are the ends of the range at 0 and 1', () => {
    expect([normalQuantile(0), normalQuantile(0.5), normalQuantile(1)]).toEqual([-Infinity, 0, Infinity]);
    expect([tQuantile(0, 4), tQuantile(0.5, 4), tQuantile(1, 4)]).toEqual([-Infinity, 0, Infinity]);
    expect([chiSquareQuantile(0, 4), chiSquareQuantile(1, 4)]).toEqual([0, Infinity]);
    expect([fQuantile(0, 4, 5), fQuantile(1, 4, 5)]).toEqual([0, Infinity]);
    expect([betaQuantile(0, 4, 5), betaQuantile(1, 4, 5)]).toEqual([0, 1]);
  });

  it('meet their limits at infinitely many degrees of freedom', () => {
    close(tQuantile(0.975, Infinity), 1.95996398454005);
    close(fQuantile(0.95, 5, Infinity) * 5, chiSquareQuantile(0.95, 5));
    // F on (∞, df) is df over a chi-square, so its upper limit is the lower one of the chi-square.
    const q = fQuantile(0.95, Infinity, 9);
    expect(chiSquareSf(9 / q, 9)).toBeCloseTo(0.95, 10);
  });

  it('are not muddled by the answers F keeps', () => {
    const first = fQuantile(0.95, 3, 40);
    // More questions than are kept, among them ones whose numbers would run together without a sign between them.
    for (let i = 1; i <= 300; i += 1) fQuantile(0.95, 3, i);
    expect(fQuantile(0.95, 3, 40)).toBe(first);
    expect(fQuantile(0.95, 34, 0.5)).not.toBe(fQuantile(0.95, 3, 40.5));
  });
});

describe('logarithms of counts', () => {
  it.each([
    ['lgamma(0.5)', logGamma(0.5), 0.5723649429247],
    ['lgamma(171.5)', logGamma(171.5), 709.143163030928],
    ['lgamma(1e-5)', logGamma(1e-5), 11.5129196928958],
    ['lbeta(1e-3, 2e-3)', logBeta(1e-3, 2e-3), 7.31321710441724],
    ['lbeta(1e4, 3)', logBeta(1e4, 3), -26.9381739103716],
    ['lchoose(1e6, 3)', logChoose(1e6, 3), 39.6547692046623],
    ['lchoose(60, 30)', logChoose(60, 30), 39.3117007260113],
  ])('%s in R 4.2', (_, actual, expected) => close(actual, expected, 1e-12));

  it('are Pascal’s triangle', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 900 }), fc.nat(900), (n, any) => {
        const k = 1 + (any % (n - 1));
        const sum = Math.exp(logChoose(n - 1, k - 1) - logChoose(n, k)) + Math.exp(logChoose(n - 1, k) - logChoose(n, k));
        expect(sum).toBeCloseTo(1, 11);
        expect(logChoose(n, k)).toBeCloseTo(logChoose(n, n - k), 10);
      }),
      { seed: 4 },
    );
    expect(logChoose(7, 0)).toBe(0);
    expect(logChoose(7, 7)).toBe(0);
  });

  it('grow by the step of the gamma function', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 500, noNaN: true }), (x) => {
        expect(logGamma(x + 1)).toBeCloseTo(logGamma(x) + Math.log(x), 9);
        expect(logBeta(x, 3)).toBeCloseTo(Math.log(2 / (x * (x + 1) * (x + 2))), 9);
      }),
      { seed: 5 },
    );
  });
});
