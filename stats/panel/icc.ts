import { requireFiniteArray, requireProbability } from '../check';
import { fQuantile, fSf } from '../distributions';
import { StatsError } from '../errors';

/** One intraclass correlation with its F test of 0 and its limits. Estimates may be negative and are not cut. */
export interface Icc {
  readonly icc: number;
  readonly f: number;
  readonly df1: number;
  readonly df2: number;
  readonly p: number;
  readonly lower: number;
  readonly upper: number;
}

export interface IccForms {
  readonly targets: number;
  readonly judges: number;
  readonly msRows: number;
  readonly msColumns: number;
  readonly msWithin: number;
  readonly msResidual: number;
  /** ICC(1,1): each target judged by other judges. */
  readonly one: Icc;
  /** ICC(2,1): judges a random sample, absolute agreement. */
  readonly twoRandom: Icc;
  /** ICC(3,1): these very judges, consistency. */
  readonly twoFixed: Icc;
  /** The same of the mean of all judges: ICC(1,k), ICC(2,k), ICC(3,k) = Cronbach's α. */
  readonly oneMean: Icc;
  readonly twoRandomMean: Icc;
  readonly twoFixedMean: Icc;
}

/**
 * The six intraclass correlations of a targets × judges table without gaps, with limits at 1 − alpha.
 * Limits of ICC(2,1) by the Satterthwaite-type degrees of freedom of Shrout and Fleiss; those of
 * ICC(2,k) by Spearman and Brown's formula from them.
 * @param table rows = targets (products), columns = judges (assessors); at least 2 × 2
 * @throws StatsError `too_few`, `shape`, `not_finite`, `constant` when judges and targets leave no residual
 * Source: Shrout and Fleiss (1979), Psychological Bulletin 86:420; McGraw and Wong (1996).
 */
export function intraclassCorrelations(table: readonly ArrayLike<number>[], alpha = 0.05): IccForms {
  requireProbability(alpha, 'alpha');
  const n = table.length;
  const k = table[0]?.length ?? 0;
  if (n < 2 || k < 2) throw new StatsError('too_few', 'Intraclass correlation needs at least two targets and two judges');
  const rowMeans = new Float64Array(n);
  const columnMeans = new Float64Array(k);
  let grand = 0;
  table.forEach((row, i) => {
    if (row.length !== k) throw new StatsError('shape', 'Every target needs a score by every judge');
    requireFiniteArray(row, 'scores');
    for (let j = 0; j < k; j += 1) {
      rowMeans[i] += row[j] / k;
      columnMeans[j] += row[j] / n;
      grand += row[j] / (n * k);
    }
  });
  let ssRows = 0;
  let ssColumns = 0;
  let ssResidual = 0;
  let ssWithin = 0;
  for (let i = 0; i < n; i += 1) {
    ssRows += k * (rowMeans[i] - grand) ** 2;
    for (let j = 0; j < k; j += 1) {
      ssWithin += (table[i][j] - rowMeans[i]) ** 2;
      ssResidual += (table[i][j] - rowMeans[i] - columnMeans[j] + grand) ** 2;
    }
  }
  for (let j = 0; j < k; j += 1) ssColumns += n * (columnMeans[j] - grand) ** 2;
  const msRows = ssRows / (n - 1);
  const msColumns = ssColumns / (k - 1);
  const msWithin = ssWithin / (n * (k - 1));
  const msResidual = ssResidual / ((n - 1) * (k - 1));
  const scale = msRows + msColumns;
  if (msResidual <= 1e-24 * Math.max(scale, grand * grand)) {
    throw new StatsError('constant', 'The judges leave no residual, so intraclass correlation has no limits');
  }

  const dfRows = n - 1;
  const dfWithin = n * (k - 1);
  const dfResidual = (n - 1) * (k - 1);
  const half = 1 - alpha / 2;

  const f1 = msRows / msWithin;
  const f1Low = f1 / fQuantile(half, dfRows, dfWithin);
  const f1High = f1 * fQuantile(half, dfWithin, dfRows);
  const p1 = fSf(f1, dfRows, dfWithin);
  const f3 = msRows / msResidual;
  const f3Low = f3 / fQuantile(half, dfRows, dfResidual);
  const f3High = f3 * fQuantile(half, dfResidual, dfRows);
  const p3 = fSf(f3, dfRows, dfResidual);
  const ofOne = (f: number) => (f - 1) / (f + k - 1);
  const ofMean = (f: number) => 1 - 1 / f;
  const stepUp = (r: number) => (k * r) / (1 + (k - 1) * r);

  const icc2 = (msRows - msResidual) / (msRows + (k - 1) * msResidual + (k * (msColumns - msResidual)) / n);
  const [low2, high2] = limitsOfTwoRandom({ icc2, n, k, msRows, msColumns, msResidual, half });
  const test1 = { f: f1, df1: dfRows, df2: dfWithin, p: p1 };
  const test3 = { f: f3, df1: dfRows, df2: dfResidual, p: p3 };
  return {
    targets: n,
    judges: k,
    msRows,
    msColumns,
    msWithin,
    msResidual,
    one: { icc: ofOne(f1), ...test1, lower: ofOne(f1Low), upper: ofOne(f1High) },
    twoRandom: { icc: icc2, ...test3, lower: low2, upper: high2 },
    twoFixed: { icc: ofOne(f3), ...test3, lower: ofOne(f3Low), upper: ofOne(f3High) },
    oneMean: { icc: ofMean(f1), ...test1, lower: ofMean(f1Low), upper: ofMean(f1High) },
    twoRandomMean: { icc: (msRows - msResidual) / (msRows + (msColumns - msResidual) / n), ...test3, lower: stepUp(low2), upper: stepUp(high2) },
    twoFixedMean: { icc: ofMean(f3), ...test3, lower: ofMean(f3Low), upper: ofMean(f3High) },
  };
}

function limitsOfTwoRandom(q: { icc2: number; n: number; k: number; msRows: number; msColumns: number; msResidual: number; half: number }): [number, number] {
  const { icc2, n, k, msRows, msColumns, msResidual, half } = q;
  const fj = msColumns / msResidual;
  const a = k * icc2 * fj + n * (1 + (k - 1) * icc2) - k * icc2;
  const v = ((k - 1) * (n - 1) * a ** 2) / ((n - 1) * k ** 2 * icc2 ** 2 * fj ** 2 + (n * (1 + (k - 1) * icc2) - k * icc2) ** 2);
  const fl = fQuantile(half, n - 1, v);
  const fu = fQuantile(half, v, n - 1);
  const rest = k * msColumns + (k * n - k - n) * msResidual;
  return [(n * (msRows - fl * msResidual)) / (fl * rest + n * msRows), (n * (fu * msRows - msResidual)) / (rest + n * fu * msRows)];
}
