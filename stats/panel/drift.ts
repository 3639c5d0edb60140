import { requireFinite } from '../check';
import { tQuantile, tTwoSided } from '../distributions';
import { StatsError } from '../errors';
import { highest, requireServed, type ServedScores } from './serving-effect';

/** How one person's scores move as a tasting goes on. `change` = slope × the span of time. */
export interface Drift {
  readonly slope: number;
  readonly standardError: number;
  readonly df: number;
  readonly p: number;
  readonly low: number;
  readonly high: number;
  readonly change: number;
}

/**
 * Drift of each assessor: the straight line of (own score − panel's mean of that product) on time (place in
 * the serving, or session), with t limits at `level`. Null for an assessor with fewer than three scores, or
 * all at one time, or without any scatter about the line.
 * Common practice. Errors as `servingEffect`.
 */
export function drift(scores: ServedScores, time: ArrayLike<number>, level = 0.95): (Drift | null)[] {
  const { assessor, product, score } = scores;
  const n = score.length;
  requireServed(scores, new Int32Array(n));
  if (time.length !== n) throw new StatsError('shape', 'There must be one time for each score');
  requireFinite(level, 'level');
  const products = highest(product, n) + 1;
  const sums = new Float64Array(products);
  const counts = new Float64Array(products);
  for (let i = 0; i < n; i += 1) {
    requireFinite(time[i], 'time');
    sums[product[i]] += score[i];
    counts[product[i]] += 1;
  }
  const own: { t: number; y: number }[][] = Array.from({ length: highest(assessor, n) + 1 }, () => []);
  for (let i = 0; i < n; i += 1) own[assessor[i]].push({ t: time[i], y: score[i] - sums[product[i]] / counts[product[i]] });
  return own.map((points) => line(points, level));
}

function line(points: readonly { t: number; y: number }[], level: number): Drift | null {
  const n = points.length;
  if (n < 3) return null;
  const t0 = points.reduce((sum, { t }) => sum + t, 0) / n;
  const y0 = points.reduce((sum, { y }) => sum + y, 0) / n;
  let stt = 0;
  let sty = 0;
  let syy = 0;
  let first = Infinity;
  let last = -Infinity;
  for (const { t, y } of points) {
    first = Math.min(first, t);
    last = Math.max(last, t);
    stt += (t - t0) ** 2;
    sty += (t - t0) * (y - y0);
    syy += (y - y0) ** 2;
  }
  const error = stt > 0 ? syy - sty ** 2 / stt : 0;
  if (stt === 0 || error <= 1e-12 * syy) return null;
  const df = n - 2;
  const slope = sty / stt;
  const standardError = Math.sqrt(error / df / stt);
  const reach = tQuantile((1 + level) / 2, df) * standardError;
  return { slope, standardError, df, p: tTwoSided(slope / standardError, df), low: slope - reach, high: slope + reach, change: slope * (last - first) };
}
