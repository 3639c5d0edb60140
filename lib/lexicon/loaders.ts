import 'server-only';
import { getDb } from '@/db/client';
import { descriptors } from '@/db/schema';
import { and, asc, eq } from 'drizzle-orm';
import { loadAccess } from '../auth/access';
import { AppError } from '../errors';

const publicEntry = (row: typeof descriptors.$inferSelect) => {
  const { id, version, name, sense, family, definition, reference, phase, lowAnchor, highAnchor, archivedAt } = row;
  return { id, version, name, sense, family, definition, reference, phase, lowAnchor, highAnchor, isArchived: archivedAt !== null };
};

/** The lexicon by family, filtered by any part of a word or definition. */
export async function loadLexicon(slug: string, query: string, withArchived: boolean) {
  const access = await loadAccess(slug, 'cellar.view');
  const words = query.toLowerCase();
  const entries = getDb().select().from(descriptors).where(eq(descriptors.cellarId, access.cellar.id)).orderBy(asc(descriptors.sense), asc(descriptors.family), asc(descriptors.name)).all().map(publicEntry);
  const shown = entries.filter((entry) => (withArchived || !entry.isArchived) && `${entry.name} ${entry.family} ${entry.sense} ${entry.definition}`.toLowerCase().includes(words));
  const families = [...new Set(shown.map((entry) => entry.family))];
  return { access, total: entries.length, count: shown.length, families: families.map((family) => ({ family, entries: shown.filter((entry) => entry.family === family) })) };
}

/** @throws AppError `not_found` */
export async function loadDescriptor(slug: string, id: string) {
  const access = await loadAccess(slug, 'lexicon.edit');
  const row = getDb().select().from(descriptors).where(and(eq(descriptors.id, id), eq(descriptors.cellarId, access.cellar.id))).get();
  if (!row) throw new AppError('not_found');
  return { access, entry: publicEntry(row) };
}

export async function loadFamilies(slug: string) {
  const access = await loadAccess(slug, 'lexicon.edit');
  const rows = getDb().selectDistinct({ family: descriptors.family }).from(descriptors).where(eq(descriptors.cellarId, access.cellar.id)).orderBy(asc(descriptors.family)).all();
  return { access, families: rows.map((row) => row.family) };
}
