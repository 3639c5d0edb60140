import 'server-only';
import { auditEvents } from '@/db/schema';
import type { Db } from '@/db/client';
import { asc, eq } from 'drizzle-orm';
import { sha256Hex } from '../ids';
import { CHAIN_START, chainText } from './record';

/** Walks the cellar's chain. @returns the first broken entry's number, or null, and the head's hash */
export function verifyAuditChain(db: Db, cellarId: string): { brokenAt: number | null; entries: number; head: string } {
  let previous = CHAIN_START;
  let entries = 0;
  for (const row of db.select().from(auditEvents).where(eq(auditEvents.cellarId, cellarId)).orderBy(asc(auditEvents.seq)).all()) {
    entries += 1;
    const { hash, ...rest } = row;
    if (row.seq !== entries || row.previousHash !== previous || sha256Hex(chainText(rest)) !== hash) {
      return { brokenAt: entries, entries, head: previous };
    }
    previous = hash;
  }
  return { brokenAt: null, entries, head: previous };
}
