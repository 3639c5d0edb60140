import { z } from 'zod';
import { CALLS } from '@/db/enums';

export const REASONS_MAX = 2000;

/** A calendar day that exists, `YYYY-MM-DD`. */
const daySchema = z.iso.date('Enter a day that exists');

/** Which cellar's address the form was on. */
const cellar = z.string().min(1).max(80);

/** The input of "Record the call". A hold says until when, or it would never come up again. */
export const createCallSchema = z
  .object({
    cellar,
    fill: z.uuid({ error: 'Choose the barrel' }),
    session: z.uuid({ error: 'That is no session' }).optional(),
    kind: z.enum(CALLS, { error: 'Choose what is to be done' }),
    reasons: z
      .string({ error: 'Say why: the next person reads it' })
      .trim()
      .min(3, 'Say why: the next person reads it')
      .max(REASONS_MAX, `At most ${REASONS_MAX} characters`),
    nextDay: daySchema.optional(),
  })
  .refine((call) => call.kind !== 'hold' || call.nextDay !== undefined, { path: ['nextDay'], error: 'Say until when it is held' });

/** Taking a call back. The call stays on record, with the reason. */
export const withdrawCallSchema = z.object({
  cellar,
  call: z.uuid(),
  reason: z.string({ error: 'Say why it is taken back' }).trim().min(3, 'Say why it is taken back').max(500, 'At most 500 characters'),
});

export const CALL_VIEWS = ['standing', 'all', 'withdrawn'] as const;
export const CALL_SORTS = ['next', 'decided', 'barrel'] as const;

/** What the list's address may ask for; anything else falls back to the standing calls by next date. */
export const callFilterSchema = z.object({
  show: z.enum(CALL_VIEWS).catch('standing'),
  kind: z.enum(CALLS).optional().catch(undefined),
  sort: z.enum(CALL_SORTS).catch('next'),
  find: z.string().trim().max(80).catch(''),
});

export type CreateCall = z.output<typeof createCallSchema>;
export type WithdrawCall = z.output<typeof withdrawCallSchema>;
export type CallFilter = z.output<typeof callFilterSchema>;
