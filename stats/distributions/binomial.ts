import betainc from '@stdlib/math-base-special-betainc';
import { requireFinite, requireInteger } from '../check';
import { requireClosedProbability } from './arguments';

function check(k: number, n: number, p: number): void {
  requireInteger(n, 'n', 0);
  requireFinite(k, 'k');
  requireInteger(k, 'k');
  requireClosedProbability(p);
}

/** ln(m!) minus Stirling's leading terms, for m ≥ 1 (Loader 2000, section 2). */
const SMALL = [
  0, 0.08106146679532726, 0.0413406959554093, 0.02767792568499834, 0.020790672103765093, 0.016644691189821193,
  0.013876128823070748, 0.01189670994589177, 0.010411265261972096, 0.009255462182712733, 0.00833056343336287,
  0.007573675487951841, 0.00694284010720953, 0.006408994188004207, 0.0059513701127588475, 0.005554733551962801,
];

function stirlingError(m: number): number {
  if (m < 16) return SMALL[m];
  const s = 1 / (m * m);
  return (1 / 12 - s * (1 / 360 - s * (1 / 1260 - s * (1 / 1680 - s / 1188)))) / m;
}

/** Deviance x ln(x/m) + m − x without cancellation when x is near m (Loader 2000, section 3). */
function deviance(x: number, m: number): number {
  const d = x - m;
  if (Math.abs(d) >= 0.1 * (x + m)) return x * Math.log(x / m) + m - x;
  const v = d / (x + m);
  let sum = d * v;
  let term = 2 * x * v;
  for (let j = 1; j < 1000; j += 1) {
    term *= v * v;
    const next = sum + term / (2 * j + 1);
    if (next === sum) break;
    sum = next;
  }
  return sum;
}

/**
 * Binomial probability P(X = k) = C(n, k) p^k (1 − p)^(n − k), whole n ≥ 0, p in [0, 1];
 * k outside 0..n gives 0. Throws on numbers that are not whole, p out of range, NaN.
 * Relative error below 1e-13. Source: C. Loader (2000), "Fast and accurate computation of
 * binomial probabilities" (saddle-point form).
 */
export function binomialPmf(k: number, n: number, p: number): number {
  check(k, n, p);
  if (k < 0 || k > n) return 0;
  if (p === 0) return k === 0 ? 1 : 0;
  if (p === 1) return k === n ? 1 : 0;
  const q = 1 - p;
  if (k === 0) return Math.exp(n * Math.log1p(-p));
  if (k === n) return Math.exp(n * Math.log(p));
  const exponent =
    stirlingError(n) - stirlingError(k) - stirlingError(n - k) - deviance(k, n * p) - deviance(n - k, n * q);
  return Math.exp(exponent) * Math.sqrt(n / (2 * Math.PI * k * (n - k)));
}

/**
 * Binomial upper tail with its end, P(X ≥ k) = I_p(k, n − k + 1), computed directly.
 * k ≤ 0 gives 1, k > n gives 0. Domain and errors as {@link binomialPmf}. Relative error below 1e-12.
 */
export function binomialSf(k: number, n: number, p: number): number {
  check(k, n, p);
  if (k <= 0) return 1;
  if (k > n || p === 0) return 0;
  if (p === 1) return 1;
  return betainc(p, k, n - k + 1, true, false);
}

/**
 * Binomial lower tail with its end, P(X ≤ k) = 1 − I_p(k + 1, n − k), computed directly.
 * k < 0 gives 0, k ≥ n gives 1. Domain and errors as {@link binomialPmf}. Relative error below 1e-12.
 */
export function binomialCdf(k: number, n: number, p: number): number {
  check(k, n, p);
  if (k < 0) return 0;
  if (k >= n || p === 0) return 1;
  if (p === 1) return 0;
  return betainc(p, k + 1, n - k, true, true);
}
