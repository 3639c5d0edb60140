import { requireProbability } from '../check';
import { betaQuantile, normalQuantile } from '../distributions';
import { requireChance, requireCounts } from './protocols';

/** Confidence limits at one level: a two-sided pair, and each one-sided bound at that same level. */
export interface Limits {
  readonly lower: number;
  readonly upper: number;
  readonly oneSidedLower: number;
  readonly oneSidedUpper: number;
}

/** Limits of the proportion correct and of the proportion of distinguishers. */
export interface ProportionLimits {
  readonly pc: Limits;
  readonly pd: Limits;
}

/** The share of people who tell the products apart, as far as one test shows it. */
export interface Distinguishers {
  /** Proportion of correct answers. */
  readonly pc: number;
  /** (pc − chance) / (1 − chance); negative when fewer were right than by guessing. */
  readonly pd: number;
  /** Standard error of pd, √(pc (1 − pc) / n) / (1 − chance); 0 when none or all were right. */
  readonly standardError: number;
  /** Clopper–Pearson: never covers less than its level. */
  readonly exact: ProportionLimits;
  /** pd ± z · standard error, the form printed in ISO 4120 and ISO 10399; degenerate at 0 or n correct. */
  readonly normal: ProportionLimits;
  /** Wilson's score limits, without continuity correction. */
  readonly wilson: ProportionLimits;
}

/**
 * Proportion of distinguishers with exact, normal and Wilson limits at confidence `level` (default .95).
 * Limits of pd are those of pc mapped by (p − chance)/(1 − chance) and are not cut at 0.
 * Throws on counts that are not whole or out of range and on chance or level outside (0, 1).
 * Relative error below 1e-12. Sources: Clopper & Pearson (1934); Wilson (1927); ISO 4120:2021 annex B.
 */
export function distinguishers({
  correct,
  n,
  chance,
  level = 0.95,
}: {
  correct: number;
  n: number;
  chance: number;
  level?: number;
}): Distinguishers {
  requireCounts(correct, n);
  requireChance(chance);
  requireProbability(level, 'level');
  const pc = correct / n;
  const toPd = (p: number) => (p - chance) / (1 - chance);
  const se = Math.sqrt((pc * (1 - pc)) / n);
  const limits = (bound: (tail: number, upper: boolean) => number): ProportionLimits => {
    const one = 1 - level;
    const pcLimits = {
      lower: bound(one / 2, false),
      upper: bound(one / 2, true),
      oneSidedLower: bound(one, false),
      oneSidedUpper: bound(one, true),
    };
    return {
      pc: pcLimits,
      pd: {
        lower: toPd(pcLimits.lower),
        upper: toPd(pcLimits.upper),
        oneSidedLower: toPd(pcLimits.oneSidedLower),
        oneSidedUpper: toPd(pcLimits.oneSidedUpper),
      },
    };
  };
  return {
    pc,
    pd: toPd(pc),
    standardError: se / (1 - chance),
    exact: limits((tail, upper) => clopperPearson(correct, n, tail, upper)),
    normal: limits((tail, upper) => pc + (upper ? -1 : 1) * normalQuantile(tail) * se),
    wilson: limits((tail, upper) => {
      const z = (upper ? -1 : 1) * normalQuantile(tail);
      return (pc + (z * z) / (2 * n) + z * Math.sqrt((pc * (1 - pc)) / n + (z * z) / (4 * n * n))) / (1 + (z * z) / n);
    }),
  };
}

/**
 * Clopper–Pearson limit of a proportion: the beta quantile that leaves `tail` beyond it on the asked side.
 * 0 of n gives lower limit 0, n of n upper limit 1.
 */
export function clopperPearson(x: number, n: number, tail: number, upper: boolean): number {
  requireCounts(x, n);
  requireProbability(tail, 'tail');
  if (upper) return x === n ? 1 : 1 - betaQuantile(tail, n - x, x + 1);
  return x === 0 ? 0 : betaQuantile(tail, x, n - x + 1);
}
