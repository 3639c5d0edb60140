import type { DrawMethod, Drink, Grain, Toast, VesselKind } from '@/db/enums';

export const VESSEL_WORDS: Record<VesselKind, string> = { barrel: 'Barrel', puncheon: 'Puncheon', demijohn: 'Demijohn', foudre: 'Foudre', tank: 'Tank', keg: 'Keg', amphora: 'Amphora' };
export const TOAST_WORDS: Record<Toast, string> = { light: 'light toast', medium: 'medium toast', medium_plus: 'medium plus toast', heavy: 'heavy toast', none: 'no toast' };
export const GRAIN_WORDS: Record<Grain, string> = { very_fine: 'very fine grain', fine: 'fine grain', medium: 'medium grain', loose: 'loose grain' };
export const DRINK_WORDS: Record<Drink, string> = { wine: 'Wine', cider: 'Cider', perry: 'Perry', mead: 'Mead' };
export const DRAW_WORDS: Record<DrawMethod, string> = { thief: 'Thief, through the bung', nail: 'Nail, in the head', spigot: 'Spigot' };

/** Options of a select from a table of words. */
export const optionsOf = (words: Record<string, string>) => Object.entries(words).map(([value, label]) => ({ value, label }));
