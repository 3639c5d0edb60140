import 'server-only';
import { getDb } from '@/db/client';
import { users } from '@/db/schema';
import { eq } from 'drizzle-orm';
import { useLink as takeLink } from '../auth/links';
import { hashPassword } from '../auth/password';
import { createCellar } from '../cellars/mutations';
import { now } from '../clock';
import { AppError } from '../errors';
import { newId } from '../ids';
import { hasRealCellar, withdrawFirstOwner } from './first-owner';
import type { SetUp } from './schema';

/**
 * Makes the first owner and the first real cellar by the one-time link: all of it or nothing.
 * @returns the new person's id and the cellar's name in addresses
 * @throws AppError `expired` (link spent, old or unknown; or a real cellar is there), `invalid` (address taken)
 */
export async function setUpFirstCellar(input: SetUp): Promise<{ userId: string; slug: string }> {
  const passwordHash = await hashPassword(input.password);
  const made = getDb().transaction((tx) => {
    takeLink(tx, 'first_owner', input.token);
    if (hasRealCellar(tx)) throw new AppError('expired');
    if (tx.select({ id: users.id }).from(users).where(eq(users.email, input.email)).get()) {
      throw new AppError('invalid', 'Somebody has that e-mail address already.', { email: 'Take another address' });
    }
    const userId = newId();
    tx.insert(users).values({ id: userId, email: input.email, name: input.name, passwordHash, createdAt: now() }).run();
    const { slug } = createCellar(tx, { name: input.cellarName, timeZone: input.timeZone, drink: input.drink, ownerId: userId });
    return { userId, slug };
  }, { behavior: 'immediate' });
  withdrawFirstOwner();
  return made;
}
