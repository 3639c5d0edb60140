import 'server-only';
import { timingSafeEqual } from 'node:crypto';
import { inflateRawSync } from 'node:zlib';
import { getDb } from '@/db/client';
import { seats } from '@/db/schema';
import { and, eq, isNotNull } from 'drizzle-orm';
import { recordAudit } from '../audit/record';
import type { Access } from '../auth/access';
import { takeDelivery } from '../ballots/mutations';
import { SYNC_MAX_BYTES } from '../ballots/schema';
import type { SyncResponse } from '../ballots/types';
import { AppError } from '../errors';
import type { SeatRow } from '../seats/access';
import { seatLabel } from '../seats/format';
import { findSession } from '../sessions/find';
import { handoverKey } from './key';
import { markOf } from './pack';
import { handoverBodySchema } from './schema';

/** Operations of one delivery to the ballots; a handover may hold more. */
const BATCH = 200;

/** What a leader is told after a scan: numbers, never an answer. */
export interface HandoverResult {
  seat: string;
  received: number;
  late: number;
  refused: SyncResponse['refused'];
}

function unpack(text: string): { payload: Uint8Array; plain: string; mark: string } {
  const [kind, data, mark] = text.split('.') as [string, string, string];
  const payload = Buffer.from(data, 'base64url');
  try {
    return { payload, mark, plain: kind === 'd' ? inflateRawSync(payload, { maxOutputLength: SYNC_MAX_BYTES * 4 }).toString('utf8') : payload.toString('utf8') };
  } catch {
    throw new AppError('invalid', 'The codes do not fit together. Scan them again from the first.');
  }
}

/** The seat whose mark the handover carries, among those of the session that somebody holds. */
function seatBehind(sessionId: string, payload: Uint8Array, mark: string): SeatRow {
  const held = getDb().select().from(seats).where(and(eq(seats.sessionId, sessionId), isNotNull(seats.claimedAt))).all();
  const seat = held.find((candidate) => timingSafeEqual(Buffer.from(markOf(handoverKey(candidate), payload)), Buffer.from(mark)));
  if (!seat) throw new AppError('invalid', 'These codes are of no seat in this session, or the seat was given to another phone since.');
  return seat;
}

/**
 * Takes a sheet that a phone without signal has shown as codes to the leader's device: the same
 * operations under the same ids as its outbox, marked with the seat's key, so that the leader can neither
 * read one into another seat nor add one.
 * @throws AppError `invalid` on codes that don't fit or are of no seat here, `not_found`
 */
export function receiveHandover(access: Access, sessionId: string, text: string): HandoverResult {
  const session = findSession(getDb(), access.cellar.id, sessionId);
  const { payload, plain, mark } = unpack(text);
  const seat = seatBehind(session.id, payload, mark);
  const body = handoverBodySchema.safeParse(parseJson(plain));
  if (!body.success || body.data.joinKey !== session.joinKey) throw new AppError('invalid', 'These codes are of another session.');
  const result: HandoverResult = { seat: seatLabel(seat.number, seat.isReserve, session.seatsPlanned), received: 0, late: 0, refused: [] };
  for (let from = 0; from < body.data.ops.length; from += BATCH) {
    const ops = body.data.ops.slice(from, from + BATCH);
    const answer = takeDelivery({ seat, session }, { protocol: 1, joinKey: session.joinKey, at: null, onPhone: Math.max(0, body.data.ops.length - from - ops.length), ops });
    result.received += answer.receipts.filter((receipt) => receipt.admission === 'counted').length;
    result.late += answer.receipts.filter((receipt) => receipt.admission === 'late').length;
    result.refused.push(...answer.refused);
  }
  getDb().transaction(
    (tx) => recordAudit(tx, { cellarId: access.cellar.id, sessionId: session.id, actorUserId: access.user.id, action: 'seat.handed_over', subjectType: 'seat', subjectId: seat.id, detail: { number: seat.number, answers: body.data.ops.length } }),
    { behavior: 'immediate' },
  );
  return result;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
