import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binomialTest, CHANCE, clopperPearson, distinguishers, minimumCorrect, similarityMaximum, similarityVerdict, StatsError, sortingChance } from '@/stats';

const chance = fc.constantFrom(...Object.values(CHANCE));
const outcome = fc.integer({ min: 1, max: 120 }).chain((n) => fc.record({ n: fc.constant(n), correct: fc.integer({ min: 0, max: n }) }));

describe('binomial test', () => {
  it('agrees with the critical number: p ≤ α exactly from the smallest significant number on', () => {
    fc.assert(
      fc.property(outcome, chance, fc.constantFrom(0.2, 0.1, 0.05, 0.01, 0.001), ({ n, correct }, p0, alpha) => {
        const smallest = minimumCorrect(n, alpha, p0);
        const { p } = binomialTest({ correct, n, chance: p0 });
        expect(smallest !== null && correct >= smallest).toBe(p <= alpha * (1 + 1e-12));
      }),
      { seed: 1, numRuns: 400 },
    );
  });

  it('counts a p of exactly α as significant: three of three in two-out-of-five at .001', () => {
    expect(minimumCorrect(3, 0.001, CHANCE.two_out_of_five)).toBe(3);
  });

  it('falls as more are right', () => {
    fc.assert(
      fc.property(outcome, chance, ({ n, correct }, p0) => {
        fc.pre(correct < n);
        const now = binomialTest({ correct, n, chance: p0 }).p;
        // Near 1 the fall is smaller than a double can show.
        fc.pre(now < 1 - 1e-9);
        expect(binomialTest({ correct: correct + 1, n, chance: p0 }).p).toBeLessThan(now);
      }),
      { seed: 2 },
    );
  });
});

describe('limits of a proportion', () => {
  it('are those of R 4.2: binom.test(13, 24) and binom.test(0, 12)', () => {
    expect(clopperPearson(13, 24, 0.025, false)).toBeCloseTo(0.328208075695178, 12);
    expect(clopperPearson(13, 24, 0.025, true)).toBeCloseTo(0.744469798005254, 12);
    expect(clopperPearson(0, 12, 0.025, false)).toBe(0);
    expect(clopperPearson(0, 12, 0.025, true)).toBeCloseTo(0.264648469397051, 12);
  });

  it('hold the estimate, narrow with the panel and widen with the level', () => {
    fc.assert(
      fc.property(outcome, chance, ({ n, correct }, p0) => {
        const { pd, exact } = distinguishers({ correct, n, chance: p0 });
        expect(exact.pd.lower).toBeLessThanOrEqual(pd + 1e-12);
        expect(exact.pd.upper).toBeGreaterThanOrEqual(pd - 1e-12);
        const wider = distinguishers({ correct, n, chance: p0, level: 0.99 }).exact.pd;
        expect(wider.upper - wider.lower).toBeGreaterThan(exact.pd.upper - exact.pd.lower - 1e-12);
        const larger = distinguishers({ correct: 4 * correct, n: 4 * n, chance: p0 }).exact.pd;
        expect(larger.upper - larger.lower).toBeLessThan(exact.pd.upper - exact.pd.lower);
      }),
      { seed: 3 },
    );
  });

  it('of the exact kind shut out guessing exactly when the one-sided test does', () => {
    fc.assert(
      fc.property(outcome, chance, ({ n, correct }, p0) => {
        const { p } = binomialTest({ correct, n, chance: p0 });
        fc.pre(Math.abs(p - 0.05) > 1e-9);
        expect(distinguishers({ correct, n, chance: p0 }).exact.pd.oneSidedLower > 0).toBe(p < 0.05);
      }),
      { seed: 4 },
    );
  });
});

describe('similarity', () => {
  it('has the published maxima for 18 assessors at β = .05 (ISO 4120 table A.2, from memory)', () => {
    const maxima = [0.1, 0.2, 0.3, 0.4, 0.5].map((pd) => similarityMaximum(18, { beta: 0.05, pd, chance: 1 / 3 }));
    expect(maxima).toEqual([3, 4, 5, 6, 8]);
  });

  it('gives its verdict by the maximum, and none below guessing', () => {
    const plan = { beta: 0.05, pd: 0.3, chance: 1 / 3 };
    const largest = similarityMaximum(60, plan)!;
    expect(similarityVerdict(largest, 60, plan).verdict).toBe('similar');
    expect(similarityVerdict(largest + 1, 60, plan).verdict).toBe('not_shown');
    expect(similarityVerdict(10, 60, plan).verdict).toBe('no_conclusion');
    expect(similarityVerdict(largest, 60, plan).upperLimit).toBeLessThan(0.3);
    expect(similarityVerdict(largest + 1, 60, plan).upperLimit).toBeGreaterThanOrEqual(0.3);
  });
});

describe('sorting by guess', () => {
  it('is counted: the tea lady’s 1 in 70, the tetrad’s third', () => {
    expect(sortingChance(4, true)).toBeCloseTo(1 / 70, 15);
    expect(sortingChance(2)).toBeCloseTo(1 / 3, 15);
  });
});

describe('hostile input', () => {
  it.each([
    ['more right than answers', () => binomialTest({ correct: 13, n: 12, chance: 1 / 3 })],
    ['a negative count', () => binomialTest({ correct: -1, n: 12, chance: 1 / 3 })],
    ['half an answer', () => binomialTest({ correct: 2.5, n: 12, chance: 1 / 3 })],
    ['nobody', () => binomialTest({ correct: 0, n: 0, chance: 1 / 3 })],
    ['NaN', () => distinguishers({ correct: NaN, n: 12, chance: 1 / 3 })],
    ['an infinite panel', () => minimumCorrect(Infinity, 0.05, 1 / 3)],
    ['α = 0', () => minimumCorrect(12, 0, 1 / 3)],
    ['α = 1', () => minimumCorrect(12, 1, 1 / 3)],
    ['a chance of 0', () => distinguishers({ correct: 3, n: 12, chance: 0 })],
    ['a level of 1', () => distinguishers({ correct: 3, n: 12, chance: 0.5, level: 1 })],
    ['two sides at a chance of a third', () => minimumCorrect(12, 0.05, 1 / 3, { twoSided: true })],
    ['a pd above 1', () => similarityMaximum(20, { beta: 0.05, pd: 1.4, chance: 1 / 3 })],
    ['no glasses to sort', () => sortingChance(0)],
  ])('%s is refused', (_, work) => expect(work).toThrow(StatsError));
});
