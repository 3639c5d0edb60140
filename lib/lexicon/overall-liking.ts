import 'server-only';
import type { Tx } from '@/db/client';
import { descriptors } from '@/db/schema';
import { and, eq } from 'drizzle-orm';
import { now } from '../clock';
import { newId } from '../ids';

/** The one line of a ballot that asks no trait. Phones say it in their own words. */
const KEY = 'own-overall-liking';

/** The cellar's entry for the overall liking, made when a ballot first needs it; kept out of the lexicon's list. */
export function overallLiking(tx: Tx, cellarId: string): typeof descriptors.$inferSelect {
  const known = tx.select().from(descriptors).where(and(eq(descriptors.cellarId, cellarId), eq(descriptors.key, KEY))).get();
  if (known) return known;
  const at = now();
  return tx
    .insert(descriptors)
    .values({
      id: newId(), cellarId, key: KEY, sense: 'taste', family: 'Overall', name: 'Overall liking', definition: 'How much the glass is liked as a whole.',
      phase: 'after', lowAnchor: 'dislike extremely', highAnchor: 'like extremely', createdAt: at, archivedAt: at,
    })
    .returning()
    .get();
}
