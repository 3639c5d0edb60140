import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { auditEvents, memberships, membershipRoles, seatPeople, seats, servingSamples, users } from '@/db/schema';
import { accessOf } from '@/lib/auth/access';
import { findCommitment, publishedPlanFile, readKeyForPouring } from '@/lib/blind/read-key';
import { readBoard } from '@/lib/board/loaders';
import { createCellar } from '@/lib/cellars/mutations';
import { newId } from '@/lib/ids';
import { decideEarlyOpening, readEarlyOpening, requestEarlyOpening } from '@/lib/sessions/early-opening';
import { abandonSession, closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { makeScene, type Scene, VESSELS } from './scene';

let scene: Scene;
beforeEach(async () => {
  scene = await makeScene([0, 1, 2], 5);
});

const PEOPLE = ['ines', 'odo', 'bram', 'lio'] as const;
const codeOf = (work: () => unknown): string => {
  try {
    work();
    return 'ok';
  } catch (error) {
    return (error as { code?: string }).code ?? String(error);
  }
};
const answersOf = () => Object.fromEntries(PEOPLE.map((who) => [who, codeOf(() => readKeyForPouring(scene.access(who), scene.profileId))]));

function takeSeat(userId: string): void {
  const seat = scene.db.select().from(seats).where(eq(seats.sessionId, scene.profileId)).get()!;
  scene.db.update(seats).set({ claimedAt: new Date(), tokenGeneration: 1 }).where(eq(seats.id, seat.id)).run();
  scene.db.insert(seatPeople).values({ seatId: seat.id, cellarId: scene.cellarId, displayName: 'x', userId }).run();
}

describe('who may read the key (DESIGN: the blind, 2)', () => {
  it('before unsealing the named pourer alone, owners no exception; afterwards every member', () => {
    const onlyPourer = { ines: 'forbidden', odo: 'forbidden', bram: 'ok', lio: 'forbidden' };
    expect(answersOf()).toEqual(onlyPourer);
    closeSession(scene.access('odo'), scene.profileId, null);
    expect(answersOf()).toEqual(onlyPourer);
    unsealSession(scene.access('odo'), scene.profileId);
    expect(answersOf()).toEqual({ ines: 'ok', odo: 'ok', bram: 'ok', lio: 'ok' });
  });

  it('a pourer who holds a seat is refused, and nobody reads an abandoned session’s key', () => {
    takeSeat(scene.userIds.bram);
    expect(answersOf().bram).toBe('forbidden');
    abandonSession(scene.access('odo'), scene.triangleId, 'The samples warmed up.');
    expect(codeOf(() => readKeyForPouring(scene.access('bram'), scene.triangleId))).toBe('forbidden');
  });

  it('another cellar’s owner finds nothing, and a former member neither', () => {
    const stranger = newId();
    scene.db.insert(users).values({ id: stranger, email: 's@example.com', name: 'S', createdAt: new Date() }).run();
    const { slug } = scene.db.transaction((tx) => createCellar(tx, { name: 'Elsewhere', timeZone: 'UTC', drink: 'cider', ownerId: stranger }));
    const access = accessOf({ id: stranger, email: 's@example.com', name: 'S', signInId: '' }, slug)!;
    expect(codeOf(() => readKeyForPouring(access, scene.profileId))).toBe('not_found');
    expect(codeOf(() => readBoard(access, scene.profileId))).toBe('not_found');
    scene.db.update(memberships).set({ endedAt: new Date() }).where(eq(memberships.userId, scene.userIds.bram)).run();
    expect(accessOf({ id: scene.userIds.bram, email: '', name: '', signInId: '' }, 'pellow-rake')).toBeNull();
  });

  it('logs each reading and each refusal', () => {
    answersOf();
    const actions = scene.db.select({ action: auditEvents.action }).from(auditEvents).all().map((row) => row.action);
    expect(actions.filter((action) => action === 'key.read_for_pouring')).toHaveLength(1);
    expect(actions.filter((action) => action === 'key.refused')).toHaveLength(3);
  });

  it('a role taken away counts at once', () => {
    scene.db.delete(membershipRoles).where(eq(membershipRoles.userId, scene.userIds.odo)).run();
    expect(codeOf(() => closeSession(scene.access('odo'), scene.profileId, null))).toBe('forbidden');
  });
});

describe('what rests in the database', () => {
  it('before unsealing holds no row and no text that maps a code to a sample', () => {
    expect(scene.db.select().from(servingSamples).all()).toEqual([]);
    scene.db.$client.pragma('wal_checkpoint(TRUNCATE)');
    const bytes = readFileSync(process.env.DATABASE_FILE!).toString('latin1');
    expect(bytes).toContain(VESSELS[0]);
    // The plan's own member names stand beside a code only in its plain text.
    expect(bytes).not.toContain('"servings":[{"seat"');
    expect(bytes).not.toContain('tercet-plan-1');
  });

  it('after unsealing the published file prints the commitment under SHA-256, and not before', () => {
    const { commitment } = readKeyForPouring(scene.access('bram'), scene.profileId);
    expect(codeOf(() => publishedPlanFile(commitment))).toBe('wrong_state');
    expect(findCommitment(commitment)).toMatchObject({ isPublished: false });
    closeSession(scene.access('odo'), scene.profileId, null);
    unsealSession(scene.access('odo'), scene.profileId);
    const file = publishedPlanFile(commitment);
    expect(createHash('sha256').update(file).digest('hex')).toBe(commitment);
    const plan = JSON.parse(file);
    const written = scene.db.$client.prepare(`
      SELECT st.number seat, v.block, v.position, sa.label FROM serving_samples ss JOIN servings v ON v.id = ss.serving_id
      JOIN seats st ON st.id = v.seat_id JOIN samples sa ON sa.id = ss.sample_id WHERE v.session_id = ?`).all(scene.profileId) as { seat: number; block: number; position: number; label: string }[];
    expect(written).toHaveLength(plan.servings.length);
    for (const row of written) {
      const planned = plan.servings.find((s: { seat: number; block: number; position: number }) => s.seat === row.seat && s.block === row.block && s.position === row.position);
      expect(plan.samples[planned.sample - 1].label).toBe(row.label);
    }
  });
});

describe('opening early', () => {
  it('needs a reason and a second person, and shows one sample to these two alone', () => {
    const { servings } = readKeyForPouring(scene.access('bram'), scene.profileId);
    const { code, sample } = servings[0]!;
    const id = requestEarlyOpening(scene.access('odo'), scene.profileId, code, 'A guest with an allergy drank it.');
    expect(codeOf(() => decideEarlyOpening(scene.access('odo'), id, true))).toBe('forbidden');
    expect(codeOf(() => decideEarlyOpening(scene.access('lio'), id, true))).toBe('forbidden');
    expect(codeOf(() => readEarlyOpening(scene.access('odo'), id))).toBe('wrong_state');
    decideEarlyOpening(scene.access('ines'), id, true);
    expect(readEarlyOpening(scene.access('odo'), id)).toBe(`Barrel ${VESSELS[sample - 1]}`);
    expect(readEarlyOpening(scene.access('ines'), id)).toBe(`Barrel ${VESSELS[sample - 1]}`);
    expect(codeOf(() => readEarlyOpening(scene.access('lio'), id))).toBe('forbidden');
    expect(codeOf(() => decideEarlyOpening(scene.access('ines'), id, true))).toBe('conflict');
    expect(scene.db.select().from(servingSamples).all()).toEqual([]);
  });

  it('of the whole session closes and unseals it', () => {
    const id = requestEarlyOpening(scene.access('odo'), scene.profileId, null, 'The lights went out.');
    decideEarlyOpening(scene.access('ines'), id, true);
    expect(answersOf().lio).toBe('ok');
  });

  it('unsealing before close is refused', () => {
    expect(codeOf(() => unsealSession(scene.access('odo'), scene.profileId))).toBe('wrong_state');
    expect(codeOf(() => unsealSession(scene.access('lio'), scene.profileId))).toBe('forbidden');
  });

  it('closing while seats owe needs a reason', () => {
    takeSeat(scene.userIds.lio);
    expect(codeOf(() => closeSession(scene.access('odo'), scene.profileId, null))).toBe('conflict');
    closeSession(scene.access('odo'), scene.profileId, 'She was called away.');
    expect(codeOf(() => closeSession(scene.access('odo'), scene.profileId, 'Again'))).toBe('wrong_state');
  });
});
