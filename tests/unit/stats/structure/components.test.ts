import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { multipleFactorAnalysis, pca, StatsError } from '@/stats';

const value = fc.integer({ min: -50, max: 50 });
const table = fc.array(fc.tuple(value, value, value, value), { minLength: 6, maxLength: 12 });
const spread = (rows: number[][]) => rows[0].every((_, j) => new Set(rows.map((row) => row[j])).size > 1);

describe('pca', () => {
  it('has eigenvalues 1 + r and 1 - r for two scaled variables', () => {
    // The textbook case: Jolliffe, Principal Component Analysis, sec. 3.3. Sum of products 22 by hand.
    const rows = [[2, 1], [4, 3], [6, 2], [8, 6], [10, 5]];
    const r = 22 / Math.sqrt(40 * 17.2);
    const { eigenvalues } = pca(rows, { scale: true });
    expect(eigenvalues[0]).toBeCloseTo(1 + r, 12);
    expect(eigenvalues[1]).toBeCloseTo(1 - r, 12);
  });

  it('gives back the table from scores and eigenvectors, with orthogonal axes of the stated variance', () => {
    fc.assert(
      fc.property(table.filter(spread), fc.boolean(), (rows, scale) => {
        const { centre, sd, scores, eigenvectors, eigenvalues } = pca(rows, { scale });
        rows.forEach((row, i) =>
          row.forEach((x, j) => {
            const back = scores[i].reduce((sum, score, a) => sum + score * eigenvectors[j][a], 0);
            expect(back * (scale ? sd[j] : 1) + centre[j]).toBeCloseTo(x, 6);
          }),
        );
        eigenvalues.forEach((variance, a) => {
          const seen = scores.reduce((sum, row) => sum + row[a] ** 2, 0) / (rows.length - 1);
          expect(seen / variance).toBeCloseTo(1, 8);
        });
        const first = eigenvectors.reduce((sum, row) => sum + row[0] * (row[1] ?? 0), 0);
        expect(first).toBeCloseTo(0, 8);
      }),
      { numRuns: 60 },
    );
  });

  it('does not depend on the order of objects', () => {
    fc.assert(
      fc.property(table.filter(spread), (rows) => {
        const [one, other] = [pca(rows).eigenvalues, pca([...rows].reverse()).eigenvalues];
        one.forEach((variance, a) => expect(other[a] / variance).toBeCloseTo(1, 6));
      }),
      { numRuns: 40 },
    );
  });

  it('reports a variable that does not vary as having no correlation, and refuses to scale it', () => {
    const rows = [[1, 0.1, 5], [2, 0.1, 3], [4, 0.1, 8]];
    expect(pca(rows).correlations[1][0]).toBeNull();
    expect(() => pca(rows, { scale: true })).toThrow(expect.objectContaining({ code: 'constant' }));
  });

  it('agrees with itself on tables above and below the size at which it changes method', () => {
    const rows = Array.from({ length: 2100 }, (_, i) => [Math.sin(i), Math.cos(i * 1.3) * 2, (i % 17) / 5]);
    const tall = pca(rows).eigenvalues;
    const trace = pca(rows).sd.reduce((sum, s) => sum + s * s, 0);
    expect(tall.reduce((sum, v) => sum + v, 0)).toBeCloseTo(trace, 9);
    const small = pca(rows.slice(0, 1900)).eigenvalues;
    expect(tall[0] / small[0]).toBeCloseTo(1, 1);
  });

  it('answers for a million rows', () => {
    const rows = Array.from({ length: 1_000_000 }, (_, i) => [i % 7, i % 11]);
    expect(pca(rows, { axes: 1 }).eigenvalues).toHaveLength(2);
  }, 30_000);

  it.each([
    ['no table', []],
    ['one object', [[1, 2]]],
    ['ragged rows', [[1, 2], [3]]],
    ['a missing value', [[1, NaN], [2, 3]]],
    ['objects all alike', [[1, 2], [1, 2]]],
    ['values too large to square', [[1e300, 1], [-1e300, 2]]],
  ])('refuses %s', (_, rows) => {
    expect(() => pca(rows)).toThrow(StatsError);
  });
});

describe('multipleFactorAnalysis', () => {
  const one = [[1, 2], [2, 5], [4, 3], [7, 9], [5, 5]];
  const two = [[9, 1, 4], [3, 3, 2], [5, 8, 8], [1, 2, 6], [2, 2, 2]];

  it('gives every group a first axis of weight 1', () => {
    for (const table of [one, two]) {
      const { eigenvalues } = multipleFactorAnalysis([{ table, scale: true }]);
      expect(eigenvalues[0]).toBeCloseTo(1, 12);
    }
  });

  it('does not change when a group is measured in another unit', () => {
    const a = multipleFactorAnalysis([{ table: one, scale: false }, { table: two, scale: false }]);
    const b = multipleFactorAnalysis([{ table: one.map((row) => row.map((x) => 1000 * x + 3)), scale: false }, { table: two, scale: false }]);
    a.eigenvalues.forEach((v, i) => expect(b.eigenvalues[i]).toBeCloseTo(v, 9));
  });

  it('has a first eigenvalue equal to the number of groups when they agree, and RV 1', () => {
    const { eigenvalues, rv, groupCoordinates } = multipleFactorAnalysis([{ table: one, scale: false }, { table: one.map(([x, y]) => [2 * y, 2 * x]), scale: false }]);
    expect(eigenvalues[0]).toBeCloseTo(2, 10);
    expect(rv[0][1]).toBeCloseTo(1, 10);
    expect(groupCoordinates[0][0]).toBeCloseTo(1, 10);
  });

  it('puts every object in the middle of its partial points', () => {
    const { coordinates, partialCoordinates } = multipleFactorAnalysis([{ table: one, scale: true }, { table: two, scale: true }]);
    coordinates.forEach((row, i) =>
      row.forEach((x, a) => expect((partialCoordinates[0][i][a] + partialCoordinates[1][i][a]) / 2).toBeCloseTo(x, 9)),
    );
  });

  it('refuses hostile groups', () => {
    const bad = [[], [{ table: [], scale: true }], [{ table: one, scale: true }, { table: two.slice(1), scale: true }], [{ table: [[1, 1], [1, 1]], scale: false }], [{ table: [[1, 1], [1, 2]], scale: true }]];
    for (const groups of bad) expect(() => multipleFactorAnalysis(groups)).toThrow(StatsError);
  });
});
