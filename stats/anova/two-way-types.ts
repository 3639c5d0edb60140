import { Matrix, solve } from 'ml-matrix';
import { StatsError } from '../errors';
import { cellTable, type CellTable } from '../mixed/cell-table';
import type { LongScores } from './balanced-scores';

/** A sum of squares with its degrees of freedom. */
export interface SumOfSquares {
  readonly ss: number;
  readonly df: number;
}

/** Sums of squares of one way of splitting a two-way table. */
export interface TwoWaySplit {
  readonly assessor: SumOfSquares;
  readonly product: SumOfSquares;
  readonly interaction: SumOfSquares;
  readonly residual: SumOfSquares;
}

export interface TwoWayTypes {
  /** Without interaction: each factor after the other, against the rest. */
  readonly additive: Omit<TwoWaySplit, 'interaction'>;
  /** Sequential, assessors first; null when a cell is empty or no cell holds two scores. */
  readonly typeI: TwoWaySplit | null;
  /** Each main effect after the other one. */
  readonly typeII: TwoWaySplit | null;
  /** Each main effect of equally weighted cell means (sum-to-zero coding). */
  readonly typeIII: TwoWaySplit | null;
}

/**
 * Sums of squares of types I, II and III of assessor × product with unequal numbers of scores, both
 * factors fixed. With empty cells, or one score a cell, only the additive split is defined. Units: the score's, squared.
 *
 * @throws StatsError as `fitProfileModel` on a table that can't be read, `not_estimable` when the
 * scores fall apart into groups of assessors and products without a link
 *
 * Source: type III by the weighted squares of means, Yates (1934) J. Am. Stat. Assoc. 29:51; types I and II
 * by comparing fitted models. Checked against R's anova and car's Anova.
 */
export function twoWayTypes(scores: LongScores): TwoWayTypes {
  const table = cellTable(scores);
  const { products: J, scores: N, filled, within } = table;
  const ofAssessor = margin(table, 'assessor');
  const ofProduct = margin(table, 'product');
  const I = ofAssessor.counts.filter((count) => count > 0).length;
  requireLinked(table);

  const total = within + spread(table.counts, table.means);
  const assessorAlone = spread(ofAssessor.counts, ofAssessor.means);
  const productAlone = spread(ofProduct.counts, ofProduct.means);
  const product = { ss: productAfterAssessor(table, ofAssessor), df: J - 1 };
  const assessor = { ss: assessorAlone + product.ss - productAlone, df: I - 1 };
  const left = total - assessorAlone - product.ss;
  const additive = { assessor, product, residual: { ss: left, df: N - I - J + 1 } };
  if (filled < I * J || N === filled) return { additive, typeI: null, typeII: null, typeIII: null };

  const interaction = { ss: left - within, df: (I - 1) * (J - 1) };
  const residual = { ss: within, df: N - filled };
  return {
    additive,
    typeI: { assessor: { ss: assessorAlone, df: I - 1 }, product, interaction, residual },
    typeII: { assessor, product, interaction, residual },
    typeIII: {
      assessor: { ss: weightedSquares(table, 'assessor'), df: I - 1 },
      product: { ss: weightedSquares(table, 'product'), df: J - 1 },
      interaction,
      residual,
    },
  };
}

type Factor = 'assessor' | 'product';

interface Margin {
  readonly counts: Float64Array;
  readonly means: Float64Array;
}

const levelOf = (cell: number, products: number, factor: Factor): number => (factor === 'assessor' ? Math.floor(cell / products) : cell % products);

/** Numbers of scores and plain means of one factor's levels. */
function margin({ counts, means, assessors, products }: CellTable, factor: Factor): Margin {
  const n = new Float64Array(factor === 'assessor' ? assessors : products);
  const sums = new Float64Array(n.length);
  counts.forEach((count, cell) => {
    const level = levelOf(cell, products, factor);
    n[level] += count;
    sums[level] += count * means[cell];
  });
  return { counts: n, means: sums.map((sum, level) => (n[level] === 0 ? 0 : sum / n[level])) };
}

/** Weighted sum of squares about the weighted mean. */
function spread(weights: ArrayLike<number>, values: ArrayLike<number>): number {
  let sum = 0;
  let total = 0;
  for (let i = 0; i < weights.length; i += 1) {
    sum += weights[i] * values[i];
    total += weights[i];
  }
  const mean = sum / total;
  let ss = 0;
  for (let i = 0; i < weights.length; i += 1) ss += weights[i] * (values[i] - mean) ** 2;
  return ss;
}

/** What products explain beyond assessors: normal equations with the assessors eliminated, the last product at 0. */
function productAfterAssessor({ counts, means, assessors: I, products: J }: CellTable, ofAssessor: Margin): number {
  const equations = Matrix.zeros(J, J);
  const rhs = new Float64Array(J);
  for (let i = 0; i < I; i += 1) {
    const n = ofAssessor.counts[i];
    if (n === 0) continue;
    for (let j = 0; j < J; j += 1) {
      const own = counts[i * J + j];
      if (own === 0) continue;
      rhs[j] += own * (means[i * J + j] - ofAssessor.means[i]);
      for (let k = 0; k < J; k += 1) equations.set(j, k, equations.get(j, k) - (own * counts[i * J + k]) / n + (j === k ? own : 0));
    }
  }
  const kept = J - 1;
  const effects = solve(equations.subMatrix(0, kept - 1, 0, kept - 1), Matrix.columnVector(rhs.subarray(0, kept)));
  let ss = 0;
  for (let j = 0; j < kept; j += 1) ss += effects.get(j, 0) * rhs[j];
  return ss;
}

/** Yates' weighted squares of means: unweighted means of cells, each weighted by the inverse of its variance. */
function weightedSquares({ counts, means, assessors, products }: CellTable, factor: Factor): number {
  const levels = factor === 'assessor' ? assessors : products;
  const cells = factor === 'assessor' ? products : assessors;
  const sums = new Float64Array(levels);
  const reciprocals = new Float64Array(levels);
  counts.forEach((count, cell) => {
    const level = levelOf(cell, products, factor);
    sums[level] += means[cell] / cells;
    reciprocals[level] += 1 / count;
  });
  return spread(
    reciprocals.map((sum) => cells ** 2 / sum),
    sums,
  );
}

/** Every product must be reachable from every other through assessors who scored both. */
function requireLinked({ counts, assessors: I, products: J }: CellTable): void {
  const reached = new Set([0]);
  for (let grown = true; grown; ) {
    grown = false;
    for (let i = 0; i < I; i += 1) {
      const own = Array.from({ length: J }, (_, j) => j).filter((j) => counts[i * J + j] > 0);
      if (!own.some((j) => reached.has(j)) || own.every((j) => reached.has(j))) continue;
      own.forEach((j) => reached.add(j));
      grown = true;
    }
  }
  if (reached.size < J) {
    throw new StatsError('not_estimable', 'The scores fall apart into groups of products that no assessor links, so the groups can’t be compared');
  }
}
