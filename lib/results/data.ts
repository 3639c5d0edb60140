import 'server-only';
import type { Db, Tx } from '@/db/client';
import type { PourStep } from '@/db/enums';
import { ballotItems, earlyOpenings, fills, lots, operations, pulls, sampleComponents, samples, seals, seatPeople, seats, servingSamples, servings, sessionPourers, users, vessels } from '@/db/schema';
import { and, asc, eq } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import type { SessionRow } from '../sessions/find';
import { showDay } from '../time';
import type { GlassFact, OperationFact, SeatFact } from './evidence';
import type { ComponentView, SampleView } from './types';

type Reader = Tx | Db;

/** Every operation of the session, late ones too, in the order of receipt. */
export function listOperations(db: Reader, session: SessionRow): OperationFact[] {
  return db
    .select({
      seatId: operations.seatId, tokenGeneration: operations.tokenGeneration, seq: operations.seq, receiptNo: operations.receiptNo,
      kind: operations.kind, block: operations.block, position: operations.position, item: operations.item,
      number: operations.valueNumber, text: operations.valueText, isGuess: operations.isGuess, admission: operations.admission,
    })
    .from(operations)
    .where(and(eq(operations.sessionId, session.id), eq(operations.cellarId, session.cellarId)))
    .orderBy(asc(operations.receiptNo))
    .all()
    .map(({ admission, ...op }) => ({ ...op, isLate: admission === 'late' }));
}

/** All seats of the session by number. */
export function listSeats(db: Reader, session: SessionRow): SeatFact[] {
  return db
    .select({
      id: seats.id, number: seats.number, isReserve: seats.isReserve, claimedAt: seats.claimedAt, submittedAt: seats.submittedAt,
      leftAt: seats.leftAt, role: seats.seatRole, name: seatPeople.displayName,
    })
    .from(seats)
    .leftJoin(seatPeople, eq(seatPeople.seatId, seats.id))
    .where(and(eq(seats.sessionId, session.id), eq(seats.cellarId, session.cellarId)))
    .orderBy(asc(seats.number))
    .all()
    .map((seat) => ({
      id: seat.id, number: seat.number, isReserve: seat.isReserve, isClaimed: seat.claimedAt !== null, isSubmitted: seat.submittedAt !== null,
      hasLeft: seat.leftAt !== null, role: seat.role ?? 'taste', name: seat.name?.trim() || null,
    }));
}

/** Every glass with its sample. Empty until unsealing has written the key. */
export function listGlasses(db: Reader, session: SessionRow): GlassFact[] {
  return db
    .select({ seatId: servings.seatId, block: servings.block, position: servings.position, code: servings.code, sample: samples.ordinal })
    .from(servings)
    .innerJoin(servingSamples, eq(servingSamples.servingId, servings.id))
    .innerJoin(samples, eq(samples.id, servingSamples.sampleId))
    .where(and(eq(servings.sessionId, session.id), eq(servings.cellarId, session.cellarId)))
    .orderBy(asc(servings.seatId), asc(servings.block), asc(servings.position))
    .all();
}

/** The samples with the barrels that they came from. */
export function listSamples(db: Reader, session: SessionRow, timeZone: string): Omit<SampleView, 'codes'>[] {
  const parts = db
    .select({
      sampleId: sampleComponents.sampleId, share: sampleComponents.share, pulledAt: pulls.pulledAt, drawMethod: pulls.drawMethod, fillId: fills.id,
      vesselId: vessels.id, vessel: vessels.name, vesselKind: vessels.kind, cooper: vessels.cooper, woodSpecies: vessels.woodSpecies,
      woodOrigin: vessels.woodOrigin, toast: vessels.toast, year: vessels.year, lot: lots.code, lotName: lots.name,
    })
    .from(sampleComponents)
    .innerJoin(samples, eq(samples.id, sampleComponents.sampleId))
    .innerJoin(pulls, eq(pulls.id, sampleComponents.pullId))
    .innerJoin(fills, eq(fills.id, pulls.fillId))
    .innerJoin(vessels, eq(vessels.id, fills.vesselId))
    .innerJoin(lots, eq(lots.id, fills.lotId))
    .where(and(eq(samples.sessionId, session.id), eq(samples.cellarId, session.cellarId)))
    .orderBy(asc(vessels.name))
    .all();
  const componentsOf = (sampleId: string): ComponentView[] =>
    parts.filter((part) => part.sampleId === sampleId).map(({ sampleId: _, pulledAt, ...part }) => ({ ...part, pulledOn: showDay(pulledAt, timeZone) }));
  return db
    .select()
    .from(samples)
    .where(and(eq(samples.sessionId, session.id), eq(samples.cellarId, session.cellarId)))
    .orderBy(asc(samples.ordinal))
    .all()
    .map((row) => ({ sample: row.ordinal, id: row.id, label: row.label, isControl: row.isControl, components: componentsOf(row.id) }));
}

/** The ballot as it was sealed. */
export const listItems = (db: Reader, session: SessionRow) =>
  db
    .select({
      item: ballotItems.position, kind: ballotItems.kind, phase: ballotItems.phase, name: ballotItems.name, definition: ballotItems.definition,
      lowAnchor: ballotItems.lowAnchor, highAnchor: ballotItems.highAnchor,
    })
    .from(ballotItems)
    .where(and(eq(ballotItems.sessionId, session.id), eq(ballotItems.cellarId, session.cellarId)))
    .orderBy(asc(ballotItems.position))
    .all();

export type ItemFact = ReturnType<typeof listItems>[number];

const approvers = alias(users, 'approvers');

/** Every request to open early, granted or not. It stays with the results for ever. */
export const listEarlyOpenings = (db: Reader, session: SessionRow) =>
  db
    .select({
      code: earlyOpenings.code, reason: earlyOpenings.reason, requestedAt: earlyOpenings.requestedAt, requestedBy: users.name,
      approvedBy: approvers.name, approvedAt: earlyOpenings.approvedAt, refusedAt: earlyOpenings.refusedAt,
    })
    .from(earlyOpenings)
    .innerJoin(users, eq(users.id, earlyOpenings.requestedBy))
    .leftJoin(approvers, eq(approvers.id, earlyOpenings.approvedBy))
    .where(and(eq(earlyOpenings.sessionId, session.id), eq(earlyOpenings.cellarId, session.cellarId)))
    .orderBy(asc(earlyOpenings.requestedAt))
    .all();

/** Leader, pourers and commitment, for the report. */
export function readFrame(db: Reader, session: SessionRow): { leader: string; pourers: { name: string; step: PourStep }[]; commitment: string | null } {
  const leader = db.select({ name: users.name }).from(users).where(eq(users.id, session.leaderId)).get();
  const pourers = db
    .select({ name: users.name, step: sessionPourers.step })
    .from(sessionPourers)
    .innerJoin(users, eq(users.id, sessionPourers.userId))
    .where(and(eq(sessionPourers.sessionId, session.id), eq(sessionPourers.cellarId, session.cellarId)))
    .orderBy(asc(users.name))
    .all();
  const seal = db.select({ commitment: seals.commitment }).from(seals).where(and(eq(seals.sessionId, session.id), eq(seals.cellarId, session.cellarId))).get();
  return { leader: leader?.name ?? '', pourers, commitment: seal?.commitment ?? null };
}
