import { requireProbability } from '../check';
import { StatsError } from '../errors';

/** What a sequential test is planned with. */
export interface SequentialPlan {
  /** Accepted risk of finding a difference that is not there. */
  readonly alpha: number;
  /** Accepted risk of finding similarity when the proportion correct is p1. */
  readonly beta: number;
  /** Proportion correct of products that do not differ (usually chance). */
  readonly p0: number;
  /** Proportion correct that matters, above p0. */
  readonly p1: number;
}

/** The two parallel decision lines: cumulative correct = intercept + slope × number of answers. */
export interface DecisionLines {
  readonly slope: number;
  /** At or below this line the products are similar. Negative. */
  readonly lowerIntercept: number;
  /** At or above this line the products differ. Positive. */
  readonly upperIntercept: number;
  /** Answers needed on average (Wald's approximation) when the true proportion is p0, and when it is p1. */
  readonly expectedAnswers: { readonly atP0: number; readonly atP1: number };
}

/**
 * Decision lines of Wald's sequential probability ratio test for correct/incorrect answers.
 * With D = ln[p1 (1 − p0) / (p0 (1 − p1))]: slope = ln[(1 − p0)/(1 − p1)] / D,
 * lower = ln[β/(1 − α)] / D, upper = ln[(1 − β)/α] / D.
 * Throws on probabilities outside (0, 1), p1 ≤ p0, α + β ≥ 1. Closed form.
 * Sources: A. Wald (1945) Ann. Math. Stat. 16:117; ISO 16820:2019.
 */
export function sequentialLines({ alpha, beta, p0, p1 }: SequentialPlan): DecisionLines {
  requireProbability(alpha, 'alpha');
  requireProbability(beta, 'beta');
  requireProbability(p0, 'p0');
  requireProbability(p1, 'p1');
  if (p1 <= p0) throw new StatsError('out_of_range', 'p1 must be above p0');
  if (alpha + beta >= 1) throw new StatsError('out_of_range', 'alpha and beta together must stay below 1');
  const right = Math.log(p1 / p0);
  const wrong = Math.log((1 - p1) / (1 - p0));
  const scale = right - wrong;
  const low = Math.log(beta / (1 - alpha));
  const high = Math.log((1 - beta) / alpha);
  const drift = (p: number) => p * right + (1 - p) * wrong;
  return {
    slope: -wrong / scale,
    lowerIntercept: low / scale,
    upperIntercept: high / scale,
    expectedAnswers: {
      atP0: ((1 - alpha) * low + alpha * high) / drift(p0),
      atP1: (beta * low + (1 - beta) * high) / drift(p1),
    },
  };
}

/** Where a sequential test stands. */
export interface SequentialResult {
  readonly decision: 'different' | 'similar' | 'continue';
  /** The answer (counted from 1) at which a line was reached; the number of answers so far while it goes on. */
  readonly answers: number;
  /** Correct answers up to there. */
  readonly correct: number;
  readonly lines: DecisionLines;
}

/**
 * Follows answers in the order given and stops at the first one that reaches a decision line; later answers
 * are not looked at. No answers yet gives `continue`. Throws as {@link sequentialLines}.
 * Source: ISO 16820:2019.
 */
export function sequentialTest(answers: readonly boolean[], plan: SequentialPlan): SequentialResult {
  const lines = sequentialLines(plan);
  let correct = 0;
  for (let n = 1; n <= answers.length; n += 1) {
    if (typeof answers[n - 1] !== 'boolean') throw new StatsError('shape', 'Every answer must be true or false');
    if (answers[n - 1]) correct += 1;
    const gap = correct - lines.slope * n;
    if (gap >= lines.upperIntercept) return { decision: 'different', answers: n, correct, lines };
    if (gap <= lines.lowerIntercept) return { decision: 'similar', answers: n, correct, lines };
  }
  return { decision: 'continue', answers: answers.length, correct, lines };
}
