import 'server-only';
import type { Db } from '@/db/client';
import { ballotItems, operations, samples, seatPeople, seats, servings } from '@/db/schema';
import { and, asc, eq, lte } from 'drizzle-orm';
import { takeOut } from '../blind/vault';
import { newId, sha256Hex } from '../ids';
import type { OperationBody } from '../ballots/schema';
import { valuesOf } from '../ballots/values';
import { scoreOf, simulatePanel, type Chance } from './panel';
import { PANEL } from './people';

type SeatRow = typeof seats.$inferSelect;

function claim(db: Db, seat: SeatRow, name: string, userId: string | null, at: Date): void {
  db.update(seats).set({ claimedAt: at, consentedAt: at, seatRole: 'taste', tokenGeneration: 1, lastHeardAt: at }).where(eq(seats.id, seat.id)).run();
  db.insert(seatPeople).values({ seatId: seat.id, cellarId: seat.cellarId, displayName: name, userId }).run();
}

/** Says something for a seat of the demo, in the shape in which a phone would have sent it. */
function say(db: Db, seat: SeatRow, seq: number, deviceId: string, body: OperationBody, at: Date): void {
  db.insert(operations).values({
    opId: newId(), cellarId: seat.cellarId, sessionId: seat.sessionId, seatId: seat.id, tokenGeneration: 1, deviceId, seq, kind: body.kind,
    ...valuesOf(body),
    bodyHash: sha256Hex(JSON.stringify(body)), clientAt: at, receivedAt: at, admission: 'counted',
  }).run();
}

function handIn(db: Db, seat: SeatRow, seq: number, deviceId: string, at: Date): void {
  say(db, seat, seq, deviceId, { kind: 'submit' }, at);
  db.update(seats).set({ submittedAt: at }).where(eq(seats.id, seat.id)).run();
}

const seatsOf = (db: Db, sessionId: string, upTo: number) =>
  db.select().from(seats).where(and(eq(seats.sessionId, sessionId), lte(seats.number, upTo))).orderBy(asc(seats.number)).all();

const glassesOf = (db: Db, seatId: string) =>
  db.select().from(servings).where(eq(servings.seatId, seatId)).orderBy(asc(servings.block), asc(servings.position)).all();

/** True intensity of each sample (by label) on each line (by descriptor name); what isn't named is level. */
export type PlantedProfile = Record<string, Record<string, number>>;

/**
 * Lets a simulated panel taste a profile session. Its scores follow the planted intensities.
 * @param glassesEach how many glasses each seat has done; all of them, and handed in, when left out
 */
export function tasteProfile(db: Db, cellarId: string, sessionId: string, planted: PlantedProfile, chance: Chance, seatsTaken: number, at: Date, glassesEach?: number[]): void {
  const plan = takeOut(db, cellarId, sessionId);
  const labels = db.select().from(samples).where(eq(samples.sessionId, sessionId)).orderBy(asc(samples.ordinal)).all().map((row) => row.label);
  const lines = db.select().from(ballotItems).where(and(eq(ballotItems.sessionId, sessionId), eq(ballotItems.kind, 'line'))).orderBy(asc(ballotItems.position)).all();
  const sampleAt = new Map(plan.servings.map((s) => [`${s.seat}/${s.block}/${s.position}`, labels[s.sample - 1]!]));
  const panel = simulatePanel(seatsTaken, chance);
  seatsOf(db, sessionId, seatsTaken).forEach((seat, index) => {
    claim(db, seat, PANEL[index % PANEL.length]!, null, at);
    const deviceId = newId();
    let seq = 0;
    const glasses = glassesOf(db, seat.id).slice(0, glassesEach?.[index]);
    for (const glass of glasses) {
      const label = sampleAt.get(`${seat.number}/${glass.block}/${glass.position}`)!;
      for (const line of lines) {
        const intensities = labels.map((other) => planted[other]?.[line.name] ?? 40);
        const centre = intensities.reduce((sum, value) => sum + value, 0) / intensities.length;
        const value = scoreOf(panel[index]!, planted[label]?.[line.name] ?? 40, centre, chance);
        say(db, seat, ++seq, deviceId, { kind: 'score', block: glass.block, position: glass.position, item: line.position, value }, at);
      }
    }
    if (glassesEach) db.update(seats).set({ atBlock: 1, atPosition: Math.min(glasses.length + 1, labels.length), atPhase: 'nose' }).where(eq(seats.id, seat.id)).run();
    else handIn(db, seat, ++seq, deviceId, at);
  });
}

/** Lets a panel taste a triangle session: `correct` of the seats, scattered over the table, find the odd glass. */
export function tasteTriangle(db: Db, cellarId: string, sessionId: string, seatsTaken: number, correct: number, at: Date): void {
  const plan = takeOut(db, cellarId, sessionId);
  seatsOf(db, sessionId, seatsTaken).forEach((seat, index) => {
    claim(db, seat, PANEL[index % PANEL.length]!, null, at);
    const deviceId = newId();
    const set = plan.servings.filter((s) => s.seat === seat.number && s.block === 1);
    const odd = set.find((glass) => set.filter((other) => other.sample === glass.sample).length === 1)!;
    // Five and twelve have no common factor: the finders sit apart.
    const rank = (index * 5) % seatsTaken;
    const chosen = rank < correct ? odd : set.find((glass) => glass !== odd)!;
    say(db, seat, 1, deviceId, { kind: 'choice', block: 1, position: chosen.position, isGuess: rank >= correct + 2 }, at);
    handIn(db, seat, 2, deviceId, at);
  });
}
