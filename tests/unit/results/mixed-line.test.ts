import { describe, expect, it } from 'vitest';
import type { LongScore } from '@/lib/results/evidence';
import { analyseLine } from '@/lib/results/profile-line';

/** Four panelists, three samples, two replicates, five glasses not scored. */
const ROWS: LongScore[] = (
  [
    [1, 1, 41], [1, 1, 44], [1, 2, 52], [1, 3, 60], [2, 1, 38], [2, 2, 47], [2, 2, 50], [2, 3, 61], [2, 3, 58], [3, 1, 55], [3, 2, 59], [3, 3, 70], [3, 3, 66],
    [4, 1, 49], [4, 1, 47], [4, 2, 61], [4, 2, 57], [4, 3, 59], [4, 3, 64],
  ] as const
).map(([assessor, product, score], i, all) => ({
  assessor, product, score, position: product, replicate: i > 0 && all[i - 1]![0] === assessor && all[i - 1]![1] === product ? 2 : 1,
}));

describe('a line with missing scores', () => {
  const line = analyseLine(ROWS, [1, 2, 3], 2, 0.05);

  // R 4.2: lmer(y ~ p + (1|a) + (1|a:p)), anova(ddf = "Kenward-Roger"), emmeans(lmer.df = "kenward-roger")
  it('has the test and the marginal means of lmerTest, pbkrtest and emmeans', () => {
    expect(line.method).toBe('mixed');
    expect(line.product!.F).toBeCloseTo(39.60219, 3);
    expect(line.product!.df2).toBeCloseTo(5.675079, 3);
    expect(line.cells.map((cell) => cell.mean.toFixed(3))).toEqual(['45.831', '54.774', '62.216']);
    expect(line.cells.map((cell) => cell.n)).toEqual([6, 6, 7]);
  });

  it('counts everybody, and says whose scores are missing', () => {
    expect(line.assessors).toEqual([1, 2, 3, 4]);
    expect(line.gaps).toEqual([1, 2, 3]);
    expect(line.leftOut).toEqual([]);
  });

  it('gives each pair limits that hold its difference and shut out 0 exactly when p is below α', () => {
    for (const pair of line.pairs) {
      expect(pair.low).toBeLessThan(pair.difference);
      expect(pair.high).toBeGreaterThan(pair.difference);
      expect(pair.low > 0 || pair.high < 0).toBe(pair.p <= 0.05);
    }
  });
});
