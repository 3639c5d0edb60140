import { requireBetween, requireNotNegative, requirePositive } from '../check';
import { StatsError } from '../errors';

/**
 * Coefficients A1…A12 of the density of ethanol–water at 20 °C, kg/m³ by mass fraction.
 * OIML R 22 (1973) and Council Directive 76/766/EEC.
 */
const DENSITY_COEFFICIENTS = [
  998.20123, -192.9769495, 389.1238958, -1668.103923, 13522.15441, -88292.78388, 306287.4042, -613838.1234, 747017.2998,
  -547846.1354, 223446.0334, -39032.85426,
] as const;

/** Density of pure ethanol at 20 °C, kg/m³ (OIML R 22). */
export const ETHANOL_DENSITY = 789.24;

/** Density (kg/m³, in vacuum, 20 °C) of ethanol–water with a mass fraction of ethanol in [0, 1]. Source: OIML R 22. */
export function densityOfMassFraction(fraction: number): number {
  requireBetween(fraction, 'The mass fraction', 0, 1);
  return DENSITY_COEFFICIENTS.reduceRight((sum, coefficient) => sum * fraction + coefficient, 0);
}

const strengthOf = (fraction: number): number => (100 * fraction * densityOfMassFraction(fraction)) / ETHANOL_DENSITY;

/** Alcoholic strength by volume (% vol at 20 °C) of a mass fraction of ethanol in [0, 1]. Source: OIML R 22. */
export function abvOfMassFraction(fraction: number): number {
  return strengthOf(fraction);
}

/** Mass fraction of ethanol at a strength of `abv` (% vol at 20 °C, 0 to 100). Inverse of {@link abvOfMassFraction} to 1e-13. */
export function massFractionOfAbv(abv: number): number {
  requireBetween(abv, 'Alcohol', 0, 100, '% vol');
  return bisect((fraction) => strengthOf(fraction) - abv);
}

/** Density (kg/m³, 20 °C) of ethanol–water at a strength (% vol, 0 to 100). */
export function densityOfAbv(abv: number): number {
  return densityOfMassFraction(massFractionOfAbv(abv));
}

/**
 * Strength (% vol at 20 °C) from the density (kg/m³) of the DISTILLATE made back to volume, between
 * ethanol's and water's. The density of the wine itself also carries extract and sugar and gives a wrong answer.
 */
export function abvOfDensity(density: number): number {
  return strengthOf(massFractionOfDensity(density));
}

/** Mass fraction of ethanol from the density (kg/m³, 20 °C) of ethanol–water. */
export function massFractionOfDensity(density: number): number {
  requireBetween(density, 'Density', densityOfMassFraction(1), densityOfMassFraction(0), 'kg/m³');
  return bisect((fraction) => densityOfMassFraction(0) - densityOfMassFraction(fraction) - (densityOfMassFraction(0) - density));
}

/** Root in [0, 1] of a function that rises. */
function bisect(rising: (x: number) => number): number {
  let low = 0;
  let high = 1;
  for (let step = 0; step < 200 && high - low > 1e-17; step += 1) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (rising(middle) < 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** One part of a blend: its volume (any unit, all the same) and strength (% vol). */
export interface AlcoholPart {
  readonly volume: number;
  readonly abv: number;
}

/**
 * Strength and volume after mixing, by conservation of the masses of ethanol and of all: volumes shrink a
 * little, so the volume-weighted mean is not exact (0.0001 % vol for two wines, 0.06 for a fortification).
 * Treats the parts as ethanol–water at 20 °C. Throws on no parts, a volume not above 0, a strength outside 0 to 100.
 */
export function mixAlcohol(parts: readonly AlcoholPart[]): { abv: number; volume: number } {
  if (parts.length === 0) throw new StatsError('empty', 'The blend holds no parts');
  let mass = 0;
  let ethanol = 0;
  for (const { volume, abv } of parts) {
    requirePositive(volume, 'A volume');
    mass += volume * densityOfAbv(abv);
    ethanol += (volume * abv * ETHANOL_DENSITY) / 100;
  }
  const volume = mass / densityOfMassFraction(ethanol / mass);
  return { volume, abv: (100 * ethanol) / (ETHANOL_DENSITY * volume) };
}

/** Density of ethanol in g/mL as drinks are reckoned (handbook value, rounded). */
const ETHANOL_G_PER_ML = 0.789;

/**
 * Ethanol in a flight if all of it is swallowed: millilitres of pure ethanol, and grams at 0.789 g/mL.
 * Tasters are meant to spit; this is the figure to set beside the drive home. Throws on negative numbers.
 */
export function flightEthanol({ glasses, millilitres, abv }: { glasses: number; millilitres: number; abv: number }): { millilitres: number; grams: number } {
  requireNotNegative(glasses, 'Number of glasses');
  requireNotNegative(millilitres, 'Millilitres per glass');
  requireBetween(abv, 'Alcohol', 0, 100, '% vol');
  const pure = (glasses * millilitres * abv) / 100;
  return { millilitres: pure, grams: pure * ETHANOL_G_PER_ML };
}
