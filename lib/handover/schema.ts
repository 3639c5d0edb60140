import { z } from 'zod';
import { operationSchema, SYNC_MAX_BYTES } from '../ballots/schema';
import { joinKeySchema } from '../seats/schema';

/** The text that a leader's device has put together from a phone's codes. */
export const handoverSchema = z.strictObject({ text: z.string().max(SYNC_MAX_BYTES).regex(/^[dp]\.[A-Za-z0-9_-]+\.[0-9a-f]{32}$/, 'This is no handover') });

/** What the text holds, after its mark was found to be right. */
export const handoverBodySchema = z.strictObject({ joinKey: joinKeySchema, ops: z.array(operationSchema).min(1).max(5_000) });
