import { requireFiniteArray, requireProbability } from '../check';
import { tQuantile, tTwoSided } from '../distributions';
import { StatsError } from '../errors';

/** A straight line through the means of successive pulls. Units: the descriptor's, per unit of time. */
export interface Trend {
  readonly slope: number;
  readonly standardError: number;
  readonly df: number;
  readonly low: number;
  readonly high: number;
  /** Two-sided, of a slope of 0. */
  readonly p: number;
  /** The line's value at a time, with limits of the line there. */
  at(time: number): { readonly value: number; readonly low: number; readonly high: number };
}

/**
 * Trend of one descriptor of one barrel over its pulls: least squares of the pulls' means on time, each
 * weighted (by number of panelists, say; equal weights by default), with t limits at `level` on n − 2
 * degrees of freedom. The pulls' own scatter about the line is the error, so it holds what differs between
 * sessions too. Panel means of different sessions compare only as far as the panel keeps its scale.
 *
 * @param times one for each pull, any unit (days); at least three of them different
 * @throws StatsError `too_few` below three pulls, `constant` when all stand at one time, `shape`, `out_of_range` on a weight not above 0
 * Source: weighted least squares, any text; checked against R's lm with weights.
 */
export function trendOverPulls(times: ArrayLike<number>, means: ArrayLike<number>, options: { weights?: ArrayLike<number>; level?: number } = {}): Trend {
  const { weights, level = 0.95 } = options;
  requireFiniteArray(times, 'times');
  requireFiniteArray(means, 'means');
  if (weights) requireFiniteArray(weights, 'weights');
  requireProbability(level, 'level');
  const n = times.length;
  if (means.length !== n || (weights && weights.length !== n)) throw new StatsError('shape', 'There must be one mean, and one weight, for each time');
  if (n < 3) throw new StatsError('too_few', 'A trend with limits needs at least three pulls');
  const weight = (i: number): number => weights?.[i] ?? 1;
  let total = 0;
  let timeMean = 0;
  let meanMean = 0;
  for (let i = 0; i < n; i += 1) {
    if (weight(i) <= 0) throw new StatsError('out_of_range', 'A weight must be above 0');
    total += weight(i);
    timeMean += weight(i) * times[i];
    meanMean += weight(i) * means[i];
  }
  timeMean /= total;
  meanMean /= total;
  let sxx = 0;
  let sxy = 0;
  for (let i = 0; i < n; i += 1) {
    sxx += weight(i) * (times[i] - timeMean) ** 2;
    sxy += weight(i) * (times[i] - timeMean) * (means[i] - meanMean);
  }
  if (sxx === 0) throw new StatsError('constant', 'All pulls were tasted at one time, so there is no trend to see');
  const slope = sxy / sxx;
  let ss = 0;
  for (let i = 0; i < n; i += 1) ss += weight(i) * (means[i] - meanMean - slope * (times[i] - timeMean)) ** 2;
  const df = n - 2;
  const variance = ss / df;
  const standardError = Math.sqrt(variance / sxx);
  const t = tQuantile((1 + level) / 2, df);
  return {
    slope,
    standardError,
    df,
    low: slope - t * standardError,
    high: slope + t * standardError,
    p: standardError === 0 ? (slope === 0 ? 1 : 0) : tTwoSided(slope / standardError, df),
    at(time) {
      requireFiniteArray([time], 'time');
      const value = meanMean + slope * (time - timeMean);
      const reach = t * Math.sqrt(variance * (1 / total + (time - timeMean) ** 2 / sxx));
      return { value, low: value - reach, high: value + reach };
    },
  };
}
