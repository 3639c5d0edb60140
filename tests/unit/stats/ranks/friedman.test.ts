import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { friedman, friedmanCriticalValue, friedmanFromRankSums, friedmanPermutation, StatsError } from '@/stats';

/** Hollander & Wolfe (1973) p. 140, rounding first base; the example of R's friedman.test. */
const rounding = [
  [5.4, 5.5, 5.55], [5.85, 5.7, 5.75], [5.2, 5.6, 5.5], [5.55, 5.5, 5.4], [5.9, 5.85, 5.7], [5.45, 5.55, 5.6],
  [5.4, 5.4, 5.35], [5.45, 5.5, 5.35], [5.25, 5.15, 5.0], [5.85, 5.8, 5.7], [5.25, 5.2, 5.1], [5.65, 5.55, 5.45],
  [5.6, 5.35, 5.45], [5.05, 5.0, 4.95], [5.5, 5.5, 5.4], [5.45, 5.55, 5.5], [5.55, 5.55, 5.35], [5.45, 5.5, 5.55],
  [5.5, 5.45, 5.25], [5.65, 5.6, 5.4], [5.7, 5.65, 5.55], [6.3, 6.3, 6.25],
];

/** All orders of a list, by place. */
function orders<T>(values: readonly T[]): T[][] {
  if (values.length === 0) return [[]];
  return values.flatMap((value, i) => orders(values.filter((_, j) => j !== i)).map((rest) => [value, ...rest]));
}

/** Share of all ways to shuffle every row for which the chi-square is at least the one seen. */
function byBruteForce(rows: number[][]): number {
  const seen = friedman(rows).chiSquare;
  let all = 0;
  let hits = 0;
  const walk = (i: number, chosen: number[][]): void => {
    if (i === rows.length) {
      all += 1;
      if (friedman(chosen).chiSquare >= seen - 1e-9) hits += 1;
      return;
    }
    for (const order of orders(rows[i])) walk(i + 1, [...chosen, order]);
  };
  walk(0, []);
  return hits / all;
}

describe('friedman', () => {
  it('agrees with Hollander & Wolfe: S = 11.14, p = .0038', () => {
    const result = friedman(rounding);
    expect(result.chiSquare).toBeCloseTo(11.142857, 6);
    expect(result.p).toBeCloseTo(0.003805, 6);
  });

  it('agrees with the four sweeteners of Meilgaard, Civille & Carr: T = 12.85', () => {
    const result = friedmanFromRankSums(48, [135, 103, 137, 105]);
    expect(result.chiSquare).toBeCloseTo(12.85, 2);
    expect(result.df).toBe(3);
  });

  it('does not depend on the order of assessors or the names of products', () => {
    const result = friedman(rounding);
    expect(friedman([...rounding].reverse()).chiSquare).toBeCloseTo(result.chiSquare, 10);
    expect(friedman(rounding.map(([a, b, c]) => [c, a, b])).imanDavenport.p).toBeCloseTo(result.imanDavenport.p, 12);
  });

  it('gives complete agreement its exact chance instead of dividing by 0', () => {
    const alike = [[1, 2, 3], [2, 4, 6], [1, 5, 9], [0, 1, 2]];
    const result = friedman(alike);
    expect(result.imanDavenport.f).toBe(Infinity);
    expect(result.imanDavenport.p).toBeCloseTo(1 / 6 ** 3, 14);
    expect(result.imanDavenport.p).toBeCloseTo(friedmanPermutation(alike).p, 12);
    const tied = [[1, 1, 2], [3, 3, 4], [0, 0, 9]];
    expect(friedman(tied).imanDavenport.p).toBeCloseTo(friedmanPermutation(tied).p, 12);
  });

  it('refuses what it cannot answer', () => {
    for (const rows of [[], [[1, 2, 3]], [[1], [2]], [[1, 2], [3]], [[1, NaN], [1, 2]], [[1, 1], [2, 2]]]) {
      expect(() => friedman(rows)).toThrow(StatsError);
    }
    expect(() => friedmanFromRankSums(3, [3, 3, 3])).toThrow(StatsError);
    expect(() => friedmanFromRankSums(2.5, [3, 6])).toThrow(StatsError);
  });

  it('answers for a hundred thousand assessors', () => {
    const rows = Array.from({ length: 100_000 }, (_, i) => [i % 3, (i + 1) % 5, i % 7, 2]);
    expect(friedman(rows).p).toBeGreaterThanOrEqual(0);
  });
});

describe('friedmanPermutation', () => {
  it('agrees with Siegel (1956), table N: k = 3, n = 4, chi-square 6.5, p = .042', () => {
    const rows = [[1, 2, 3], [1, 2, 3], [1, 2, 3], [2, 1, 3]];
    expect(friedman(rows).chiSquare).toBeCloseTo(6.5, 12);
    expect(friedmanPermutation(rows).p).toBeCloseTo(0.042, 3);
  });

  it('agrees with counting every arrangement, with and without ties', () => {
    const score = fc.integer({ min: 1, max: 4 });
    const rows = fc
      .array(fc.tuple(score, score, score), { minLength: 2, maxLength: 4 })
      .filter((all) => all.some((row) => new Set(row).size > 1));
    fc.assert(
      fc.property(rows, (matrix) => {
        const { p, method } = friedmanPermutation(matrix);
        expect(method).toBe('exact');
        expect(p).toBeCloseTo(byBruteForce(matrix), 10);
      }),
      { numRuns: 40, seed: 7 },
    );
  });

  it('comes near the exact p when it draws, and repeats with its seed', () => {
    const rows = rounding.slice(0, 8);
    const exact = friedmanPermutation(rows);
    const drawn = friedmanPermutation(rows, { budget: 0, draws: 20_000, seed: 3 });
    expect(drawn.method).toBe('simulated');
    expect(Math.abs(drawn.p - exact.p)).toBeLessThan(4 * drawn.standardError);
    expect(friedmanPermutation(rows, { budget: 0, draws: 20_000, seed: 3 })).toEqual(drawn);
  });

  it('leaves a frozen table alone', () => {
    const frozen = Object.freeze(rounding.slice(0, 5).map((row) => Object.freeze([...row])));
    expect(() => friedmanPermutation(frozen)).not.toThrow();
  });
});

describe('friedmanCriticalValue', () => {
  it.each([
    // Siegel (1956), table N, and Hollander & Wolfe, table A.22.
    [3, 3, 6, 0.028],
    [3, 4, 6.5, 0.042],
    [3, 5, 6.4, 0.039],
    [4, 4, 7.8, 0.036],
  ])('k = %i, n = %i: %f with p %f', (k, n, chiSquare, p) => {
    const critical = friedmanCriticalValue(k, n, 0.05);
    expect(critical?.chiSquare).toBeCloseTo(chiSquare, 10);
    expect(critical?.p).toBeCloseTo(p, 3);
  });

  it('is the border of p <= alpha', () => {
    const critical = friedmanCriticalValue(3, 4, 0.05)!;
    expect(critical.p).toBeLessThanOrEqual(0.05);
    const below = [[1, 2, 3], [1, 2, 3], [1, 3, 2], [1, 3, 2]];
    expect(friedman(below).chiSquare).toBeLessThan(critical.chiSquare);
    expect(friedmanPermutation(below).p).toBeGreaterThan(0.05);
  });

  it('is null when even complete agreement is too likely', () => {
    expect(friedmanCriticalValue(3, 2, 0.05)).toBeNull();
  });

  it('says so when the count would be too long', () => {
    expect(() => friedmanCriticalValue(10, 50, 0.05)).toThrow(StatsError);
  });
});
