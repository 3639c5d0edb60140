import { and, asc, eq } from 'drizzle-orm';
import type { Db } from '@/db/client';
import type { ItemKind, Method, Phase, Role } from '@/db/enums';
import {
  ballotItems, cellars, descriptors, fills, lots, membershipRoles, memberships, operations, pulls, sampleComponents, samples, seatPeople, seats, sessionPourers, sessions, users, vessels,
} from '@/db/schema';
import { valuesOf } from '@/lib/ballots/values';
import { accessOf, type Access } from '@/lib/auth/access';
import type { OperationBody } from '@/lib/ballots/schema';
import { takeOut } from '@/lib/blind/vault';
import { newId, sha256Hex } from '@/lib/ids';
import { openSession, sealSession } from '@/lib/sessions/lifecycle';
import { testDb } from '@/tests/support/db';

const AT = new Date('2026-05-06T09:00:00Z');

/** A cellar with one person of each asked role, and barrels that hold one lot. */
export interface Scene {
  db: Db;
  cellarId: string;
  as(role: Role): Access;
  /** Fill and pull of each barrel by its name. */
  barrels: Map<string, { vesselId: string; fillId: string; pullId: string }>;
}

export function addCellar(db: Db, slug: string, barrelNames: readonly string[]): Scene {
  const cellarId = newId();
  db.insert(cellars).values({ id: cellarId, slug, name: `Cellar ${slug}`, timeZone: 'Europe/Paris', drink: 'wine', createdAt: AT }).run();
  const people = new Map<Role, { id: string; email: string; name: string; signInId: string }>();
  for (const role of ['owner', 'winemaker', 'leader', 'cellar_hand', 'panelist'] as const) {
    const person = { id: newId(), email: `${role}@${slug}.example`, name: `The ${role}`, signInId: '' };
    people.set(role, person);
    db.insert(users).values({ id: person.id, email: person.email, name: person.name, createdAt: AT }).run();
    db.insert(memberships).values({ cellarId, userId: person.id, createdAt: AT }).run();
    db.insert(membershipRoles).values({ cellarId, userId: person.id, role }).run();
  }
  const lotId = newId();
  db.insert(lots).values({ id: lotId, cellarId, code: '25-A', name: 'Upper terraces', drink: 'wine', createdAt: AT }).run();
  const barrels: Scene['barrels'] = new Map();
  for (const name of barrelNames) {
    const [vesselId, fillId, pullId] = [newId(), newId(), newId()];
    db.insert(vessels).values({ id: vesselId, cellarId, name, kind: 'barrel', volumeL: 225, cooper: 'Harrowdine', toast: 'medium', year: 2023, createdAt: AT }).run();
    db.insert(fills).values({ id: fillId, cellarId, vesselId, lotId, fromDay: '2025-10-01', createdAt: AT }).run();
    db.insert(pulls).values({
      id: pullId, cellarId, fillId, pulledAt: AT, pulledBy: people.get('cellar_hand')!.id, drawMethod: 'thief', volumeMl: 500, isSanitised: true,
      evaporationS: 60, isVented: true, isResealed: true, isToppedUp: true, isWiped: true, createdAt: AT,
    }).run();
    barrels.set(name, { vesselId, fillId, pullId });
  }
  return { db, cellarId, barrels, as: (role) => accessOf(people.get(role)!, slug)! };
}

/** A fresh database with one cellar. */
export const makeScene = (barrelNames: readonly string[]): Scene => addCellar(testDb(), 'pellow', barrelNames);

export interface Design {
  method: Method;
  barrels: readonly string[];
  lines?: readonly { name: string; phase: Phase; kind?: ItemKind }[];
  seats: number;
  replicates: number;
}

