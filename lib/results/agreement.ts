import { friedman, friedmanPermutation, intraclassCorrelations, StatsError, type BalancedScores } from '@/stats';
import type { LimitedView } from './types';

export interface AgreementNumbers {
  kendallW: number | null;
  kendallP: number | null;
  icc: LimitedView | null;
}

/** Below this many panelists the test of W counts arrangements instead of leaning on F. */
const SMALL_PANEL = 8;

/** Steps that the exact count may take while somebody waits for a page. */
const BUDGET = 300_000;

/** The work's result, or null where the statistic is not defined. */
export function orNull<T>(work: () => T): T | null {
  try {
    return work();
  } catch (error) {
    if (error instanceof StatsError) return null;
    throw error;
  }
}

/** Each panelist's mean of each sample over the replicates: rows = panelists. */
function meansByAssessor({ scores, assessors, products, replicates }: BalancedScores): number[][] {
  return Array.from({ length: assessors }, (_, i) =>
    Array.from({ length: products }, (_, j) => {
      let sum = 0;
      for (let k = 0; k < replicates; k += 1) sum += scores[(i * products + j) * replicates + k]!;
      return sum / replicates;
    }),
  );
}

/**
 * Kendall's W with its test (Friedman: Iman and Davenport's F, or the permutation distribution for
 * fewer than eight panelists) and ICC(2,k) with its limits, all on the panelists' means by sample. What has no
 * value is null.
 */
export function agreementOf(table: BalancedScores): AgreementNumbers {
  const means = meansByAssessor(table);
  const ranked = orNull(() => friedman(means));
  const kendallP =
    ranked === null ? null : table.assessors < SMALL_PANEL ? orNull(() => friedmanPermutation(means, { budget: BUDGET }).p) : ranked.imanDavenport.p;
  const byProduct = Array.from({ length: table.products }, (_, j) => means.map((row) => row[j]!));
  const icc = orNull(() => intraclassCorrelations(byProduct).twoRandomMean);
  const isWhole = icc !== null && [icc.icc, icc.lower, icc.upper].every(Number.isFinite);
  return { kendallW: ranked?.kendallW ?? null, kendallP, icc: isWhole ? { value: icc.icc, low: icc.lower, high: icc.upper } : null };
}
