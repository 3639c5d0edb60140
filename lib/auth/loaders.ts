import 'server-only';
import { getDb } from '@/db/client';
import { users } from '@/db/schema';
import { eq } from 'drizzle-orm';
import { findLink } from './links';

/** Whom a set-password link is for; null when it can't be used any more. */
export function linkState(token: string): { name: string; email: string } | null {
  const link = findLink(getDb(), 'set_password', token);
  if (!link?.userId) return null;
  return getDb().select({ name: users.name, email: users.email }).from(users).where(eq(users.id, link.userId)).get() ?? null;
}