/** A draft of that design, led by the leader. @returns its id */
export function addDraft(scene: Scene, design: Design): string {
  const { db, cellarId } = scene;
  const sessionId = newId();
  db.insert(sessions).values({
    id: sessionId, cellarId, state: 'draft', method: design.method, title: 'Wednesday tasting', instruction: 'Taste and spit.', privateQuestion: 'Which barrel is the most bitter?',
    leaderId: scene.as('leader').user.id, seatsPlanned: design.seats, reservesPlanned: 1, replicates: design.replicates, alpha: 0.05, servingTemperatureC: 16,
    servingVolumeMl: 30, restS: 60, allergens: ['sulfites'], createdAt: AT,
  }).run();
  db.insert(sessionPourers).values({ cellarId, sessionId, userId: scene.as('cellar_hand').user.id }).run();
  design.barrels.forEach((name, index) => {
    const sampleId = newId();
    db.insert(samples).values({ id: sampleId, cellarId, sessionId, ordinal: index + 1, label: `Barrel ${name}` }).run();
    db.insert(sampleComponents).values({ cellarId, sampleId, pullId: scene.barrels.get(name)!.pullId, share: 1 }).run();
  });
  (design.lines ?? []).forEach(({ name, phase, kind }, index) => {
    const descriptorId = newId();
    const words = { name, definition: `How ${name.toLowerCase()} it is`, lowAnchor: 'none', highAnchor: 'very strong' };
    db.insert(descriptors).values({ id: descriptorId, cellarId, key: `own-${descriptorId}`, sense: 'taste', family: 'Test', phase, createdAt: AT, ...words }).run();
    db.insert(ballotItems).values({ id: newId(), cellarId, sessionId, position: index + 1, phase, kind: kind ?? 'line', descriptorId, ...words }).run();
  });
  return sessionId;
}

/** A tasting that is open, with the key in the test's hand so that it can say what each glass gets. */
export interface Tasting {
  sessionId: string;
  seats: { id: string; number: number }[];
  /** Position of a sample's glass in a block of a seat (profile). */
  positionOf(seat: number, block: number, sample: number): number;
  samplesOf(seat: number, block: number): number[];
  say(seat: number, body: OperationBody, more?: { seq?: number; generation?: number; isLate?: boolean }): void;
  submit(seat: number): void;
}

export function openTasting(scene: Scene, design: Design, taken = design.seats): Tasting {
  const { db, cellarId } = scene;
  const sessionId = addDraft(scene, design);
  sealSession(scene.as('leader'), sessionId);
  openSession(scene.as('leader'), sessionId);
  const own = db.select().from(seats).where(eq(seats.sessionId, sessionId)).orderBy(asc(seats.number)).all();
  for (const seat of own.slice(0, taken)) {
    db.update(seats).set({ claimedAt: AT, consentedAt: AT, seatRole: 'taste', tokenGeneration: 1 }).where(eq(seats.id, seat.id)).run();
    db.insert(seatPeople).values({ seatId: seat.id, cellarId, displayName: `Guest ${seat.number}` }).run();
  }
  const plan = takeOut(db, cellarId, sessionId).servings;
  const seqs = new Map<number, number>();
  const say: Tasting['say'] = (seat, body, more = {}) => {
    const seq = more.seq ?? (seqs.get(seat) ?? 0) + 1;
    seqs.set(seat, Math.max(seq, seqs.get(seat) ?? 0));
    db.insert(operations).values({
      opId: newId(), cellarId, sessionId, seatId: own[seat - 1]!.id, tokenGeneration: more.generation ?? 1, deviceId: newId(), seq, kind: body.kind, ...valuesOf(body),
      bodyHash: sha256Hex(JSON.stringify(body)), clientAt: AT, receivedAt: AT, admission: more.isLate ? 'late' : 'counted',
    }).run();
  };
  return {
    sessionId, seats: own.map(({ id, number }) => ({ id, number })), say,
    positionOf: (seat, block, sample) => plan.find((s) => s.seat === seat && s.block === block && s.sample === sample)!.position,
    samplesOf: (seat, block) => plan.filter((s) => s.seat === seat && s.block === block).sort((a, b) => a.position - b.position).map((s) => s.sample),
    submit: (seat) => {
      say(seat, { kind: 'submit' });
      db.update(seats).set({ submittedAt: AT }).where(and(eq(seats.id, own[seat - 1]!.id))).run();
    },
  };
}

/** Every number in a value, however deep, with its path: to look for what is not a number. */
export function numbersIn(value: unknown, path = ''): { path: string; value: number }[] {
  if (typeof value === 'number') return [{ path, value }];
  if (value === null || typeof value !== 'object') return [];
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}.${key}`));
}
