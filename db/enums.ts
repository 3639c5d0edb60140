/** The fixed vocabularies of the cellar. Pure, so that forms, actions and tables share them. */
export const ROLES = ['owner', 'winemaker', 'leader', 'cellar_hand', 'panelist'] as const;
export type Role = (typeof ROLES)[number];

export const DRINKS = ['wine', 'cider', 'perry', 'mead'] as const;
export type Drink = (typeof DRINKS)[number];

export const VESSEL_KINDS = ['barrel', 'puncheon', 'demijohn', 'foudre', 'tank', 'keg', 'amphora'] as const;
export type VesselKind = (typeof VESSEL_KINDS)[number];

export const TOASTS = ['light', 'medium', 'medium_plus', 'heavy', 'none'] as const;
export type Toast = (typeof TOASTS)[number];

export const GRAINS = ['very_fine', 'fine', 'medium', 'loose'] as const;
export type Grain = (typeof GRAINS)[number];

export const DRAW_METHODS = ['thief', 'nail', 'spigot'] as const;
export type DrawMethod = (typeof DRAW_METHODS)[number];

export const METHODS = [
  'profile', 'category_profile', 'check_all', 'rate_all', 'just_right', 'liking', 'free_note', 'ranking',
  'triangle', 'tetrad', 'duo_trio', 'duo_trio_constant', 'directional_pair', 'preference', 'two_of_five',
] as const;
export type Method = (typeof METHODS)[number];

/**
 * Who knows the key before it is opened: `pourer` named people who don't taste; `two_step` nobody: one person moves samples
 * into lettered bottles, another marks letters with codes, and both may taste.
 */
export const CODINGS = ['pourer', 'two_step'] as const;
export type Coding = (typeof CODINGS)[number];

/** What somebody who prepares a session may read of the key. */
export const POUR_STEPS = ['key', 'letters', 'codes'] as const;
export type PourStep = (typeof POUR_STEPS)[number];

export const SESSION_STATES = ['draft', 'sealed', 'open', 'closed', 'unsealed', 'abandoned'] as const;
export type SessionState = (typeof SESSION_STATES)[number];

export const PHASES = ['look', 'nose', 'palate', 'mouthfeel', 'after'] as const;
export type Phase = (typeof PHASES)[number];

export const SENSES = ['aroma', 'fault', 'mouthfeel', 'appearance', 'taste'] as const;
export type Sense = (typeof SENSES)[number];

export const ALLERGENS = ['sulfites', 'egg', 'milk', 'nuts', 'honey', 'gluten'] as const;
export type Allergen = (typeof ALLERGENS)[number];

export const SEAT_ROLES = ['taste', 'nose_only'] as const;
export type SeatRole = (typeof SEAT_ROLES)[number];

export const CALLS = ['bottle', 'hold', 'rack', 'top', 'treat', 'blend', 'declassify'] as const;
export type CallKind = (typeof CALLS)[number];

/**
 * How a line of the ballot is answered: `line` 0 to 100; `category` 0 to 5 in words; `check` 0 or 1; `rate` 0
 * (not there) to 3; `just_right` 1 (far too little) to 5; `liking` 1 to 9; `term` a descriptor that a free note may
 * name, 0 to 3; `ask` not scored: what a pair or an order is about; `flag` a fault, ticked.
 */
export const ITEM_KINDS = ['line', 'category', 'check', 'rate', 'just_right', 'liking', 'term', 'ask', 'flag'] as const;
export type ItemKind = (typeof ITEM_KINDS)[number];

/** What one operation sent by a phone may record. */
export const OPERATION_KINDS = ['score', 'clear', 'choice', 'order', 'comment', 'fault', 'submit'] as const;
export type OperationKind = (typeof OPERATION_KINDS)[number];

/** `counted` before close; `late` after it: kept and shown, never counted. */
export const ADMISSIONS = ['counted', 'late'] as const;
export type Admission = (typeof ADMISSIONS)[number];
