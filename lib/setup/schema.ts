import { z } from 'zod';
import { DRINKS } from '@/db/enums';
import { emailSchema, newPasswordSchema } from '../auth/schema';
import { isTimeZone } from '../time';

export const NAME_MAX = 80;

/** What the first owner of the first cellar fills in. */
export const setUpSchema = z.object({
  token: z.string().min(20).max(64),
  name: z.string({ error: 'Enter your name' }).trim().min(1, 'Enter your name').max(NAME_MAX, `At most ${NAME_MAX} characters`),
  email: emailSchema,
  password: newPasswordSchema,
  cellarName: z.string({ error: 'Enter the name of the cellar' }).trim().min(2, 'At least 2 characters').max(NAME_MAX, `At most ${NAME_MAX} characters`),
  timeZone: z.string({ error: 'Choose a time zone' }).max(64, 'Choose a time zone from the list').refine(isTimeZone, 'Choose a time zone from the list, like Europe/Paris'),
  drink: z.enum(DRINKS, { error: 'Choose what the cellar ages' }),
});

export type SetUp = z.output<typeof setUpSchema>;
