import type { DemoSession } from './sessions';
import type { PlantedProfile } from './tasting';

/** A session of the demo, its samples named by barrel. */
export type Story = Omit<DemoSession, 'samples' | 'scheduledFor' | 'createdAt'> & { barrels: string[] };

const RED_LINES: Story['lines'] = [
  { key: 'ar-dark-plum', phase: 'nose' },
  { key: 'ar-cedar', phase: 'nose' },
  { key: 'ar-vanilla', phase: 'nose' },
  { key: 'ta-sour', phase: 'palate' },
  { key: 'mf-body', phase: 'mouthfeel' },
  { key: 'mf-drying', phase: 'mouthfeel' },
  { key: 'mf-green-grip', phase: 'mouthfeel' },
  { key: 'ta-length', phase: 'after' },
];

const TASTE_AND_SPIT = 'Taste each glass by itself, in the order of the sheet. Spit, rinse and wait between glasses.';

/** Six barrels of one red, three coopers by two toasts: one is clearly ahead on length, one dries. */
export const LEAD_SESSION: Story = {
  method: 'profile', title: 'Wednesday tasting', instruction: TASTE_AND_SPIT,
  privateQuestion: 'Which of the six barrels of the upper terraces is ready to bottle, and does a heavy toast dry too much?',
  barrels: ['12', '31', '47', '52', '63', '64'], lines: RED_LINES, flags: ['ft-vinegar', 'ft-plaster-barn'],
  seats: 8, reserves: 2, replicates: 2, servingTemperatureC: 16, allergens: ['sulfites', 'egg'],
};

export const TRIANGLE_SESSION: Story = {
  method: 'triangle', title: 'Thursday tasting', instruction: 'Two of the three glasses are the same. Taste from left to right and say which one is different. If you can’t tell, guess and say so.',
  privateQuestion: 'Did racking take the egg note out of the white?',
  barrels: ['18', '19'], lines: [], flags: [], seats: 12, reserves: 2, replicates: 1, servingTemperatureC: 11, allergens: ['sulfites', 'milk'],
};

export const CIDER_SESSION: Story = {
  method: 'profile', title: 'Open tasting', instruction: TASTE_AND_SPIT,
  privateQuestion: 'Does a light or a medium toast of acacia suit the dry cider?',
  barrels: ['9', '10', '11', '13'],
  lines: [{ key: 'ar-ripe-apple', phase: 'nose' }, { key: 'ar-pear', phase: 'nose' }, { key: 'ta-sour', phase: 'palate' }, { key: 'mf-drying', phase: 'mouthfeel' }, { key: 'ta-length', phase: 'after' }],
  flags: ['ft-vinegar'], seats: 12, reserves: 4, replicates: 1, servingTemperatureC: 11, allergens: ['sulfites'],
};

export const NEXT_SESSION: Story = {
  ...LEAD_SESSION, title: 'Next tasting', privateQuestion: 'Do the first, second and fourth fills of the dark red still differ in vanilla and grip?',
  barrels: ['77', '41', '5'], seats: 8, reserves: 2, replicates: 2, flags: ['ft-vinegar'],
};

/** What the simulated panel tastes in the six barrels. Names are those of the lexicon. */
export const LEAD_PLANTED: PlantedProfile = {
  'Barrel 12': { 'Dark plum': 44, 'Cedar and pencil': 36, Vanilla: 31, Sour: 39, Body: 47, 'Drying grip': 47, 'Green tannin': 24, Length: 46 },
  'Barrel 31': { 'Dark plum': 57, 'Cedar and pencil': 37, Vanilla: 30, Sour: 39, Body: 60, 'Drying grip': 44, 'Green tannin': 19, Length: 66 },
  'Barrel 47': { 'Dark plum': 41, 'Cedar and pencil': 47, Vanilla: 34, Sour: 45, Body: 43, 'Drying grip': 64, 'Green tannin': 28, Length: 48 },
  'Barrel 52': { 'Dark plum': 45, 'Cedar and pencil': 44, Vanilla: 33, Sour: 40, Body: 48, 'Drying grip': 50, 'Green tannin': 24, Length: 49 },
  'Barrel 63': { 'Dark plum': 46, 'Cedar and pencil': 42, Vanilla: 32, Sour: 41, Body: 50, 'Drying grip': 49, 'Green tannin': 23, Length: 51 },
  'Barrel 64': { 'Dark plum': 43, 'Cedar and pencil': 40, Vanilla: 32, Sour: 42, Body: 46, 'Drying grip': 52, 'Green tannin': 25, Length: 47 },
};

export const OPEN_PLANTED: PlantedProfile = {
  'Barrel 9': { 'Ripe apple': 58, Pear: 38, Sour: 48, Length: 44 },
  'Barrel 10': { 'Ripe apple': 54, Pear: 36, Sour: 46, Length: 47 },
  'Barrel 11': { 'Ripe apple': 44, Pear: 40, Sour: 50, Length: 52 },
  'Barrel 13': { 'Ripe apple': 42, Pear: 37, Sour: 51, Length: 50 },
};
