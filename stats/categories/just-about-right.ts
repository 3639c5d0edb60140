import { requireFiniteArray, requireInteger } from '../check';
import { StatsError } from '../errors';
import { twoMeans, type TwoMeansTest } from './two-means';

/** People who chose one side of a just-about-right scale. */
export interface JarGroup {
  n: number;
  /** Share of all respondents, in percent. */
  percent: number;
  /** Mean liking of the group; null when it is empty. */
  meanLiking: number | null;
}

/** A side of the scale with what it costs in liking. */
export interface JarPenalty extends JarGroup {
  /** Mean liking of the just-about-right group less that of this group; null when either is empty. */
  meanDrop: number | null;
  /** Mean drop times the share of all respondents in this group. */
  weightedPenalty: number | null;
  /** Tests of the drop; null when a group has fewer than two people or liking does not vary. */
  welch: TwoMeansTest | null;
  pooled: TwoMeansTest | null;
}

export interface JarAnalysis {
  n: number;
  /** Number of answers at each point of the scale, from 1 up. */
  counts: number[];
  jar: JarGroup;
  tooLow: JarPenalty;
  tooHigh: JarPenalty;
  /** Just about right against everyone else. */
  overall: { meanDrop: number | null; welch: TwoMeansTest | null; pooled: TwoMeansTest | null };
}

/**
 * Just-about-right counts and penalty analysis of one attribute of one product.
 *
 * The middle point means just about right; lower points are too low, higher ones too high. The mean drop is the liking
 * lost against the just-about-right group, in units of the liking scale; a drop is usually shown only for a side that
 * 20 % or more of the respondents chose. The drops are associations, not effects of changing the product.
 *
 * @param ratings points of the scale, whole numbers 1..points, one for each respondent.
 * @param liking liking of the same respondents, any numeric scale. No missing values: drop the respondent first.
 * @param points odd number of points of the scale, 5 unless given.
 * @throws StatsError `empty`, `shape` (unequal lengths), `not_finite`, `not_integer`, `out_of_range`.
 * Source: ASTM MNL63, Just-About-Right (JAR) Scales. Checked against R 4.2.2 to 1e-10.
 */
export function jarPenalties(ratings: ArrayLike<number>, liking: ArrayLike<number>, points = 5): JarAnalysis {
  requireFiniteArray(ratings, 'The list of ratings');
  requireFiniteArray(liking, 'The list of liking scores');
  requireInteger(points, 'The number of points of the scale', 3, 101);
  if (points % 2 === 0) throw new StatsError('out_of_range', 'A just-about-right scale has an odd number of points');
  const n = ratings.length;
  if (liking.length !== n) throw new StatsError('shape', 'There must be one liking score for every rating');
  const middle = (points + 1) / 2;
  const counts = new Array<number>(points).fill(0);
  const low: number[] = [];
  const jar: number[] = [];
  const high: number[] = [];
  for (let i = 0; i < n; i += 1) {
    requireInteger(ratings[i], 'Every rating', 1, points);
    counts[ratings[i] - 1] += 1;
    (ratings[i] < middle ? low : ratings[i] > middle ? high : jar).push(liking[i]);
  }
  const others = twoMeans(jar, [...low, ...high]);
  const jarMean = mean(jar);
  const othersMean = mean([...low, ...high]);
  return {
    n,
    counts,
    jar: { n: jar.length, percent: (100 * jar.length) / n, meanLiking: jarMean },
    tooLow: penalty(low, jar, n),
    tooHigh: penalty(high, jar, n),
    overall: {
      meanDrop: jarMean === null || othersMean === null ? null : jarMean - othersMean,
      welch: others?.welch ?? null,
      pooled: others?.pooled ?? null,
    },
  };
}

function mean(values: number[]): number | null {
  return values.length === 0 ? null : values.reduce((sum, v) => sum + v, 0) / values.length;
}

function penalty(group: number[], jar: number[], n: number): JarPenalty {
  const meanLiking = mean(group);
  const jarMean = mean(jar);
  const meanDrop = meanLiking === null || jarMean === null ? null : jarMean - meanLiking;
  const tests = twoMeans(jar, group);
  return {
    n: group.length,
    percent: (100 * group.length) / n,
    meanLiking,
    meanDrop,
    weightedPenalty: meanDrop === null ? null : (meanDrop * group.length) / n,
    welch: tests?.welch ?? null,
    pooled: tests?.pooled ?? null,
  };
}
