import 'server-only';
import { getDb, type Db } from '@/db/client';
import { operations, seats, sessions } from '@/db/schema';
import { and, eq, isNotNull, sql } from 'drizzle-orm';

/**
 * The statements of a delivery, prepared once a connection: they run for every tap of every phone.
 * Prepared on the connection, they run inside whatever transaction is open on it.
 */
function prepare(db: Db) {
  const p = sql.placeholder;
  return {
    sessionByJoinKey: db.select().from(sessions).where(eq(sessions.joinKey, p('joinKey'))).prepare(),
    heldSeat: db.select().from(seats).where(and(eq(seats.id, p('seatId')), eq(seats.sessionId, p('sessionId')), isNotNull(seats.claimedAt))).prepare(),
    present: db.select({ state: sessions.state, generation: seats.tokenGeneration }).from(seats).innerJoin(sessions, eq(sessions.id, seats.sessionId)).where(eq(seats.id, p('seatId'))).prepare(),
    knownOperation: db
      .select({ seatId: operations.seatId, bodyHash: operations.bodyHash, receiptNo: operations.receiptNo, admission: operations.admission })
      .from(operations)
      .where(eq(operations.opId, p('opId')))
      .prepare(),
    heard: db.update(seats).set({ lastHeardAt: p('at') as never, onPhone: p('onPhone') as never }).where(eq(seats.id, p('seatId'))).prepare(),
    keepOperation: db
      .insert(operations)
      .values({
        opId: p('opId'), cellarId: p('cellarId'), sessionId: p('sessionId'), seatId: p('seatId'), tokenGeneration: p('tokenGeneration'), deviceId: p('deviceId'),
        seq: p('seq'), kind: p('kind'), block: p('block'), position: p('position'), item: p('item'), valueNumber: p('valueNumber'), valueText: p('valueText'),
        isGuess: p('isGuess'), bodyHash: p('bodyHash'), clientAt: p('clientAt'), receivedAt: p('receivedAt'), admission: p('admission'),
      })
      .prepare(),
  };
}

const prepared = new WeakMap<Db, ReturnType<typeof prepare>>();

/** The prepared statements of the process's connection. */
export function statements(): ReturnType<typeof prepare> {
  const db = getDb();
  let found = prepared.get(db);
  if (!found) {
    found = prepare(db);
    prepared.set(db, found);
  }
  return found;
}
