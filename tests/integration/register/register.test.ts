import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import type { Db } from '@/db/client';
import { cellars, fills, lots, pulls, sessions, users, vessels } from '@/db/schema';
import { accessOf, type Access } from '@/lib/auth/access';
import { atMoment } from '@/lib/clock';
import { createCellar } from '@/lib/cellars/mutations';
import { fillDemo } from '@/lib/demo/fill';
import { PEOPLE } from '@/lib/demo/people';
import { newId } from '@/lib/ids';
import { addMember, changeRoles, endMembership, makePasswordLink } from '@/lib/members/mutations';
import { removeDemoCellar } from '@/lib/members/remove-demo';
import { archiveRow, emptyVessel, fillVessel, recordPull, saveLot, saveVessel } from '@/lib/register/mutations';
import type { PullInput, VesselInput } from '@/lib/register/schema';
import { testDb } from '../../support/db';

let db: Db;
let owner: Access;
let stranger: Access;

function person(email: string): string {
  const id = newId();
  db.insert(users).values({ id, email, name: email.split('@')[0]!, createdAt: new Date() }).run();
  return id;
}
const asUser = (id: string, slug: string) => accessOf({ id, email: '', name: '', signInId: '' }, slug)!;

beforeEach(() => {
  db = testDb();
  const a = person('a@example.com');
  const b = person('b@example.com');
  const first = db.transaction((tx) => createCellar(tx, { name: 'First', timeZone: 'Europe/Paris', drink: 'wine', ownerId: a }));
  const second = db.transaction((tx) => createCellar(tx, { name: 'Second', timeZone: 'UTC', drink: 'mead', ownerId: b }));
  owner = asUser(a, first.slug);
  stranger = asUser(b, second.slug);
});

const codeOf = (work: () => unknown): string => {
  try {
    work();
    return 'ok';
  } catch (error) {
    return (error as { code?: string }).code ?? String(error);
  }
};
const vessel = (name: string, more: Partial<VesselInput> = {}): VesselInput => ({ cellar: 'first', name, kind: 'barrel', volumeL: 225, cooper: '', woodSpecies: '', woodOrigin: '', location: '', note: '', ...more });
const lot = (code: string) => ({ cellar: 'first', code, name: code, drink: 'wine' as const, note: '' });
const pull = (vesselId: string, pulledAt: string, more: Partial<PullInput> = {}): PullInput => ({
  cellar: 'first', vesselId, pulledAt, drawMethod: 'thief', volumeMl: 300, isSanitised: true, evaporationS: 60, isVented: true, isResealed: true, isToppedUp: true, toppedWith: '', isWiped: true, note: '', ...more,
});

describe('the register', () => {
  it('finds nothing of another cellar', () => {
    const vesselId = saveVessel(owner, vessel('41'));
    const lotId = saveLot(owner, lot('25-B'));
    expect(codeOf(() => saveVessel(stranger, { ...vessel('41'), id: vesselId, version: 1 }))).toBe('not_found');
    expect(codeOf(() => saveLot(stranger, { ...lot('x'), id: lotId, version: 1 }))).toBe('not_found');
    expect(codeOf(() => fillVessel(stranger, { cellar: 'second', vesselId, lotId, fromDay: '2026-01-01', note: '' }))).toBe('not_found');
    expect(codeOf(() => recordPull(stranger, pull(vesselId, '2026-01-01T10:00')))).toBe('not_found');
    expect(codeOf(() => archiveRow(stranger, { cellar: 'second', kind: 'vessel', id: vesselId, isArchived: 'yes' }))).toBe('not_found');
    const ownLot = saveLot(stranger, { ...lot('m'), cellar: 'second' });
    expect(codeOf(() => fillVessel(owner, { cellar: 'first', vesselId, lotId: ownLot, fromDay: '2026-01-01', note: '' }))).toBe('not_found');
  });

  it('refuses a form that is older than the row, and a name that is taken', () => {
    const id = saveVessel(owner, vessel('41'));
    saveVessel(owner, { ...vessel('41', { location: 'Row A' }), id, version: 1 });
    expect(codeOf(() => saveVessel(owner, { ...vessel('41', { location: 'Row B' }), id, version: 1 }))).toBe('stale');
    expect(db.select().from(vessels).where(eq(vessels.id, id)).get()!.location).toBe('Row A');
    expect(codeOf(() => saveVessel(owner, vessel('41')))).toBe('conflict');
  });

  it('keeps a vessel’s fills apart in time', () => {
    const vesselId = saveVessel(owner, vessel('41'));
    const [a, b] = [saveLot(owner, lot('a')), saveLot(owner, lot('b'))];
    const fill = (lotId: string, fromDay: string) => fillVessel(owner, { cellar: 'first', vesselId, lotId, fromDay, note: '' });
    const first = fill(a, '2026-01-10');
    expect(codeOf(() => fill(b, '2026-01-10'))).toBe('conflict');
    expect(codeOf(() => fill(b, '2026-01-09'))).toBe('conflict');
    const second = fill(b, '2026-03-01');
    expect(db.select().from(fills).where(eq(fills.id, first)).get()!.toDay).toBe('2026-03-01');
    emptyVessel(owner, { cellar: 'first', vesselId, fillId: second, version: 1, toDay: '2026-05-01' });
    expect(codeOf(() => emptyVessel(owner, { cellar: 'first', vesselId, fillId: second, version: 2, toDay: '2026-06-01' }))).toBe('stale');
    expect(codeOf(() => fill(a, '2026-04-01'))).toBe('conflict');
    expect(codeOf(() => fill(a, '2026-05-01'))).toBe('ok');
  });

  it('takes a pull from what the vessel held that day, in the cellar’s zone', () => {
    const vesselId = saveVessel(owner, vessel('41'));
    const [a, b] = [saveLot(owner, lot('a')), saveLot(owner, lot('b'))];
    const first = fillVessel(owner, { cellar: 'first', vesselId, lotId: a, fromDay: '2026-01-10', note: '' });
    const second = fillVessel(owner, { cellar: 'first', vesselId, lotId: b, fromDay: '2026-03-01', note: '' });
    const fillOf = (at: string) => db.select().from(pulls).where(eq(pulls.id, recordPull(owner, pull(vesselId, at)))).get()!;
    expect(codeOf(() => recordPull(owner, pull(vesselId, '2026-01-09T23:00')))).toBe('conflict');
    expect(fillOf('2026-02-01T09:00').fillId).toBe(first);
    const late = fillOf('2026-03-02T00:30');
    expect(late.fillId).toBe(second);
    // Half past midnight in Paris, winter time, is 23:30 UTC of the day before.
    expect(late.pulledAt.toISOString()).toBe('2026-03-01T23:30:00.000Z');
    expect(codeOf(() => atMoment(new Date('2026-03-05T00:00:00Z'), () => recordPull(owner, pull(vesselId, '2026-03-06T10:00'))))).toBe('invalid');
  });

  it('puts away and takes back, and keeps a full vessel in view', () => {
    const vesselId = saveVessel(owner, vessel('41'));
    const lotId = saveLot(owner, lot('a'));
    fillVessel(owner, { cellar: 'first', vesselId, lotId, fromDay: '2026-01-10', note: '' });
    expect(codeOf(() => archiveRow(owner, { cellar: 'first', kind: 'vessel', id: vesselId, isArchived: 'yes' }))).toBe('conflict');
    archiveRow(owner, { cellar: 'first', kind: 'lot', id: lotId, isArchived: 'yes' });
    expect(db.select().from(lots).where(eq(lots.id, lotId)).get()!.archivedAt).not.toBeNull();
    archiveRow(owner, { cellar: 'first', kind: 'lot', id: lotId, isArchived: 'no' });
    expect(db.select().from(lots).where(eq(lots.id, lotId)).get()!.archivedAt).toBeNull();
  });
});

