import erfc from '@stdlib/math-base-special-erfc';
import erfcinv from '@stdlib/math-base-special-erfcinv';
import { requireClosedProbability, requireNumber } from './arguments';

const SQRT_HALF = Math.SQRT1_2;
const INV_SQRT_2PI = 0.3989422804014327;
const LN_SQRT_2PI = 0.9189385332046728;
/** From here outward the complementary error function loses digits to underflow. */
const FAR = 20;

/**
 * Mills' ratio sf(z) / density(z) for z ≥ 20, by Laplace's continued fraction
 * 1/(z + 1/(z + 2/(z + 3/(z + …)))). Relative error below 1e-15 there.
 */
function millsRatio(z: number): number {
  let tail = z;
  for (let i = 24; i >= 1; i -= 1) tail = z + i / tail;
  return 1 / tail;
}

/**
 * Standard normal density exp(−z²/2) / √(2π). Any real z; infinite z gives 0; throws on NaN.
 */
export function normalPdf(z: number): number {
  requireNumber(z, 'z');
  return INV_SQRT_2PI * Math.exp(-0.5 * z * z);
}

/**
 * Standard normal upper tail P(Z > z), computed directly, so small tails keep their digits.
 * Any real z; infinite z gives 0 or 1; throws on NaN. Relative error below 1e-12 down to 1e-315.
 */
export function normalSf(z: number): number {
  requireNumber(z, 'z');
  if (z < FAR) return 0.5 * erfc(z * SQRT_HALF);
  if (z > 39) return 0;
  // The density is split in two so that only the last product may fall below the normal range.
  const half = Math.exp(-0.25 * z * z);
  return half * INV_SQRT_2PI * millsRatio(z) * half;
}

/**
 * Standard normal distribution function P(Z ≤ z) = P(Z > −z).
 * Any real z; infinite z gives 0 or 1; throws on NaN. Relative error below 1e-12 down to 1e-315.
 */
export function normalCdf(z: number): number {
  return normalSf(-z);
}

/**
 * Natural logarithm of P(Z ≤ z), finite for every finite z. Throws on NaN.
 * Relative error below 1e-13.
 */
export function normalLogCdf(z: number): number {
  requireNumber(z, 'z');
  if (z === -Infinity) return -Infinity;
  if (z <= -FAR) return -0.5 * z * z - LN_SQRT_2PI + Math.log(millsRatio(-z));
  return z > 0 ? Math.log1p(-normalSf(z)) : Math.log(normalCdf(z));
}

/**
 * Standard normal quantile: the z with P(Z ≤ z) = p, for p in [0, 1] (0 and 1 give ∓Infinity).
 * Throws on p outside [0, 1] or NaN. The library value is polished by Newton steps on the
 * logarithm of the tail, so relative error stays below 1e-13 even at p = 1e-300.
 */
export function normalQuantile(p: number): number {
  requireClosedProbability(p);
  if (p === 0) return -Infinity;
  if (p === 1) return Infinity;
  if (p === 0.5) return 0;
  if (p > 0.5) return -lowerQuantile(1 - p);
  return lowerQuantile(p);
}

function lowerQuantile(p: number): number {
  const target = Math.log(p);
  let z = -Math.SQRT2 * erfcinv(2 * p);
  if (!Number.isFinite(z)) z = -Math.sqrt(-2 * target);
  if (z > -1.5) return z;
  for (let i = 0; i < 8; i += 1) {
    const logCdf = normalLogCdf(z);
    // d log Φ / dz = φ/Φ
    const slope = Math.exp(-0.5 * z * z - LN_SQRT_2PI - logCdf);
    const step = (logCdf - target) / slope;
    z -= step;
    if (Math.abs(step) < 1e-15 * Math.abs(z)) break;
  }
  return z;
}
