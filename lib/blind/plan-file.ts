import { z } from 'zod';
import { ITEM_KINDS, METHODS, PHASES } from '@/db/enums';

const componentSchema = z.strictObject({ vessel: z.string(), lot: z.string(), pulledAt: z.string(), share: z.number() });

/** What the canonical file of a sealed plan holds. Its SHA-256 is the commitment. */
export const planFileSchema = z.strictObject({
  format: z.literal('tercet-plan-1'),
  session: z.strictObject({ id: z.string(), title: z.string(), method: z.enum(METHODS), sealedAt: z.string() }),
  /** 256 random bits, hex: without them a guesser could try all keys against the commitment. */
  salt: z.string().regex(/^[0-9a-f]{64}$/),
  samples: z.array(z.strictObject({ sample: z.int(), label: z.string(), components: z.array(componentSchema) })),
  /** Two-step coding: the bottle that each sample goes into. */
  letters: z.array(z.strictObject({ sample: z.int(), letter: z.string().regex(/^[A-Z]$/) })).optional(),
  ballot: z.array(z.strictObject({ item: z.int(), phase: z.enum(PHASES), kind: z.enum(ITEM_KINDS), name: z.string() })),
  servings: z.array(z.strictObject({ seat: z.int(), block: z.int(), position: z.int(), code: z.string(), sample: z.int() })),
});

export type PlanFile = z.output<typeof planFileSchema>;

/**
 * The canonical text: the schema's own order of members, no spaces, one line feed at the end.
 * The bytes are kept sealed and published as they are; nothing is ever written again from parts.
 */
export const canonicalText = (plan: PlanFile): string => `${JSON.stringify(planFileSchema.parse(plan))}\n`;

export const parsePlanFile = (text: string): PlanFile => planFileSchema.parse(JSON.parse(text));
