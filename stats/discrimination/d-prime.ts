import { requireProbability } from '../check';
import { binomialSf, chiSquareQuantile } from '../distributions';
import { clopperPearson } from './distinguishers';
import { CHANCE, requireCounts } from './protocols';
import { inversePsychometric, psychometricSlope, type ThurstoneProtocol } from './psychometric';

/** The size of the sensory difference that one test shows. */
export interface DPrime {
  /** Estimate; 0 when correct/n is at or below chance, Infinity when all were correct. */
  readonly dPrime: number;
  /** Standard error by the delta method; null when d′ is 0 or infinite. */
  readonly standardError: number | null;
  /** Likelihood limits of d′ over d′ ≥ 0; the upper one is Infinity when all were correct. */
  readonly likelihood: { readonly lower: number; readonly upper: number };
  /** Likelihood limits of the proportion correct, from chance upward. */
  readonly likelihoodPc: { readonly lower: number; readonly upper: number };
  /** Clopper–Pearson limits of the proportion correct, mapped to d′. */
  readonly exact: { readonly lower: number; readonly upper: number };
  /** Exact one-sided p of the test against guessing. */
  readonly p: number;
}

/**
 * d′ from `correct` answers of `n`, with its standard error √(pc(1 − pc)/n) / pc′(d′) and limits at
 * confidence `level` (default .95). Likelihood limits: all d′ ≥ 0 with
 * 2 [log L(best d′ ≥ 0) − log L(d′)] ≤ χ²₁ quantile. Protocols: triangle, duo-trio, 2-AFC, 3-AFC, tetrad.
 * Throws on counts or level out of range. Limits to 1e-9 in d′ (less near d′ = 0, see
 * {@link inversePsychometric}). Sources: Thurstone (1927); Bi, Ennis & O'Mahony (1997) J. Sensory Stud. 12:87;
 * Brockhoff & Christensen (2010) Food Qual. Pref. 21:330 (likelihood limits).
 */
export function dPrime({
  protocol,
  correct,
  n,
  level = 0.95,
}: {
  protocol: ThurstoneProtocol;
  correct: number;
  n: number;
  level?: number;
}): DPrime {
  requireCounts(correct, n);
  requireProbability(level, 'level');
  const chance = CHANCE[protocol];
  const pc = correct / n;
  const estimate = inversePsychometric(protocol, pc);
  const slope = Number.isFinite(estimate) && estimate > 0 ? psychometricSlope(protocol, estimate) : 0;
  const likelihoodPc = likelihoodLimits(correct, n, chance, level);
  const outside = (1 - level) / 2;
  return {
    dPrime: estimate,
    standardError: slope > 0 ? Math.sqrt((pc * (1 - pc)) / n) / slope : null,
    likelihood: {
      lower: inversePsychometric(protocol, likelihoodPc.lower),
      upper: inversePsychometric(protocol, likelihoodPc.upper),
    },
    likelihoodPc,
    exact: {
      lower: inversePsychometric(protocol, clopperPearson(correct, n, outside, false)),
      upper: inversePsychometric(protocol, clopperPearson(correct, n, outside, true)),
    },
    p: binomialSf(correct, n, chance),
  };
}

/** Likelihood limits of the proportion correct over [chance, 1]. */
function likelihoodLimits(x: number, n: number, chance: number, level: number): { lower: number; upper: number } {
  const best = Math.max(x / n, chance);
  const logLikelihood = (p: number) => (x > 0 ? x * Math.log(p) : 0) + (x < n ? (n - x) * Math.log1p(-p) : 0);
  const goal = logLikelihood(best) - chiSquareQuantile(level, 1) / 2;
  const inside = (p: number) => logLikelihood(p) >= goal;
  const bisect = (from: number, to: number) => {
    let [near, far] = [from, to];
    for (let i = 0; i < 200; i += 1) {
      const middle = (near + far) / 2;
      if (middle === near || middle === far) break;
      if (inside(middle)) near = middle;
      else far = middle;
    }
    return near;
  };
  return {
    lower: inside(chance) ? chance : bisect(best, chance),
    upper: x === n ? 1 : bisect(best, 1),
  };
}
