import { z } from 'zod';
import { SEAT_ROLES } from '@/db/enums';

export const joinKeySchema = z.string().regex(/^[a-z2-7]{16}$/);

/** Six digits, with or without the space that the board shows. */
export const joinCodeSchema = z.object({
  code: z.string({ error: 'Enter the six digits from the board' }).transform((text) => text.replaceAll(/\s/g, '')).pipe(z.string().regex(/^\d{6}$/, 'Six digits, as on the board')),
});

const ticked = (message: string) => z.literal('on', { error: message });

export const claimSchema = z.object({
  joinKey: joinKeySchema,
  /** A nickname will do; 40 fits the board's column. */
  displayName: z.string({ error: 'Enter a name; a nickname will do' }).trim().min(1, 'Enter a name; a nickname will do').max(40, 'At most 40 characters'),
  seatRole: z.enum(SEAT_ROLES, { error: 'Choose one' }),
  isOfAge: ticked('Only people of legal drinking age can take part'),
  hasRead: ticked('Please read and confirm this'),
});

export const leaveSchema = z.object({ joinKey: joinKeySchema });

export const takeSeatSchema = z.object({ token: z.string().min(20).max(64) });
