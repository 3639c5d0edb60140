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
  type StatsErrorCode,
} from '@/stats';
import { expectRefusal } from './support/refusal';

type Work = (...values: number[]) => unknown;

/** Every distribution function with arguments it accepts; the tables below spoil one argument at a time. */
const CONTINUOUS: [string, Work, number[]][] = [
  ['normalPdf', normalPdf, [1]],
  ['normalCdf', normalCdf, [1]],
  ['normalSf', normalSf, [1]],
  ['normalLogCdf', normalLogCdf, [1]],
  ['tCdf', tCdf, [1, 5]],
  ['tSf', tSf, [1, 5]],
  ['tTwoSided', tTwoSided, [1, 5]],
  ['fCdf', fCdf, [1, 5, 6]],
  ['fSf', fSf, [1, 5, 6]],
  ['chiSquareCdf', chiSquareCdf, [1, 5]],
  ['chiSquareSf', chiSquareSf, [1, 5]],
  ['betaCdf', betaCdf, [0.5, 2, 3]],
  ['betaSf', betaSf, [0.5, 2, 3]],
];
const QUANTILES: [string, Work, number[]][] = [
  ['normalQuantile', normalQuantile, [0.4]],
  ['tQuantile', tQuantile, [0.4, 5]],
  ['fQuantile', fQuantile, [0.4, 5, 6]],
  ['chiSquareQuantile', chiSquareQuantile, [0.4, 5]],
  ['betaQuantile', betaQuantile, [0.4, 2, 3]],
];
const COUNTS: [string, Work, number[]][] = [
  ['binomialPmf', binomialPmf, [2, 5, 0.5]],
  ['binomialSf', binomialSf, [2, 5, 0.5]],
  ['binomialCdf', binomialCdf, [2, 5, 0.5]],
];

const spoil = (values: number[], place: number, value: number) => values.map((good, i) => (i === place ? value : good));

describe.each([...CONTINUOUS, ...QUANTILES, ...COUNTS])('%s', (_, work, good) => {
  it('answers for good arguments and refuses NaN in the place of any', () => {
    expect(work(...good)).toEqual(expect.any(Number));
    good.forEach((__, place) => expectRefusal(() => work(...spoil(good, place, NaN)), 'not_finite'));
  });

  it('refuses what a read past the end of an array gives', () => {
    good.forEach((__, place) => expectRefusal(() => work(...spoil(good, place, undefined as unknown as number)), 'not_finite'));
  });
});

describe.each([...CONTINUOUS, ...QUANTILES].filter(([, , good]) => good.length > 1))('%s', (_, work, good) => {
  it('refuses a parameter of 0 or below', () => {
    for (let place = 1; place < good.length; place += 1) {
      for (const value of [0, -1, -Infinity]) {
        // An infinite parameter may be refused for being infinite or for being negative.
        if (value === -Infinity) expect(() => work(...spoil(good, place, value))).toThrow(expect.objectContaining({ name: 'StatsError' }));
        else expectRefusal(() => work(...spoil(good, place, value)), 'out_of_range');
      }
    }
  });
});

describe.each(QUANTILES)('%s', (_, work, good) => {
  it('refuses what is no probability', () => {
    for (const p of [-0.1, 1.1, -1e-300, 1 + 1e-15]) expectRefusal(() => work(...spoil(good, 0, p)), 'out_of_range');
    for (const p of [Infinity, -Infinity]) expectRefusal(() => work(...spoil(good, 0, p)), 'not_finite');
  });
});

describe.each(COUNTS)('%s', (_, work, good) => {
  it.each<[string, number, number, StatsErrorCode]>([
    ['half a right answer', 0, 2.5, 'not_integer'],
    ['infinitely many right', 0, Infinity, 'not_finite'],
    ['half an answer', 1, 4.5, 'not_integer'],
    ['a negative panel', 1, -3, 'out_of_range'],
    ['an infinite panel', 1, Infinity, 'not_finite'],
    ['a negative probability', 2, -0.1, 'out_of_range'],
    ['a probability above 1', 2, 1.5, 'out_of_range'],
  ])('refuses %s', (__, place, value, code) => expectRefusal(() => work(...spoil(good, place, value)), code));
});

describe('chi-square and the beta', () => {
  it('have no infinite parameters', () => {
    for (const work of [() => chiSquareSf(1, Infinity), () => chiSquareQuantile(0.5, Infinity), () => betaCdf(0.5, Infinity, 1), () => betaQuantile(0.5, 1, Infinity)]) expectRefusal(work, 'not_finite');
  });
});

it.each<[string, () => unknown, StatsErrorCode]>([
  ['logGamma(0)', () => logGamma(0), 'out_of_range'],
  ['logGamma(-1.5)', () => logGamma(-1.5), 'out_of_range'],
  ['logGamma(NaN)', () => logGamma(NaN), 'not_finite'],
  ['logBeta(1, 0)', () => logBeta(1, 0), 'out_of_range'],
  ['logBeta(Infinity, 1)', () => logBeta(Infinity, 1), 'not_finite'],
  ['logChoose(5, 6)', () => logChoose(5, 6), 'out_of_range'],
  ['logChoose(5, -1)', () => logChoose(5, -1), 'out_of_range'],
  ['logChoose(5.5, 1)', () => logChoose(5.5, 1), 'not_integer'],
  ['logChoose(NaN, 1)', () => logChoose(NaN, 1), 'not_finite'],
  ['gaussLegendre(2.5)', () => gaussLegendre(2.5), 'not_integer'],
  ['gaussLegendre(513)', () => gaussLegendre(513), 'out_of_range'],
  ['gaussLegendre(NaN)', () => gaussLegendre(NaN), 'not_finite'],
])('%s is refused', (_, work, code) => expectRefusal(work, code));
