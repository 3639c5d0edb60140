import { z } from 'zod';
import { PHASES } from '@/db/enums';
import { COMMENT_MAX } from './limits';

/** Version 4 (random) ids made on the phone. */
const clientId = z.uuid({ version: 'v4' });

/** Blocks (replicates, sets) and positions count from 1; a glass is named by the two, never by a row id. */
const place = { block: z.int().min(1).max(12), position: z.int().min(1).max(40) };
const item = z.int().min(1).max(400);
const position = place.position;

/** What one operation says. `choice` is final; of the others the latest counts, and earlier ones are kept. */
export const operationBodySchema = z.discriminatedUnion('kind', [
  /** A line of the ballot in whole steps of its scale (see `VALUE_RANGE`). */
  z.strictObject({ kind: z.literal('score'), ...place, item, value: z.int().min(0).max(100) }),
  /** Takes a score back. */
  z.strictObject({ kind: z.literal('clear'), ...place, item }),
  /** A fault noted, or the note taken back. */
  z.strictObject({ kind: z.literal('fault'), ...place, item, isNoted: z.boolean() }),
  /** The glass that was picked in the set `block`; where two are picked, the later one is `also`. */
  z.strictObject({ kind: z.literal('choice'), ...place, also: position.optional(), isGuess: z.boolean() }),
  /** The places of the set's glasses from least to most; shorter while it is not yet whole. */
  z.strictObject({ kind: z.literal('order'), block: place.block, order: z.array(position).max(40) }),
  z.strictObject({ kind: z.literal('comment'), ...place, text: z.string().max(COMMENT_MAX) }),
  /** The whole ballot is handed in. */
  z.strictObject({ kind: z.literal('submit') }),
]);

/** Made once on the phone and never changed after: a repeat is recognised by `opId`. */
export const operationSchema = z.strictObject({
  opId: clientId,
  deviceId: clientId,
  seq: z.int().min(1).max(1_000_000),
  /** The phone's clock, milliseconds UTC: stored, never used to order or to admit. */
  clientAt: z.int().min(0).max(8_640_000_000_000_000),
  body: operationBodySchema,
});

/** One delivery of the outbox. */
export const syncSchema = z.strictObject({
  protocol: z.literal(1),
  /** The session's join key, which says for which of the phone's seats this is. */
  joinKey: z.string().regex(/^[a-z2-7]{16}$/),
  /** Where the panelist is, for the leader's board. */
  at: z.strictObject({ ...place, phase: z.enum(PHASES).nullable() }).nullable(),
  /** How many operations wait on the phone after this delivery. */
  onPhone: z.int().min(0).max(100_000),
  ops: z.array(operationSchema).max(200),
});

/** A sheet has at most 40 glasses of 80 lines; a batch of 200 operations stays well below. */
export const SYNC_MAX_BYTES = 512 * 1024;

export type OperationBody = z.output<typeof operationBodySchema>;
export type Operation = z.output<typeof operationSchema>;
export type SyncRequest = z.output<typeof syncSchema>;
