import {
  abvOfDensity,
  convertAcidity,
  densityOfAbv,
  freeSo2For,
  linearBlend,
  massFractionOfAbv,
  massFractionOfDensity,
  metabisulphiteGrams,
  mixAlcohol,
  molecularShare,
  molecularSo2,
  so2Pka,
  twoPartBlend,
  type AlcoholPart,
  SO2_IN_METABISULPHITE,
} from '@/stats';
import { at, byRow, has, type Columns } from './tables';
import type { Answerer } from './types';

/** "wine12_with_wine14_1000L_each" and "fortify_1000L_12_with_50L_96": the question stands in the name. */
function partsOf(name: string): AlcoholPart[] {
  const equal = /^wine([\d.]+)_with_wine([\d.]+)_([\d.]+)L_each$/.exec(name);
  if (equal) return [equal[1], equal[2]].map((abv) => ({ volume: Number(equal[3]), abv: Number(abv) }));
  const fortified = /^fortify_([\d.]+)L_([\d.]+)_with_([\d.]+)L_([\d.]+)$/.exec(name);
  if (!fortified) throw new Error(`${name} names no blend`);
  return [
    { volume: Number(fortified[1]), abv: Number(fortified[2]) },
    { volume: Number(fortified[3]), abv: Number(fortified[4]) },
  ];
}

export const answers: Answerer[] = [
  {
    matches: (c) => has(c, 'molecular'),
    answer: ({ given }) => ({
      molecular: byRow(at(given, 'molecular') as Columns, (row) => ({
        molecular_mg_L: molecularSo2(Number(row.free_mg_L), Number(row.pH), Number(row.pKa)),
        percent_molecular: 100 * molecularShare(Number(row.pH), Number(row.pKa)),
      })),
      free_needed: byRow(at(given, 'free_needed') as Columns, (row) => ({
        free_needed_mg_L: freeSo2For(Number(row.target_molecular_mg_L), Number(row.pH), Number(row.pKa)),
      })),
    }),
  },
  {
    matches: (c) => has(c, 'temperature_C') && Array.isArray(c.inputs.pH),
    answer({ inputs, given }) {
      const { temperature_C, abv } = given as { temperature_C: number[]; abv: number[] };
      // Keys are printed with as many decimals as the longest needs.
      const decimals = Math.max(...(inputs.pH as number[]).map((pH) => (String(pH).split('.')[1] ?? '').length));
      const table = <T>(cell: (pKa: number) => T) => abv.map((strength) => temperature_C.map((t) => cell(so2Pka(t, strength).pKa)));
      return {
        temperature_C,
        abv,
        pkT: table((pKa) => pKa),
        percent_molecular_at_pH: Object.fromEntries((inputs.pH as number[]).map((pH) => [pH.toFixed(decimals), table((pKa) => 100 * molecularShare(pH, pKa))])),
      };
    },
  },
  {
    matches: (c) => has(c, 'from_density'),
    answer: ({ given }) => ({
      from_density: byRow(at(given, 'from_density') as Columns, ({ density_kg_m3: density }) => ({
        mass_percent: 100 * massFractionOfDensity(Number(density)),
        abv_percent: abvOfDensity(Number(density)),
      })),
      from_abv: byRow(at(given, 'from_abv') as Columns, ({ abv_percent: abv }) => ({
        density_kg_m3: densityOfAbv(Number(abv)),
        mass_percent: 100 * massFractionOfAbv(Number(abv)),
      })),
    }),
  },
  {
    matches: (c) => has(c, 'blends'),
    answer({ given }) {
      const { blends, pearson_square } = given as { blends: { components: Record<string, number[]> }[]; pearson_square: { low: number; high: number; target: number }[] };
      return {
        blends: blends.map(({ components }) => {
          const { volume_L, ...figures } = components;
          const result = Object.fromEntries(Object.entries(figures).map(([name, values]) => [name, linearBlend(volume_L, values)]));
          return { components, result: { volume_L: volume_L.reduce((a, b) => a + b, 0), ...result } };
        }),
        pearson_square: pearson_square.map(({ low, high, target }) => {
          const blend = twoPartBlend(low, high, target);
          return { low, high, target, parts_low: blend.partsLow, parts_high: blend.partsHigh, fraction_high: blend.fractionHigh, litres_high_per_1000_L_low: 1000 * blend.highPerLow };
        }),
      };
    },
  },
  {
    matches: (c) => typeof c.inputs.note === 'string' && /volume is not/.test(c.inputs.note),
    answer({ given }) {
      return Object.fromEntries(
        Object.keys(given as object).map((name) => {
          const parts = partsOf(name);
          const volumes = parts.map((part) => part.volume);
          const mixed = mixAlcohol(parts);
          return [
            name,
            {
              abv_linear: linearBlend(volumes, parts.map((part) => part.abv)),
              abv_mass_balance: mixed.abv,
              volume_sum_L: volumes.reduce((a, b) => a + b, 0),
              volume_real_L: mixed.volume,
            },
          ];
        }),
      );
    },
  },
  {
    matches: (c) => has(c, 'kms_g'),
    answer: ({ given }) => ({
      so2_fraction_of_K2S2O5: SO2_IN_METABISULPHITE,
      kms_g: byRow(at(given, 'kms_g') as Columns, (row) => ({ grams: metabisulphiteGrams(Number(row.dose_mg_L), Number(row.volume_L)) })),
      tartaric_to_sulphuric: convertAcidity(1, 'tartaric', 'sulphuric'),
      acetic_to_sulphuric: convertAcidity(1, 'acetic', 'sulphuric'),
    }),
  },
];
