import 'server-only';
import { getDb, type Tx } from '@/db/client';
import { PHASES, type ItemKind, type Phase, type PourStep } from '@/db/enums';
import { ballotItems, descriptors, oneTimeLinks, pulls, fills, sampleComponents, samples, seatPeople, seats, sessionPourers, sessions, vessels } from '@/db/schema';
import { and, eq, inArray } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import { requireCapability, type Access } from '../auth/access';
import { createLink } from '../auth/links';
import { now } from '../clock';
import { AppError } from '../errors';
import { newId } from '../ids';
import { overallLiking } from '../lexicon/overall-liking';
import { factsOf } from '../methods/facts';
import { fromLocalInput } from '../time';
import { listDescriptors, listMembers } from './data';
import { findSession, requireState } from './find';
import type { DraftInput } from './schema';

/** @throws AppError `invalid` when a chosen pull is not the cellar's */
function writeSamples(tx: Tx, cellarId: string, sessionId: string, input: DraftInput): void {
  const old = tx.select({ id: samples.id }).from(samples).where(eq(samples.sessionId, sessionId)).all().map((row) => row.id);
  if (old.length > 0) tx.delete(sampleComponents).where(inArray(sampleComponents.sampleId, old)).run();
  tx.delete(samples).where(eq(samples.sessionId, sessionId)).run();
  const chosen = input.pulls.length === 0 ? [] : tx
    .select({ id: pulls.id, vessel: vessels.name, kind: vessels.kind })
    .from(pulls)
    .innerJoin(fills, eq(fills.id, pulls.fillId))
    .innerJoin(vessels, eq(vessels.id, fills.vesselId))
    .where(and(eq(pulls.cellarId, cellarId), inArray(pulls.id, input.pulls)))
    .all();
  if (chosen.length !== new Set(input.pulls).size) throw new AppError('invalid', 'A chosen pull is not there any more.', { pulls: 'Choose again' });
  const labels = new Set<string>();
  chosen.sort((a, b) => a.vessel.localeCompare(b.vessel, 'en', { numeric: true }));
  const insert = (label: string, ordinal: number, isControl: boolean): string => {
    const id = newId();
    let unique = label;
    for (let i = 2; labels.has(unique); i += 1) unique = `${label} (${i})`;
    labels.add(unique);
    tx.insert(samples).values({ id, cellarId, sessionId, ordinal, label: unique, isControl }).run();
    return id;
  };
  chosen.forEach((pull, index) => {
    const kind = pull.kind.charAt(0).toUpperCase() + pull.kind.slice(1);
    const sampleId = insert(`${kind} ${pull.vessel}`, index + 1, false);
    tx.insert(sampleComponents).values({ cellarId, sampleId, pullId: pull.id, share: 1 }).run();
  });
  if (input.controlLabel) insert(input.controlLabel, chosen.length + 1, true);
}

interface WantedItem {
  id: string;
  phase: Phase;
  kind: ItemKind;
}

/** The ballot's lines by the method's rule: the leader's choice, or the whole lexicon, and what the method asks by itself. */
function wantedItems(tx: Tx, cellarId: string, input: DraftInput, lexicon: readonly (typeof descriptors.$inferSelect)[]): WantedItem[] {
  const rule = factsOf(input.method).items;
  if (!rule) return [];
  const lines: WantedItem[] =
    rule.from === 'whole'
      ? lexicon.slice(0, rule.max).map(({ id, phase }) => ({ id, phase, kind: rule.kind }))
      : rule.from === 'chosen'
        ? [...new Set(input.lines)].slice(0, rule.max).map((line) => ({ id: line.slice(0, 36), phase: line.slice(37) as Phase, kind: rule.kind }))
        : [];
  const flags: WantedItem[] = rule.hasFlags ? [...new Set(input.flags)].map((id) => ({ id, phase: 'nose', kind: 'flag' })) : [];
  const liking: WantedItem[] = rule.asksLiking ? [{ id: overallLiking(tx, cellarId).id, phase: 'after', kind: 'liking' }] : [];
  return [...lines, ...flags, ...liking];
}

