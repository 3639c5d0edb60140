import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

/** A seeded source, so that the demo's panel says the same at every filling. */
export interface Chance {
  uniform(): number;
  normal(): number;
}

export function seeded(seed: number): Chance {
  const generator = xoroshiro128plus(seed);
  const uniform = () => uniformFloat64(generator);
  return {
    uniform,
    // Box and Muller's transformation.
    normal: () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform()),
  };
}

export interface SimulatedPanelist {
  /** Where on the line this person tends to sit. */
  level: number;
  /** How much of the line this person uses; below 0 the line is read the other way round. */
  spread: number;
  noise: number;
}

/** A panel like a real one: different levels and uses of the scale, and some noise. */
export function simulatePanel(seats: number, chance: Chance): SimulatedPanelist[] {
  return Array.from({ length: seats }, () => ({
    level: 6 * chance.normal(),
    spread: 0.8 + 0.4 * chance.uniform(),
    noise: 4 + 3 * chance.uniform(),
  }));
}

/** One score on the line 0…100 for a glass whose true intensity is `truth`; `centre` is the line's mean over the samples. */
export function scoreOf(person: SimulatedPanelist, truth: number, centre: number, chance: Chance): number {
  const said = centre + person.level + person.spread * (truth - centre) + person.noise * chance.normal();
  return Math.round(Math.min(100, Math.max(0, said)));
}
