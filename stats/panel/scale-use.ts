import { requireFinite, requireFiniteArray } from '../check';
import { StatsError } from '../errors';

/** How one person used a line scale. Units: the scale's. */
export interface ScaleUse {
  readonly n: number;
  readonly mean: number;
  /** Standard deviation (n − 1); null with one score. */
  readonly sd: number | null;
  readonly least: number;
  readonly most: number;
  /** Share of the scale between the least and the greatest score, 0 to 1. */
  readonly share: number;
  /** Share of the scores within `margin` of an end. */
  readonly atEnds: number;
  /** Number of different values. */
  readonly distinct: number;
}

/**
 * Where on the scale a person's scores lie: level, spread, the part used, scores at the ends (where the scale
 * can hide a difference). `low` and `high` are the scale's ends, scores lie between; `margin` is a share of
 * the scale, 0.02 by default.
 * Common practice; no standard gives limits.
 * @throws StatsError `empty`, `not_finite`, `out_of_range` on a score beyond the scale or low ≥ high
 */
export function scaleUse(scores: ArrayLike<number>, { low, high, margin = 0.02 }: { low: number; high: number; margin?: number }): ScaleUse {
  requireFiniteArray(scores, 'scores');
  requireFinite(low, 'the low end');
  requireFinite(high, 'the high end');
  if (low >= high) throw new StatsError('out_of_range', 'The high end of the scale must be above the low end');
  if (!(margin >= 0 && margin < 0.5)) throw new StatsError('out_of_range', 'The margin must lie between 0 and 0.5');
  const n = scores.length;
  const reach = margin * (high - low);
  const values = new Set<number>();
  let least = Infinity;
  let most = -Infinity;
  let sum = 0;
  let ends = 0;
  for (let i = 0; i < n; i += 1) {
    const score = scores[i];
    if (score < low || score > high) throw new StatsError('out_of_range', 'A score lies beyond the ends of the scale');
    least = Math.min(least, score);
    most = Math.max(most, score);
    sum += score;
    values.add(score);
    if (score <= low + reach || score >= high - reach) ends += 1;
  }
  const mean = sum / n;
  let ss = 0;
  for (let i = 0; i < n; i += 1) ss += (scores[i] - mean) ** 2;
  return {
    n,
    mean,
    sd: n > 1 ? Math.sqrt(ss / (n - 1)) : null,
    least,
    most,
    share: (most - least) / (high - low),
    atEnds: ends / n,
    distinct: values.size,
  };
}