/** @throws AppError `invalid` when a descriptor is not in the cellar's lexicon */
function writeBallot(tx: Tx, cellarId: string, sessionId: string, input: DraftInput): void {
  tx.delete(ballotItems).where(eq(ballotItems.sessionId, sessionId)).run();
  const entries = listDescriptors(tx, cellarId);
  const wanted = wantedItems(tx, cellarId, input, entries);
  const lexicon = new Map([...entries, ...(wanted.some((item) => item.kind === 'liking') ? [overallLiking(tx, cellarId)] : [])].map((entry) => [entry.id, entry]));
  // In the order in which a glass is tasted; within a part as chosen.
  wanted.sort((a, b) => PHASES.indexOf(a.phase) - PHASES.indexOf(b.phase));
  const seen = new Set<string>();
  let position = 0;
  for (const { id, phase, kind } of wanted) {
    const entry = lexicon.get(id);
    if (!entry) throw new AppError('invalid', 'A chosen descriptor is not in the lexicon any more.', { lines: 'Choose again' });
    if (seen.has(`${id}/${phase}`)) continue;
    seen.add(`${id}/${phase}`);
    position += 1;
    tx.insert(ballotItems).values({
      id: newId(), cellarId, sessionId, position, phase, kind, descriptorId: id,
      name: entry.name, definition: entry.definition, lowAnchor: entry.lowAnchor, highAnchor: entry.highAnchor,
    }).run();
  }
}

function writePourers(tx: Tx, cellarId: string, sessionId: string, input: DraftInput): void {
  const members = new Set(listMembers(tx, cellarId).map((member) => member.id));
  if (!members.has(input.leaderId)) throw new AppError('invalid', 'The leader must be a member.', { leaderId: 'Choose a member' });
  tx.delete(sessionPourers).where(eq(sessionPourers.sessionId, sessionId)).run();
  const named: { userId: string; step: PourStep }[] =
    input.coding === 'two_step'
      ? [...(input.letteredBy ? [{ userId: input.letteredBy, step: 'letters' as const }] : []), ...(input.codedBy ? [{ userId: input.codedBy, step: 'codes' as const }] : [])]
      : [...new Set(input.pourers)].map((userId) => ({ userId, step: 'key' as const }));
  for (const { userId, step } of named) {
    if (!members.has(userId)) throw new AppError('invalid', 'Who pours must be a member.', { pourers: 'Choose members' });
    tx.insert(sessionPourers).values({ cellarId, sessionId, userId, step }).run();
  }
}

/**
 * Saves a session's design: a new draft, or a change of one.
 * @returns the session's id
 * @throws AppError `forbidden`, `not_found`, `wrong_state` (sealed before), `stale`, `invalid`
 */
export function saveDraft(access: Access, input: DraftInput): string {
  requireCapability(access, 'session.design');
  const { cellar } = access;
  const values = {
    method: input.method, coding: input.coding, title: input.title, instruction: input.instruction, privateQuestion: input.privateQuestion,
    leaderId: input.leaderId, scheduledFor: input.scheduledFor ? fromLocalInput(input.scheduledFor, cellar.timeZone) : null,
    seatsPlanned: input.seatsPlanned, reservesPlanned: input.reservesPlanned, replicates: input.replicates, alpha: input.alpha,
    servingTemperatureC: input.servingTemperatureC ?? null, servingVolumeMl: input.servingVolumeMl, restS: input.restS, allergens: input.allergens,
  };
  return getDb().transaction((tx) => {
    let sessionId = input.sessionId;
    if (sessionId) {
      const session = findSession(tx, cellar.id, sessionId);
      requireState(session, 'draft');
      const changed = tx.update(sessions).set({ ...values, version: session.version + 1 }).where(and(eq(sessions.id, sessionId), eq(sessions.version, input.version ?? 0))).run();
      if (changed.changes !== 1) throw new AppError('stale');
    } else {
      sessionId = newId();
      tx.insert(sessions).values({ id: sessionId, cellarId: cellar.id, state: 'draft', createdAt: now(), ...values }).run();
    }
    writeSamples(tx, cellar.id, sessionId, input);
    writeBallot(tx, cellar.id, sessionId, input);
    writePourers(tx, cellar.id, sessionId, input);
    recordAudit(tx, {
      cellarId: cellar.id, sessionId, actorUserId: access.user.id, action: input.sessionId ? 'session.designed' : 'session.created',
      subjectType: 'session', subjectId: sessionId,
    });
    return sessionId;
  }, { behavior: 'immediate' });
}

