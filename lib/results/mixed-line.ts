import { compactLetters, fitProfileModel, modelComparisons, productTest, StatsError, type LongScores } from '@/stats';
import type { LongScore } from './evidence';
import type { CellView, PairView, TestView } from './types';

/** A line with gaps, analysed with everybody who scored a glass. */
export interface MixedLine {
  cells: CellView[];
  product: TestView;
  smallestDifference: number;
  pairs: PairView[];
}

/** Rows as numbered levels; `assessors` and `products` in the order of their levels. */
export function levelsOf(rows: readonly LongScore[], assessors: readonly number[], products: readonly number[]): LongScores {
  return {
    assessor: rows.map((row) => assessors.indexOf(row.assessor)),
    product: rows.map((row) => products.indexOf(row.product)),
    score: rows.map((row) => row.score),
  };
}

/**
 * REML with Kenward and Roger's degrees of freedom: means as if everybody had scored every glass, pairs by
 * Tukey's rule with each pair's own error. The bars are half the largest difference that a pair needed,
 * so they err on the wide side. Null when the model can't be fitted.
 */
export function mixedLine(rows: readonly LongScore[], assessors: readonly number[], products: readonly number[], alpha: number): MixedLine | null {
  try {
    const model = fitProfileModel(levelsOf(rows, assessors, products));
    const { f, df, p } = productTest(model, 'kenward_roger');
    const compared = modelComparisons(model, { alpha, method: 'kenward_roger' });
    const letters = compactLetters(model.means, compared.filter((pair) => pair.isShown).map((pair) => [pair.first, pair.second] as const));
    const smallestDifference = Math.max(...compared.map((pair) => pair.high - pair.difference));
    if (![f, df[1], p, smallestDifference].every(Number.isFinite)) return null;
    const half = smallestDifference / 2;
    return {
      cells: products.map((sample, j) => ({ sample, mean: model.means[j]!, n: model.counts[j]!, low: model.means[j]! - half, high: model.means[j]! + half, letters: letters[j]! })),
      product: { F: f, df1: df[0], df2: df[1], p },
      smallestDifference,
      pairs: compared.map((pair) => ({ a: products[pair.first]!, b: products[pair.second]!, difference: pair.difference, low: pair.low, high: pair.high, p: pair.p })),
    };
  } catch (error) {
    if (error instanceof StatsError) return null;
    throw error;
  }
}
