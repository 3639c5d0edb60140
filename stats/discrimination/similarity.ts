import { requireInteger, requireProbability } from '../check';
import { binomialCdf, binomialPmf, normalQuantile } from '../distributions';
import { distinguishers } from './distinguishers';
import { proportionFromDistinguishers } from './power';
import { requireChance, requireCounts, requireDistinguishers, TIE_GUARD } from './protocols';

/** What a similarity test is planned with. */
export interface SimilarityPlan {
  /** Accepted risk of calling products similar when a share pd tells them apart. */
  readonly beta: number;
  /** Smallest proportion of distinguishers that matters, in (0, 1]. */
  readonly pd: number;
  readonly chance: number;
}

function check(n: number, { beta, pd, chance }: SimilarityPlan): void {
  requireInteger(n, 'number of answers', 1);
  requireProbability(beta, 'beta');
  requireChance(chance);
  requireDistinguishers(pd);
}

/**
 * Largest number of correct answers that still shows similarity: the largest x with
 * P(X ≤ x | n, chance + pd (1 − chance)) ≤ β. null when not even 0 correct does. Exact.
 * Throws on n, β, pd or chance out of range. Source: ISO 4120:2021 table A.2 (the exact binomial one).
 */
export function similarityMaximum(n: number, plan: SimilarityPlan): number | null {
  check(n, plan);
  const p = proportionFromDistinguishers(plan.pd, plan.chance);
  const limit = plan.beta * TIE_GUARD;
  if (p === 1) return n - 1;
  const guess = Math.floor(n * p + normalQuantile(plan.beta) * Math.sqrt(n * p * (1 - p)));
  let x = Math.min(n - 1, Math.max(0, guess));
  while (x >= 0 && binomialCdf(x, n, p) > limit) x -= 1;
  if (x < 0) return null;
  let tail = binomialCdf(x, n, p);
  for (;;) {
    const next = tail + binomialPmf(x + 1, n, p);
    if (next > limit || x + 1 > n) return x;
    tail = next;
    x += 1;
  }
}

/**
 * The same by the normal upper limit printed beside the table: the largest x whose one-sided upper limit
 * pd̂ + z_(1−β) √(pc (1 − pc)/n) / (1 − chance) lies below pd; null when none does. It differs from the
 * exact maximum and is here for comparison with reports that used it. Source: ISO 4120:2021 annex B.
 */
export function similarityMaximumNormal(n: number, plan: SimilarityPlan): number | null {
  check(n, plan);
  const z = -normalQuantile(plan.beta);
  for (let x = n; x >= 0; x -= 1) {
    const pc = x / n;
    const upper = (pc - plan.chance + z * Math.sqrt((pc * (1 - pc)) / n)) / (1 - plan.chance);
    if (upper < plan.pd) return x;
  }
  return null;
}

/** Answer of a similarity test. */
export interface SimilarityVerdict {
  /** similar: shown within the plan. not_shown: too many correct. no_conclusion: fewer correct than guessing gives. */
  readonly verdict: 'similar' | 'not_shown' | 'no_conclusion';
  /** Largest number correct that would have shown similarity; null when the panel was too small for the plan. */
  readonly maximum: number | null;
  /** P(X ≤ correct) if a share pd told the products apart. */
  readonly p: number;
  /** Upper one-sided Clopper–Pearson limit of the proportion of distinguishers at 1 − β, not cut at 0. */
  readonly upperLimit: number;
}

/**
 * Verdict of a similarity test planned with β and pd. At or below the maximum the products are similar;
 * but fewer correct answers than guessing gives on average (n × chance) lead to no conclusion, since
 * something other than tasting is then at work. Source: ISO 4120:2021 8.2 and table A.2.
 * Throws on counts, β, pd or chance out of range.
 */
export function similarityVerdict(correct: number, n: number, plan: SimilarityPlan): SimilarityVerdict {
  requireCounts(correct, n);
  check(n, plan);
  const maximum = similarityMaximum(n, plan);
  const p = binomialCdf(correct, n, proportionFromDistinguishers(plan.pd, plan.chance));
  const limits = distinguishers({ correct, n, chance: plan.chance, level: 1 - plan.beta });
  const similar = maximum !== null && correct <= maximum;
  const belowGuessing = correct < n * plan.chance * (1 - 1e-12);
  return {
    verdict: similar ? (belowGuessing ? 'no_conclusion' : 'similar') : 'not_shown',
    maximum,
    p,
    upperLimit: limits.exact.pd.oneSidedUpper,
  };
}
