import fc from 'fast-check';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { cochranQ, cochranQPermutation, mcnemar, mcnemarOfAnswers, pairedPreference, StatsError } from '@/stats';

const answer = fc.constantFrom(0, 1);

describe('mcnemar', () => {
  it.each([
    // R 4.2.2: binom.test(b, b + c)$p.value, mcnemar.test with correction.
    [5, 0, 0.0625, 3.2],
    [3, 9, 0.14599609375, 2.08333333333333],
    [150, 86, 3.71593613957143e-5, 16.8177966101695],
  ])('%i and %i', (b, c, exact, continuity) => {
    const result = mcnemar(b, c);
    expect(result.pExact / exact).toBeCloseTo(1, 11);
    expect(result.chiSquareContinuity).toBeCloseTo(continuity, 10);
    expect(mcnemar(c, b).pExact).toBe(result.pExact);
  });

  it('shows nothing when nobody changed', () => {
    expect(mcnemar(0, 0)).toMatchObject({ pExact: 1, chiSquare: null, p: null, pMid: null });
  });

  it('has a mid-p between the tail without the point and the exact p', () => {
    fc.assert(
      fc.property(fc.nat(60), fc.nat(60), (b, c) => {
        fc.pre(b + c > 0);
        const { pExact, pMid } = mcnemar(b, c);
        expect(pMid!).toBeLessThanOrEqual(pExact + 1e-12);
        expect(pMid!).toBeGreaterThan(0);
      }),
    );
  });

  it('refuses counts that are none, and answers that are neither 0 nor 1', () => {
    for (const [b, c] of [[-1, 2], [1.5, 2], [NaN, 1], [Infinity, 1]]) expect(() => mcnemar(b, c)).toThrow(StatsError);
    expect(() => mcnemarOfAnswers([0, 1], [0, 2])).toThrow(StatsError);
    expect(() => mcnemarOfAnswers([0, 1], [0])).toThrow(StatsError);
    expect(() => mcnemarOfAnswers([], [])).toThrow(StatsError);
  });
});

describe('cochranQ', () => {
  it('agrees with Cochran (1950), four media: Q = 8.05', () => {
    const path = fileURLToPath(new URL('../../../reference/cases/data_cochran_1950.csv', import.meta.url));
    const rows = readFileSync(path, 'utf8').trim().split(/\r?\n/).slice(1).map((line) => line.split(',').slice(1).map(Number));
    expect(rows).toHaveLength(69);
    expect(cochranQ(rows).q).toBeCloseTo(8.05, 2);
  });

  it('is McNemar’s chi-square for two products', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(answer, answer), { minLength: 2, maxLength: 30 }), (rows) => {
        fc.pre(rows.some(([a, b]) => a !== b));
        const pair = mcnemarOfAnswers(rows.map(([a]) => a), rows.map(([, b]) => b));
        expect(cochranQ(rows).q).toBeCloseTo(pair.chiSquare!, 10);
        expect(cochranQPermutation(rows).p).toBeCloseTo(pair.pExact, 10);
      }),
    );
  });

  it('does not change when assessors who ticked all or none are added', () => {
    const rows = [[1, 0, 0], [1, 1, 0], [0, 1, 0], [1, 0, 1]];
    const more = [...rows, [0, 0, 0], [1, 1, 1]];
    expect(cochranQ(more).q).toBeCloseTo(cochranQ(rows).q, 12);
    expect(cochranQPermutation(more).p).toBeCloseTo(cochranQPermutation(rows).p, 12);
  });

  it('has an exact p that counts every way to move the ticks', () => {
    const rows = [[1, 0, 0], [1, 1, 0], [1, 0, 0], [1, 0, 1]];
    const ways = [[[1, 0, 0], [0, 1, 0], [0, 0, 1]], [[1, 1, 0], [1, 0, 1], [0, 1, 1]]];
    const seen = cochranQ(rows).q;
    let hits = 0;
    for (const a of ways[0]) for (const b of ways[1]) for (const c of ways[0]) for (const d of ways[1]) {
      if (cochranQ([a, b, c, d]).q >= seen - 1e-9) hits += 1;
    }
    expect(cochranQPermutation(rows).p).toBeCloseTo(hits / 81, 12);
  });

  it.each([['nobody', []], ['one product', [[1]]], ['ragged rows', [[1, 0], [1]]], ['a score', [[1, 3]]], ['only all or none', [[1, 1], [0, 0]]]])(
    'refuses %s',
    (_, rows) => {
      expect(() => cochranQ(rows)).toThrow(StatsError);
    },
  );
});

describe('pairedPreference', () => {
  it('is significant from 21 of 30 two-sided at 5 %, as the tables of paired tests say', () => {
    expect(pairedPreference(21, 9).pTwoSided).toBeLessThanOrEqual(0.05);
    expect(pairedPreference(20, 10).pTwoSided).toBeGreaterThan(0.05);
  });

  it('has the Clopper-Pearson interval, which is known in closed form at the ends', () => {
    const none = pairedPreference(0, 10);
    expect(none.lower).toBe(0);
    expect(none.upper).toBeCloseTo(1 - 0.025 ** (1 / 10), 12);
    expect(pairedPreference(10, 0).lower).toBeCloseTo(0.025 ** (1 / 10), 12);
  });

  it('mirrors when the products change places', () => {
    fc.assert(
      fc.property(fc.nat(40), fc.nat(40), fc.nat(9), fc.constantFrom('exclude' as const, 'split' as const), (a, b, none, rule) => {
        fc.pre(a + b > 0 && a !== b);
        const one = pairedPreference(a, b, none, { noPreference: rule });
        const other = pairedPreference(b, a, none, { noPreference: rule });
        expect(other.pTwoSided).toBeCloseTo(one.pTwoSided, 12);
        expect(other.lower).toBeCloseTo(1 - one.upper, 9);
        expect(one.lower).toBeLessThanOrEqual(one.share);
      }),
    );
  });

  it('never gains from splitting the undecided', () => {
    expect(pairedPreference(15, 5, 7, { noPreference: 'split' }).pTwoSided).toBeGreaterThan(pairedPreference(15, 5, 7).pTwoSided);
  });

  it('refuses nobody and bad counts', () => {
    expect(() => pairedPreference(0, 0, 4)).toThrow(StatsError);
    expect(() => pairedPreference(-1, 4)).toThrow(StatsError);
    expect(() => pairedPreference(3, 4, 0, { level: 1 })).toThrow(StatsError);
  });
});
