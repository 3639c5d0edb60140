import { z } from 'zod';
import { DRAW_METHODS } from '@/db/enums';
import { EVAPORATION_S, TEMPERATURE_C, VOLUME_ML } from './limits';

/** One pull as the phone has it: made once, never changed, recognised by its id. */
export const phonePullSchema = z.strictObject({
  opId: z.uuid({ version: 'v4' }),
  vesselId: z.uuid(),
  /** When it was drawn by the phone's clock, milliseconds UTC: a pull without signal is sent hours later. */
  pulledAt: z.int().min(0).max(8_640_000_000_000_000),
  drawMethod: z.enum(DRAW_METHODS),
  volumeMl: z.int().min(VOLUME_ML.min).max(VOLUME_ML.max),
  temperatureC: z.number().min(TEMPERATURE_C.min).max(TEMPERATURE_C.max).nullable(),
  evaporationS: z.int().min(EVAPORATION_S.min).max(3600),
  isVented: z.boolean(),
  isHissHeard: z.boolean(),
  isToppedUp: z.boolean(),
  colour: z.string().trim().max(60),
  note: z.string().trim().max(900),
});

/** One delivery of the pull sheet's outbox. */
export const pullsSchema = z.strictObject({ protocol: z.literal(1), pulls: z.array(phonePullSchema).min(1).max(100) });

export const PULLS_MAX_BYTES = 256 * 1024;

export type PhonePull = z.output<typeof phonePullSchema>;

/** The server's word on each pull of a delivery. */
export interface PullsAnswer {
  protocol: 1;
  received: string[];
  /** Permanent: the phone shows and keeps it. */
  refused: { opId: string; message: string }[];
}
