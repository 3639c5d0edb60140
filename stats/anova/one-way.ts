import { requireFiniteArray, requireInteger } from '../check';
import { StatsError } from '../errors';
import { testLine, type AnovaLine, type TestedLine } from './profile-anova';

export interface OneWayAnova {
  readonly between: TestedLine;
  readonly within: AnovaLine;
  readonly means: Float64Array;
  /** Scores in each group. */
  readonly counts: Int32Array;
}

/**
 * One-way analysis of variance of groups of any sizes. `group` holds whole numbers from 0; every
 * group up to the highest must have a score, and one of them at least two.
 * @throws StatsError `too_few`, `shape`, `not_finite`, `empty`
 */
export function oneWayAnova(group: ArrayLike<number>, score: ArrayLike<number>): OneWayAnova {
  if (group.length !== score.length) throw new StatsError('shape', 'Groups and scores must be equally many');
  requireFiniteArray(score, 'scores');
  let k = 0;
  for (let i = 0; i < group.length; i += 1) {
    requireInteger(group[i], 'group', 0, 999_999);
    if (group[i] >= k) k = group[i] + 1;
  }
  const n = score.length;
  if (k < 2 || n <= k) throw new StatsError('too_few', 'A one-way analysis needs two groups and a group with two scores');
  const means = new Float64Array(k);
  const counts = new Int32Array(k);
  let grand = 0;
  for (let i = 0; i < n; i += 1) {
    means[group[i]] += score[i];
    counts[group[i]] += 1;
    grand += score[i] / n;
  }
  let ssBetween = 0;
  for (let g = 0; g < k; g += 1) {
    if (counts[g] === 0) throw new StatsError('empty', 'A group holds no scores');
    means[g] /= counts[g];
    ssBetween += counts[g] * (means[g] - grand) ** 2;
  }
  let ssWithin = 0;
  for (let i = 0; i < n; i += 1) ssWithin += (score[i] - means[group[i]]) ** 2;
  const within = { ss: ssWithin, df: n - k, ms: ssWithin / (n - k) };
  return { between: testLine({ ss: ssBetween, df: k - 1, ms: ssBetween / (k - 1) }, within), within, means, counts };
}
