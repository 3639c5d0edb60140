import { describe, expect, it } from 'vitest';
import { CHANCE, minimumCorrect, proportionFromDistinguishers, smallestPanel, sortingChance } from '@/stats';
import { expectRefusal } from '../distributions/support/refusal';

const RISKS = [0.2, 0.1, 0.05, 0.01, 0.001];
type Row = [number, (number | null)[]];

describe('smallest significant numbers at .20, .10, .05, .01, .001', () => {
  it.each<Row>([
    // ISO 10399 table A.1 as reprinted in GOST ISO 10399-2015. Its row for 22 is misprinted in the copy seen and left out.
    [6, [5, 6, 6, null, null]],
    [7, [6, 6, 7, 7, null]],
    [8, [6, 7, 7, 8, null]],
    [9, [7, 7, 8, 9, null]],
    [10, [7, 8, 9, 10, 10]],
    [12, [8, 9, 10, 11, 12]],
    [14, [10, 10, 11, 12, 13]],
    [16, [11, 12, 12, 14, 15]],
    [19, [12, 13, 14, 15, 17]],
    [23, [15, 16, 16, 18, 20]],
    [28, [17, 18, 19, 21, 23]],
    [30, [18, 20, 20, 22, 24]],
    [44, [26, 27, 28, 31, 33]],
    [52, [30, 32, 33, 35, 38]],
    [64, [36, 38, 40, 42, 45]],
    [72, [41, 42, 44, 47, 50]],
    [88, [49, 51, 53, 56, 59]],
  ])('duo-trio, %i answers', (n, row) => {
    expect(RISKS.map((alpha) => minimumCorrect(n, alpha, CHANCE.duo_trio))).toEqual(row);
  });

  it.each<Row>([
    // ISO 5495 table A.1 as reprinted in its national adoption (garant.ru 57969792).
    [11, [8, 9, 9, 10, 11]],
    [20, [13, 14, 15, 16, 18]],
    [22, [14, 15, 16, 17, 19]],
    [37, [22, 23, 24, 27, 29]],
    [39, [23, 24, 26, 28, 30]],
    [48, [28, 29, 31, 33, 36]],
    [60, [34, 36, 37, 40, 43]],
  ])('paired comparison, one side, %i answers', (n, row) => {
    expect(RISKS.map((alpha) => minimumCorrect(n, alpha, CHANCE.two_afc))).toEqual(row);
  });

  it.each([
    // ISO 4120 table A.1, from memory.
    [12, 0.05, 8],
    [24, 0.05, 13],
    [30, 0.05, 15],
    [30, 0.01, 17],
    [36, 0.05, 18],
  ])('triangle, %i answers at %f', (n, alpha, correct) => expect(minimumCorrect(n, alpha, CHANCE.triangle)).toBe(correct));
});

describe('panels needed', () => {
  const size = (alpha: number, beta: number, pd: number, chance: number) => smallestPanel(1 - beta, { alpha, chance, pc: proportionFromDistinguishers(pd, chance) }).first;

  it.each([
    // ISO 4120 table A.3 (also in Meilgaard, Civille & Carr), from memory: a line for each α of .20 to .001, β the same.
    [0.5, [[7, 12, 16, 25, 36], [12, 15, 20, 30, 43], [16, 20, 23, 35, 48], [25, 30, 35, 47, 62], [36, 43, 48, 62, 81]]],
    [0.4, [[12, 17, 25, 36, 55], [17, 25, 30, 46, 67], [23, 30, 40, 57, 79], [35, 47, 56, 76, 102], [55, 68, 76, 102, 130]]],
    [0.3, [[20, 28, 39, 64, 97], [30, 43, 54, 81, 119], [40, 53, 66, 98, 136], [62, 82, 97, 131, 181], [93, 120, 138, 181, 233]]],
    [0.2, [[39, 64, 86, 140, 212], [62, 89, 119, 178, 260], [87, 117, 147, 213, 305], [136, 176, 211, 292, 397], [207, 257, 302, 396, 513]]],
  ])('triangle, a share of %f who can tell', (pd, table) => {
    expect(RISKS.map((alpha) => RISKS.map((beta) => size(alpha, beta, pd, CHANCE.triangle)))).toEqual(table);
  });

  it('duo-trio at α .05 (ISO 10399 table A.3, from memory)', () => {
    expect([0.2, 0.1, 0.05].map((beta) => size(0.05, beta, 0.5, CHANCE.duo_trio))).toEqual([23, 33, 42]);
    expect(size(0.05, 0.05, 0.3, CHANCE.duo_trio)).toBe(119);
  });
});

describe('sorting by guess', () => {
  it('has the printed chances of two to six glasses of each kind', () => {
    // J. Soc. Cosmetic Chemists 22(4) p. 217.
    const printed = [0.33, 0.1, 0.0286, 0.0079, 0.0022];
    printed.forEach((p, i) => expect(sortingChance(i + 2)).toBeCloseTo(p, i === 0 ? 2 : 4));
  });

  it('counts the ways to choose the first group, by multiplication', () => {
    for (let n = 1; n <= 30; n += 1) {
      let ways = 1n;
      for (let i = 1n; i <= BigInt(n); i += 1n) ways = (ways * (BigInt(n) + i)) / i;
      expect(sortingChance(n, true) * Number(ways)).toBeCloseTo(1, 11);
      // With one glass of each kind and no names asked for there is nothing to get wrong.
      expect(sortingChance(n) * Number(ways)).toBeCloseTo(2, 11);
    }
    expect(sortingChance(500)).toBeGreaterThan(0);
  });

  it('refuses glasses that can’t be sorted', () => {
    expectRefusal(() => sortingChance(0), 'out_of_range');
    expectRefusal(() => sortingChance(-2), 'out_of_range');
    expectRefusal(() => sortingChance(501), 'out_of_range');
    expectRefusal(() => sortingChance(2.5), 'not_integer');
    expectRefusal(() => sortingChance(NaN), 'not_finite');
    expectRefusal(() => sortingChance(Infinity), 'not_finite');
  });
});
