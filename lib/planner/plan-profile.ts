import { chiSquareQuantile, gaussLegendre, normalCdf, studentizedRangeQuantile, tQuantile } from '@/stats';
import type { Scatter } from './types';

/** A profile as it is planned: who tastes what, how often, and how pairs are compared. */
export interface ProfileQuestion {
  scatter: Scatter;
  panelists: number;
  samples: number;
  replicates: number;
  alpha: number;
  /** Tukey guards all pairs together, LSD each pair by itself. */
  rule: 'tukey' | 'lsd';
}

export interface ProfilePlan {
  /** Two means further apart than this are shown to differ; points of the scale. */
  shown: number;
  /** The true difference that is found with the asked power; points of the scale. */
  found: number;
  /** The expected mean square by which means are judged (panelist × sample), and its degrees of freedom. */
  ms: number;
  df: number;
}

/** Nodes for the mean over the error's chi-square; the integrand is smooth, so 64 give seven digits. */
const NODES = 64;

/** Scaled errors √(χ²/df) at the quadrature's nodes: what the estimated standard deviation may turn out to be. */
function errorNodes(df: number): { at: number[]; weights: number[] } {
  const rule = gaussLegendre(NODES);
  const at = Array.from(rule.nodes, (x) => Math.sqrt(chiSquareQuantile((1 + x) / 2, df) / df));
  return { at, weights: Array.from(rule.weights, (w) => w / 2) };
}

/**
 * The chance that |T| exceeds `critical`, T non-central t on `df` with non-centrality `shift` (both
 * tails): the normal tail averaged over the error's chi-square by Gauss–Legendre. Absolute error below 1e-5.
 */
function powerAt(shift: number, critical: number, { at, weights }: ReturnType<typeof errorNodes>): number {
  return at.reduce((sum, scale, i) => sum + weights[i]! * (normalCdf(shift - critical * scale) + normalCdf(-shift - critical * scale)), 0);
}

type Design = Omit<ProfileQuestion, 'scatter'>;

/** What a design makes of any scatter: two differences in standard errors. */
interface Reach {
  df: number;
  critical: number;
  nodes: ReturnType<typeof errorNodes>;
}

function reachOf({ panelists, samples, alpha, rule }: Design): Reach {
  const df = (panelists - 1) * (samples - 1);
  const critical = rule === 'tukey' ? studentizedRangeQuantile(1 - alpha, samples, df) / Math.SQRT2 : tQuantile(1 - alpha / 2, df);
  return { df, critical, nodes: errorNodes(df) };
}

/** The expected mean square of panelist × sample, and the standard error of a difference of two means. */
function errorOf({ panelists, replicates }: Design, { repeatability, disagreement }: Scatter): { ms: number; se: number } {
  const ms = repeatability ** 2 + replicates * disagreement ** 2;
  return { ms, se: Math.sqrt((2 * ms) / (panelists * replicates)) };
}

/** The true difference, in standard errors, that is shown with chance `goal`. */
function shiftFor(goal: number, { critical, nodes }: Reach): number {
  let [low, high] = [0, critical + 1];
  while (powerAt(high, critical, nodes) < goal) high *= 1.5;
  for (let i = 0; i < 50; i += 1) {
    const middle = (low + high) / 2;
    if (powerAt(middle, critical, nodes) < goal) low = middle;
    else high = middle;
  }
  return high;
}

/**
 * The chance that a true difference (points of the scale) between two samples' means is shown.
 * @throws StatsError on fewer than two panelists or samples, alpha out of range
 */
export function profilePower({ scatter, ...design }: ProfileQuestion, difference: number): number {
  const { critical, nodes } = reachOf(design);
  const { se } = errorOf(design, scatter);
  if (se === 0) return difference === 0 ? 0 : 1;
  return powerAt(Math.abs(difference) / se, critical, nodes);
}

/**
 * For each scatter (a line of the ballot) the smallest difference that a profile shows, and the true
 * one that it finds with chance `goal`.
 * Model of the results: panelists random, samples judged by the panelist × sample mean square, which is
 * expected to be repeatability² + replicates · disagreement² on (I − 1)(J − 1) degrees of freedom.
 * Tukey: q(1 − α; J, df) √(ms / (I r)); LSD: t(1 − α/2; df) √(2 ms / (I r)).
 * Units: points of the scale. `goal` in (0, 1), above alpha. Relative error of `found` below 1e-4.
 * @throws StatsError on fewer than two panelists or samples, alpha out of range
 */
export function planProfiles(scatters: readonly Scatter[], design: Design, goal = 0.8): ProfilePlan[] {
  const reach = reachOf(design);
  const shift = shiftFor(goal, reach);
  return scatters.map((scatter) => {
    const { ms, se } = errorOf(design, scatter);
    return { shown: reach.critical * se, found: shift * se, ms, df: reach.df };
  });
}

/** The same for one scatter. */
export const planProfile = ({ scatter, ...design }: ProfileQuestion, goal = 0.8): ProfilePlan => planProfiles([scatter], design, goal)[0]!;

/** What one line of a past session showed of its panel. */
export interface PastLine {
  name: string;
  /** Panelists and samples in the analysis, and times each was tasted. */
  panelists: number;
  samples: number;
  replicates: number;
  alpha: number;
  /** Tukey's smallest difference of that session, points of the scale. */
  smallestDifference: number;
  /** F of the interaction over the error; null with one replicate, or without any error. */
  interactionF: number | null;
}

/** The two scatters of a line with the degrees of freedom behind them. */
export interface LineScatter extends Scatter {
  name: string;
  df: number;
}

/**
 * Scatters of a past line, taken back out of what its results say: the interaction's mean square from
 * Tukey's difference, the error's from the interaction's F. With one replicate the two can't be parted:
 * all of it is then called disagreement, which makes plans cautious. A negative disagreement counts as 0.
 * Units: points of the scale. @throws StatsError on fewer than two panelists or samples
 */
export function scatterOfLine(line: PastLine): LineScatter {
  const { panelists, samples, replicates, alpha, smallestDifference, interactionF, name } = line;
  const df = (panelists - 1) * (samples - 1);
  const msInteraction = panelists * replicates * (smallestDifference / studentizedRangeQuantile(1 - alpha, samples, df)) ** 2;
  if (interactionF === null || interactionF === 0) return { name, df, repeatability: 0, disagreement: Math.sqrt(msInteraction / replicates) };
  const msError = msInteraction / interactionF;
  return { name, df, repeatability: Math.sqrt(msError), disagreement: Math.sqrt(Math.max(0, (msInteraction - msError) / replicates)) };
}

/**
 * One scatter for each name out of several sessions: squares averaged by their degrees of freedom.
 * In the order of the first appearance. `sessions` says how many stand behind it.
 */
export function poolScatter(lines: readonly LineScatter[]): (LineScatter & { sessions: number })[] {
  const names = [...new Set(lines.map((line) => line.name))];
  return names.map((name) => {
    const own = lines.filter((line) => line.name === name);
    const df = own.reduce((sum, line) => sum + line.df, 0);
    const pooled = (of: (line: LineScatter) => number) => Math.sqrt(own.reduce((sum, line) => sum + line.df * of(line) ** 2, 0) / df);
    return { name, df, sessions: own.length, repeatability: pooled((line) => line.repeatability), disagreement: pooled((line) => line.disagreement) };
  });
}
