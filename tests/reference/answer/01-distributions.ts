import {
  betaCdf, betaQuantile, betaSf, chiSquareQuantile, chiSquareSf, fQuantile, fSf, logGamma, normalCdf, normalQuantile, normalSf, studentizedRangeCdf, studentizedRangeQuantile, tCdf, tQuantile, tSf,
} from '@/stats';
import type { Answerer, CaseInput } from './types';

type Columns = Record<string, number[]>;
type Given = { cdf?: Columns; quantile?: Columns; upper_tail?: Columns; rows?: Columns; quantiles?: Columns };

const inFile = (c: CaseInput) => c.file.startsWith('01');
const has = (c: CaseInput, table: keyof Given, ...columns: string[]) => {
  const found = (c.given as Given | undefined)?.[table];
  return inFile(c) && found !== undefined && columns.every((column) => column in found) && Object.keys(found).length === columns.length;
};
/** Infinite degrees of freedom are written as null. */
const open = (df: number | null) => df ?? Infinity;

const rows = <T>(columns: Columns, make: (...values: number[]) => T): T[] => {
  const lists = Object.values(columns);
  return lists[0]!.map((_, i) => make(...lists.map((list) => list[i]!)));
};

/** log Φ(z); in the far tail Φ underflows before its logarithm does, so a continued fraction takes over. */
function logNormalCdf(z: number): number {
  if (z > -30) return Math.log(z < 0 ? normalSf(-z) : normalCdf(z));
  let fraction = 0;
  for (let k = 60; k > 0; k -= 1) fraction = k / (-z + fraction);
  return -0.5 * z * z - 0.5 * Math.log(2 * Math.PI) - Math.log(-z + fraction);
}

export const answers: Answerer[] = [
  {
    matches: (c) => has(c, 'cdf', 'z'),
    answer(c) {
      const { cdf, quantile } = c.given as Required<Given>;
      return { cdf: { z: cdf.z, cdf: cdf.z!.map((z) => (z < 0 ? normalSf(-z) : normalCdf(z))), log_cdf: cdf.z!.map(logNormalCdf) }, quantile: { p: quantile.p, q: quantile.p!.map(normalQuantile) } };
    },
  },
  {
    matches: (c) => has(c, 'cdf', 't', 'df'),
    answer(c) {
      const { cdf, quantile } = c.given as Required<Given>;
      return {
        cdf: { ...cdf, cdf: cdf.t!.map((t, i) => tCdf(t, open(cdf.df![i]!))), upper: cdf.t!.map((t, i) => tSf(t, open(cdf.df![i]!))) },
        quantile: { ...quantile, q: quantile.p!.map((p, i) => tQuantile(p, open(quantile.df![i]!))) },
      };
    },
  },
  {
    matches: (c) => has(c, 'upper_tail', 'F', 'df1', 'df2'),
    answer(c) {
      const { upper_tail: tail, quantile } = c.given as Required<Given>;
      return {
        upper_tail: { ...tail, upper: tail.F!.map((f, i) => fSf(f, tail.df1![i]!, tail.df2![i]!)) },
        quantile: { ...quantile, q: quantile.p!.map((p, i) => fQuantile(p, quantile.df1![i]!, quantile.df2![i]!)) },
      };
    },
  },
  {
    matches: (c) => has(c, 'upper_tail', 'x', 'df'),
    answer(c) {
      const { upper_tail: tail, quantile } = c.given as Required<Given>;
      return { upper_tail: { ...tail, upper: tail.x!.map((x, i) => chiSquareSf(x, tail.df![i]!)) }, quantile: { ...quantile, q: quantile.p!.map((p, i) => chiSquareQuantile(p, quantile.df![i]!)) } };
    },
  },
  {
    matches: (c) => has(c, 'cdf', 'x', 'a', 'b'),
    answer(c) {
      const { cdf, quantile } = c.given as Required<Given>;
      return {
        cdf: { ...cdf, cdf: rows({ x: cdf.x!, a: cdf.a!, b: cdf.b! }, betaCdf), upper: rows({ x: cdf.x!, a: cdf.a!, b: cdf.b! }, betaSf) },
        quantile: { ...quantile, q: rows({ p: quantile.p!, a: quantile.a!, b: quantile.b! }, betaQuantile) },
      };
    },
  },
  {
    matches: (c) => has(c, 'rows', 'x'),
    answer(c) {
      const { rows: table } = c.given as Required<Given>;
      return { rows: { x: table.x, lgamma: table.x!.map(logGamma) } };
    },
  },
  {
    matches: (c) => has(c, 'quantiles', 'p', 'k', 'df'),
    answer(c) {
      const { quantiles, cdf } = c.given as Required<Given>;
      return {
        quantiles: { ...quantiles, q: quantiles.p!.map((p, i) => studentizedRangeQuantile(p, quantiles.k![i]!, open(quantiles.df![i]!))) },
        cdf: { ...cdf, cdf: cdf.q!.map((q, i) => studentizedRangeCdf(q, cdf.k![i]!, open(cdf.df![i]!))) },
      };
    },
  },
];
