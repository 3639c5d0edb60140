import { requireFinite, requireInteger, requireProbability } from '../check';
import { tQuantile } from '../distributions';
import { StatsError } from '../errors';

/**
 * Half the width of a mean's confidence interval: t(1 − α/2; df) √(ms / n). With the interaction's
 * mean square it speaks of the products' differences for this panel, not of the panel's level.
 * Units: the score's. Throws on ms < 0, df ≤ 0, n < 1, level outside (0, 1).
 */
export function meanHalfWidth({ ms, df, n, level }: { ms: number; df: number; n: number; level: number }): number {
  requireFinite(ms, 'mean square');
  requireFinite(df, 'degrees of freedom');
  requireInteger(n, 'number of scores', 1);
  requireProbability(level, 'level');
  if (ms < 0) throw new StatsError('out_of_range', 'A mean square can’t be negative');
  if (df <= 0) throw new StatsError('too_few', 'There are no degrees of freedom for the error');
  return tQuantile((1 + level) / 2, df) * Math.sqrt(ms / n);
}
