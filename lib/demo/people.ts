import type { Role } from '@/db/enums';

/** The invented estate. Every name here is made up. */
export const ESTATE = { name: 'Pellow Rake Cellars', slug: 'pellow-rake', timeZone: 'Europe/Paris', drink: 'wine' } as const;

export interface DemoPerson {
  key: 'ines' | 'odo' | 'bram' | 'lio';
  name: string;
  email: string;
  roles: Role[];
}

export const PEOPLE: readonly DemoPerson[] = [
  { key: 'ines', name: 'Ines Tarrow', email: 'ines@pellow-rake.example', roles: ['owner', 'winemaker'] },
  { key: 'odo', name: 'Odo Vennick', email: 'odo@pellow-rake.example', roles: ['leader'] },
  { key: 'bram', name: 'Bram Setterly', email: 'bram@pellow-rake.example', roles: ['cellar_hand'] },
  { key: 'lio', name: 'Lio Quarm', email: 'lio@pellow-rake.example', roles: ['panelist'] },
];

/** First names of the invented panel, by seat. */
export const PANEL = ['Ines', 'Moth', 'Lio', 'R.', 'Anneke', 'Tom B.', 'Corvo', 'Fenna', 'Ada', 'Pell', 'Sorrel', 'Wick'] as const;
