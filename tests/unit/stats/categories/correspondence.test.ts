import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { correspondenceAnalysis, StatsError } from '@/stats';

/** Smoking and staff, Greenacre, Correspondence Analysis in Practice: inertia .08519, axes .07476, .01002, .00041. */
const staff = [[4, 2, 3, 2], [4, 3, 7, 4], [25, 10, 12, 4], [18, 24, 33, 13], [10, 6, 7, 2]];

describe('correspondenceAnalysis', () => {
  it('agrees with Greenacre’s staff and smoking table', () => {
    const result = correspondenceAnalysis(staff);
    expect(result.totalInertia).toBeCloseTo(0.08519, 5);
    expect(result.eigenvalues[0]).toBeCloseTo(0.07476, 5);
    expect(result.eigenvalues[1]).toBeCloseTo(0.01002, 5);
    expect(result.eigenvalues[2]).toBeCloseTo(0.00041, 5);
    expect(result.chiSquare).toBeCloseTo(16.44, 2);
  });

  it('places rows by chi-square distance, centres them, and splits the inertia', () => {
    const cell = fc.integer({ min: 1, max: 40 });
    fc.assert(
      fc.property(fc.array(fc.tuple(cell, cell, cell, cell), { minLength: 3, maxLength: 6 }), (table) => {
        // Proportional rows have no axes; they are refused, see below.
        fc.pre(table.some((row) => row.some((count, j) => count * table[0][0] !== row[0] * table[0][j])));
        const { rows, columns, eigenvalues, totalInertia } = correspondenceAnalysis(table);
        const profile = (i: number) => table[i].map((count) => count / table[i].reduce((a, b) => a + b, 0));
        const [a, b] = [profile(0), profile(1)];
        const expected = a.reduce((sum, value, j) => sum + (value - b[j]) ** 2 / columns.mass[j], 0);
        const drawn = rows.coordinates[0].reduce((sum, value, j) => sum + (value - rows.coordinates[1][j]) ** 2, 0);
        expect(drawn).toBeCloseTo(expected, 9);
        eigenvalues.forEach((value, axis) => {
          const centre = rows.coordinates.reduce((sum, row, i) => sum + rows.mass[i] * row[axis], 0);
          expect(centre).toBeCloseTo(0, 9);
        });
        expect(eigenvalues.reduce((sum, value) => sum + value, 0)).toBeCloseTo(totalInertia, 10);
      }),
      { numRuns: 50 },
    );
  });

  it('gives one inertia whichever way the table lies', () => {
    const turned = staff[0].map((_, j) => staff.map((row) => row[j]));
    const [one, other] = [correspondenceAnalysis(staff), correspondenceAnalysis(turned)];
    one.eigenvalues.forEach((value, axis) => expect(other.eigenvalues[axis]).toBeCloseTo(value, 12));
  });

  it.each([
    ['no table', []],
    ['one column', [[1], [2]]],
    ['ragged rows', [[1, 2], [3]]],
    ['a negative count', [[1, -2], [3, 4]]],
    ['an empty row', [[0, 0], [3, 4]]],
    ['an empty column', [[1, 0], [3, 0]]],
    ['a missing count', [[1, NaN], [3, 4]]],
    ['proportional rows', [[1, 2], [2, 4]]],
  ])('refuses %s', (_, table) => {
    expect(() => correspondenceAnalysis(table)).toThrow(StatsError);
  });
});
