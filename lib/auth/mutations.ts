import 'server-only';
import { getDb } from '@/db/client';
import { signIns, users } from '@/db/schema';
import { and, eq, isNull } from 'drizzle-orm';
import { AppError } from '../errors';
import { newId } from '../ids';
import { signInCookie, SIGN_IN_DAYS } from './cookie';
import { resetTries, requireTriesLeft, takeTry } from './limits';
import { useLink } from './links';
import { hashPassword, passwordFits } from './password';

const WRONG = 'That e-mail address and password do not fit together.';

/** Starts a sign-in of its own row and puts its id into the cookie. */
export async function startSignIn(userId: string, userAgent: string): Promise<void> {
  const now = Date.now();
  const id = newId();
  getDb()
    .insert(signIns)
    .values({
      id,
      userId,
      createdAt: new Date(now),
      lastSeenAt: new Date(now),
      expiresAt: new Date(now + SIGN_IN_DAYS * 86_400_000),
      userAgent: userAgent.slice(0, 200),
    })
    .run();
  const cookie = await signInCookie();
  cookie.signInId = id;
  await cookie.save();
}

/**
 * Signs a person in by e-mail and password.
 * @throws AppError `invalid` (which of the two was wrong is not said), `too_many`
 */
export async function signIn(email: string, password: string, userAgent: string): Promise<void> {
  await requireTriesLeft('signIn', email);
  const user = getDb().select().from(users).where(eq(users.email, email)).get();
  const fits = await passwordFits(user?.passwordHash ?? null, password);
  if (!user || !fits || user.disabledAt) {
    await takeTry('signIn', email);
    throw new AppError('invalid', WRONG);
  }
  await resetTries('signIn', email);
  await signOut();
  await startSignIn(user.id, userAgent);
}

/** Ends this browser's sign-in, on the server too. */
export async function signOut(): Promise<void> {
  const cookie = await signInCookie();
  if (cookie.signInId) {
    getDb().update(signIns).set({ endedAt: new Date() }).where(eq(signIns.id, cookie.signInId)).run();
  }
  cookie.destroy();
}

/** Ends every sign-in of the person, this one included. */
export async function signOutEverywhere(userId: string): Promise<void> {
  getDb().update(signIns).set({ endedAt: new Date() }).where(and(eq(signIns.userId, userId), isNull(signIns.endedAt))).run();
  (await signInCookie()).destroy();
}

/**
 * Sets the password that a one-time link allows, ends older sign-ins and signs in.
 * @throws AppError `expired`
 */
export async function setPasswordByLink(token: string, password: string, userAgent: string): Promise<void> {
  const passwordHash = await hashPassword(password);
  const userId = getDb().transaction((tx) => {
    const link = useLink(tx, 'set_password', token);
    tx.update(users).set({ passwordHash }).where(eq(users.id, link.userId!)).run();
    tx.update(signIns).set({ endedAt: new Date() }).where(and(eq(signIns.userId, link.userId!), isNull(signIns.endedAt))).run();
    return link.userId!;
  }, { behavior: 'immediate' });
  await startSignIn(userId, userAgent);
}

/** Changes the password of a signed-in person and ends the other sign-ins. @throws AppError `invalid`, `too_many` */
export async function changePassword(user: { id: string; email: string }, current: string, password: string, userAgent: string): Promise<void> {
  await requireTriesLeft('signIn', user.email);
  const row = getDb().select().from(users).where(eq(users.id, user.id)).get();
  if (!(await passwordFits(row?.passwordHash ?? null, current))) {
    await takeTry('signIn', user.email);
    throw new AppError('invalid', 'The present password is not right.', { current: 'Not your present password' });
  }
  const passwordHash = await hashPassword(password);
  getDb().transaction((tx) => {
    tx.update(users).set({ passwordHash }).where(eq(users.id, user.id)).run();
    tx.update(signIns).set({ endedAt: new Date() }).where(and(eq(signIns.userId, user.id), isNull(signIns.endedAt))).run();
  }, { behavior: 'immediate' });
  await startSignIn(user.id, userAgent);
}
