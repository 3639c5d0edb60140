import { requireBetween, requireNotNegative } from '../check';
import { locate } from './interpolation';

/** The customary first pKa of sulphurous acid: water, about 20 °C (textbooks of enology, from memory). */
export const CUSTOMARY_PKA = 1.81;

/** OIV-MA-AS323-04C, table I: thermodynamic pK by alcohol (% vol, rows) and temperature (°C, columns). */
const TEMPERATURES = [20, 25, 30, 35, 40] as const;
const ALCOHOLS = [0, 5, 10, 15] as const;
const PK_TABLE = [
  [1.798, 2.0, 2.219, 2.334, 2.493],
  [1.897, 2.098, 2.299, 2.397, 2.527],
  [1.997, 2.198, 2.394, 2.488, 2.606],
  [2.099, 2.301, 2.503, 2.607, 2.728],
] as const;

/** pKa at a temperature and strength; `isExtrapolated` when they lie outside the table (20 to 40 °C, 0 to 15 % vol). */
export interface So2Pka {
  readonly pKa: number;
  readonly isExtrapolated: boolean;
}

/**
 * First pKa of sulphurous acid in wine at `temperature` (°C, 0 to 40) and `abv` (% vol, 0 to 25), linear
 * between the values of OIV-MA-AS323-04C table I and along its last step outside of them: a cellar at
 * 13 °C is outside, and the answer says so. Thermodynamic constants; ionic strength moves them by about
 * 0.1 further. Throws outside the stated ranges.
 */
export function so2Pka(temperature: number, abv: number): So2Pka {
  requireBetween(temperature, 'Temperature', 0, 40, '°C');
  requireBetween(abv, 'Alcohol', 0, 25, '% vol');
  const column = locate(TEMPERATURES, temperature);
  const row = locate(ALCOHOLS, abv);
  const alongRow = (r: number) => PK_TABLE[r][column.index] * (1 - column.share) + PK_TABLE[r][column.index + 1] * column.share;
  const pKa = alongRow(row.index) * (1 - row.share) + alongRow(row.index + 1) * row.share;
  return { pKa, isExtrapolated: column.isOutside || row.isOutside };
}

/**
 * Share of free SO₂ that is molecular, 0 to 1: 1 / (1 + 10^(pH − pKa)). pH 2 to 5. Henderson–Hasselbalch on
 * the first dissociation; the second (pKa about 7) does not matter at the pH of wine.
 */
export function molecularShare(pH: number, pKa: number = CUSTOMARY_PKA): number {
  requireBetween(pH, 'pH', 2, 5);
  requireBetween(pKa, 'pKa', 1, 4);
  return 1 / (1 + 10 ** (pH - pKa));
}

/** Molecular SO₂ (mg/L) of `free` SO₂ (mg/L, 0 or more) at a pH. Domain as {@link molecularShare}. */
export function molecularSo2(free: number, pH: number, pKa: number = CUSTOMARY_PKA): number {
  requireNotNegative(free, 'Free SO₂');
  return free * molecularShare(pH, pKa);
}

/** Free SO₂ (mg/L) that holds `molecular` SO₂ (mg/L) at a pH. Domain as {@link molecularShare}. */
export function freeSo2For(molecular: number, pH: number, pKa: number = CUSTOMARY_PKA): number {
  requireNotNegative(molecular, 'Molecular SO₂');
  return molecular / molecularShare(pH, pKa);
}
