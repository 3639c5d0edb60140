import { balancedScores, compactLetters, profileAnova, StatsError, tukeyComparisons, type BalancedScores, type ProfileAnova, type TestedLine } from '@/stats';
import { completeScores, type LongScore } from './evidence';
import type { CellView, TestView } from './types';

/** The numbers of one ballot line; the words of the ballot are added by the caller. */
export interface LineNumbers {
  cells: CellView[];
  assessors: number[];
  leftOut: number[];
  product: TestView | null;
  interaction: TestView | null;
  assessor: TestView | null;
  smallestDifference: number | null;
  whyNot: string | null;
  /** The complete table behind the tests, for the panel's own figures; null when there is none. */
  table: BalancedScores | null;
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

function tableOf(complete: readonly LongScore[], assessors: readonly number[], products: readonly number[]): BalancedScores {
  return balancedScores({
    assessor: complete.map((row) => assessors.indexOf(row.assessor)),
    product: complete.map((row) => products.indexOf(row.product)),
    score: complete.map((row) => row.score),
  });
}

function compared(anova: ProfileAnova, products: readonly number[], alpha: number): { cells: CellView[]; smallestDifference: number } {
  const means = anova.productMeans;
  const n = anova.assessors * anova.replicates;
  const tukey = tukeyComparisons({ means, n, ms: anova.interaction.ms, df: anova.interaction.df, alpha });
  const letters = compactLetters(means, tukey.pairs.filter((pair) => pair.isShown).map((pair) => [pair.first, pair.second] as const));
  const smallestDifference = tukey.criticalDifference!;
  const half = smallestDifference / 2;
  const cells = products.map((sample, j) => ({ sample, mean: means[j]!, n, low: means[j]! - half, high: means[j]! + half, letters: letters[j]! }));
  return { cells, smallestDifference };
}

/**
 * Analysis of variance of one line with the panelists who scored every glass: panelists random,
 * product over the panelist × sample interaction, Tukey's differences at `alpha`.
 * What can't be computed says why in `whyNot`; nothing here is ever NaN.
 * @param products sample numbers, in the order of the cells
 */
export function analyseLine(rows: readonly LongScore[], products: readonly number[], replicates: number, alpha: number): LineNumbers {
  const { complete, assessors, leftOut } = completeScores(rows, products.length, replicates);
  const numbers: LineNumbers = {
    cells: plainCells(rows, products), assessors, leftOut, product: null, interaction: null, assessor: null, smallestDifference: null, whyNot: null, table: null,
  };
  if (rows.length === 0) return { ...numbers, whyNot: 'Nobody scored this line.' };
  if (assessors.length < 2) {
    const who = assessors.length === 0 ? 'No panelist' : 'Only one panelist';
    return { ...numbers, whyNot: `${who} scored every glass on this line, and a test needs two. The means are of what was scored.` };
  }
  try {
    const table = tableOf(complete, assessors, products);
    numbers.table = table;
    const anova = profileAnova(table);
    const product = testView(anova.product, anova.interaction.df);
    if (!product) {
      const isFlat = anova.product.f === null;
      return { ...numbers, cells: plainCells(complete, products), whyNot: isFlat ? 'Every panelist scored all glasses alike, so there is nothing to test.' : 'The panelists differ from each other in nothing, so there is no error to judge the samples by.' };
    }
    return {
      ...numbers, ...compared(anova, products, alpha), product,
      interaction: anova.error ? testView(anova.interaction, anova.error.df) : null,
      assessor: testView(anova.assessor, anova.interaction.df),
    };
  } catch (error) {
    if (error instanceof StatsError) return { ...numbers, whyNot: `${error.message}.` };
    throw error;
  }
}

/** Whether two samples were shown to differ: they share no letter. */
export const wereShownToDiffer = (a: CellView, b: CellView): boolean =>
  a.letters !== '' && b.letters !== '' && !lettersOf(a.letters).some((letter) => lettersOf(b.letters).includes(letter));

const lettersOf = (letters: string): string[] => letters.match(/[a-z]\d*/g) ?? [];
