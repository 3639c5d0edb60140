import { StatsError } from '../errors';

export type Metric = 'nominal' | 'ordinal' | 'interval' | 'ratio';

export interface KrippendorffAlpha {
  /** 1 = full agreement, 0 = chance. */
  readonly alpha: number;
  /** Observed and expected disagreement. */
  readonly observed: number;
  readonly expected: number;
  /** Values in units that at least two observers judged. */
  readonly pairable: number;
}

/**
 * Krippendorff's α of observers (rows) by units (columns); null = missing. Differences: nominal 0 or
 * 1; interval (c − k)²; ratio ((c − k)/(c + k))²; ordinal the squared number of values between, with
 * half of the two ends.
 * @throws StatsError `too_few` (no unit with two values), `constant` (all values alike: no disagreement
 * can be expected), `not_finite`, `out_of_range` (negative values under the ratio metric)
 * Source: Krippendorff (2011), Computing Krippendorff's alpha-reliability.
 */
export function krippendorffAlpha(table: readonly (readonly (number | null)[])[], metric: Metric): KrippendorffAlpha {
  const units = Math.max(0, ...table.map((row) => row.length));
  const columns: number[][] = [];
  for (let u = 0; u < units; u += 1) {
    const values: number[] = [];
    for (const row of table) {
      const value = row[u];
      if (value === null || value === undefined) continue;
      if (!Number.isFinite(value)) throw new StatsError('not_finite', 'The table holds a value that is not a finite number');
      if (metric === 'ratio' && value < 0) throw new StatsError('out_of_range', 'The ratio metric takes no negative values');
      values.push(value);
    }
    if (values.length >= 2) columns.push(values);
  }
  const pairable = columns.reduce((sum, values) => sum + values.length, 0);
  if (columns.length === 0) throw new StatsError('too_few', 'No unit was judged by two observers');
  const levels = [...new Set(columns.flat())].sort((a, b) => a - b);
  const index = new Map(levels.map((value, i) => [value, i]));
  const marginals = new Float64Array(levels.length);
  for (const values of columns) for (const value of values) marginals[index.get(value)!] += 1;
  const difference = differenceOf(metric, levels, marginals);
  let observed = 0;
  for (const values of columns) {
    let sum = 0;
    for (const a of values) for (const b of values) sum += difference(index.get(a)!, index.get(b)!);
    observed += sum / (values.length - 1);
  }
  observed /= pairable;
  let expected = 0;
  for (let c = 0; c < levels.length; c += 1) for (let k = 0; k < levels.length; k += 1) expected += marginals[c] * marginals[k] * difference(c, k);
  expected /= pairable * (pairable - 1);
  if (expected === 0) throw new StatsError('constant', 'All values are alike, so agreement beyond chance has no meaning');
  return { alpha: 1 - observed / expected, observed, expected, pairable };
}

function differenceOf(metric: Metric, levels: readonly number[], marginals: Float64Array): (c: number, k: number) => number {
  switch (metric) {
    case 'nominal':
      return (c, k) => (c === k ? 0 : 1);
    case 'interval':
      return (c, k) => (levels[c] - levels[k]) ** 2;
    case 'ratio':
      return (c, k) => (levels[c] + levels[k] === 0 ? 0 : ((levels[c] - levels[k]) / (levels[c] + levels[k])) ** 2);
    case 'ordinal': {
      const upTo = new Float64Array(marginals.length + 1);
      marginals.forEach((count, i) => { upTo[i + 1] = upTo[i] + count; });
      return (c, k) => {
        const [low, high] = c < k ? [c, k] : [k, c];
        return low === high ? 0 : (upTo[high + 1] - upTo[low] - (marginals[low] + marginals[high]) / 2) ** 2;
      };
    }
  }
}
