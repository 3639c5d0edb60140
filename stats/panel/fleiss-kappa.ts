import { requireInteger } from '../check';
import { StatsError } from '../errors';

/** Agreement of raters who each put a subject into one category. */
export interface FleissKappa {
  /** 1: all agree; 0: as much as chance gives; null when everyone always chose one category. */
  readonly kappa: number | null;
  /** Mean share of agreeing pairs of raters, and what chance gives. */
  readonly observed: number;
  readonly expected: number;
}

/**
 * Fleiss' kappa of votes (hold, bottle, blend, rack…). `counts`: [subject][category] = number of raters who
 * chose it; every subject has the same number of raters, at least two. At least one subject, two categories.
 * @throws StatsError `empty`, `shape` on rows of unequal length or sum, `too_few` on fewer than two raters or categories
 * Source: Fleiss (1971) Psychological Bulletin 76:378.
 */
export function fleissKappa(counts: readonly (readonly number[])[]): FleissKappa {
  if (counts.length === 0) throw new StatsError('empty', 'There are no subjects');
  const categories = counts[0].length;
  if (categories < 2) throw new StatsError('too_few', 'Votes need at least two categories');
  const raters = sum(counts[0]);
  const totals = new Float64Array(categories);
  let observed = 0;
  for (const row of counts) {
    if (row.length !== categories) throw new StatsError('shape', 'Every subject must have the same categories');
    row.forEach((count, category) => {
      requireInteger(count, 'number of votes', 0);
      totals[category] += count;
    });
    if (sum(row) !== raters) throw new StatsError('shape', 'Every subject must have the same number of votes');
    if (raters < 2) throw new StatsError('too_few', 'Agreement needs at least two raters');
    observed += row.reduce((pairs, count) => pairs + count * (count - 1), 0) / (raters * (raters - 1));
  }
  observed /= counts.length;
  const all = raters * counts.length;
  const expected = totals.reduce((chance, total) => chance + (total / all) ** 2, 0);
  return { kappa: expected === 1 ? null : (observed - expected) / (1 - expected), observed, expected };
}

const sum = (row: readonly number[]): number => row.reduce((a, b) => a + b, 0);
