import { requireFinite, requireFiniteArray, requireNotNegative, requirePositive } from '../check';
import { StatsError } from '../errors';

/**
 * Volume-weighted mean Σ v x / Σ v: exact mass balance for what stays what it is in a blend (total
 * acidity, residual sugar, volatile acidity, total SO₂; g/L or mg/L) and within 0.001 % vol for the alcohol
 * of two wines. NOT for pH (buffers), nor exactly for free and molecular SO₂ (binding and pH move).
 * `volumes` 0 or more and not all 0, in any one unit; as many values. Throws on the rest.
 */
export function linearBlend(volumes: ArrayLike<number>, values: ArrayLike<number>): number {
  requireFiniteArray(volumes, 'volumes');
  requireFiniteArray(values, 'values');
  if (volumes.length !== values.length) throw new StatsError('shape', 'There must be one value for each volume');
  let total = 0;
  let sum = 0;
  for (let i = 0; i < volumes.length; i += 1) {
    requireNotNegative(volumes[i], 'A volume');
    total += volumes[i];
    sum += volumes[i] * values[i];
  }
  requirePositive(total, 'The blend’s volume');
  return sum / total;
}

/** Shares of two wines that meet a figure between theirs. */
export interface TwoPartBlend {
  readonly partsLow: number;
  readonly partsHigh: number;
  /** Share of the higher one in the blend, 0 to 1. */
  readonly fractionHigh: number;
  /** Litres of the higher one to a litre of the lower one; Infinity when only the higher one will do. */
  readonly highPerLow: number;
}

/**
 * How much of a low and a high component meets a target (the Pearson square), for figures that blend
 * linearly as in {@link linearBlend}. Needs low < high and the target between them, ends included.
 */
export function twoPartBlend(low: number, high: number, target: number): TwoPartBlend {
  requireFinite(low, 'the lower figure');
  requireFinite(high, 'the higher figure');
  requireFinite(target, 'the target');
  if (low >= high) throw new StatsError('out_of_range', 'The higher figure must be above the lower one');
  if (target < low || target > high) throw new StatsError('out_of_range', 'No blend of the two meets a target outside of their figures');
  const partsLow = high - target;
  const partsHigh = target - low;
  return { partsLow, partsHigh, fractionHigh: partsHigh / (high - low), highPerLow: partsLow === 0 ? Infinity : partsHigh / partsLow };
}
