import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cloudEllipse, cutTree, generalizedProcrustes, panelEllipses, StatsError, wardClusters } from '@/stats';

const base = [[0, 0, 1], [4, 1, 0], [1, 5, 2], [6, 6, -1], [3, -2, 0]];
const rotate = (rows: number[][], angle: number, factor = 1, shift = 0) =>
  rows.map(([x, y, z]) => [
    factor * (x * Math.cos(angle) - y * Math.sin(angle)) + shift,
    factor * (x * Math.sin(angle) + y * Math.cos(angle)) - shift,
    -factor * z,
  ]);

describe('generalizedProcrustes', () => {
  it('brings turned, mirrored, moved and stretched copies together without a rest', () => {
    const result = generalizedProcrustes([base, rotate(base, 1.1, 2, 5), rotate(base, -2.4, 0.5, 1)]);
    expect(result.consensusPercent).toBeCloseTo(100, 6);
    const [one, two, three] = result.scalingFactors;
    expect(one / two).toBeCloseTo(2, 5);
    expect(one / three).toBeCloseTo(0.5, 5);
  });

  it('splits the total, which is the number of sets, by set and by object', () => {
    const other = base.map(([x, y, z], i) => [x + (i % 2), y - i, z * 2]);
    const result = generalizedProcrustes([base, other, rotate(other, 0.3)]);
    const sum = (values: number[]) => values.reduce((a, b) => a + b, 0);
    expect(result.totalSs).toBeCloseTo(3, 9);
    expect(sum(result.residualBySet)).toBeCloseTo(result.residualSs, 9);
    expect(sum(result.residualByObject)).toBeCloseTo(result.residualSs, 9);
    expect(sum(result.consensusByObject)).toBeCloseTo(result.consensusSs, 9);
    expect(sum(result.consensusAxesPercent)).toBeCloseTo(100, 9);
  });

  it('never does worse with more starts or with scaling, and repeats with its seed', () => {
    const sets = [1, 2, 3, 4].map((s) => base.map((row, i) => row.map((_, j) => Math.sin(7 * s + 3 * i + 5 * j * s))));
    const few = generalizedProcrustes(sets, { starts: 1 });
    const many = generalizedProcrustes(sets, { starts: 12 });
    expect(many.residualSs).toBeLessThanOrEqual(few.residualSs + 1e-9);
    expect(many.residualSs).toBeLessThanOrEqual(generalizedProcrustes(sets, { starts: 12, scale: false }).residualSs + 1e-6);
    expect(generalizedProcrustes(sets, { starts: 12 })).toEqual(many);
    expect(many.optima[0]).toBeCloseTo(many.consensusPercent, 9);
  });

  it('takes sets of different width', () => {
    const flat = base.map(([x, y]) => [x, y]);
    expect(generalizedProcrustes([flat, base]).consensus).toHaveLength(5);
  });

  it('refuses hostile sets', () => {
    const bad = [[], [base], [base, base.slice(1)], [base, base.map(() => [1, 1, 1])], [base, [[NaN]]], [base, []]];
    for (const sets of bad) expect(() => generalizedProcrustes(sets)).toThrow(StatsError);
    expect(() => generalizedProcrustes([base, base], { starts: 0 })).toThrow(StatsError);
  });
});

