import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bestEstimateThreshold, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

/** + right, − missed. */
const series = (text: string): boolean[] => [...text].map((sign) => sign === '+');

const table = fc
  .tuple(fc.integer({ min: 2, max: 7 }), fc.integer({ min: 1, max: 12 }))
  .chain(([steps, people]) =>
    fc.record({
      ratios: fc.array(fc.double({ min: 1.2, max: 5, noNaN: true }), { minLength: steps, maxLength: steps }),
      correct: fc.array(fc.array(fc.boolean(), { minLength: steps, maxLength: steps }), { minLength: people, maxLength: people }),
    }),
  )
  .map(({ ratios, correct }) => {
    let at = 0.01;
    return { concentrations: ratios.map((ratio) => (at *= ratio)), correct };
  });

describe('best-estimate thresholds (ASTM E679, the rule from memory)', () => {
  it('lie between the last miss and the next step, half a step outside at the ends', () => {
    const result = bestEstimateThreshold([1, 2, 4, 8, 16, 32], ['--++++', '-+-+++', '++++++', '----++', '------', '+-++++'].map(series));
    const root = Math.SQRT2;
    [2 * root, 4 * root, 1 / root, 8 * root, 32 * root, 2 * root].forEach((value, i) => expect(result.individual[i]).toBeCloseTo(value, 10));
    // Steps of log2 from 1: 1.5, 2.5, −.5, 3.5, 5.5, 1.5, which add up to 14.
    expect(result.group).toBeCloseTo(2 ** (14 / 6), 10);
    const logs = [1.5, 2.5, -0.5, 3.5, 5.5, 1.5];
    const squares = logs.reduce((sum, value) => sum + (value - 14 / 6) ** 2, 0);
    expect(result.log10Sd).toBeCloseTo(Math.sqrt(squares / 5) * Math.log10(2), 10);
    expect(result).toMatchObject({ belowRange: 1, aboveRange: 1 });
  });

  it('count a lucky guess below a later miss for nothing', () => {
    expect(bestEstimateThreshold([1, 3, 9, 27], [series('++-+')]).group).toBeCloseTo(bestEstimateThreshold([1, 3, 9, 27], [series('---+')]).group, 12);
  });

  it('use the nearest step at either end when the steps differ', () => {
    const { individual } = bestEstimateThreshold([1, 4, 100], [series('+++'), series('++-')]);
    expect(individual[0]).toBeCloseTo(1 / 2, 12);
    expect(individual[1]).toBeCloseTo(100 * 5, 9);
  });

  it('go with the unit, and stay within half a step of the series', () => {
    fc.assert(
      fc.property(table, fc.double({ min: 0.001, max: 1000, noNaN: true }), ({ concentrations, correct }, unit) => {
        const here = bestEstimateThreshold(concentrations, correct);
        const there = bestEstimateThreshold(concentrations.map((value) => value * unit), correct);
        expect(there.group / unit / here.group).toBeCloseTo(1, 9);
        if (here.log10Sd !== null) expect(there.log10Sd).toBeCloseTo(here.log10Sd, 9);
        const [first, second] = concentrations;
        const [previous, last] = concentrations.slice(-2);
        for (const value of [...here.individual, here.group]) {
          expect(value).toBeGreaterThanOrEqual(first * Math.sqrt(first / second) * (1 - 1e-9));
          expect(value).toBeLessThanOrEqual(last * Math.sqrt(last / previous) * (1 + 1e-9));
        }
      }),
      { seed: 1 },
    );
  });

  it('never rise when one more answer is right', () => {
    fc.assert(
      fc.property(table, fc.nat(), fc.nat(), ({ concentrations, correct }, person, step) => {
        const better = correct.map((row) => [...row]);
        better[person % correct.length][step % concentrations.length] = true;
        expect(bestEstimateThreshold(concentrations, better).group).toBeLessThanOrEqual(bestEstimateThreshold(concentrations, correct).group * (1 + 1e-12));
      }),
      { seed: 2 },
    );
  });

  it('do not care in which order people come', () => {
    fc.assert(
      fc.property(table, ({ concentrations, correct }) => {
        expect(bestEstimateThreshold(concentrations, correct.toReversed()).group / bestEstimateThreshold(concentrations, correct).group).toBeCloseTo(1, 12);
      }),
      { seed: 3 },
    );
  });

  it('have no spread for one person', () => {
    expect(bestEstimateThreshold([1, 2], [series('-+')])).toMatchObject({ log10Sd: null, belowRange: 0, aboveRange: 0 });
  });

  it.each<[string, number[], boolean[][], StatsErrorCode]>([
    ['nobody', [1, 2], [], 'empty'],
    ['no concentrations', [], [[]], 'too_few'],
    ['one concentration', [1], [[true]], 'too_few'],
    ['a series that stands still', [1, 1], [[true, true]], 'shape'],
    ['a series that falls', [2, 1], [[true, true]], 'shape'],
    ['a concentration of 0', [0, 1], [[true, true]], 'out_of_range'],
    ['a negative concentration', [-1, 1], [[true, true]], 'out_of_range'],
    ['a concentration of NaN', [1, NaN], [[true, true]], 'not_finite'],
    ['an infinite concentration', [1, Infinity], [[true, true]], 'not_finite'],
    ['a row too short', [1, 2], [[true, true], [true]], 'shape'],
    ['a row too long', [1, 2], [[true, true, true]], 'shape'],
  ])('refuse %s', (_, concentrations, correct, code) => expectRefusal(() => bestEstimateThreshold(concentrations, correct), code));
});
