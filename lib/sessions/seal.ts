import 'server-only';
import { getDb, type Tx } from '@/db/client';
import { ballotItems, descriptors, fills, lots, pulls, sampleComponents, samples, seats, servings, sessions, vessels } from '@/db/schema';
import { and, asc, eq } from 'drizzle-orm';
import { randomBytes, randomInt } from 'node:crypto';
import { shuffled } from '@/stats';
import { recordAudit } from '../audit/record';
import { requireCapability, type Access } from '../auth/access';
import type { PlanFile } from '../blind/plan-file';
import { putAway } from '../blind/vault';
import { AppError } from '../errors';
import { now } from '../clock';
import { newId } from '../ids';
import { methodOf } from '../methods';
import { systemDraw } from '../methods/draw';
import type { Draw } from '../methods/types';
import { findSession, requireState, type SessionRow } from './find';
import { listMissing } from './readiness';

const JOIN_KEY_ALPHABET = 'abcdefghijklmnopqrstuvwxyz234567';

/** 80 random bits for the link that a QR code carries. */
const newJoinKey = () => Array.from(randomBytes(16), (byte) => JOIN_KEY_ALPHABET[byte % 32]).join('');

/** Six digits that no other session in use has. */
function newJoinCode(tx: Tx): string {
  for (let tries = 0; tries < 50; tries += 1) {
    const code = String(randomInt(100_000, 1_000_000));
    if (!tx.select({ id: sessions.id }).from(sessions).where(eq(sessions.joinCode, code)).get()) return code;
  }
  throw new AppError('busy', 'No join code is free just now. Close an older session.');
}

/** Sealing copies the lexicon's words, so that later edits there change nothing here. */
function fixBallot(tx: Tx, session: SessionRow): PlanFile['ballot'] {
  const lines = tx
    .select({ id: ballotItems.id, item: ballotItems.position, phase: ballotItems.phase, kind: ballotItems.kind, descriptor: descriptors })
    .from(ballotItems)
    .innerJoin(descriptors, eq(descriptors.id, ballotItems.descriptorId))
    .where(eq(ballotItems.sessionId, session.id))
    .orderBy(asc(ballotItems.position))
    .all();
  return lines.map(({ id, item, phase, kind, descriptor }) => {
    const { name, definition, lowAnchor, highAnchor } = descriptor;
    tx.update(ballotItems).set({ name, definition, lowAnchor, highAnchor }).where(eq(ballotItems.id, id)).run();
    return { item, phase, kind, name };
  });
}

function describeSamples(tx: Tx, session: SessionRow): PlanFile['samples'] {
  const own = tx.select().from(samples).where(eq(samples.sessionId, session.id)).orderBy(asc(samples.ordinal)).all();
  return own.map((sample, index) => ({
    sample: index + 1,
    label: sample.label,
    components: tx
      .select({ vessel: vessels.name, lot: lots.code, pulledAt: pulls.pulledAt, share: sampleComponents.share })
      .from(sampleComponents)
      .innerJoin(pulls, eq(pulls.id, sampleComponents.pullId))
      .innerJoin(fills, eq(fills.id, pulls.fillId))
      .innerJoin(vessels, eq(vessels.id, fills.vesselId))
      .innerJoin(lots, eq(lots.id, fills.lotId))
      .where(eq(sampleComponents.sampleId, sample.id))
      .orderBy(asc(vessels.name))
      .all()
      .map((part) => ({ ...part, pulledAt: part.pulledAt.toISOString() })),
  }));
}

/** Which lettered bottle each sample goes into, drawn apart from the codes. */
const drawLetters = (count: number, draw: Draw) => shuffled(Array.from({ length: count }, (_, i) => String.fromCharCode(65 + i)), draw).map((letter, i) => ({ sample: i + 1, letter }));

/** The sample of a constant reference: the control, or else the first. */
function referenceOf(tx: Tx, sessionId: string): number {
  const own = tx.select({ isControl: samples.isControl }).from(samples).where(eq(samples.sessionId, sessionId)).orderBy(asc(samples.ordinal)).all();
  return Math.max(1, own.findIndex((sample) => sample.isControl) + 1);
}

/** Numbered seats, then reserves: each with its own plan. @returns the seats' ids in order */
function makeSeats(tx: Tx, session: SessionRow): string[] {
  const count = session.seatsPlanned + session.reservesPlanned;
  const ids = Array.from({ length: count }, newId);
  ids.forEach((id, index) => {
    tx.insert(seats).values({ id, cellarId: session.cellarId, sessionId: session.id, number: index + 1, isReserve: index >= session.seatsPlanned }).run();
  });
  return ids;
}

/**
 * Fixes the serving plan, draws the codes, puts the key away encrypted and publishes the
 * commitment. From here on nothing of the session's design can change.
 * @param draw the source of chance; the system's unless a test passes a seeded one
 * @returns the commitment (SHA-256 of the plan file, hex)
 * @throws AppError `forbidden`, `not_found`, `wrong_state`, `invalid` (what is missing)
 */
export function sealSession(access: Access, sessionId: string, draw: Draw = systemDraw): string {
  requireCapability(access, 'session.design');
  return getDb().transaction((tx) => {
    const session = findSession(tx, access.cellar.id, sessionId);
    requireState(session, 'draft');
    const missing = listMissing(tx, session);
    if (missing.length > 0) throw new AppError('invalid', missing.join(' '));

    const sealedAt = now();
    const ballot = fixBallot(tx, session);
    const described = describeSamples(tx, session);
    const seatIds = makeSeats(tx, session);
    const planned = methodOf(session.method).plan({ sampleCount: described.length, seatCount: seatIds.length, replicates: session.replicates, reference: referenceOf(tx, session.id) }, draw);
    for (const { seat, block, position, code } of planned) {
      tx.insert(servings).values({ id: newId(), cellarId: session.cellarId, sessionId, seatId: seatIds[seat - 1]!, block, position, code }).run();
    }
    const commitment = putAway(tx, session.cellarId, {
      format: 'tercet-plan-1',
      session: { id: sessionId, title: session.title, method: session.method, sealedAt: sealedAt.toISOString() },
      salt: randomBytes(32).toString('hex'),
      samples: described,
      ...(session.coding === 'two_step' && { letters: drawLetters(described.length, draw) }),
      ballot,
      servings: planned.map(({ seat, block, position, code, sample }) => ({ seat, block, position, code, sample })),
    }, sealedAt);
    tx.update(sessions)
      .set({ state: 'sealed', sealedAt, joinCode: newJoinCode(tx), joinKey: newJoinKey(), version: session.version + 1 })
      .where(and(eq(sessions.id, sessionId), eq(sessions.state, 'draft')))
      .run();
    recordAudit(tx, {
      cellarId: session.cellarId, sessionId, actorUserId: access.user.id, action: 'session.sealed',
      subjectType: 'session', subjectId: sessionId, detail: { commitment, seats: seatIds.length, servings: planned.length },
    });
    return commitment;
  }, { behavior: 'immediate' });
}
