import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { normalQuantile } from '@/stats';

/** A study with complete scores: `scores[descriptor][(assessor·products + product)·replicates + replicate]`. */
export interface Study {
  readonly assessors: number;
  readonly products: number;
  readonly replicates: number;
  readonly scores: readonly Float64Array[];
}

export interface StudySize {
  readonly assessors: number;
  readonly products: number;
  readonly replicates: number;
  readonly descriptors: number;
}

/** Scores on a 0–100 scale with product, assessor, interaction and residual effects; the same for the same seed. */
export function makeStudy({ assessors: I, products: J, replicates: K, descriptors }: StudySize, seed = 7): Study {
  const generator = xoroshiro128plus(seed);
  const normal = (sd: number) => sd * normalQuantile((uniformInt(generator, 1, 1_000_000) - 0.5) / 1_000_000);
  const scores = Array.from({ length: descriptors }, () => {
    const product = Array.from({ length: J }, () => normal(10));
    const y = new Float64Array(I * J * K);
    for (let i = 0; i < I; i += 1) {
      const own = normal(8);
      for (let j = 0; j < J; j += 1) {
        const cell = 50 + own + product[j] + normal(5);
        for (let k = 0; k < K; k += 1) y[(i * J + j) * K + k] = Math.round(10 * (cell + normal(6))) / 10;
      }
    }
    return y;
  });
  return { assessors: I, products: J, replicates: K, scores };
}

/** The study as a CSV in long form: assessor, product, replicate, then a column for each descriptor. */
export function studyCsv({ assessors, products, replicates, scores }: Study): string {
  const lines = [['assessor', 'product', 'replicate', ...scores.map((_, d) => `d${d + 1}`)].join()];
  for (let i = 0; i < assessors; i += 1) {
    for (let j = 0; j < products; j += 1) {
      for (let k = 0; k < replicates; k += 1) {
        const at = (i * products + j) * replicates + k;
        lines.push([`A${i + 1}`, `P${j + 1}`, k + 1, ...scores.map((y) => y[at])].join());
      }
    }
  }
  return `${lines.join('\n')}\n`;
}
