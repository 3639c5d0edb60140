import 'server-only';
import { getDb } from '@/db/client';
import { descriptors } from '@/db/schema';
import { and, eq, ne } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import { requireCapability, type Access } from '../auth/access';
import { now } from '../clock';
import { AppError } from '../errors';
import { newId } from '../ids';
import type { DescriptorInput } from './schema';

/**
 * A descriptor of the cellar's own, or changed words of one. Sealed sessions keep the words that
 * they were sealed with.
 * @returns its id @throws AppError `conflict` (name taken), `stale`, `not_found`
 */
export function saveDescriptor(access: Access, { cellar: _, id, version, ...values }: DescriptorInput): string {
  requireCapability(access, 'lexicon.edit');
  const cellarId = access.cellar.id;
  return getDb().transaction((tx) => {
    const descriptorId = id ?? newId();
    const twin = tx.select({ id: descriptors.id }).from(descriptors).where(and(eq(descriptors.cellarId, cellarId), eq(descriptors.name, values.name), ne(descriptors.id, descriptorId))).get();
    if (twin) throw new AppError('conflict', 'The lexicon has that word already.', { name: 'Already in the lexicon' });
    if (id) {
      const { changes } = tx.update(descriptors).set({ ...values, version: (version ?? 0) + 1 }).where(and(eq(descriptors.id, id), eq(descriptors.cellarId, cellarId), eq(descriptors.version, version ?? 0))).run();
      if (changes !== 1) throw new AppError(tx.select({ id: descriptors.id }).from(descriptors).where(and(eq(descriptors.id, id), eq(descriptors.cellarId, cellarId))).get() ? 'stale' : 'not_found');
    } else tx.insert(descriptors).values({ id: descriptorId, cellarId, key: `own-${descriptorId}`, createdAt: now(), ...values }).run();
    recordAudit(tx, { cellarId, actorUserId: access.user.id, action: id ? 'descriptor.changed' : 'descriptor.created', subjectType: 'descriptor', subjectId: descriptorId });
    return descriptorId;
  }, { behavior: 'immediate' });
}

/** Takes a descriptor out of new ballots, or back in. @throws AppError `not_found` */
export function archiveDescriptor(access: Access, id: string, isArchived: boolean): void {
  requireCapability(access, 'lexicon.edit');
  getDb().transaction((tx) => {
    const { changes } = tx.update(descriptors).set({ archivedAt: isArchived ? now() : null }).where(and(eq(descriptors.id, id), eq(descriptors.cellarId, access.cellar.id))).run();
    if (changes !== 1) throw new AppError('not_found');
    recordAudit(tx, { cellarId: access.cellar.id, actorUserId: access.user.id, action: isArchived ? 'descriptor.archived' : 'descriptor.restored', subjectType: 'descriptor', subjectId: id });
  }, { behavior: 'immediate' });
}
