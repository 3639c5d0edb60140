import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialPmf, binomialSf, clopperPearson, distinguishers, normalQuantile, type Limits, type StatsErrorCode } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

const KINDS = ['exact', 'wilson', 'normal'] as const;
const outcome = fc.integer({ min: 1, max: 150 }).chain((n) => fc.record({ n: fc.constant(n), correct: fc.integer({ min: 0, max: n }) }));
const chance = fc.constantFrom(1 / 2, 1 / 3, 1 / 10);
const level = fc.double({ min: 0.5, max: 0.999, noNaN: true });

describe('limits of the proportion correct', () => {
  it.each([
    // Newcombe (1998) Stat. Med. 17:857, table I, from memory to four digits; the rest by R 4.2:
    // binom.test(x, n)$conf.int and prop.test(x, n, correct = FALSE)$conf.int
    [81, 263, [0.252736745585271, 0.367621922601351], [0.255288519878274, 0.3662095769828]],
    [15, 148, [0.0578440100834486, 0.161650490349479], [0.0623863995307363, 0.160487241723308]],
    [0, 20, [0, 0.168433470983085], [0, 0.161125158052819]],
    [1, 29, [0.000872646883579923, 0.177644295488723], [0.00611321429276266, 0.171755218793203]],
  ])('%i of %i at 95 %%', (correct, n, exact, wilson) => {
    const { exact: ours, wilson: scores } = distinguishers({ correct, n, chance: 0.5 });
    [ours.pc.lower, ours.pc.upper].forEach((limit, i) => expect(limit).toBeCloseTo(exact[i], 12));
    [scores.pc.lower, scores.pc.upper].forEach((limit, i) => expect(limit).toBeCloseTo(wilson[i], 12));
  });

  it('take their level', () => {
    const ninety = distinguishers({ correct: 40, n: 90, chance: 0.5, level: 0.9 });
    // R 4.2: binom.test(40, 90, conf.level = 0.9), the same with alternative = "greater" and "less", and prop.test
    expect(ninety.exact.pc.lower).toBeCloseTo(0.355147603503669, 12);
    expect(ninety.exact.pc.upper).toBeCloseTo(0.536554081324217, 12);
    expect(ninety.exact.pc.oneSidedLower).toBeCloseTo(0.373295915358098, 12);
    expect(ninety.exact.pc.oneSidedUpper).toBeCloseTo(0.517504423438398, 12);
    expect(ninety.wilson.pc.lower).toBeCloseTo(0.361162194728939, 12);
    expect(ninety.wilson.pc.upper).toBeCloseTo(0.530969390638967, 12);
    const all = distinguishers({ correct: 11, n: 11, chance: 0.5, level: 0.99 });
    expect(all.exact.pc).toMatchObject({ lower: expect.closeTo(0.617753841782323, 12), upper: 1 });
    expect(all.wilson.pc.lower).toBeCloseTo(0.623763226338566, 12);
  });

  it('hold the estimate, in the right order, one-sided ones inside', () => {
    fc.assert(
      fc.property(outcome, chance, level, ({ n, correct }, p0, at) => {
        const result = distinguishers({ correct, n, chance: p0, level: at });
        for (const kind of KINDS) {
          for (const [limits, estimate] of [[result[kind].pc, result.pc], [result[kind].pd, result.pd]] as [Limits, number][]) {
            const order = [limits.lower, limits.oneSidedLower, estimate, limits.oneSidedUpper, limits.upper];
            order.forEach((value, i) => i > 0 && expect(value).toBeGreaterThanOrEqual(order[i - 1] - 1e-12));
          }
        }
        for (const kind of ['exact', 'wilson'] as const) {
          expect(result[kind].pc.lower).toBeGreaterThanOrEqual(-1e-12);
          expect(result[kind].pc.upper).toBeLessThanOrEqual(1 + 1e-12);
        }
      }),
      { seed: 1 },
    );
  });

  it('mirror when right and wrong change places', () => {
    fc.assert(
      fc.property(outcome, level, ({ n, correct }, at) => {
        const one = distinguishers({ correct, n, chance: 0.5, level: at });
        const other = distinguishers({ correct: n - correct, n, chance: 0.5, level: at });
        for (const kind of KINDS) {
          expect(other[kind].pc.lower).toBeCloseTo(1 - one[kind].pc.upper, 10);
          expect(other[kind].pc.oneSidedUpper).toBeCloseTo(1 - one[kind].pc.oneSidedLower, 10);
        }
      }),
      { seed: 2 },
    );
  });

  it('are where each kind’s own test turns', () => {
    fc.assert(
      fc.property(outcome, level, ({ n, correct }, at) => {
        const { exact, wilson, pc } = distinguishers({ correct, n, chance: 0.5, level: at });
        if (correct > 0) expect(binomialSf(correct, n, exact.pc.lower)).toBeCloseTo((1 - at) / 2, 9);
        if (correct > 0) expect(binomialSf(correct, n, exact.pc.oneSidedLower)).toBeCloseTo(1 - at, 9);
        const z = normalQuantile((1 + at) / 2);
        for (const p of [wilson.pc.lower, wilson.pc.upper]) expect(Math.abs(pc - p)).toBeCloseTo(z * Math.sqrt((Math.max(0, p * (1 - p))) / n), 7);
      }),
      { seed: 3 },
    );
  });

  it('of the exact kind cover every true proportion at least as often as they say', () => {
    for (const n of [7, 24, 60]) {
      const limits = Array.from({ length: n + 1 }, (_, correct) => distinguishers({ correct, n, chance: 0.5, level: 0.9 }).exact.pc);
      for (let p = 0.005; p < 1; p += 0.005) {
        let covered = 0;
        limits.forEach(({ lower, upper }, correct) => {
          if (lower <= p && p <= upper) covered += binomialPmf(correct, n, p);
        });
        expect(covered).toBeGreaterThanOrEqual(0.9);
      }
    }
  });
});

