import { requireInteger, requireProbability } from '../check';
import { binomialCdf, binomialPmf, binomialSf } from '../distributions';
import { StatsError } from '../errors';
import { minimumCorrect, requireSides, type Sides } from './binomial-test';
import { requireChance, TIE_GUARD } from './protocols';

/** A planned test: its significance level, guessing probability and the true proportion correct. */
export interface PowerPlan extends Sides {
  readonly alpha: number;
  readonly chance: number;
  /** True proportion correct, above chance; from pd by {@link proportionFromDistinguishers}, from d′ by pc(d′). */
  readonly pc: number;
}

/** One point of a power curve. */
export interface PowerPoint {
  readonly n: number;
  /** Smallest significant number correct; null when the panel is too small to show anything. */
  readonly minimumCorrect: number | null;
  /** Probability that the test comes out significant. */
  readonly power: number;
}

const MOST = 1_000_000;

/** Proportion correct when a share pd of people tell the products apart: chance + pd (1 − chance), pd in [0, 1]. */
export function proportionFromDistinguishers(pd: number, chance: number): number {
  requireChance(chance);
  requireProbability(pd, 'proportion of distinguishers', true);
  return chance + pd * (1 - chance);
}

function checkPlan({ alpha, chance, pc, twoSided }: PowerPlan): void {
  requireProbability(alpha, 'alpha');
  requireChance(chance);
  requireProbability(pc, 'proportion correct', true);
  requireSides(chance, { twoSided });
}

/**
 * Exact power of a discrimination test with n answers: P(X ≥ x | n, pc) with x the smallest significant
 * number; two-sided adds P(X ≤ n − x). 0 when no outcome would be significant.
 * Throws on n not whole or below 1 and on probabilities out of range. Relative error below 1e-12.
 * Source: definition; ISO 4120:2021 annex A uses the same exact binomial.
 */
export function power(n: number, plan: PowerPlan): number {
  checkPlan(plan);
  const x = minimumCorrect(n, plan.alpha, plan.chance, plan);
  if (x === null) return 0;
  return binomialSf(x, n, plan.pc) + (plan.twoSided ? binomialCdf(n - x, n, plan.pc) : 0);
}

/** P(X_n ≥ x) for one success probability, moved along n and x by recurrence. */
class Tail {
  private tail: number;
  /** P(X_n = x − 1). */
  private below: number;
  constructor(
    private n: number,
    private x: number,
    private readonly p: number,
  ) {
    this.tail = binomialSf(x, n, p);
    this.below = binomialPmf(x - 1, n, p);
  }
  get value(): number {
    return this.tail;
  }
  nextN(): void {
    this.tail += this.p * this.below;
    this.below *= ((this.n + 1) / (this.n + 2 - this.x)) * (1 - this.p);
    this.n += 1;
  }
  /** What the tail would be one x further. */
  private at(): number {
    if (this.p === 1) return this.x === this.n ? 1 : 0;
    return this.below * ((this.n - this.x + 1) / this.x) * (this.p / (1 - this.p));
  }
  nextX(): void {
    const mass = this.at();
    this.tail = this.x >= this.n ? 0 : Math.max(0, this.tail - mass);
    this.below = mass;
    this.x += 1;
  }
}

/** Calls `visit` with every point from n = `from` on, until it returns false. */
function walk(from: number, plan: PowerPlan, visit: (n: number, x: number, power: number) => boolean): void {
  const limit = (plan.twoSided ? plan.alpha / 2 : plan.alpha) * TIE_GUARD;
  let n = from;
  let x = minimumCorrect(n, plan.alpha, plan.chance, plan) ?? n + 1;
  let guess = new Tail(n, x, plan.chance);
  let right = new Tail(n, x, plan.pc);
  let wrong = plan.twoSided ? new Tail(n, x, 1 - plan.pc) : null;
  for (;;) {
    const size = x > n ? 0 : right.value + (wrong ? wrong.value : 0);
    if (!visit(n, x, Math.min(1, size))) return;
    n += 1;
    if (n % 512 === 0 || plan.pc === 1) {
      // A fresh start keeps rounding from piling up over long walks.
      x = minimumCorrect(n, plan.alpha, plan.chance, plan) ?? n + 1;
      guess = new Tail(n, x, plan.chance);
      right = new Tail(n, x, plan.pc);
      wrong = plan.twoSided ? new Tail(n, x, 1 - plan.pc) : null;
      continue;
    }
    guess.nextN();
    right.nextN();
    wrong?.nextN();
    // With one more answer the critical number stays or grows by one.
    if (guess.value > limit) {
      guess.nextX();
      right.nextX();
      wrong?.nextX();
      x += 1;
    }
  }
}

/**
 * Power for every n from `from` to `to` (1 ≤ from ≤ to ≤ 1 000 000), by recurrence from n to n + 1:
 * two hundred points take well under a millisecond. The curve is saw-toothed, as exact power is.
 * Domain and errors as {@link power}. Relative error below 1e-10.
 */
export function powerCurve(from: number, to: number, plan: PowerPlan): PowerPoint[] {
  checkPlan(plan);
  requireInteger(to, 'largest panel', 1, MOST);
  requireInteger(from, 'smallest panel', 1, to);
  const points: PowerPoint[] = [];
  walk(from, plan, (n, x, size) => {
    points.push({ n, minimumCorrect: x > n ? null : x, power: size });
    return n < to;
  });
  return points;
}

/** The smallest panels that reach a wanted power. */
export interface PanelSize {
  /** First n whose power reaches the goal: what the published tables print. */
  readonly first: number;
  readonly powerAtFirst: number;
  /** Smallest n from which every larger panel reaches it too; power is saw-toothed, so this may be larger. */
  readonly stable: number;
  readonly powerAtStable: number;
}

/**
 * Smallest panel for power ≥ `goal` (= 1 − β, in (0, 1)); `pc` must be above chance.
 * Throws `not_estimable` when more than 1 000 000 answers would be needed, `out_of_range` on the rest.
 * Exact, by walking n. The published tables (ISO 4120 A.3, ISO 10399 A.3, ISO 5495 A.4 and A.5) give `first`.
 */
export function smallestPanel(goal: number, plan: PowerPlan): PanelSize {
  requireProbability(goal, 'power');
  checkPlan(plan);
  if (plan.pc <= plan.chance) {
    throw new StatsError('out_of_range', 'The proportion correct to be found must be above chance');
  }
  let first: [number, number] | null = null;
  let stable: [number, number] | null = null;
  walk(1, plan, (n, _, size) => {
    if (size >= goal) {
      first ??= [n, size];
      stable ??= [n, size];
    } else stable = null;
    // The saw-tooth's lower edge rises with n: past twice the first panel it can no longer fall below the goal.
    return n < (first ? 2 * first[0] + 200 : MOST);
  });
  const [a, b] = [first, stable] as ([number, number] | null)[];
  if (!a || !b) throw new StatsError('not_estimable', 'More than 1 000 000 answers would be needed');
  return { first: a[0], powerAtFirst: a[1], stable: b[0], powerAtStable: b[1] };
}
