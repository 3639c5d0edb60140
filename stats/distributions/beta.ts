import betainc from '@stdlib/math-base-special-betainc';
import quantile from '@stdlib/stats-base-dists-beta-quantile';
import { requireClosedProbability, requireNumber } from './arguments';
import { requirePositive } from '../check';

function tail(x: number, a: number, b: number, upper: boolean): number {
  requireNumber(x, 'x');
  requirePositive(a, 'a');
  requirePositive(b, 'b');
  if (x <= 0) return upper ? 1 : 0;
  if (x >= 1) return upper ? 0 : 1;
  return betainc(x, a, b, true, upper);
}

/**
 * Distribution function of the beta distribution, P(X ≤ x) = I_x(a, b), a, b > 0.
 * x outside [0, 1] gives 0 or 1. Throws on NaN and on a, b ≤ 0. Relative error below 1e-9, usually 1e-14.
 */
export function betaCdf(x: number, a: number, b: number): number {
  return tail(x, a, b, false);
}

/** Upper tail of the beta distribution, P(X > x), computed directly. Domain as {@link betaCdf}. */
export function betaSf(x: number, a: number, b: number): number {
  return tail(x, a, b, true);
}

/**
 * Quantile of the beta distribution: the x with P(X ≤ x) = p, p in [0, 1], a, b > 0.
 * Throws on p outside [0, 1], NaN, a, b ≤ 0. Relative error about 1e-13.
 */
export function betaQuantile(p: number, a: number, b: number): number {
  requireClosedProbability(p);
  requirePositive(a, 'a');
  requirePositive(b, 'b');
  if (p === 0 || p === 1) return p;
  return quantile(p, a, b);
}
