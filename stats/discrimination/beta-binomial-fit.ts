import { StatsError } from '../errors';

/** A log-likelihood with its gradient and Hessian in (mu, gamma). */
export interface Derivatives {
  value: number;
  m: number;
  g: number;
  mm: number;
  mg: number;
  gg: number;
}

/** Where the likelihood is largest. */
export interface Maximum {
  readonly mu: number;
  readonly gamma: number;
  readonly logLik: number;
  readonly at: Derivatives;
}

/** Cumulative log of rising products Π (start + i·gamma), with derivatives in mu and gamma. */
interface Rising {
  readonly log: Float64Array;
  readonly m: Float64Array;
  readonly g: Float64Array;
  readonly mm: Float64Array;
  readonly mg: Float64Array;
  readonly gg: Float64Array;
}

/** `share` is mu, 1 − mu or 1; `slope` its derivative in mu. The factors are share (1 − gamma) + i gamma. */
function rising(length: number, share: number, slope: number, gamma: number): Rising {
  const make = () => new Float64Array(length + 1);
  const r = { log: make(), m: make(), g: make(), mm: make(), mg: make(), gg: make() };
  for (let i = 0; i < length; i += 1) {
    const factor = share * (1 - gamma) + i * gamma;
    const m = (slope * (1 - gamma)) / factor;
    const g = (i - share) / factor;
    r.log[i + 1] = r.log[i] + Math.log(factor);
    r.m[i + 1] = r.m[i] + m;
    r.g[i + 1] = r.g[i] + g;
    r.mm[i + 1] = r.mm[i] - m * m;
    r.mg[i + 1] = r.mg[i] - slope / factor - m * g;
    r.gg[i + 1] = r.gg[i] - g * g;
  }
  return r;
}

/** People with the same counts share one term of the likelihood. */
interface Group {
  readonly x: number;
  readonly n: number;
  readonly times: number;
  /** Weights ln[C(x, j) chance^(x − j) (1 − chance)^(n − x + j)] for j = first..x. */
  readonly weights: Float64Array;
  readonly first: number;
}

function group(people: readonly (readonly [number, number])[], chance: number): Group[] {
  const times = new Map<string, [number, number, number]>();
  for (const [x, n] of people) {
    const key = `${x}/${n}`;
    const kept = times.get(key);
    if (kept) kept[2] += 1;
    else times.set(key, [x, n, 1]);
  }
  return [...times.values()].map(([x, n, count]) => {
    const first = chance === 0 ? x : 0;
    const weights = new Float64Array(x - first + 1);
    if (chance > 0) {
      let choose = 0;
      for (let j = 0; j <= x; j += 1) {
        weights[j] = choose + (x - j) * Math.log(chance) + (n - x + j) * Math.log1p(-chance);
        choose += Math.log(x - j) - Math.log(j + 1);
      }
    }
    return { x, n, times: count, weights, first };
  });
}

/**
 * Log-likelihood (without binomial coefficients) and its derivatives. A person's likelihood is
 * Σ_j weight_j E[π^j (1 − π)^(n − x)], with the beta moments written as rising products, which stay
 * finite as gamma goes to 0.
 */
function evaluate(groups: readonly Group[], longest: number, mu: number, gamma: number): Derivatives {
  const up = rising(longest, mu, 1, gamma);
  const down = rising(longest, 1 - mu, -1, gamma);
  const all = rising(longest, 1, 0, gamma);
  const total: Derivatives = { value: 0, m: 0, g: 0, mm: 0, mg: 0, gg: 0 };
  for (const { x, n, times, weights, first } of groups) {
    const wrong = n - x;
    let top = -Infinity;
    for (let j = first; j <= x; j += 1) {
      top = Math.max(top, weights[j - first] + up.log[j] + down.log[wrong] - all.log[j + wrong]);
    }
    let [s, m, g, mm, mg, gg] = [0, 0, 0, 0, 0, 0];
    for (let j = first; j <= x; j += 1) {
      const t = Math.exp(weights[j - first] + up.log[j] + down.log[wrong] - all.log[j + wrong] - top);
      const lm = up.m[j] + down.m[wrong];
      const lg = up.g[j] + down.g[wrong] - all.g[j + wrong];
      s += t;
      m += t * lm;
      g += t * lg;
      mm += t * (lm * lm + up.mm[j] + down.mm[wrong]);
      mg += t * (lm * lg + up.mg[j] + down.mg[wrong]);
      gg += t * (lg * lg + up.gg[j] + down.gg[wrong] - all.gg[j + wrong]);
    }
    total.value += times * (top + Math.log(s));
    total.m += (times * m) / s;
    total.g += (times * g) / s;
    total.mm += times * (mm / s - (m / s) ** 2);
    total.mg += times * (mg / s - (m / s) * (g / s));
    total.gg += times * (gg / s - (g / s) ** 2);
  }
  return total;
}

const EDGE = 1e-9;

/**
 * Largest likelihood inside the square (0, 1)², from several starts, by Newton steps that are halved until the
 * likelihood rises (along the gradient where the surface is not concave). null when it lies on an edge.
 */
export function maximize(people: readonly (readonly [number, number])[], chance: number, startMu: number): Maximum | null {
  const groups = group(people, chance);
  const longest = people.reduce((most, [, n]) => Math.max(most, n), 0);
  let best: Maximum | null = null;
  for (const mu of [startMu, 0.2, 0.5]) {
    for (const gamma of [0.03, 0.15, 0.5]) {
      const found = climb(groups, longest, Math.min(0.97, Math.max(0.03, mu)), gamma);
      if (!best || found.logLik > best.logLik) best = found;
    }
  }
  if (!best || best.mu < 1e-6 || best.mu > 1 - 1e-6 || best.gamma < 1e-7) return null;
  return best;
}

function climb(groups: readonly Group[], longest: number, startMu: number, startGamma: number): Maximum {
  let [mu, gamma] = [startMu, startGamma];
  let at = evaluate(groups, longest, mu, gamma);
  for (let i = 0; i < 200; i += 1) {
    const determinant = at.mm * at.gg - at.mg * at.mg;
    let stepM: number;
    let stepG: number;
    if (at.mm < 0 && determinant > 0) {
      stepM = -(at.gg * at.m - at.mg * at.g) / determinant;
      stepG = -(at.mm * at.g - at.mg * at.m) / determinant;
    } else {
      const size = Math.hypot(at.m, at.g) || 1;
      stepM = (0.1 * at.m) / size;
      stepG = (0.1 * at.g) / size;
    }
    let share = 1;
    let next: Derivatives | null = null;
    let [nextMu, nextGamma] = [mu, gamma];
    for (let half = 0; half < 50; half += 1, share /= 2) {
      nextMu = Math.min(1 - EDGE, Math.max(EDGE, mu + share * stepM));
      nextGamma = Math.min(1 - EDGE, Math.max(EDGE, gamma + share * stepG));
      const tried = evaluate(groups, longest, nextMu, nextGamma);
      if (tried.value >= at.value) {
        next = tried;
        break;
      }
    }
    if (!next) break;
    const moved = Math.abs(nextMu - mu) + Math.abs(nextGamma - gamma);
    [mu, gamma, at] = [nextMu, nextGamma, next];
    if (moved < 1e-13) break;
  }
  if (!Number.isFinite(at.value)) throw new StatsError('no_convergence', 'The beta-binomial fit did not settle');
  return { mu, gamma, logLik: at.value, at };
}
