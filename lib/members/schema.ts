import { z } from 'zod';
import { ROLES } from '@/db/enums';
import { emailSchema } from '../auth/schema';
import { isTimeZone } from '../time';

const slug = z.string().min(1).max(80);
const userId = z.uuid({ error: 'Not one of the members' });
const roles = z.array(z.enum(ROLES), { error: 'Choose at least one role' }).min(1, 'Choose at least one role');

export const addMemberSchema = z.object({
  cellar: slug,
  email: emailSchema,
  name: z.string({ error: 'Enter a name' }).trim().min(1, 'Enter a name').max(80, 'At most 80 characters'),
  roles,
});
export const changeRolesSchema = z.object({ cellar: slug, userId, roles });
export const memberSchema = z.object({ cellar: slug, userId });
export const cellarSchema = z.object({
  cellar: slug,
  version: z.number().int().min(1),
  name: z.string({ error: 'Enter a name' }).trim().min(1, 'Enter a name').max(80, 'At most 80 characters'),
  timeZone: z.string({ error: 'Enter a time zone' }).refine(isTimeZone, 'A name like Europe/Paris'),
});
/** Typing the cellar's name is the guard. */
export const removeDemoSchema = z.object({ cellar: slug, typedName: z.string({ error: 'Type the name of the cellar' }) });
