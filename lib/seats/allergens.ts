import type { Allergen } from '@/db/enums';

/** Where each allergen may come from in a tasting. */
export const ALLERGEN_WORDS: Record<Allergen, string> = {
  sulfites: 'sulfites',
  egg: 'egg (fining)',
  milk: 'milk (fining)',
  nuts: 'nuts (reference samples)',
  honey: 'honey and pollen',
  gluten: 'gluten (crackers)',
};
