import {
  balancedScores,
  compactLetters,
  mixedAssessorModel,
  profileAnova,
  scaleUse,
  servingEffect,
  StatsError,
  tukeyComparisons,
  type BalancedScores,
  type ProfileAnova,
  type TestedLine,
} from '@/stats';
import { orNull } from './agreement';
import { completeScores, type LongScore } from './evidence';
import { levelsOf, mixedLine } from './mixed-line';
import type { CellView, LineView, PairView, PositionView, ScaleView, TestView } from './types';

/** The numbers of one ballot line; the words of the ballot are added by the caller. */
export interface LineNumbers
  extends Pick<LineView, 'cells' | 'gaps' | 'leftOut' | 'method' | 'product' | 'interaction' | 'assessor' | 'scaling' | 'position' | 'atEnds' | 'smallestDifference' | 'pairs' | 'whyNot'> {
  assessors: number[];
  /** The complete table of those who scored every glass, for the panel's own figures; null when there is none. */
  table: BalancedScores | null;
  /** Panelists in `table`, in its order. */
  complete: number[];
}

const testView = (line: TestedLine, df2: number): TestView | null =>
  line.f === null || line.p === null || !Number.isFinite(line.f) ? null : { F: line.f, df1: line.df, df2, p: line.p };

/** Plain means of what was scored, when no test can be made. */
function plainCells(rows: readonly LongScore[], products: readonly number[]): CellView[] {
  return products.flatMap((sample) => {
    const scores = rows.filter((row) => row.product === sample).map((row) => row.score);
    if (scores.length === 0) return [];
    const mean = scores.reduce((sum, score) => sum + score, 0) / scores.length;
    return [{ sample, mean, n: scores.length, low: null, high: null, letters: '' }];
  });
}

function compared(anova: ProfileAnova, products: readonly number[], alpha: number): Pick<LineNumbers, 'cells' | 'smallestDifference' | 'pairs'> {
  const means = anova.productMeans;
  const n = anova.assessors * anova.replicates;
  const tukey = tukeyComparisons({ means, n, ms: anova.interaction.ms, df: anova.interaction.df, alpha });
  const letters = compactLetters(means, tukey.pairs.filter((pair) => pair.isShown).map((pair) => [pair.first, pair.second] as const));
  const smallestDifference = tukey.criticalDifference!;
  const half = smallestDifference / 2;
  const cells = products.map((sample, j) => ({ sample, mean: means[j]!, n, low: means[j]! - half, high: means[j]! + half, letters: letters[j]! }));
  const pairs: PairView[] = tukey.pairs.map((pair) => ({ a: products[pair.first]!, b: products[pair.second]!, difference: pair.difference, low: pair.low, high: pair.high, p: pair.p }));
  return { cells, smallestDifference, pairs };
}

/** What the place in the flight did, with samples and panelists allowed for; null where it can't be told. */
function positionOf(rows: readonly LongScore[], assessors: readonly number[], products: readonly number[]): PositionView | null {
  const places = [...new Set(rows.map((row) => row.position))].sort((a, b) => a - b);
  const effect = orNull(() => servingEffect(levelsOf(rows, assessors, products), rows.map((row) => places.indexOf(row.position))));
  return effect && { F: effect.f, df1: effect.df[0], df2: effect.df[1], p: effect.p, span: effect.span };
}

/** Panelists' use of the scale over their other disagreement; null where it is not defined. */
function scalingOf(table: BalancedScores): TestView | null {
  const model = orNull(() => mixedAssessorModel(table));
  // Disagreement that is only rounding is no measure of anything.
  if (!model || model.disagreement.ss <= 1e-10 * model.scaling.ss) return null;
  return testView(model.scaling, model.disagreement.df);
}

/**
 * Analysis of one line at `alpha`. Every glass scored by every panelist: analysis of variance, panelists
 * random, product over the panelist × sample interaction, Tukey's differences. With gaps: the same model
 * by REML over everybody who scored a glass; where that can't be fitted, those who scored all of them.
 * What can't be computed says why in `whyNot`; nothing here is ever NaN.
 * @param products sample numbers, in the order of the cells
 * @param scale ends of the scale, for the share of scores that lie at them
 */
export function analyseLine(rows: readonly LongScore[], products: readonly number[], replicates: number, alpha: number, scale: ScaleView = { low: 0, high: 100 }): LineNumbers {
  const { complete, assessors, leftOut } = completeScores(rows, products.length, replicates);
  const everybody = [...assessors, ...leftOut].sort((a, b) => a - b);
  const numbers: LineNumbers = {
    cells: plainCells(rows, products), assessors, complete: assessors, gaps: [], leftOut, method: 'none', product: null, interaction: null, assessor: null, scaling: null,
    position: positionOf(rows, everybody, products), atEnds: 0, smallestDifference: null, pairs: [], whyNot: null, table: null,
  };
  if (rows.length === 0) return { ...numbers, whyNot: 'Nobody scored this line.' };
  numbers.atEnds = scaleUse(rows.map((row) => row.score), scale).atEnds;
  if (assessors.length >= 2) numbers.table = balancedScores(levelsOf(complete, assessors, products));
  if (leftOut.length > 0) {
    const mixed = mixedLine(rows, everybody, products, alpha);
    if (mixed) return { ...numbers, ...mixed, assessors: everybody, gaps: leftOut, leftOut: [], method: 'mixed' };
  }
  if (!numbers.table) {
    const who = assessors.length === 0 ? 'No panelist' : 'Only one panelist';
    return { ...numbers, whyNot: `${who} scored every glass on this line, and a test needs two. The means are of what was scored.` };
  }
  return { ...numbers, ...balancedLine(numbers.table, complete, products, alpha) };
}

function balancedLine(table: BalancedScores, complete: readonly LongScore[], products: readonly number[], alpha: number): Partial<LineNumbers> {
  try {
    const anova = profileAnova(table);
    const product = testView(anova.product, anova.interaction.df);
    if (!product) {
      const isFlat = anova.product.f === null;
      return { cells: plainCells(complete, products), whyNot: isFlat ? 'Every panelist scored all glasses alike, so there is nothing to test.' : 'The panelists differ from each other in nothing, so there is no error to judge the samples by.' };
    }
    return {
      ...compared(anova, products, alpha), product, method: 'anova',
      interaction: anova.error ? testView(anova.interaction, anova.error.df) : null,
      assessor: testView(anova.assessor, anova.interaction.df),
      scaling: scalingOf(table),
    };
  } catch (error) {
    if (error instanceof StatsError) return { whyNot: `${error.message}.` };
    throw error;
  }
}

/** Whether two samples were shown to differ: they share no letter. */
export const wereShownToDiffer = (a: CellView, b: CellView): boolean =>
  a.letters !== '' && b.letters !== '' && !lettersOf(a.letters).some((letter) => lettersOf(b.letters).includes(letter));

const lettersOf = (letters: string): string[] => letters.match(/[a-z]\d*/g) ?? [];