describe('people', () => {
  it('a role that lacks the right is refused', () => {
    const id = addMember(owner, { cellar: 'first', email: 'p@example.com', name: 'P', roles: ['panelist'] });
    const panelist = asUser(id, 'first');
    expect(codeOf(() => saveVessel(panelist, vessel('1')))).toBe('forbidden');
    expect(codeOf(() => addMember(panelist, { cellar: 'first', email: 'q@example.com', name: 'Q', roles: ['owner'] }))).toBe('forbidden');
  });

  it('the last owner can neither leave nor stop being one', () => {
    expect(codeOf(() => endMembership(owner, owner.user.id))).toBe('conflict');
    expect(codeOf(() => changeRoles(owner, { cellar: 'first', userId: owner.user.id, roles: ['winemaker'] }))).toBe('conflict');
    expect(asUser(owner.user.id, 'first').roles.has('owner')).toBe(true);
  });

  it('one cellar’s owner can’t take over the account of somebody who works elsewhere too', () => {
    addMember(owner, { cellar: 'first', email: 'b@example.com', name: 'B', roles: ['panelist'] });
    expect(codeOf(() => makePasswordLink(owner, stranger.user.id))).toBe('ok');
    db.update(users).set({ passwordHash: 'x' }).where(eq(users.id, stranger.user.id)).run();
    expect(codeOf(() => makePasswordLink(owner, stranger.user.id))).toBe('forbidden');
    expect(codeOf(() => makePasswordLink(owner, newId()))).toBe('not_found');
  });
});

describe('the demo cellar', () => {
  it('goes as a whole, with its people, and nothing else does', async () => {
    db = testDb();
    await fillDemo();
    const keeper = person('keeper@example.com');
    const { slug } = db.transaction((tx) => createCellar(tx, { name: 'Kept', timeZone: 'UTC', drink: 'wine', ownerId: keeper }));
    saveVessel(asUser(keeper, slug), vessel('1'));
    const ines = db.select().from(users).where(eq(users.email, PEOPLE[0]!.email)).get()!;
    const access = asUser(ines.id, 'pellow-rake');
    expect(codeOf(() => removeDemoCellar(access, 'Pellow'))).toBe('invalid');
    expect(codeOf(() => removeDemoCellar(asUser(keeper, slug), 'Kept'))).toBe('forbidden');
    removeDemoCellar(access, 'Pellow Rake Cellars');
    expect(db.select({ slug: cellars.slug }).from(cellars).all()).toEqual([{ slug: 'kept' }]);
    expect(db.select({ email: users.email }).from(users).all()).toEqual([{ email: 'keeper@example.com' }]);
    expect(db.select().from(sessions).all()).toEqual([]);
    expect(db.select().from(vessels).all()).toHaveLength(1);
    expect(db.$client.pragma('foreign_key_check')).toEqual([]);
  });
});
