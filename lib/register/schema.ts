import { z } from 'zod';
import { DRAW_METHODS, DRINKS, GRAINS, TOASTS, VESSEL_KINDS } from '@/db/enums';

const slug = z.string().min(1).max(80);
const id = z.uuid({ error: 'Not one of the choices' });
const version = z.number().int().min(1);
const text = (max: number) => z.string().trim().max(max, `At most ${max} characters`).default('');
const year = z.number({ error: 'A year' }).int('A whole year').min(1900, 'Not before 1900').max(2100, 'Not after 2100').optional();
const isDay = (value: string) => /^\d{4}-\d{2}-\d{2}$/.test(value) && !Number.isNaN(Date.parse(value)) && new Date(`${value}T00:00:00Z`).toISOString().startsWith(value);
export const daySchema = z.string({ error: 'Enter a day' }).refine(isDay, 'Enter a day of the calendar');

/** `id` and `version` are empty for a new row. */
const edited = { cellar: slug, id: id.optional(), version: version.optional() };

export const lotSchema = z.object({
  ...edited,
  code: z.string({ error: 'Enter a code' }).trim().min(1, 'Enter a code').max(20, 'At most 20 characters'),
  name: z.string({ error: 'Enter a name' }).trim().min(1, 'Enter a name').max(80, 'At most 80 characters'),
  drink: z.enum(DRINKS, { error: 'Choose one' }),
  vintage: year,
  note: text(1000),
});

export const vesselSchema = z.object({
  ...edited,
  name: z.string({ error: 'Enter what stands on it' }).trim().min(1, 'Enter what stands on it').max(20, 'At most 20 characters'),
  kind: z.enum(VESSEL_KINDS, { error: 'Choose one' }),
  volumeL: z.number({ error: 'Enter litres' }).positive('More than 0 L').max(100_000, 'At most 100,000 L'),
  cooper: text(80),
  woodSpecies: text(80),
  woodOrigin: text(80),
  grain: z.enum(GRAINS).optional(),
  toast: z.enum(TOASTS).optional(),
  year,
  location: text(80),
  note: text(1000),
});

export const fillSchema = z.object({
  cellar: slug,
  vesselId: id,
  lotId: id,
  fromDay: daySchema,
  note: text(1000),
});

/** Takes the wine out: the fill ends on a day. */
export const emptySchema = z.object({ cellar: slug, vesselId: id, fillId: id, version, toDay: daySchema });

const mustTick = (message: string) => z.boolean({ error: message });

export const pullSchema = z.object({
  cellar: slug,
  vesselId: id,
  pulledAt: z.string({ error: 'Enter a date and time' }).regex(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/, 'Enter a date and time'),
  drawMethod: z.enum(DRAW_METHODS, { error: 'Choose one' }),
  volumeMl: z.number({ error: 'Enter millilitres' }).int('A whole number').min(5, 'At least 5 mL').max(50_000, 'At most 50,000 mL'),
  temperatureC: z.number({ error: 'A number of degrees' }).min(-5, 'At least −5 °C').max(45, 'At most 45 °C').optional(),
  isSanitised: mustTick('Sanitise the tool first, then tick it').refine((ticked) => ticked, 'Sanitise the tool first, then tick it'),
  evaporationS: z.number({ error: 'Enter the seconds waited' }).int('A whole number').min(30, 'Wait at least 30 s: alcohol in the tool spoils the sample').max(3600, 'At most an hour'),
  isVented: z.boolean().default(false),
  isHissHeard: z.enum(['yes', 'no']).optional(),
  isResealed: z.boolean().default(false),
  isToppedUp: z.boolean().default(false),
  toppedWith: text(120),
  isWiped: z.boolean().default(false),
  note: text(1000),
});

export const archiveSchema = z.object({ cellar: slug, kind: z.enum(['lot', 'vessel', 'pull']), id, isArchived: z.enum(['yes', 'no']) });

export type LotInput = z.output<typeof lotSchema>;
export type VesselInput = z.output<typeof vesselSchema>;
export type PullInput = z.output<typeof pullSchema>;
