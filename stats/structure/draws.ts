import type { RandomGenerator } from 'pure-rand/types/RandomGenerator';
import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { uniformInt } from 'pure-rand/distribution/uniformInt';

/** Standard normal draws from a seeded generator, by the Box-Muller transform; moves the generator on. */
export function normalDraws(count: number, generator: RandomGenerator): number[] {
  const draws: number[] = [];
  while (draws.length < count) {
    // 1 - u keeps the logarithm away from 0.
    const radius = Math.sqrt(-2 * Math.log(1 - uniformFloat64(generator)));
    const angle = 2 * Math.PI * uniformFloat64(generator);
    draws.push(radius * Math.cos(angle), radius * Math.sin(angle));
  }
  return draws.slice(0, count);
}

/** A new list with the same members in random order; moves the generator on. */
export function shuffled<T>(values: ReadonlyArray<T>, generator: RandomGenerator): T[] {
  const result = [...values];
  for (let i = result.length - 1; i > 0; i -= 1) {
    const j = uniformInt(generator, 0, i);
    [result[i], result[j]] = [result[j], result[i]];
  }
  return result;
}
