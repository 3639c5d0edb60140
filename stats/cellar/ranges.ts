import { requireFinite } from '../check';
import { StatsError } from '../errors';

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