describe('the share who can tell', () => {
  it('follows the formulas of ISO 4120 B.3 and of the note to ISO 5495 table A.3', () => {
    const triangle = distinguishers({ correct: 26, n: 66, chance: 1 / 3 });
    expect(triangle.pd).toBeCloseTo(1.5 * (26 / 66) - 0.5, 12);
    expect(triangle.standardError).toBeCloseTo(1.5 * Math.sqrt((66 * 26 - 26 ** 2) / 66 ** 3), 12);
    const paired = distinguishers({ correct: 26, n: 40, chance: 1 / 2, level: 0.95 });
    expect(paired.pd).toBeCloseTo(2 * (26 / 40) - 1, 12);
    const s = 2 * Math.sqrt((40 * 26 - 26 ** 2) / 40 ** 3);
    // R 4.2: qnorm(0.95)
    expect(paired.normal.pd.oneSidedLower).toBeCloseTo(0.3 - 1.64485362695147 * s, 10);
    expect(paired.normal.pd.oneSidedUpper).toBeCloseTo(0.3 + 1.64485362695147 * s, 10);
  });

  it('is 0 at chance, 1 when all are right, and below 0 when guessing did better', () => {
    expect(distinguishers({ correct: 20, n: 60, chance: 1 / 3 }).pd).toBeCloseTo(0, 12);
    expect(distinguishers({ correct: 9, n: 9, chance: 1 / 3 })).toMatchObject({ pd: 1, standardError: 0 });
    expect(distinguishers({ correct: 0, n: 9, chance: 1 / 3 }).pd).toBeCloseTo(-0.5, 12);
  });

  it('has limits that are those of the proportion, on its own scale', () => {
    fc.assert(
      fc.property(outcome, chance, ({ n, correct }, p0) => {
        const result = distinguishers({ correct, n, chance: p0 });
        for (const kind of KINDS) {
          for (const end of ['lower', 'upper', 'oneSidedLower', 'oneSidedUpper'] as const) expect(p0 + (1 - p0) * result[kind].pd[end]).toBeCloseTo(result[kind].pc[end], 12);
        }
      }),
      { seed: 4 },
    );
  });
});

describe('hostile input', () => {
  it.each<[string, Parameters<typeof distinguishers>[0], StatsErrorCode]>([
    ['more right than answers', { correct: 5, n: 4, chance: 0.5 }, 'out_of_range'],
    ['a negative count', { correct: -1, n: 4, chance: 0.5 }, 'out_of_range'],
    ['nobody', { correct: 0, n: 0, chance: 0.5 }, 'out_of_range'],
    ['half an answer', { correct: 1.5, n: 4, chance: 0.5 }, 'not_integer'],
    ['NaN', { correct: NaN, n: 4, chance: 0.5 }, 'not_finite'],
    ['an endless panel', { correct: 4, n: Infinity, chance: 0.5 }, 'not_finite'],
    ['a chance of 1', { correct: 2, n: 4, chance: 1 }, 'out_of_range'],
    ['a chance of NaN', { correct: 2, n: 4, chance: NaN }, 'not_finite'],
    ['a level of 0', { correct: 2, n: 4, chance: 0.5, level: 0 }, 'out_of_range'],
    ['a level of 1', { correct: 2, n: 4, chance: 0.5, level: 1 }, 'out_of_range'],
    ['a level in percent', { correct: 2, n: 4, chance: 0.5, level: 95 }, 'out_of_range'],
    ['a level of NaN', { correct: 2, n: 4, chance: 0.5, level: NaN }, 'not_finite'],
  ])('%s is refused', (_, question, code) => expectRefusal(() => distinguishers(question), code));

  it('has no limit at a tail of 0 or 1', () => {
    expectRefusal(() => clopperPearson(2, 4, 0, true), 'out_of_range');
    expectRefusal(() => clopperPearson(2, 4, 1, false), 'out_of_range');
    expectRefusal(() => clopperPearson(2, 4, NaN, false), 'not_finite');
    expectRefusal(() => clopperPearson(5, 4, 0.05, false), 'out_of_range');
  });
});
