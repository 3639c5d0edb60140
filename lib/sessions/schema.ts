import { z } from 'zod';
import { ALLERGENS, CODINGS, METHODS, PHASES } from '@/db/enums';

const slug = z.string().min(1).max(80);
const id = z.uuid({ error: 'Not one of the choices' });
/** "descriptor:phase": one line of the ballot. */
const ballotLine = z.string().regex(new RegExp(`^[0-9a-f-]{36}:(${PHASES.join('|')})$`), 'Not one of the choices');

export const SAMPLES_MAX = 12;
export const LINES_MAX = 60;

/** The design of a session; a draft may be saved before it is complete. */
export const draftSchema = z.object({
  cellar: slug,
  /** Empty for a new session. */
  sessionId: id.optional(),
  version: z.number().int().min(1).optional(),
  method: z.enum(METHODS, { error: 'Choose a method' }),
  title: z.string({ error: 'Enter a title' }).trim().min(1, 'Enter a title').max(80, 'At most 80 characters'),
  instruction: z.string({ error: 'Say what the panelists do' }).trim().min(1, 'Say what the panelists do').max(1000, 'At most 1,000 characters'),
  privateQuestion: z.string({ error: 'Write down the question' }).trim().min(1, 'Write down the question that the cellar asks').max(500, 'At most 500 characters'),
  scheduledFor: z.string().regex(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/, 'Enter a date and time').optional(),
  leaderId: id,
  pulls: z.array(id).max(SAMPLES_MAX, `At most ${SAMPLES_MAX} samples`).default([]),
  /** A wine from outside the cellar, by its label only. */
  controlLabel: z.string().trim().max(60, 'At most 60 characters').optional(),
  lines: z.array(ballotLine).max(LINES_MAX, `At most ${LINES_MAX} lines`).default([]),
  flags: z.array(id).max(20, 'At most 20 faults').default([]),
  seatsPlanned: z.number({ error: 'How many seats?' }).int('A whole number').min(1, 'At least 1').max(120, 'At most 120'),
  reservesPlanned: z.number({ error: 'How many reserves?' }).int('A whole number').min(0, 'Not below 0').max(40, 'At most 40'),
  replicates: z.number({ error: 'How many?' }).int('A whole number').min(1, 'At least 1').max(4, 'At most 4'),
  alpha: z.number({ error: 'Enter a risk' }).min(0.001, 'At least 0.001').max(0.5, 'At most 0.5'),
  servingTemperatureC: z.number({ error: 'A number of degrees' }).min(0, 'At least 0 °C').max(30, 'At most 30 °C').optional(),
  servingVolumeMl: z.number({ error: 'How many millilitres?' }).int('A whole number').min(5, 'At least 5 mL').max(150, 'At most 150 mL'),
  restS: z.number({ error: 'How many seconds?' }).int('A whole number').min(0, 'Not below 0').max(900, 'At most 900 s'),
  allergens: z.array(z.enum(ALLERGENS)).default([]),
  coding: z.enum(CODINGS).default('pourer'),
  pourers: z.array(id).max(20).default([]),
  /** Two-step coding: who moves samples into lettered bottles, and who marks letters with codes. */
  letteredBy: id.optional(),
  codedBy: id.optional(),
}).refine((draft) => draft.coding !== 'two_step' || draft.letteredBy === undefined || draft.letteredBy !== draft.codedBy, { path: ['codedBy'], error: 'Another person than the one with the letters: one alone would know the key' });
export type DraftInput = z.output<typeof draftSchema>;

/** One session of one cellar: what every button on its page sends. */
export const sessionSchema = z.object({ cellar: slug, sessionId: id });

const reason = z.string({ error: 'Give a reason' }).trim().min(3, 'Give a reason').max(500, 'At most 500 characters');

export const closeSchema = sessionSchema.extend({ reason: z.string().trim().max(500, 'At most 500 characters').optional() });
export const abandonSchema = sessionSchema.extend({ reason });
export const reissueSchema = sessionSchema.extend({ seat: z.number().int().min(1).max(400) });
export const earlyRequestSchema = sessionSchema.extend({ code: z.string().trim().regex(/^\d{3}$/, 'Three digits').optional(), reason });
export const earlyDecisionSchema = sessionSchema.extend({ openingId: id, decision: z.enum(['approve', 'refuse']) });
