import { StatsError } from '../errors';
import { requirePositive } from '../check';

/** Detection threshold of a panel from an ascending series. */
export interface Threshold {
  /** One best estimate a person, in the unit of the concentrations. */
  readonly individual: number[];
  /** Geometric mean over people. */
  readonly group: number;
  /** Standard deviation of log10 of the individual estimates (n − 1); null for one person. */
  readonly log10Sd: number | null;
  /** How many were right from the lowest step on, and how many missed the highest: their estimates are guesses. */
  readonly belowRange: number;
  readonly aboveRange: number;
}

/**
 * Best-estimate thresholds from an ascending forced-choice series. `concentrations` ascend (at least two,
 * above zero); `correct[person][step]` says whether the right glass was picked. A person's estimate is the
 * geometric mean of the last missed step and the next; with all right, half a step below the lowest; with
 * the last step missed, half a step above the highest (a step being the ratio of the nearest two).
 * Throws on no people, rows of another length, concentrations that do not ascend. Closed form.
 * Source: ASTM E679-19, 3-AFC ascending series.
 */
export function bestEstimateThreshold(
  concentrations: readonly number[],
  correct: readonly (readonly boolean[])[],
): Threshold {
  const steps = concentrations.length;
  if (steps < 2) throw new StatsError('too_few', 'A threshold needs at least two concentrations');
  concentrations.forEach((value, i) => {
    requirePositive(value, 'concentration');
    if (i > 0 && value <= concentrations[i - 1]) throw new StatsError('shape', 'Concentrations must ascend');
  });
  if (correct.length === 0) throw new StatsError('empty', 'A threshold needs at least one person');
  const logs = concentrations.map((value) => Math.log10(value));
  let belowRange = 0;
  let aboveRange = 0;
  const estimates = correct.map((row) => {
    if (row.length !== steps) throw new StatsError('shape', 'Every person needs one answer a concentration');
    const lastMissed = row.lastIndexOf(false);
    if (lastMissed === -1) {
      belowRange += 1;
      return logs[0] - (logs[1] - logs[0]) / 2;
    }
    if (lastMissed === steps - 1) {
      aboveRange += 1;
      return logs[lastMissed] + (logs[lastMissed] - logs[lastMissed - 1]) / 2;
    }
    return (logs[lastMissed] + logs[lastMissed + 1]) / 2;
  });
  const n = estimates.length;
  const mean = estimates.reduce((a, b) => a + b, 0) / n;
  const squares = estimates.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return {
    individual: estimates.map((value) => 10 ** value),
    group: 10 ** mean,
    log10Sd: n > 1 ? Math.sqrt(squares / (n - 1)) : null,
    belowRange,
    aboveRange,
  };
}
