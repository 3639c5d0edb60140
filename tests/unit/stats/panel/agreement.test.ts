import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { assessorPerformance, fleissKappa, intraclassCorrelations, krippendorffAlpha, linConcordance, pearson, rvCoefficient, StatsError, steadyMean } from '@/stats';

const score = fc.integer({ min: 0, max: 100 });
const judged = fc.integer({ min: 3, max: 6 }).chain((n) => fc.integer({ min: 2, max: 5 }).chain((k) => fc.array(fc.array(score, { minLength: k, maxLength: k }), { minLength: n, maxLength: n })));

describe('intraclass correlation', () => {
  it('is the same for judges in another order, and for other levels and units of the scale', () => {
    fc.assert(
      fc.property(judged, (rows) => {
        fc.pre(isMixed(rows));
        const forms = intraclassCorrelations(rows);
        const turned = intraclassCorrelations(rows.map((row) => row.toReversed().map((y) => 7 + 3 * y)));
        for (const form of ['one', 'twoRandom', 'twoFixed', 'twoRandomMean'] as const) expect(turned[form].icc).toBeCloseTo(forms[form].icc, 8);
      }),
      { seed: 1 },
    );
  });

  it('of consistency takes no notice of a judge’s own level, that of agreement does', () => {
    const rows = [[1, 2, 4], [5, 6, 7], [9, 8, 9], [3, 5, 4]];
    const moved = rows.map(([a, b, c]) => [a, b, c + 20]);
    expect(intraclassCorrelations(moved).twoFixed.icc).toBeCloseTo(intraclassCorrelations(rows).twoFixed.icc, 10);
    expect(intraclassCorrelations(moved).twoRandom.icc).toBeLessThan(intraclassCorrelations(rows).twoRandom.icc);
  });

  it.each([
    ['one target', [[1, 2, 3]]],
    ['one judge', [[1], [2], [3]]],
    ['a gap', [[1, 2], [3, NaN]]],
    ['rows of different lengths', [[1, 2], [3]]],
    ['judges that agree wholly', [[1, 1], [5, 5], [9, 9]]],
    ['scores all alike', [[4, 4], [4, 4]]],
  ])('refuses %s', (_, rows) => expect(() => intraclassCorrelations(rows)).toThrow(StatsError));
});

/** Judges neither all agree nor differ by constants: something is left for the error. */
function isMixed(rows: number[][]): boolean {
  const first = rows[0];
  return rows.some((row) => row.some((y, j) => Math.abs(y - row[0] - (first[j] - first[0])) > 0.5)) && rows.some((row) => row.some((y, j) => y !== rows[0][j]));
}

describe('agreement by votes and by scores', () => {
  it('is 1 when all say the same of each, whatever the measure', () => {
    const ratings = [[1, 3, 5, 2], [1, 3, 5, 2], [1, 3, 5, 2]];
    for (const metric of ['nominal', 'ordinal', 'interval', 'ratio'] as const) expect(krippendorffAlpha(ratings, metric).alpha).toBeCloseTo(1, 12);
    expect(fleissKappa([[3, 0], [0, 3], [3, 0]]).kappa).toBeCloseTo(1, 12);
    expect(linConcordance([1, 3, 5, 2], [1, 3, 5, 2]).ccc).toBeCloseTo(1, 12);
  });

  it('by Fleiss’ κ is at most 1, and nearly Krippendorff’s nominal α for many subjects', () => {
    fc.assert(
      fc.property(fc.array(fc.array(fc.integer({ min: 0, max: 2 }), { minLength: 4, maxLength: 4 }), { minLength: 60, maxLength: 60 }), (votes) => {
        const counts = votes.map((row) => [0, 1, 2].map((category) => row.filter((vote) => vote === category).length));
        const { kappa } = fleissKappa(counts);
        fc.pre(kappa !== null);
        expect(kappa!).toBeLessThanOrEqual(1);
        const raters = [0, 1, 2, 3].map((rater) => votes.map((row) => row[rater]));
        // The two differ by a small-sample term of 1 / (subjects × raters).
        expect(Math.abs(krippendorffAlpha(raters, 'nominal').alpha! - kappa!)).toBeLessThan(1.5 / 240);
      }),
      { seed: 2, numRuns: 40 },
    );
  });

  it('by Lin’s concordance is never above the correlation', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(score, score), { minLength: 4, maxLength: 12 }), (pairs) => {
        const [x, y] = [pairs.map(([a]) => a), pairs.map(([, b]) => b)];
        const r = pearson(x, y);
        fc.pre(r !== null);
        expect(Math.abs(linConcordance(x, y).ccc!)).toBeLessThanOrEqual(Math.abs(r!) + 1e-12);
      }),
      { seed: 3 },
    );
  });

  it('by RV takes no notice of turning or stretching a configuration', () => {
    const x = [[1, 2], [4, 0], [3, 5], [7, 1]];
    const turned = x.map(([a, b]) => [3 * (0.6 * a - 0.8 * b), 3 * (0.8 * a + 0.6 * b)]);
    expect(rvCoefficient(x, turned)).toBeCloseTo(1, 12);
  });

  it.each([
    ['votes of nobody', () => fleissKappa([])],
    ['one rater', () => fleissKappa([[1, 0], [0, 1]])],
    ['a negative count', () => fleissKappa([[3, -1], [1, 1]])],
    ['different numbers of votes', () => fleissKappa([[2, 1], [1, 1]])],
    ['lists of different lengths', () => linConcordance([1, 2, 3], [1, 2])],
    ['NaN', () => rvCoefficient([[1, NaN], [2, 3], [4, 5]], [[1, 2], [3, 4], [5, 7]])],
    ['configurations of different objects', () => rvCoefficient([[1, 2], [2, 3]], [[1, 2], [3, 4], [5, 7]])],
  ])('%s is refused', (_, work) => expect(work).toThrow(StatsError));

  it('of votes for one category only is not defined', () => expect(fleissKappa([[3, 0], [3, 0]]).kappa).toBeNull());
  it('with a constant list is not defined', () => expect(pearson([1, 1, 1], [1, 2, 3])).toBeNull());
});

describe('steady means', () => {
  it('are the same for the same scores in another order, to the last bit', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 30 }), fc.nat(), (values, seed) => {
        const order = values.map((value, i) => ({ value, key: Math.sin(i * 12.9898 + seed) })).sort((a, b) => a.key - b.key);
        expect(steadyMean(order.map(({ value }) => value))).toBe(steadyMean(values));
      }),
      { seed: 4 },
    );
  });
});

describe('one assessor’s performance', () => {
  const table = (scores: number[]) => ({ scores, assessors: 3, products: 3, replicates: 2 });
  const scores = [10, 12, 20, 24, 31, 33, 5, 9, 22, 20, 30, 38, 30, 28, 22, 19, 12, 10];

  it('tells who reads the scale the other way round', () => {
    const [, , reversed] = assessorPerformance(table(scores));
    expect(reversed.agreement).toBeLessThan(-0.9);
  });

  it('does not change with the assessor’s level, and its repeatability is that of the replicates', () => {
    const moved = assessorPerformance(table(scores.map((y, at) => (at < 6 ? y + 40 : y))));
    const now = assessorPerformance(table(scores));
    expect(moved[0].f).toBeCloseTo(now[0].f!, 10);
    expect(moved[0].agreement).toBeCloseTo(now[0].agreement!, 10);
    // Differences of the replicates: 2, 4, 2; √(Σd²/2 / 3).
    expect(now[0].repeatability).toBeCloseTo(Math.sqrt(12 / 3), 10);
  });
});
