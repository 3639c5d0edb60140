import { z } from 'zod';

/** Trimmed, lower case; 254 is the longest address that mail can carry. */
export const emailSchema = z.string({ error: 'Enter an e-mail address' }).trim().toLowerCase().max(254, 'That address is too long').pipe(z.email('Enter an e-mail address, like name@example.com'));

/** Length is what counts; 200 keeps a hash from being asked of a book. */
export const newPasswordSchema = z.string({ error: 'Choose a password' }).min(12, 'At least 12 characters').max(200, 'At most 200 characters');

export const signInSchema = z.object({
  email: emailSchema,
  password: z.string({ error: 'Enter your password' }).min(1, 'Enter your password').max(200, 'At most 200 characters'),
  next: z.string().max(500).optional(),
});

export const setPasswordSchema = z.object({ token: z.string().min(20).max(64), password: newPasswordSchema });

export const changePasswordSchema = z.object({
  current: z.string({ error: 'Enter your present password' }).min(1).max(200),
  password: newPasswordSchema,
});

/** A path of this site to go on to; anything else is dropped. */
export function safeNext(next: string | undefined): string | null {
  return next && /^\/(?![/\\])[\w\-./?=&%]*$/.test(next) ? next : null;
}
