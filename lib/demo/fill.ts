import 'server-only';
import { getDb, type Tx } from '@/db/client';
import { calls, cellars, sessions } from '@/db/schema';
import { eq } from 'drizzle-orm';
import { randomBytes } from 'node:crypto';
import { mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { accessOf, type Access } from '../auth/access';
import { hashPassword } from '../auth/password';
import { atMoment, now } from '../clock';
import { newId } from '../ids';
import { closeSession, openSession, sealSession, unsealSession } from '../sessions/lifecycle';
import { dayIn } from '../time';
import { DAY_MS, insertPeople, insertPull, insertRegister, type DemoCellar } from './cellar';
import { seeded } from './panel';
import { ESTATE, PEOPLE, type DemoPerson } from './people';
import { insertDraft, type DemoSession } from './sessions';
import { tasteProfile, tasteTriangle } from './tasting';
import { CIDER_SESSION, LEAD_PLANTED, LEAD_SESSION, NEXT_SESSION, OPEN_PLANTED, TRIANGLE_SESSION, type Story } from './stories';

/** Where the demo's sign-ins and join link are kept, for the start to print. Never in code. */
export function demoFile(): string {
  return process.env.TERCET_DEMO_FILE ?? path.join(/* turbopackIgnore: true */ process.cwd(), 'data', 'demo.json');
}

const HOUR_MS = 3_600_000;

/** Ten in the morning of the day that many days before `today`, near enough for a demo. */
const morning = (today: Date, daysAgo: number) => new Date(Math.floor((today.getTime() - daysAgo * DAY_MS) / DAY_MS) * DAY_MS + 9 * HOUR_MS);

/** The session's samples are drawn two hours before it, all by one hand. */
function draftOf(tx: Tx, story: Story, cellar: DemoCellar, scheduledFor: Date): DemoSession {
  const { barrels, ...rest } = story;
  const drawnAt = new Date(Math.min(scheduledFor.getTime() - 2 * HOUR_MS, now().getTime() - 2 * HOUR_MS));
  return {
    ...rest,
    samples: barrels.map((barrel) => ({ label: `${barrel === '5' ? 'Puncheon' : 'Barrel'} ${barrel}`, pullId: insertPull(tx, cellar, barrel, drawnAt) })),
    scheduledFor,
    createdAt: new Date(scheduledFor.getTime() - DAY_MS),
  };
}

/**
 * Fills an empty database with the invented estate: 84 barrels, months of pulls, two finished
 * sessions whose planted differences the results recover, one open now and one being designed.
 * @returns false when there is a cellar already: nothing is touched then
 */
export async function fillDemo(today = new Date()): Promise<boolean> {
  const db = getDb();
  if (db.select({ id: cellars.id }).from(cellars).limit(1).get()) return false;
  const passwords = Object.fromEntries(PEOPLE.map((person) => [person.key, randomBytes(9).toString('base64url')])) as Record<DemoPerson['key'], string>;
  const hashes = Object.fromEntries(
    await Promise.all(PEOPLE.map(async (person) => [person.key, await hashPassword(passwords[person.key])])),
  ) as Record<DemoPerson['key'], string>;

  const joinKey = db.transaction((tx) => {
    const { cellarId, userIds } = insertPeople(tx, hashes, new Date(today.getTime() - 420 * DAY_MS));
    const cellar: DemoCellar = { cellarId, userIds, ...insertRegister(tx, cellarId, userIds, today) };
    const access = (key: DemoPerson['key']): Access => {
      const person = PEOPLE.find((p) => p.key === key)!;
      return accessOf({ id: userIds[key], email: person.email, name: person.name, signInId: '' }, ESTATE.slug)!;
    };
    const leader = access('odo');
    const draft = (story: Story, at: Date) => insertDraft(tx, cellarId, userIds.odo, userIds.bram, draftOf(tx, story, cellar, at));
    const sealAndOpen = (id: string, at: Date) => {
      atMoment(new Date(at.getTime() - HOUR_MS), () => sealSession(leader, id));
      atMoment(at, () => openSession(leader, id));
    };
    const finish = (id: string, at: Date) => {
      atMoment(new Date(at.getTime() + HOUR_MS), () => closeSession(leader, id, null));
      atMoment(new Date(at.getTime() + HOUR_MS + 60_000), () => unsealSession(leader, id));
    };

    const leadAt = morning(today, 21);
    const lead = draft(LEAD_SESSION, leadAt);
    sealAndOpen(lead, leadAt);
    tasteProfile(db, cellarId, lead, LEAD_PLANTED, seeded(7), LEAD_SESSION.seats, leadAt);
    finish(lead, leadAt);

    const triangleAt = morning(today, 8);
    const triangle = draft(TRIANGLE_SESSION, triangleAt);
    sealAndOpen(triangle, triangleAt);
    tasteTriangle(db, cellarId, triangle, TRIANGLE_SESSION.seats, 8, triangleAt);
    finish(triangle, triangleAt);

    const open = draft(CIDER_SESSION, today);
    sealAndOpen(open, new Date(today.getTime() - HOUR_MS / 2));
    tasteProfile(db, cellarId, open, OPEN_PLANTED, seeded(11), 5, new Date(today.getTime() - 120_000), [4, 3, 2, 2, 1]);

    draft(NEXT_SESSION, morning(today, -2));

    const call = (barrel: string, kind: typeof calls.$inferInsert.kind, reasons: string, inDays: number | null, sessionId: string | null, at: Date) =>
      tx.insert(calls).values({
        id: newId(), cellarId, fillId: cellar.fillOf.get(barrel)!, sessionId, kind, reasons,
        nextDay: inDays === null ? null : dayIn(new Date(today.getTime() + inDays * DAY_MS), ESTATE.timeZone), decidedBy: userIds.ines, decidedAt: at,
      }).run();
    call('31', 'bottle', 'Longest and fullest of the six; the panel agreed.', 12, lead, leadAt);
    call('47', 'hold', 'Still dries more than the others. Taste again before deciding.', 14, lead, leadAt);
    call('18', 'rack', 'Racking was tasted: 8 of 12 found the odd glass. Rack the other half.', -1, triangle, triangleAt);
    call('41', 'treat', 'Volatile acidity rose on two tastings and the hiss is gone. Isolate, own thief, second laboratory figure.', -2, null, morning(today, 3));
    return tx.select({ joinKey: sessions.joinKey, joinCode: sessions.joinCode }).from(sessions).where(eq(sessions.id, open)).get()!;
  }, { behavior: 'immediate' });

  const file = demoFile();
  mkdirSync(path.dirname(file), { recursive: true });
  const signIns = PEOPLE.map((person) => ({ role: person.roles.join(', ').replace('_', ' '), email: person.email, password: passwords[person.key] }));
  writeFileSync(file, `${JSON.stringify({ cellar: ESTATE.name, signIns, joinPath: `/j/${joinKey.joinKey}`, joinCode: joinKey.joinCode }, null, 2)}\n`, { mode: 0o600 });
  return true;
}
