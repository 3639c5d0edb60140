import { binomialCdf, CHANCE, minimumCorrect, power, powerCurve, similarityMaximum, smallestPanel, StatsError, type PowerPlan } from '@/stats';
import { effectOfDPrime, effectOfShare, type Effect } from './effect';
import type { PlannedProtocol } from './types';

/** A discrimination test as it is planned. */
export interface DiscriminationQuestion {
  protocol: PlannedProtocol;
  aim: 'difference' | 'similarity';
  /** Accepted risk of a false "different". */
  alpha: number;
  /** Accepted risk of missing the difference (difference), of calling different wines similar (similarity). */
  beta: number;
  /** The difference that matters: a share of distinguishers in (0, 1), or a d′ above 0. */
  size: { by: 'pd' | 'dPrime'; value: number };
  /** Both directions count; pair and difference only. */
  twoSided: boolean;
  /** Sets that each person tastes. */
  replicates: number;
  /** People at hand. */
  panel: number;
}

export interface CurvePoint {
  /** Answers: people × sets. */
  n: number;
  /** Chance that the test shows what it is asked for. */
  power: number;
}

export interface DiscriminationPlan {
  chance: number;
  effect: Effect;
  /** Chance of showing that is aimed at: 1 − β for difference, 1 − α for similarity. */
  goal: number;
  /** Smallest numbers of answers; null when more than a million would be needed. */
  smallest: { answers: number; power: number; steadyFrom: number } | null;
  /** Smallest numbers of people: if every set were a new palate's, and with each person counted once. Equal with one set; a guide, no limits. */
  people: { hopeful: number; safe: number } | null;
  /** What the panel at hand can do: `answers` that count, the chance, and the number correct that decides. */
  atHand: { answers: number; power: number; powerIfRepeatsSayNothing: number; critical: number | null };
  curve: CurvePoint[];
  /** The curve in few rows, with the number correct that decides; the panel at hand and the smallest among them. */
  table: (CurvePoint & { critical: number | null })[];
  /** What replicates do and do not buy, and how far the numbers reach. */
  notes: string[];
}

/** The curve reaches to so many answers at least, and at most, with about so many points. */
const CURVE = { least: 30, most: 3000, points: 300 };

const PAIR: PlannedProtocol = 'two_afc';

/** Repeats of one person are no further people, so a claim of likeness counts one answer for each. */
const answersOf = (q: DiscriminationQuestion, people: number): number => (q.aim === 'similarity' ? people : people * q.replicates);

/**
 * Chance that n answers show what is asked. Difference: P(X ≥ minimum | pc). Similarity: the chance
 * that X stays at or below the maximum when nobody tastes a difference, P(X ≤ maximum | chance).
 */
function chanceOfShowing(n: number, q: DiscriminationQuestion, plan: PowerPlan, pd: number): number {
  if (q.aim === 'difference') return power(n, plan);
  const most = similarityMaximum(n, { beta: q.beta, pd, chance: plan.chance });
  return most === null ? 0 : binomialCdf(most, n, plan.chance);
}

function curveOf(q: DiscriminationQuestion, plan: PowerPlan, pd: number, end: number): CurvePoint[] {
  const step = Math.ceil(end / CURVE.points);
  const isDrawn = (n: number) => (end - n) % step === 0;
  if (q.aim === 'difference') return powerCurve(1, end, plan).filter(({ n }) => isDrawn(n)).map(({ n, power: size }) => ({ n, power: size }));
  return Array.from({ length: end }, (_, i) => i + 1).filter(isDrawn).map((n) => ({ n, power: chanceOfShowing(n, q, plan, pd) }));
}

/** About eight even steps of 1, 2 or 5 tens up to `end`, and the numbers that matter. */
function rowsUpTo(end: number, more: readonly number[]): number[] {
  const rough = end / 8;
  const ten = 10 ** Math.floor(Math.log10(rough));
  const step = Math.max(1, ([1, 2, 5].find((of) => of * ten >= rough) ?? 10) * ten);
  const even = Array.from({ length: Math.floor(end / step) }, (_, i) => step * (i + 1));
  return [...new Set([...even, ...more])].sort((a, b) => a - b);
}

function smallestOf(goal: number, plan: PowerPlan): DiscriminationPlan['smallest'] {
  try {
    const size = smallestPanel(goal, plan);
    return { answers: size.first, power: size.powerAtFirst, steadyFrom: size.stable };
  } catch (error) {
    if (error instanceof StatsError && error.code === 'not_estimable') return null;
    throw error;
  }
}

