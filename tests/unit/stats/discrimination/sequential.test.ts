import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { bestEstimateThreshold, sequentialLines, sequentialTest, StatsError } from '@/stats';

const plan = { alpha: 0.05, beta: 0.1, p0: 1 / 3, p1: 0.6 };

describe('the sequential test', () => {
  it('keeps its risks in simulation, and needs about Wald’s number of answers', () => {
    const generator = xoroshiro128plus(3);
    const runs = 4000;
    const simulate = (pc: number) => {
      let different = 0;
      let taken = 0;
      for (let run = 0; run < runs; run += 1) {
        const answers = Array.from({ length: 600 }, () => uniformInt(generator, 0, 999_999) < 1_000_000 * pc);
        const result = sequentialTest(answers, plan);
        if (result.decision === 'different') different += 1;
        taken += result.answers / runs;
      }
      return { different: different / runs, taken };
    };
    const alike = simulate(plan.p0);
    const apart = simulate(plan.p1);
    // Wald's bound on the real risk is α / (1 − β); overshoot keeps it below α as a rule.
    expect(alike.different).toBeLessThan(plan.alpha / (1 - plan.beta));
    expect(1 - apart.different).toBeLessThan(plan.beta / (1 - plan.alpha));
    const { expectedAnswers } = sequentialLines(plan);
    expect(alike.taken / expectedAnswers.atP0).toBeGreaterThan(0.95);
    expect(alike.taken / expectedAnswers.atP0).toBeLessThan(1.4);
    expect(apart.taken / expectedAnswers.atP1).toBeGreaterThan(0.95);
    expect(apart.taken / expectedAnswers.atP1).toBeLessThan(1.4);
  });

  it('stops where the count first meets a line, and looks no further', () => {
    const { slope, lowerIntercept, upperIntercept } = sequentialLines(plan);
    fc.assert(
      fc.property(fc.array(fc.boolean(), { minLength: 1, maxLength: 60 }), (answers) => {
        let right = 0;
        const stop = answers.findIndex((answer, i) => {
          if (answer) right += 1;
          return right >= upperIntercept + slope * (i + 1) || right <= lowerIntercept + slope * (i + 1);
        });
        const result = sequentialTest(answers, plan);
        expect(result.decision === 'continue').toBe(stop < 0);
        if (stop >= 0) expect(result.answers).toBe(stop + 1);
        expect(sequentialTest([...answers, true, false, true], plan).decision === result.decision || result.decision === 'continue').toBe(true);
      }),
      { seed: 1 },
    );
  });

  it('goes on without answers', () => expect(sequentialTest([], plan).decision).toBe('continue'));

  it.each([
    ['p1 not above p0', { ...plan, p1: 0.3 }],
    ['risks that make 1', { ...plan, alpha: 0.5, beta: 0.5 }],
    ['a risk of 0', { ...plan, alpha: 0 }],
    ['NaN', { ...plan, p0: NaN }],
  ])('refuses %s', (_, bad) => expect(() => sequentialLines(bad)).toThrow(StatsError));
});

describe('best-estimate thresholds', () => {
  it('do not care in which order people come', () => {
    const series = [1, 2, 4, 8];
    const people = [[false, true, true, true], [false, false, false, true], [true, true, true, true]];
    expect(bestEstimateThreshold(series, people).group).toBeCloseTo(bestEstimateThreshold(series, people.toReversed()).group, 12);
  });

  it.each([
    ['a series that does not ascend', () => bestEstimateThreshold([1, 1, 2], [[true, true, true]])],
    ['nobody', () => bestEstimateThreshold([1, 2], [])],
    ['a row too short', () => bestEstimateThreshold([1, 2, 4], [[true, true]])],
  ])('refuse %s', (_, work) => expect(work).toThrow(StatsError));
});
