import type { BalancedScores } from './balanced-scores';

export interface CellMeans {
  /** Mean of cell (i, j) at i·products + j. */
  readonly cells: Float64Array;
  readonly assessorMeans: Float64Array;
  readonly productMeans: Float64Array;
  readonly grandMean: number;
}

/** Means of a complete table over replicates, by assessor, by product and over all. */
export function cellMeans({ scores, assessors: I, products: J, replicates: K }: BalancedScores): CellMeans {
  const cells = new Float64Array(I * J);
  const assessorMeans = new Float64Array(I);
  const productMeans = new Float64Array(J);
  let total = 0;
  for (let i = 0; i < I; i += 1) {
    for (let j = 0; j < J; j += 1) {
      const cell = i * J + j;
      let sum = 0;
      for (let k = 0; k < K; k += 1) sum += scores[cell * K + k];
      const mean = sum / K;
      cells[cell] = mean;
      assessorMeans[i] += mean;
      productMeans[j] += mean;
      total += mean;
    }
  }
  for (let i = 0; i < I; i += 1) assessorMeans[i] /= J;
  for (let j = 0; j < J; j += 1) productMeans[j] /= I;
  return { cells, assessorMeans, productMeans, grandMean: total / (I * J) };
}