/** First number of people whose sets together reach the goal; exact power is saw-toothed, so each is looked at. */
function peopleFor(q: DiscriminationQuestion, plan: PowerPlan, smallest: NonNullable<DiscriminationPlan['smallest']>): number {
  if (q.aim === 'similarity' || q.replicates === 1) return smallest.answers;
  let people = Math.ceil(smallest.answers / q.replicates);
  while (power(people * q.replicates, plan) < 1 - q.beta) people += 1;
  return people;
}

function notesOf(q: DiscriminationQuestion, chance: number): string[] {
  const notes: string[] = [];
  if (q.replicates > 1 && q.aim === 'difference') {
    notes.push(`${q.replicates} sets from each person: the test of a difference stays valid, because under guessing every answer is as good as another’s. But one person’s answers are not independent. One figure takes every set for a new palate’s, which is hopeful; the other counts each person once, which is careful. The truth depends on how much people differ; the two are a guide, no limits. Sets tell whether a palate repeats itself; they don’t tell more about other people.`);
  }
  if (q.replicates > 1 && q.aim === 'similarity') {
    notes.push('A claim of likeness counts one answer for each person: repeats by the same palate would make it look surer than it is (ISO 10399, note to 6.2, by analogy). The further sets are not counted here.');
  }
  if (q.aim === 'similarity') notes.push('Fewer correct answers than guessing gives lead to no conclusion: something other than tasting is then at work.');
  if (q.protocol === 'two_out_of_five' && q.size.by === 'dPrime') notes.push('Two out of five has no model of d′ here. It is counted as if as many people told the wines apart as in a triangle at that d′, which is hopeful.');
  if (q.twoSided) notes.push('Both directions count, so each gets half of α.');
  if (q.protocol === PAIR && !q.twoSided && q.aim === 'difference') notes.push('One direction only: say which before anybody tastes. The other direction can’t be shown then.');
  notes.push(`Guessing alone is right ${q.protocol === 'two_out_of_five' ? 'once in 10' : chance === 0.5 ? 'once in 2' : 'once in 3'} times. Exact binomial; it is saw-toothed, so one person more can lower the chance a little.`);
  return notes;
}

/**
 * Plans a discrimination test: smallest panel, what the panel at hand can do, the number correct that
 * decides (at least, for difference; at most, for similarity) and the curve from one answer on.
 * The smallest panel of a similarity test is that of the difference test with the same α, β and pd: both
 * ask that the largest number similar at β and the smallest number different at α meet.
 * @throws StatsError on risks or sizes out of range, and on two sides asked of anything but a pair
 * Sources: ISO 4120:2021 A.3 and 8.2, ISO 10399 A.3, ISO 5495 A.4 and A.5, all computed exactly.
 */
export function planDiscrimination(q: DiscriminationQuestion): DiscriminationPlan {
  const chance = CHANCE[q.protocol];
  const effect = q.size.by === 'pd' ? effectOfShare(q.protocol, q.size.value) : effectOfDPrime(q.protocol, q.size.value);
  const twoSided = q.twoSided && q.aim === 'difference';
  const plan: PowerPlan = { alpha: q.alpha, chance, pc: effect.pc, twoSided };
  const smallest = smallestOf(1 - q.beta, plan);
  const answers = answersOf(q, q.panel);
  const wanted = Math.max(CURVE.least, Math.ceil(1.3 * (smallest?.answers ?? CURVE.most)), Math.ceil(1.3 * answers));
  const end = Math.min(CURVE.most, wanted);
  const criticalAt = (n: number) => (q.aim === 'difference' ? minimumCorrect(n, q.alpha, chance, { twoSided }) : similarityMaximum(n, { beta: q.beta, pd: effect.pd, chance }));
  const show = (n: number) => chanceOfShowing(n, q, plan, effect.pd);
  return {
    chance, effect, smallest,
    goal: q.aim === 'difference' ? 1 - q.beta : 1 - q.alpha,
    people: smallest && { hopeful: peopleFor(q, plan, smallest), safe: smallest.answers },
    atHand: { answers, power: show(answers), powerIfRepeatsSayNothing: show(q.panel), critical: criticalAt(answers) },
    curve: curveOf(q, plan, effect.pd, end),
    table: rowsUpTo(end, [answers, ...(smallest ? [smallest.answers] : [])]).map((n) => ({ n, power: show(n), critical: criticalAt(n) })),
    notes: notesOf({ ...q, twoSided }, chance),
  };
}
