import 'server-only';
import type { Db, Tx } from '@/db/client';
import { ballotItems, descriptors, fills, lots, memberships, pulls, sampleComponents, samples, sessionPourers, sessions, users, vessels } from '@/db/schema';
import { and, asc, desc, eq, inArray, isNull } from 'drizzle-orm';

/** Pulls that a session may take its samples from: the newest, and those chosen before. */
export function listPullChoices(db: Db, cellarId: string, chosen: readonly string[]) {
  const query = (where: ReturnType<typeof and>) =>
    db
      .select({ id: pulls.id, vessel: vessels.name, kind: vessels.kind, lot: lots.code, pulledAt: pulls.pulledAt, volumeMl: pulls.volumeMl })
      .from(pulls)
      .innerJoin(fills, eq(fills.id, pulls.fillId))
      .innerJoin(vessels, eq(vessels.id, fills.vesselId))
      .innerJoin(lots, eq(lots.id, fills.lotId))
      .where(where)
      .orderBy(desc(pulls.pulledAt));
  const newest = query(and(eq(pulls.cellarId, cellarId), isNull(pulls.archivedAt))).limit(120).all();
  const missing = chosen.filter((id) => !newest.some((pull) => pull.id === id));
  const older = missing.length > 0 ? query(and(eq(pulls.cellarId, cellarId), inArray(pulls.id, missing))).all() : [];
  return [...newest, ...older];
}

export const listDescriptors = (db: Db | Tx, cellarId: string) =>
  db.select().from(descriptors).where(and(eq(descriptors.cellarId, cellarId), isNull(descriptors.archivedAt))).orderBy(asc(descriptors.family), asc(descriptors.name)).all();

export const listMembers = (db: Db | Tx, cellarId: string) =>
  db
    .select({ id: users.id, name: users.name })
    .from(memberships)
    .innerJoin(users, eq(users.id, memberships.userId))
    .where(and(eq(memberships.cellarId, cellarId), isNull(memberships.endedAt)))
    .orderBy(asc(users.name))
    .all();

/** What a draft holds beside its own row. */
export function designOf(db: Db | Tx, sessionId: string) {
  const own = db.select().from(samples).where(eq(samples.sessionId, sessionId)).orderBy(asc(samples.ordinal)).all();
  const parts = own.length > 0 ? db.select().from(sampleComponents).where(inArray(sampleComponents.sampleId, own.map((sample) => sample.id))).all() : [];
  return {
    samples: own.map((sample) => ({ ...sample, pullIds: parts.filter((part) => part.sampleId === sample.id).map((part) => part.pullId) })),
    items: db.select().from(ballotItems).where(eq(ballotItems.sessionId, sessionId)).orderBy(asc(ballotItems.position)).all(),
    pourers: db.select({ userId: sessionPourers.userId, name: users.name, step: sessionPourers.step }).from(sessionPourers).innerJoin(users, eq(users.id, sessionPourers.userId)).where(eq(sessionPourers.sessionId, sessionId)).orderBy(asc(users.name)).all(),
  };
}

/** Names of vessels and lots that a neutral title must not hold. */
export function namesInSession(db: Db | Tx, sessionId: string): string[] {
  const rows = db
    .select({ vessel: vessels.name, lot: lots.code, lotName: lots.name, cooper: vessels.cooper })
    .from(samples)
    .innerJoin(sampleComponents, eq(sampleComponents.sampleId, samples.id))
    .innerJoin(pulls, eq(pulls.id, sampleComponents.pullId))
    .innerJoin(fills, eq(fills.id, pulls.fillId))
    .innerJoin(vessels, eq(vessels.id, fills.vesselId))
    .innerJoin(lots, eq(lots.id, fills.lotId))
    .where(eq(samples.sessionId, sessionId))
    .all();
  return [...new Set(rows.flatMap((row) => [row.vessel, row.lot, row.lotName, row.cooper]))].filter((name) => name.length > 1);
}

export const listSessionRows = (db: Db, cellarId: string) =>
  db
    .select({ session: sessions, leader: users.name })
    .from(sessions)
    .innerJoin(users, eq(users.id, sessions.leaderId))
    .where(eq(sessions.cellarId, cellarId))
    .orderBy(desc(sessions.createdAt), asc(sessions.title))
    .all();
