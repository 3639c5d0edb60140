import { requireNotNegative, requirePositive } from '../check';
import { StatsError } from '../errors';

/** Molar masses in g/mol (handbook values, from memory). */
const MOLAR = { so2: 64.066, metabisulphite: 222.32, tartaric: 150.087, acetic: 60.052, sulphuric: 98.079 } as const;

/** Mass of SO₂ in potassium metabisulphite, K₂S₂O₅: 0.5763 of fresh, pure salt. */
export const SO2_IN_METABISULPHITE = (2 * MOLAR.so2) / MOLAR.metabisulphite;

/**
 * Grams of potassium metabisulphite that add `dose` mg/L of SO₂ to `volume` litres. `yield_`: share of SO₂ in
 * the salt, by default the theoretical one; old salt gives less, and many cellars reckon with 0.5.
 * Sulphite is an allergen and its fumes harm: see the product's data sheet.
 */
export function metabisulphiteGrams(dose: number, volume: number, yield_: number = SO2_IN_METABISULPHITE): number {
  requireNotNegative(dose, 'The dose');
  requireNotNegative(volume, 'The volume');
  requirePositive(yield_, 'The share of SO₂ in the salt');
  if (yield_ > SO2_IN_METABISULPHITE + 1e-12) throw new StatsError('out_of_range', 'The share of SO₂ in the salt can’t be above the theoretical one, 0.576');
  return (dose * volume) / 1000 / yield_;
}

/** How an acidity is expressed: as grams per litre of an acid, or as milliequivalents per litre. */
export type AcidityUnit = 'tartaric' | 'sulphuric' | 'acetic' | 'meq';

/** Grams of the acid in one milliequivalent: molar mass over the protons it gives. */
const PER_MEQ: Readonly<Record<AcidityUnit, number>> = {
  tartaric: MOLAR.tartaric / 2000,
  sulphuric: MOLAR.sulphuric / 2000,
  acetic: MOLAR.acetic / 1000,
  meq: 1,
};

/** Converts an acidity between g/L of tartaric, sulphuric or acetic acid and meq/L. Exact but for the molar masses. */
export function convertAcidity(value: number, from: AcidityUnit, to: AcidityUnit): number {
  requireNotNegative(value, 'The acidity');
  return (value / PER_MEQ[from]) * PER_MEQ[to];
}

/** What a barrel loses in a year of 365 days at `mlPerDay`: litres, and percent of its `volume` in litres. */
export function yearlyLoss(mlPerDay: number, volume: number): { litres: number; percent: number } {
  requireNotNegative(mlPerDay, 'The daily loss');
  requirePositive(volume, 'The volume');
  const litres = (mlPerDay * 365) / 1000;
  return { litres, percent: (100 * litres) / volume };
}
