import { randomUUID } from 'node:crypto';
import path from 'node:path';
import { asc, eq } from 'drizzle-orm';
import { sealData } from 'iron-session';
import { closeDb, openDatabase } from '@/db/client';
import type { Phase } from '@/db/enums';
import { fills, lots, pulls, seats, sessions, vessels } from '@/db/schema';
import { accessOf } from '@/lib/auth/access';
import { insertPeople } from '@/lib/demo/cellar';
import { ESTATE, PEOPLE, type DemoPerson } from '@/lib/demo/people';
import { insertDraft } from '@/lib/demo/sessions';
import { newId } from '@/lib/ids';
import { cookieSecret } from '@/lib/secrets';
import { openSession, sealSession } from '@/lib/sessions/lifecycle';
import { testDb } from '../support/db';

const GLASSES = 6;
const LINES: readonly string[] = ['ar-dark-plum', 'ar-vanilla', 'ta-sour', 'mf-drying'];

export interface BenchScene {
  folder: string;
  joinKey: string;
  glasses: number;
  items: number;
  /** One a seat. */
  cookies: string[];
  devices: string[];
  /** How many of the operations are in the file. */
  countKept(opIds: readonly string[]): number;
}

/**
 * An open profile session with that many seats taken, on a database of its own. `lines`: keys of the lexicon, all on
 * the nose, or dealt out over the parts of a tasting.
 */
export async function makeBenchScene(seatCount: number, lines: readonly string[] = LINES, phases: readonly Phase[] = ['nose']): Promise<BenchScene> {
  const db = testDb();
  const at = new Date();
  const hashes = Object.fromEntries(PEOPLE.map((person) => [person.key, 'no sign-in'])) as Record<DemoPerson['key'], string>;
  const { cellarId, userIds } = db.transaction((tx) => insertPeople(tx, hashes, at));
  const lotId = newId();
  db.insert(lots).values({ id: lotId, cellarId, code: 'A', name: 'A', drink: 'wine', createdAt: at }).run();
  const samples = Array.from({ length: GLASSES }, (_, i) => {
    const [vesselId, fillId, pullId] = [newId(), newId(), newId()];
    db.insert(vessels).values({ id: vesselId, cellarId, name: String(i + 1), kind: 'barrel', volumeL: 225, createdAt: at }).run();
    db.insert(fills).values({ id: fillId, cellarId, vesselId, lotId, fromDay: '2026-01-01', createdAt: at }).run();
    db.insert(pulls).values({ id: pullId, cellarId, fillId, pulledAt: at, pulledBy: userIds.bram, drawMethod: 'thief', volumeMl: 5000, isSanitised: true, evaporationS: 60, isVented: true, isResealed: true, isToppedUp: true, isWiped: true, createdAt: at }).run();
    return { label: `Barrel ${i + 1}`, pullId };
  });
  const sessionId = db.transaction((tx) => insertDraft(tx, cellarId, userIds.odo, userIds.bram, {
    method: 'profile', title: 'Bench', instruction: 'Bench', privateQuestion: 'Bench?', samples, lines: lines.map((key, i) => ({ key, phase: phases[i % phases.length]! })), flags: [],
    seats: seatCount, reserves: 0, replicates: 1, servingTemperatureC: 16, allergens: [], scheduledFor: at, createdAt: at,
  }));
  const leader = accessOf({ id: userIds.odo, email: '', name: '', signInId: '' }, ESTATE.slug)!;
  sealSession(leader, sessionId);
  openSession(leader, sessionId);
  db.update(seats).set({ claimedAt: at, consentedAt: at, seatRole: 'taste', tokenGeneration: 1 }).where(eq(seats.sessionId, sessionId)).run();
  const rows = db.select({ id: seats.id }).from(seats).where(eq(seats.sessionId, sessionId)).orderBy(asc(seats.number)).all();
  const cookies = await Promise.all(rows.map(async ({ id }) => `tercet-seat=${await sealData({ seats: [{ seatId: id, generation: 1 }] }, { password: cookieSecret(), ttl: 3600 })}`));
  const joinKey = db.select({ key: sessions.joinKey }).from(sessions).where(eq(sessions.id, sessionId)).get()!.key!;
  const file = process.env.DATABASE_FILE!;
  closeDb();
  return {
    folder: path.dirname(file), joinKey, glasses: GLASSES, items: lines.length, cookies, devices: rows.map(() => randomUUID()),
    countKept(opIds) {
      const kept = openDatabase(file);
      const find = kept.$client.prepare("SELECT 1 FROM operations WHERE op_id = ? AND admission = 'counted'");
      const count = opIds.filter((id) => find.get(id)).length;
      kept.$client.close();
      return count;
    },
  };
}
