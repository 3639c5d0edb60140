import betaln from '@stdlib/math-base-special-betaln';
import gammaln from '@stdlib/math-base-special-gammaln';
import { requireInteger, requirePositive } from '../check';

/**
 * Natural logarithm of the gamma function, ln Γ(x), for x > 0.
 * Throws on x ≤ 0, NaN or infinite. Relative error below 1e-14 (absolute near x = 1 and 2).
 * Source: W. J. Cody's rational approximations, through the stdlib library.
 */
export function logGamma(x: number): number {
  requirePositive(x, 'x');
  return gammaln(x);
}

/**
 * Natural logarithm of the beta function, ln B(a, b) = ln Γ(a) + ln Γ(b) − ln Γ(a + b), for a, b > 0.
 * Throws on values that are not finite and above zero. Relative error about 1e-14.
 */
export function logBeta(a: number, b: number): number {
  requirePositive(a, 'a');
  requirePositive(b, 'b');
  return betaln(a, b);
}

/**
 * Natural logarithm of the binomial coefficient, ln [n! / (k! (n − k)!)], for whole 0 ≤ k ≤ n.
 * Throws on numbers that are not whole or out of that range. Relative error about 1e-14.
 */
export function logChoose(n: number, k: number): number {
  requireInteger(n, 'n', 0);
  requireInteger(k, 'k', 0, n);
  if (k === 0 || k === n) return 0;
  return -betaln(k + 1, n - k + 1) - Math.log(n + 1);
}
