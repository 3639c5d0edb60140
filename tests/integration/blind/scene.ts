import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { uniformInt } from 'pure-rand/distribution/uniformInt';
import path from 'node:path';
import { closeDb, type Db } from '@/db/client';
import { fills, lots, pulls, sessions, vessels } from '@/db/schema';
import { accessOf, type Access } from '@/lib/auth/access';
import { hashPassword } from '@/lib/auth/password';
import { insertPeople } from '@/lib/demo/cellar';
import { ESTATE, PEOPLE, type DemoPerson } from '@/lib/demo/people';
import { insertDraft } from '@/lib/demo/sessions';
import type { Draw } from '@/lib/methods/types';
import { openSession, sealSession } from '@/lib/sessions/lifecycle';
import { eq } from 'drizzle-orm';
import { newId } from '@/lib/ids';
import { testDb } from '../../support/db';

export const PASSWORD = 'quiet stones under oak';

/** Names that occur nowhere else: whoever reads one of them has been told what is in the glass. */
export const VESSELS = ['Quillfox91', 'Brindlemere42', 'Harrowgate77'] as const;
export const PULLED_AT = new Date('2026-03-17T09:41:23.457Z');
export const PRIVATE_QUESTION = 'Does Quillfox91 outlast the others on the palate?';

export interface Scene {
  db: Db;
  folder: string;
  cellarId: string;
  userIds: Record<DemoPerson['key'], string>;
  access(key: DemoPerson['key']): Access;
  profileId: string;
  triangleId: string;
  joinKeys: { profile: string; triangle: string };
  /** Every string that would tell a taster something. */
  canaries: string[];
}

/** A draw that gives the same at every run. */
export function seededDraw(seed: number): Draw {
  const generator = xoroshiro128plus(seed);
  return (n) => (n <= 1 ? 0 : uniformInt(generator, 0, n - 1));
}

/**
 * A cellar with a profile of three barrels and a triangle of two, both open, on a database of its
 * own. `order` says which barrel is sample 1, 2, 3: what the key hides.
 */
export async function makeScene(order: readonly number[], seed: number): Promise<Scene> {
  const db = testDb();
  const hash = await hashPassword(PASSWORD);
  const hashes = Object.fromEntries(PEOPLE.map((person) => [person.key, hash])) as Record<DemoPerson['key'], string>;
  const { cellarId, userIds } = db.transaction((tx) => insertPeople(tx, hashes, new Date('2026-01-02T00:00:00Z')));
  const lotId = newId();
  db.insert(lots).values({ id: lotId, cellarId, code: 'LZ-7741', name: 'Vellichor terrace', drink: 'wine', vintage: 2025, createdAt: PULLED_AT }).run();
  const ids: string[] = [lotId];
  const pullIds = VESSELS.map((name) => {
    const [vesselId, fillId, pullId] = [newId(), newId(), newId()];
    ids.push(vesselId, fillId, pullId);
    db.insert(vessels).values({ id: vesselId, cellarId, name, kind: 'barrel', volumeL: 225, cooper: `Cooper ${name}`, location: `Vault ${name}`, createdAt: PULLED_AT }).run();
    db.insert(fills).values({ id: fillId, cellarId, vesselId, lotId, fromDay: '2025-11-23', createdAt: PULLED_AT }).run();
    db.insert(pulls).values({ id: pullId, cellarId, fillId, pulledAt: PULLED_AT, pulledBy: userIds.bram, drawMethod: 'thief', volumeMl: 700, isSanitised: true, evaporationS: 60, isVented: true, isResealed: true, isToppedUp: true, isWiped: true, createdAt: PULLED_AT }).run();
    return pullId;
  });
  const access = (key: DemoPerson['key']): Access => {
    const person = PEOPLE.find((candidate) => candidate.key === key)!;
    return accessOf({ id: userIds[key], email: person.email, name: person.name, signInId: '' }, ESTATE.slug)!;
  };
  const ordered = order.map((index) => ({ label: `Barrel ${VESSELS[index]!}`, pullId: pullIds[index]! }));
  const common = {
    instruction: 'Taste each glass by itself.', privateQuestion: PRIVATE_QUESTION, flags: [], reserves: 2, servingTemperatureC: 16,
    allergens: ['sulfites' as const], scheduledFor: new Date('2026-03-18T09:00:00Z'), createdAt: PULLED_AT,
  };
  const draft = (demo: Parameters<typeof insertDraft>[4]) => db.transaction((tx) => insertDraft(tx, cellarId, userIds.odo, userIds.bram, demo));
  const profileId = draft({ ...common, method: 'profile', title: 'Wednesday tasting', samples: ordered, lines: [{ key: 'ar-vanilla', phase: 'nose' }, { key: 'ta-length', phase: 'after' }], seats: 6, replicates: 2 });
  const triangleId = draft({ ...common, method: 'triangle', title: 'Thursday tasting', samples: ordered.slice(0, 2), lines: [], seats: 6, replicates: 2 });
  const draw = seededDraw(seed);
  for (const id of [profileId, triangleId]) {
    sealSession(access('odo'), id, draw);
    openSession(access('odo'), id);
  }
  const joinKey = (id: string) => db.select({ key: sessions.joinKey }).from(sessions).where(eq(sessions.id, id)).get()!.key!;
  const sampleIds = db.$client.prepare('SELECT id FROM samples UNION SELECT id FROM servings UNION SELECT id FROM ballot_items').pluck().all() as string[];
  return {
    db, folder: path.dirname(process.env.DATABASE_FILE!), cellarId, userIds, access, profileId, triangleId,
    joinKeys: { profile: joinKey(profileId), triangle: joinKey(triangleId) },
    canaries: [
      ...VESSELS, ...VESSELS.map((name) => `Vault ${name}`), 'LZ-7741', 'Vellichor', '2025-11-23', '2026-03-17', String(PULLED_AT.getTime()), '17 Mar 2026', ...ids, ...sampleIds,
    ],
  };
}

/** Lets go of the database, so that a server may take it. */
export const release = (): void => closeDb();
