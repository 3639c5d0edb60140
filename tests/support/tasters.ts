import type { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { normalQuantile } from '@/stats';

/** Chance in [0, 1), seeded. */
export type Random = () => number;

export function seeded(generator: ReturnType<typeof xoroshiro128plus>): Random {
  return () => (generator.next() >>> 0) / 2 ** 32;
}

/** One draw from a normal distribution. */
export const normalDraw = (random: Random, mean: number): number => mean + normalQuantile(Math.min(1 - 1e-12, Math.max(1e-12, random())));

const distance = (a: number, b: number) => Math.abs(a - b);

/**
 * What a simulated person picks in a set, by the decision rule of Thurstone's model for the protocol: each glass is
 * felt as its sample's mean plus a standard normal error. Places count from 1.
 * Source: Ennis (1993) J. Sensory Stud. 8:353 (triangle, duo-trio, 2-AFC); Ennis, Ennis, Palen & O'Mahony (1998) (tetrad).
 */
export function pickBy(protocol: 'triangle' | 'tetrad' | 'duo_trio' | 'two_afc' | 'two_out_of_five', felt: readonly number[]): number[] {
  const best = (options: readonly number[][], cost: (places: readonly number[]) => number) => options.reduce((a, b) => (cost(b) < cost(a) ? b : a));
  const at = (place: number) => felt[place - 1]!;
  const places = felt.map((_, i) => i + 1);
  switch (protocol) {
    case 'triangle':
      return best(places.map((p) => [p]), ([odd]) => {
        const [a, b] = places.filter((p) => p !== odd) as [number, number];
        return distance(at(a), at(b));
      });
    case 'tetrad':
      // The two lower ones belong together.
      return [...places].sort((a, b) => at(a) - at(b)).slice(0, 2).sort((a, b) => a - b);
    case 'duo_trio':
      return best([[2], [3]], ([p]) => distance(at(p!), at(1)));
    case 'two_afc':
      return best([[1], [2]], ([p]) => -at(p!));
    case 'two_out_of_five': {
      // The lower two or the upper two, whichever are further from the other three.
      const sorted = [...places].sort((a, b) => at(a) - at(b));
      const low = at(sorted[2]!) - at(sorted[1]!);
      const high = at(sorted[3]!) - at(sorted[2]!);
      return (low > high ? sorted.slice(0, 2) : sorted.slice(3)).sort((a, b) => a - b);
    }
  }
}
