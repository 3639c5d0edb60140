import { StatsError } from './errors';

/** Throws `not_finite` unless `x` is a finite number. `name` is used in the message. */
export function requireFinite(x: number, name: string): void {
  if (typeof x !== 'number' || !Number.isFinite(x)) throw new StatsError('not_finite', `${name} must be a finite number`);
}

/** Throws unless `x` is an integer in [min, max]. */
export function requireInteger(x: number, name: string, min = -Infinity, max = Infinity): void {
  requireFinite(x, name);
  if (!Number.isInteger(x)) throw new StatsError('not_integer', `${name} must be a whole number`);
  if (x < min || x > max) throw new StatsError('out_of_range', `${name} must lie between ${min} and ${max}`);
}

/** Throws unless `p` is a finite number in the open interval (0, 1), or the closed one with `closed`. */
export function requireProbability(p: number, name: string, closed = false): void {
  requireFinite(p, name);
  if (closed ? p < 0 || p > 1 : p <= 0 || p >= 1) throw new StatsError('out_of_range', `${name} must lie between 0 and 1`);
}

/** Throws `empty` on no values and `not_finite` on any value that is not a finite number. */
export function requireFiniteArray(xs: ArrayLike<number>, name: string): void {
  if (xs.length === 0) throw new StatsError('empty', `${name} holds no values`);
  for (let i = 0; i < xs.length; i += 1) {
    if (!Number.isFinite(xs[i])) throw new StatsError('not_finite', `${name} holds a value that is not a finite number`);
  }
}

/** Throws `out_of_range` unless min ≤ x ≤ max, `not_finite` on no number. */
export function requireBetween(x: number, name: string, min: number, max: number, unit = ''): void {
  requireFinite(x, name);
  if (x < min || x > max) throw new StatsError('out_of_range', `${name} must lie between ${min} and ${max}${unit && ` ${unit}`}`);
}

/** Throws `out_of_range` on a number below 0, `not_finite` on no number. */
export function requireNotNegative(x: number, name: string): void {
  requireFinite(x, name);
  if (x < 0) throw new StatsError('out_of_range', `${name} can’t be negative`);
}

/** Throws `out_of_range` on a number that is not above 0, `not_finite` on no number. */
export function requirePositive(x: number, name: string): void {
  requireFinite(x, name);
  if (x <= 0) throw new StatsError('out_of_range', `${name} must be above 0`);
}