describe('wardClusters', () => {
  const wines = [[6.1, 3.2, 4.0], [5.9, 3.5, 4.4], [2.0, 7.1, 6.3], [2.4, 6.8, 5.9], [8.8, 1.0, 2.2], [5.0, 5.0, 5.0], [8.1, 1.4, 2.0]];

  it('agrees with SciPy 1.17.1, scipy.cluster.hierarchy.linkage(X, "ward")', () => {
    const expected = [
      [0, 1, 0.5385164807134504, 2],
      [2, 3, 0.6403124237432845, 2],
      [4, 6, 0.8306623862918084, 2],
      [5, 7, 2.411776661854631, 3],
      [9, 10, 7.037850050500745, 5],
      [8, 11, 11.299772437658074, 7],
    ];
    wardClusters(wines).forEach(({ a, b, height, size }, i) => {
      expect([a, b, size]).toEqual([expected[i][0], expected[i][1], expected[i][3]]);
      expect(height / expected[i][2]).toBeCloseTo(1, 12);
    });
  });

  it('cuts into the clusters that the joinings say', () => {
    const merges = wardClusters(wines);
    expect(cutTree(merges, 3)).toEqual([0, 0, 1, 1, 2, 0, 2]);
    expect(cutTree(merges, 1)).toEqual([0, 0, 0, 0, 0, 0, 0]);
    expect(cutTree(merges, 7)).toEqual([0, 1, 2, 3, 4, 5, 6]);
  });

  it('adds up: half the squared heights are the total sum of squares', () => {
    const point = fc.tuple(fc.integer({ min: -20, max: 20 }), fc.integer({ min: -20, max: 20 }));
    fc.assert(
      fc.property(fc.array(point, { minLength: 1, maxLength: 25 }), (points) => {
        const merges = wardClusters(points);
        const heights = merges.map(({ height }) => height);
        expect(heights).toEqual([...heights].sort((x, y) => x - y));
        const mean = [0, 1].map((j) => points.reduce((sum, p) => sum + p[j], 0) / points.length);
        const total = points.reduce((sum, p) => sum + (p[0] - mean[0]) ** 2 + (p[1] - mean[1]) ** 2, 0);
        expect(heights.reduce((sum, h) => sum + (h * h) / 2, 0)).toBeCloseTo(total, 6);
      }),
    );
  });

  it('refuses hostile tables and cuts', () => {
    for (const rows of [[], [[1], [NaN]], [[1, 2], [3]], [[1e200], [-1e200]]]) expect(() => wardClusters(rows)).toThrow(StatsError);
    expect(() => wardClusters(Array.from({ length: 5001 }, (_, i) => [i]))).toThrow(StatsError);
    expect(() => cutTree(wardClusters(wines), 8)).toThrow(StatsError);
    expect(() => cutTree(wardClusters(wines), 0)).toThrow(StatsError);
  });
});

describe('ellipses', () => {
  it('hold their share of the cloud', () => {
    const x = Array.from({ length: 1000 }, (_, i) => Math.sin(i) * 3 + Math.cos(i * 2.7));
    const y = x.map((value, i) => value / 2 + Math.sin(i * 1.9));
    const { centre, semiMajor, semiMinor, angle } = cloudEllipse(x, y, 0.9);
    const inside = x.filter((value, i) => {
      const [dx, dy] = [value - centre[0], y[i] - centre[1]];
      const along = dx * Math.cos(angle) + dy * Math.sin(angle);
      const across = dy * Math.cos(angle) - dx * Math.sin(angle);
      return (along / semiMajor) ** 2 + (across / semiMinor) ** 2 <= 1 + 1e-12;
    });
    expect(inside).toHaveLength(900);
  });

  it('have no width for a cloud on a line', () => {
    const { semiMinor, angle } = cloudEllipse([0, 1, 2, 3], [0, 1, 2, 3], 0.95);
    expect(semiMinor).toBeCloseTo(0, 6);
    expect(angle).toBeCloseTo(Math.PI / 4, 12);
  });

  const panel = (noise: number) =>
    Array.from({ length: 10 }, (_, i) => base.map((row, j) => row.map((x, a) => x + noise * Math.sin(13 * i + 7 * j + 3 * a))));

  it.each(['rotated', 'projected'] as const)('shrink with agreement and repeat with the seed (%s)', (method) => {
    const size = (noise: number) => panelEllipses(panel(noise), { method, resamples: 100 }).ellipses.reduce((sum, e) => sum + e.semiMajor, 0);
    expect(size(0.1)).toBeLessThan(size(1));
    expect(size(0)).toBeCloseTo(0, 9);
    expect(panelEllipses(panel(1), { method, resamples: 100 })).toEqual(panelEllipses(panel(1), { method, resamples: 100 }));
  });

  it('refuse small and broken panels', () => {
    expect(() => panelEllipses(panel(1).slice(0, 2))).toThrow(StatsError);
    expect(() => panelEllipses(panel(1), { axes: [0, 9] })).toThrow(StatsError);
    expect(() => panelEllipses([...panel(1), base.slice(1)])).toThrow(StatsError);
    expect(() => panelEllipses([...panel(1), base.map(() => [1, NaN, 2])])).toThrow(StatsError);
    expect(() => cloudEllipse([1, 2], [1, 2], 0.9)).toThrow(StatsError);
  });
});
