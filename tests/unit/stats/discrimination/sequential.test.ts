import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { CHANCE, sequentialLines, type SequentialPlan, sequentialTest, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

const patties: SequentialPlan = { alpha: 0.1, beta: 0.1, p0: 0.5, p1: 0.7 };

const plans = fc
  .record({ alpha: fc.double({ min: 0.001, max: 0.4, noNaN: true }), beta: fc.double({ min: 0.001, max: 0.4, noNaN: true }), p0: fc.double({ min: 0.05, max: 0.85, noNaN: true }), share: fc.double({ min: 0.1, max: 0.9, noNaN: true }) })
  .map(({ share, ...plan }): SequentialPlan => ({ ...plan, p1: plan.p0 + share * (1 - plan.p0) }));
const answers = fc.array(fc.boolean(), { maxLength: 80 });

/** Running totals of right answers, as the standard prints them, into single answers. */
const fromTotals = (totals: number[]): boolean[] => totals.map((total, i) => total > (i === 0 ? 0 : totals[i - 1]));

describe('the decision lines', () => {
  it('are Wald’s, by hand for even risks and odds', () => {
    // p0 = 1/2, p1 = 3/4: D = ln 3, slope = ln 2 / ln 3, intercepts ∓ ln 9 / ln 3 = ∓2 at risks of .1.
    const lines = sequentialLines({ alpha: 0.1, beta: 0.1, p0: 0.5, p1: 0.75 });
    expect(lines.slope).toBeCloseTo(Math.log(2) / Math.log(3), 12);
    expect(lines.upperIntercept).toBeCloseTo(2, 12);
    expect(lines.lowerIntercept).toBeCloseTo(-2, 12);
  });

  it('rise more steeply than guessing and less than the difference that matters', () => {
    fc.assert(
      fc.property(plans, (plan) => {
        const { slope, lowerIntercept, upperIntercept, expectedAnswers } = sequentialLines(plan);
        expect(slope).toBeGreaterThan(plan.p0);
        expect(slope).toBeLessThan(plan.p1);
        expect(lowerIntercept).toBeLessThan(0);
        expect(upperIntercept).toBeGreaterThan(0);
        expect(expectedAnswers.atP0).toBeGreaterThan(0);
        expect(expectedAnswers.atP1).toBeGreaterThan(0);
      }),
      { seed: 1 },
    );
  });

  it('move apart with less risk, and so does the number of answers grow', () => {
    fc.assert(
      fc.property(plans, (plan) => {
        const wide = sequentialLines({ ...plan, alpha: plan.alpha / 2, beta: plan.beta / 2 });
        const here = sequentialLines(plan);
        expect(wide.upperIntercept).toBeGreaterThan(here.upperIntercept);
        expect(wide.lowerIntercept).toBeLessThan(here.lowerIntercept);
        expect(wide.slope).toBeCloseTo(here.slope, 12);
        expect(wide.expectedAnswers.atP0).toBeGreaterThan(here.expectedAnswers.atP0);
        expect(wide.expectedAnswers.atP1).toBeGreaterThan(here.expectedAnswers.atP1);
      }),
      { seed: 2 },
    );
  });
});

describe('the sequential test', () => {
  it('keeps its risks in simulation, and needs about Wald’s number of answers', () => {
    const plan: SequentialPlan = { alpha: 0.05, beta: 0.1, p0: 1 / 3, p1: 0.6 };
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

  it('stops where ISO 16820 does in its example of meat patties', () => {
    // Example 2 as reprinted in GOST ISO 16820-2015; its α, β, p0, p1 from memory.
    const one = fromTotals([0, 0, 0, 1, 1, 2, 2, 3, 3, 4, 4]);
    const three = fromTotals([0, 1, 1, 2, 2, 3, 3, 4, 5, 6, 7, 7, 8, 9, 10, 11, 11, 11, 12, 13, 13, 13, 13, 14, 14, 15, 16, 17, 18, 19]);
    const five = fromTotals([1, 2, 3, 4, 4, 5, 6, 7, 7, 8, 9, 10]);
    expect(sequentialTest(one, patties)).toMatchObject({ decision: 'similar', answers: 11, correct: 4 });
    expect(sequentialTest(three, patties)).toMatchObject({ decision: 'continue', answers: 30, correct: 19 });
    expect(sequentialTest(five, patties)).toMatchObject({ decision: 'different', answers: 12, correct: 10 });
  });

  it('decides by the ratio of the two likelihoods', () => {
    fc.assert(
      fc.property(plans, answers, (plan, given) => {
        // Wald’s own form: multiply the odds answer by answer, stop outside B to A.
        let ratio = 1;
        let decision = 'continue';
        let taken = 0;
        let near = false;
        for (const right of given) {
          taken += 1;
          ratio *= right ? plan.p1 / plan.p0 : (1 - plan.p1) / (1 - plan.p0);
          const [above, below] = [ratio / ((1 - plan.beta) / plan.alpha), ratio / (plan.beta / (1 - plan.alpha))];
          near ||= Math.abs(above - 1) < 1e-9 || Math.abs(below - 1) < 1e-9;
          if (above >= 1) decision = 'different';
          else if (below <= 1) decision = 'similar';
          if (decision !== 'continue') break;
        }
        fc.pre(!near);
        expect(sequentialTest(given, plan)).toMatchObject({ decision, answers: taken });
      }),
      { seed: 3, numRuns: 300 },
    );
  });

  it('turns round when right and wrong, and the two risks, change places', () => {
    const opposite = { different: 'similar', similar: 'different', continue: 'continue' };
    fc.assert(
      fc.property(plans, answers, (plan, given) => {
        const one = sequentialTest(given, plan);
        const other = sequentialTest(given.map((right) => !right), { alpha: plan.beta, beta: plan.alpha, p0: 1 - plan.p1, p1: 1 - plan.p0 });
        expect(other.decision).toBe(opposite[one.decision]);
        expect(other.answers).toBe(one.answers);
        expect(other.correct).toBe(one.answers - one.correct);
      }),
      { seed: 4 },
    );
  });

  it('calls a clean run as soon as the line allows', () => {
    const plan = { alpha: 0.05, beta: 0.05, p0: CHANCE.triangle, p1: 2 / 3 };
    // Each right answer doubles the odds and each wrong one halves them; 19 times takes five.
    expect(sequentialTest(Array<boolean>(9).fill(true), plan)).toMatchObject({ decision: 'different', answers: 5, correct: 5 });
    expect(sequentialTest(Array<boolean>(9).fill(false), plan)).toMatchObject({ decision: 'similar', answers: 5, correct: 0 });
    expect(sequentialTest(Array<boolean>(4).fill(true), plan)).toMatchObject({ decision: 'continue', answers: 4 });
    expect(sequentialTest([], plan)).toMatchObject({ decision: 'continue', answers: 0, correct: 0, lines: sequentialLines(plan) });
  });
});

describe('hostile input', () => {
  it.each<[string, Partial<SequentialPlan>, StatsErrorCode]>([
    ['α of 0', { alpha: 0 }, 'out_of_range'],
    ['α of 1', { alpha: 1 }, 'out_of_range'],
    ['α of NaN', { alpha: NaN }, 'not_finite'],
    ['a negative β', { beta: -0.1 }, 'out_of_range'],
    ['β of 1', { beta: 1 }, 'out_of_range'],
    ['β of NaN', { beta: NaN }, 'not_finite'],
    ['p0 of 0', { p0: 0 }, 'out_of_range'],
    ['p1 of 1', { p1: 1 }, 'out_of_range'],
    ['an infinite p1', { p1: Infinity }, 'not_finite'],
    ['p1 equal to p0', { p1: 0.5 }, 'out_of_range'],
    ['p1 below p0', { p1: 0.4 }, 'out_of_range'],
    ['risks that add up to 1', { alpha: 0.5, beta: 0.5 }, 'out_of_range'],
  ])('%s is refused, lines and test alike', (_, spoiled, code) => {
    expectRefusal(() => sequentialLines({ ...patties, ...spoiled }), code);
    expectRefusal(() => sequentialTest([true], { ...patties, ...spoiled }), code);
  });

  it('an answer that is neither right nor wrong is refused', () => {
    for (const junk of [1, null, undefined, 'true']) expectRefusal(() => sequentialTest([true, junk as unknown as boolean], patties), 'shape');
  });
});
