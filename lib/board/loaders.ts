import 'server-only';
import { getDb } from '@/db/client';
import type { OperationKind } from '@/db/enums';
import { operations, seatPeople, seats, servings } from '@/db/schema';
import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import type { Access } from '../auth/access';
import { requireCapability } from '../auth/access';
import { factsOf } from '../methods/facts';
import { findSession } from '../sessions/find';
import { seatLabel } from '../seats/format';
import type { Board } from './types';

/**
 * Where everybody is.
 * @throws AppError `forbidden`, `not_found`
 */
export function readBoard(access: Access, sessionId: string): Board {
  requireCapability(access, 'session.run');
  const db = getDb();
  const session = findSession(db, access.cellar.id, sessionId);
  const { ballot, unit: unitOf } = factsOf(session.method);
  const isSets = unitOf === 'set';
  const kinds: OperationKind[] = ballot.kind === 'pick' ? ['choice'] : ballot.kind === 'order' ? ['order'] : ballot.kind === 'note' ? ['score', 'comment'] : ['score', 'fault'];
  const rows = db
    .select({ seat: seats, name: seatPeople.displayName })
    .from(seats)
    .leftJoin(seatPeople, eq(seatPeople.seatId, seats.id))
    .where(eq(seats.sessionId, session.id))
    .orderBy(asc(seats.number))
    .all();
  const unit = isSets ? sql<number>`count(distinct ${operations.block})` : sql<number>`count(distinct ${operations.block} * 100 + ${operations.position})`;
  const received = new Map(
    db
      .select({ seatId: operations.seatId, units: unit })
      .from(operations)
      .where(and(eq(operations.sessionId, session.id), eq(operations.admission, 'counted'), inArray(operations.kind, kinds)))
      .groupBy(operations.seatId)
      .all()
      .map((row) => [row.seatId, row.units]),
  );
  const unitsPerSeat = rows.length === 0 ? 0 : db
    .select({ n: isSets ? sql<number>`count(distinct ${servings.block})` : sql<number>`count(*)` })
    .from(servings)
    .where(eq(servings.seatId, rows[0]!.seat.id))
    .get()!.n;
  const nowMs = Date.now();
  return {
    state: session.state,
    unitsPerSeat,
    seats: rows.map(({ seat, name }) => ({
      number: seat.number, label: seatLabel(seat.number, seat.isReserve, session.seatsPlanned), name: name ?? '',
      isClaimed: seat.claimedAt !== null, isReserve: seat.isReserve, hasLeft: seat.leftAt !== null, isSubmitted: seat.submittedAt !== null,
      at: seat.atBlock !== null && seat.atPosition !== null ? { block: seat.atBlock, position: seat.atPosition, phase: seat.atPhase } : null,
      received: received.get(seat.id) ?? 0, onPhone: seat.onPhone,
      silentS: seat.lastHeardAt ? Math.max(0, Math.round((nowMs - seat.lastHeardAt.getTime()) / 1000)) : null,
    })),
  };
}
