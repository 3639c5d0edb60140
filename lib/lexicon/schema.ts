import { z } from 'zod';
import { PHASES, SENSES } from '@/db/enums';

const slug = z.string().min(1).max(80);

export const descriptorSchema = z.object({
  cellar: slug,
  /** Both empty for a new entry. */
  id: z.uuid().optional(),
  version: z.number().int().min(1).optional(),
  name: z.string({ error: 'Enter a name' }).trim().min(1, 'Enter a name').max(60, 'At most 60 characters'),
  sense: z.enum(SENSES, { error: 'Choose one' }),
  family: z.string({ error: 'Enter a family' }).trim().min(1, 'Enter a family').max(60, 'At most 60 characters'),
  definition: z.string({ error: 'Say what is meant' }).trim().min(1, 'Say what is meant').max(500, 'At most 500 characters'),
  reference: z.string().trim().max(500, 'At most 500 characters').default(''),
  phase: z.enum(PHASES, { error: 'Choose one' }),
  lowAnchor: z.string({ error: 'The word at the left end' }).trim().min(1, 'The word at the left end').max(30, 'At most 30 characters'),
  highAnchor: z.string({ error: 'The word at the right end' }).trim().min(1, 'The word at the right end').max(30, 'At most 30 characters'),
});
export type DescriptorInput = z.output<typeof descriptorSchema>;

export const archiveDescriptorSchema = z.object({ cellar: slug, id: z.uuid(), isArchived: z.enum(['yes', 'no']) });
