import 'server-only';
import { databaseFile, getDb, type Db, type Tx } from '@/db/client';
import { cellars, oneTimeLinks } from '@/db/schema';
import { and, eq, isNull } from 'drizzle-orm';
import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';
import { createLink, findLink } from '../auth/links';

/** Where the link of the first owner waits for the start to print it. Readable by the owner of the process only. */
function firstOwnerFile(): string {
  return process.env.TERCET_FIRST_OWNER_FILE ?? path.join(/* turbopackIgnore: true */ path.dirname(databaseFile()), 'first-owner.json');
}

/** Whether somebody owns a cellar of their own, the invented one aside. */
export const hasRealCellar = (db: Tx | Db): boolean =>
  db.select({ id: cellars.id }).from(cellars).where(eq(cellars.isDemo, false)).limit(1).get() !== undefined;

const fileSchema = z.object({ path: z.string().regex(/^\/setup\/[\w-]+$/) });

function keptToken(file: string): string | null {
  if (!existsSync(file)) return null;
  try {
    return fileSchema.parse(JSON.parse(readFileSync(file, 'utf8'))).path.slice('/setup/'.length);
  } catch {
    return null;
  }
}

/**
 * While there is no real cellar, sees to one open first-owner link and its file; afterwards to
 * none. A link that still works stays, so that starting again doesn't break the printed one.
 */
export function offerFirstOwner(): void {
  const file = firstOwnerFile();
  const db = getDb();
  if (hasRealCellar(db)) return rmSync(file, { force: true });
  const kept = keptToken(file);
  if (kept && findLink(db, 'first_owner', kept)) return;
  const token = db.transaction((tx) => {
    tx.update(oneTimeLinks).set({ usedAt: new Date() }).where(and(eq(oneTimeLinks.purpose, 'first_owner'), isNull(oneTimeLinks.usedAt))).run();
    return createLink(tx, { purpose: 'first_owner' });
  }, { behavior: 'immediate' });
  mkdirSync(path.dirname(file), { recursive: true });
  // Removed first: a mode is given only to a file that is made anew.
  rmSync(file, { force: true });
  writeFileSync(file, `${JSON.stringify({ path: `/setup/${token}` })}\n`, { mode: 0o600 });
}

/** Takes the printed link away once it was used. */
export const withdrawFirstOwner = (): void => rmSync(firstOwnerFile(), { force: true });

/** Whether the token opens the set-up of the first cellar. */
export const isFirstOwnerToken = (token: string): boolean => !hasRealCellar(getDb()) && findLink(getDb(), 'first_owner', token) !== null;
