import { binomialCdf, binomialPmf, chiSquareSf } from '../distributions';
import { requireInteger } from '../check';
import { StatsError } from '../errors';

/** McNemar's test of two yes/no answers from the same people. */
export interface McnemarResult {
  /** Yes to the first and no to the second; and the other way about. */
  b: number;
  c: number;
  /** Two-sided exact binomial p on b of b + c; 1 when nobody changed. */
  pExact: number;
  /** Two-sided mid-p, less careful than the exact p; null when nobody changed. */
  pMid: number | null;
  /** (b - c)^2/(b + c), 1 df, and its upper tail; null when nobody changed. */
  chiSquare: number | null;
  p: number | null;
  /** max(0, |b - c| - 1)^2/(b + c) and its upper tail; null when nobody changed. */
  chiSquareContinuity: number | null;
  pContinuity: number | null;
}

/**
 * McNemar's test from the two counts of people whose answers differ. Those who answer both alike carry no weight.
 *
 * The exact p is min(1, 2 P(X <= min(b, c))) with X binomial(b + c, 1/2). The mid-p takes off the probability of the
 * count that was seen. Prefer the exact p, or the mid-p, below about 25 changes.
 *
 * @param b yes then no, a whole number. @param c no then yes, a whole number.
 * @throws StatsError `not_finite`, `not_integer`, `out_of_range`.
 * Source: McNemar (1947) Psychometrika 12:153; Fagerland, Lydersen & Laake (2013). Checked against R 4.2.2 to 1e-11.
 */
export function mcnemar(b: number, c: number): McnemarResult {
  requireInteger(b, 'The number who said yes then no', 0, 1e9);
  requireInteger(c, 'The number who said no then yes', 0, 1e9);
  const n = b + c;
  if (n === 0) {
    return { b, c, pExact: 1, pMid: null, chiSquare: null, p: null, chiSquareContinuity: null, pContinuity: null };
  }
  const fewer = Math.min(b, c);
  const tail = binomialCdf(fewer, n, 0.5);
  const point = binomialPmf(fewer, n, 0.5);
  const chiSquare = (b - c) ** 2 / n;
  const chiSquareContinuity = Math.max(0, Math.abs(b - c) - 1) ** 2 / n;
  return {
    b,
    c,
    pExact: Math.min(1, 2 * tail),
    pMid: b === c ? 1 - point / 2 : 2 * tail - point,
    chiSquare,
    p: chiSquareSf(chiSquare, 1),
    chiSquareContinuity,
    pContinuity: chiSquareSf(chiSquareContinuity, 1),
  };
}

/**
 * McNemar's test from two equally long lists of 0/1 answers, one place per person.
 *
 * @throws StatsError `empty`, `shape` (lists of different length), `out_of_range` (an answer is neither 0 nor 1).
 */
export function mcnemarOfAnswers(first: ArrayLike<number>, second: ArrayLike<number>): McnemarResult {
  if (first.length === 0) throw new StatsError('empty', 'There are no answers to compare');
  if (first.length !== second.length) throw new StatsError('shape', 'Both lists of answers must be equally long');
  let b = 0;
  let c = 0;
  for (let i = 0; i < first.length; i += 1) {
    requireAnswer(first[i]);
    requireAnswer(second[i]);
    if (first[i] > second[i]) b += 1;
    else if (first[i] < second[i]) c += 1;
  }
  return mcnemar(b, c);
}

/** Throws `out_of_range` unless the answer is 0 or 1. */
export function requireAnswer(answer: number): void {
  if (answer !== 0 && answer !== 1) throw new StatsError('out_of_range', 'Every answer must be 0 or 1');
}