/** A new draft with the design of another session. @returns its id */
export function duplicateSession(access: Access, sessionId: string): string {
  requireCapability(access, 'session.design');
  return getDb().transaction((tx) => {
    const from = findSession(tx, access.cellar.id, sessionId);
    const id = newId();
    tx.insert(sessions).values({
      id, cellarId: from.cellarId, state: 'draft', method: from.method, coding: from.coding, title: from.title, instruction: from.instruction, privateQuestion: from.privateQuestion,
      leaderId: access.user.id, seatsPlanned: from.seatsPlanned, reservesPlanned: from.reservesPlanned, replicates: from.replicates, alpha: from.alpha,
      servingTemperatureC: from.servingTemperatureC, servingVolumeMl: from.servingVolumeMl, restS: from.restS, allergens: from.allergens, createdAt: now(),
    }).run();
    for (const item of tx.select().from(ballotItems).where(eq(ballotItems.sessionId, sessionId)).all()) {
      tx.insert(ballotItems).values({ ...item, id: newId(), sessionId: id }).run();
    }
    recordAudit(tx, { cellarId: from.cellarId, sessionId: id, actorUserId: access.user.id, action: 'session.created', subjectType: 'session', subjectId: id });
    return id;
  }, { behavior: 'immediate' });
}

/** The seat of that number. @throws AppError `not_found` */
function findSeat(tx: Tx, access: Access, sessionId: string, number: number) {
  const session = findSession(tx, access.cellar.id, sessionId);
  const seat = tx.select().from(seats).where(and(eq(seats.sessionId, session.id), eq(seats.number, number))).get();
  if (!seat) throw new AppError('not_found');
  return { session, seat };
}

/**
 * A one-time link that moves a seat to another phone. Older links of the seat die.
 * @returns the token
 */
export function reissueSeat(access: Access, sessionId: string, number: number): string {
  requireCapability(access, 'session.run');
  return getDb().transaction((tx) => {
    const { session, seat } = findSeat(tx, access, sessionId, number);
    requireState(session, 'open', 'closed');
    if (!seat.claimedAt) throw new AppError('conflict', 'Nobody has taken that seat yet.');
    tx.update(oneTimeLinks).set({ usedAt: now() }).where(and(eq(oneTimeLinks.seatId, seat.id))).run();
    recordAudit(tx, { cellarId: seat.cellarId, sessionId, actorUserId: access.user.id, action: 'seat.link_made', subjectType: 'seat', subjectId: seat.id, detail: { number } });
    return createLink(tx, { purpose: 'seat', seatId: seat.id, createdBy: access.user.id });
  }, { behavior: 'immediate' });
}

/** Erases the name of a seat; its answers stay as evidence. */
export function eraseSeatName(access: Access, sessionId: string, number: number): void {
  requireCapability(access, 'session.run');
  getDb().transaction((tx) => {
    const { session, seat } = findSeat(tx, access, sessionId, number);
    requireState(session, 'closed', 'unsealed', 'abandoned');
    tx.update(seatPeople).set({ displayName: '', userId: null }).where(eq(seatPeople.seatId, seat.id)).run();
    recordAudit(tx, { cellarId: seat.cellarId, sessionId, actorUserId: access.user.id, action: 'seat.name_erased', subjectType: 'seat', subjectId: seat.id, detail: { number } });
  }, { behavior: 'immediate' });
}
