import type { Drink, GRAINS, TOASTS, VesselKind } from '@/db/enums';

type Toast = (typeof TOASTS)[number];
type Grain = (typeof GRAINS)[number];

export interface DemoLot {
  code: string;
  name: string;
  drink: Drink;
  /** Years before the present one. */
  yearsBack: number;
  note: string;
}

/** Codes begin with the last two digits of the year; `%` stands for it. */
export const LOTS: readonly DemoLot[] = [
  { code: '%-A', name: 'Old red blend', drink: 'wine', yearsBack: 3, note: 'Bottled; its barrels were filled again.' },
  { code: '%-B', name: 'Red blend, upper terraces', drink: 'wine', yearsBack: 1, note: 'Three coopers, two toasts.' },
  { code: '%-C', name: 'Red blend, lower field', drink: 'wine', yearsBack: 1, note: 'Barrel 41 is watched for volatile acidity.' },
  { code: '%-S', name: 'Dark red, gravel bank', drink: 'wine', yearsBack: 1, note: 'First, second and fourth fills side by side.' },
  { code: '%-W', name: 'Barrel-fermented white', drink: 'wine', yearsBack: 1, note: 'Half of it racked after the egg note.' },
  { code: '%-K', name: 'Skin-contact white', drink: 'wine', yearsBack: 1, note: 'Five weeks on skins.' },
  { code: '%-D', name: 'Dry cider in acacia', drink: 'cider', yearsBack: 1, note: 'Guests taste it.' },
  { code: '%-P', name: 'Perry in chestnut', drink: 'perry', yearsBack: 1, note: 'Two levels of sweetness.' },
  { code: '%-M', name: 'Heather mead', drink: 'mead', yearsBack: 2, note: 'Honey allergy notice at every tasting.' },
];

export interface DemoBarrel {
  name: string;
  kind: VesselKind;
  volumeL: number;
  cooper: string;
  woodSpecies: string;
  woodOrigin: string;
  grain: Grain | null;
  toast: Toast | null;
  /** Years before the present one in which it was made. */
  yearsBack: number;
  lot: string;
}

const COOPERS = ['Harrowdine', 'Vasque & Tull', 'Ostby Wood'] as const;
const SESSILE = 'Quercus petraea';

/** Barrels that a story is told of; the others fill the rows around them. */
const NAMED: Record<number, Partial<DemoBarrel>> = {
  5: { kind: 'puncheon', volumeL: 500, woodSpecies: 'Castanea sativa', lot: '%-P' },
  9: { kind: 'barrel', volumeL: 300, woodSpecies: 'Robinia pseudoacacia', lot: '%-D', toast: 'light' },
  10: { kind: 'barrel', volumeL: 300, woodSpecies: 'Robinia pseudoacacia', lot: '%-D', toast: 'light' },
  11: { kind: 'barrel', volumeL: 300, woodSpecies: 'Robinia pseudoacacia', lot: '%-D', toast: 'medium' },
  13: { kind: 'barrel', volumeL: 300, woodSpecies: 'Robinia pseudoacacia', lot: '%-D', toast: 'medium' },
  12: { cooper: 'Harrowdine', toast: 'medium', lot: '%-B', yearsBack: 1 },
  31: { cooper: 'Vasque & Tull', toast: 'medium', lot: '%-B', yearsBack: 1 },
  47: { cooper: 'Ostby Wood', toast: 'heavy', lot: '%-B', yearsBack: 1 },
  52: { cooper: 'Harrowdine', toast: 'heavy', lot: '%-B', yearsBack: 1 },
  63: { cooper: 'Vasque & Tull', toast: 'heavy', lot: '%-B', yearsBack: 1 },
  64: { cooper: 'Ostby Wood', toast: 'medium', lot: '%-B', yearsBack: 1 },
  18: { kind: 'barrel', volumeL: 300, toast: 'light', lot: '%-W' },
  19: { kind: 'barrel', volumeL: 300, toast: 'light', lot: '%-W' },
  41: { cooper: 'Harrowdine', toast: 'medium', lot: '%-C', yearsBack: 3 },
  62: { lot: '%-M', yearsBack: 4 },
  77: { lot: '%-S', yearsBack: 3 },
};

const BARRELS = 84;

/** The 84 barrels of the hill cave, the same at every filling. */
export function demoBarrels(): DemoBarrel[] {
  const commonLots = ['%-B', '%-C', '%-S', '%-W', '%-K'];
  return Array.from({ length: BARRELS }, (_, i) => {
    const number = i + 1;
    return {
      name: String(number),
      kind: 'barrel' as const,
      volumeL: 225,
      cooper: COOPERS[number % 3]!,
      woodSpecies: number % 7 === 0 ? 'Quercus alba' : SESSILE,
      woodOrigin: number % 7 === 0 ? 'North America' : 'Central France',
      grain: (['very_fine', 'fine', 'medium'] as const)[number % 3]!,
      toast: (['light', 'medium', 'medium_plus', 'heavy'] as const)[number % 4]!,
      yearsBack: 1 + (number % 4),
      lot: commonLots[number % commonLots.length]!,
      ...NAMED[number],
    };
  });
}
