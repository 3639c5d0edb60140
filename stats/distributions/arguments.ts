import { StatsError } from '../errors';
import { requireProbability } from '../check';

/** Throws on NaN. Infinite values pass: a tail beyond infinity is 0 and below it 1. */
export function requireNumber(x: number, name: string): void {
  if (typeof x !== 'number' || Number.isNaN(x)) throw new StatsError('not_finite', `${name} must be a number`);
}

/** Throws unless `df` is above zero. Infinity passes (the limiting distribution). */
export function requireDf(df: number, name: string): void {
  requireNumber(df, name);
  if (df <= 0) throw new StatsError('out_of_range', `${name} must be above zero`);
}

/** Throws unless 0 ≤ p ≤ 1. */
export function requireClosedProbability(p: number, name = 'p'): void {
  requireProbability(p, name, true);
}
