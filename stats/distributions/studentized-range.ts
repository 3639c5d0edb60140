import { requireInteger } from '../check';
import { StatsError } from '../errors';
import { requireClosedProbability, requireDf, requireNumber } from './arguments';
import { logGamma } from './gamma';
import { normalQuantile } from './normal';
import { normalRangeTail } from './normal-range';
import { tQuantile, tTwoSided } from './t';

/** Largest number of means the quadrature is made for. */
const MAX_MEANS = 200;
interface Scale {
  /** Values of s = √(χ²_df / df). */
  readonly at: Float64Array;
  /** Their probability mass in the trapezoidal rule. */
  readonly mass: Float64Array;
}

const scales = new Map<number, Scale>();
const KEEP = 64;

/**
 * A trapezoidal rule for the scale s with density 2 (df/2)^(df/2) / Γ(df/2) s^(df−1) exp(−df s²/2),
 * on the variable x of ln s = x − exp(−x) + 1 for few degrees of freedom (which makes the left tail fall
 * doubly exponentially) and on ln s itself for many.
 */
function scaleRule(df: number): Scale {
  const kept = scales.get(df);
  if (kept) return kept;
  const few = df < 12;
  const constant = Math.LN2 + (df / 2) * Math.log(df / 2) - logGamma(df / 2);
  const width = 1 / Math.sqrt(2 * df);
  // The tail of the range multiplies the density and narrows it: steps are finer than the density needs.
  const step = few ? Math.min(0.035, 0.12 * width) : 0.2 * width;
  const floor = -64;
  const at: number[] = [];
  const mass: number[] = [];
  const add = (x: number): boolean => {
    const logS = few ? x - Math.exp(-x) + 1 : x;
    const logDensity = constant + df * logS - 0.5 * df * Math.exp(2 * logS) + (few ? Math.log1p(Math.exp(-x)) : 0);
    if (logDensity < floor) return false;
    at.push(Math.exp(logS));
    mass.push(step * Math.exp(logDensity));
    return true;
  };
  for (let x = 0; add(x); x += step);
  for (let x = -step; add(x); x -= step);
  const rule = { at: Float64Array.from(at), mass: Float64Array.from(mass) };
  if (scales.size >= KEEP) scales.delete(scales.keys().next().value as number);
  scales.set(df, rule);
  return rule;
}

function tail(q: number, k: number, df: number, upper: boolean): number {
  if (q <= 0) return upper ? 1 : 0;
  if (q === Infinity) return upper ? 0 : 1;
  if (k === 2 && upper) return tTwoSided(q * Math.SQRT1_2, df);
  if (df === Infinity) return normalRangeTail(q, k, upper);
  const { at, mass } = scaleRule(df);
  let sum = 0;
  for (let i = 0; i < at.length; i += 1) sum += mass[i] * normalRangeTail(q * at[i], k, upper);
  return Math.min(1, sum);
}

function check(k: number, df: number): void {
  requireInteger(k, 'number of means', 2, MAX_MEANS);
  requireDf(df, 'df');
  if (df < 1) throw new StatsError('out_of_range', 'df must be at least 1');
}

/**
 * Upper tail of the studentized range, P(Q > q), for k means (2 to 200) and df ≥ 1 (Infinity allowed).
 * Q is the range of k independent standard normals over √(χ²_df / df). q ≤ 0 gives 1.
 * Throws on NaN, k out of range, df < 1. Computed directly; relative error below 1e-10.
 * Source: definition (Tukey 1953; Lund & Lund 1983), by trapezoidal rules in both integrals.
 */
export function studentizedRangeSf(q: number, k: number, df: number): number {
  requireNumber(q, 'q');
  check(k, df);
  return tail(q, k, df, true);
}

/** Distribution function of the studentized range, P(Q ≤ q). Domain and errors as {@link studentizedRangeSf}. */
export function studentizedRangeCdf(q: number, k: number, df: number): number {
  requireNumber(q, 'q');
  check(k, df);
  const above = tail(q, k, df, true);
  return above < 0.5 ? 1 - above : tail(q, k, df, false);
}

const quantiles = new Map<string, number>();
const KEEP_QUANTILES = 512;

/**
 * Quantile of the studentized range: the q with P(Q ≤ q) = p, p in [0, 1), k and df as
 * {@link studentizedRangeSf}. p is the lower-tail probability: .95 for a 5 % test.
 * The last 512 answers are kept. Relative error below 1e-10.
 */
export function studentizedRangeQuantile(p: number, k: number, df: number): number {
  requireClosedProbability(p);
  check(k, df);
  if (p === 0) return 0;
  if (p === 1) return Infinity;
  if (k === 2) return Math.SQRT2 * tQuantile((1 + p) / 2, df);
  const key = `${p}/${k}/${df}`;
  const kept = quantiles.get(key);
  if (kept !== undefined) {
    quantiles.delete(key);
    quantiles.set(key, kept);
    return kept;
  }
  const q = solve(p, k, df);
  if (quantiles.size >= KEEP_QUANTILES) quantiles.delete(quantiles.keys().next().value as string);
  quantiles.set(key, q);
  return q;
}

/** Secant steps, kept inside a bracket, on the logarithm of the smaller tail against ln q. */
function solve(p: number, k: number, df: number): number {
  const upper = p >= 0.5;
  const goal = Math.log(upper ? 1 - p : p);
  const gap = (x: number) => (Math.log(tail(Math.exp(x), k, df, upper)) - goal) * (upper ? -1 : 1);
  const pairs = (k * (k - 1)) / 2;
  const share = 1 - Math.pow(p, 1 / pairs);
  const half = Math.max(share / 2, 1e-300);
  let a = Math.log(Math.SQRT2 * -(df === Infinity ? normalQuantile(half) : tQuantile(half, df)));
  let fa = gap(a);
  let b = a + (fa > 0 ? -0.02 : 0.02);
  let fb = gap(b);
  let low = -Infinity;
  let high = Infinity;
  for (let i = 0; i < 100; i += 1) {
    for (const [x, f] of [[a, fa], [b, fb]]) {
      if (f <= 0) low = Math.max(low, x);
      if (f >= 0) high = Math.min(high, x);
    }
    let next = b - (fb * (b - a)) / (fb - fa);
    if (!Number.isFinite(next)) next = b + (fb > 0 ? -0.5 : 0.5);
    if (next <= low || next >= high) {
      if (Number.isFinite(low) && Number.isFinite(high)) next = (low + high) / 2;
      else next = b + (fb > 0 ? -0.5 : 0.5);
    }
    next = Math.min(b + 2, Math.max(b - 2, next));
    const step = next - b;
    a = b;
    fa = fb;
    b = next;
    if (Math.abs(step) < 1e-7 || fb === 0) {
      // One more secant step from here is exact to the accuracy of the tail.
      fb = gap(b);
      return Math.exp(fb === fa ? b : b - (fb * (b - a)) / (fb - fa));
    }
    fb = gap(b);
  }
  throw new StatsError('no_convergence', 'The studentized range quantile did not settle');
}
