import 'server-only';
import { getDb, type Tx } from '@/db/client';
import type { Admission, SessionState } from '@/db/enums';
import { ballotItems, operations, seats, servings, sessions } from '@/db/schema';
import { and, eq, inArray, isNull } from 'drizzle-orm';
import { AppError } from '../errors';
import { sha256Hex } from '../ids';
import type { SeatAccess } from '../seats/access';
import type { Operation, OperationBody, SyncRequest } from './schema';
import type { SyncResponse } from './types';

type Refusal = SyncResponse['refused'][number];
type RefusalCode = Refusal['code'];

const REFUSAL_TEXT: Record<RefusalCode, string> = {
  body_changed: 'The same operation was sent before with another content.',
  no_such_glass: 'The plan of this seat has no such glass.',
  no_such_line: 'The ballot has no such line.',
  set_locked: 'This set was locked before with another answer.',
  not_this_method: 'That kind of answer does not belong to this session.',
  wrong_state: 'The session is not open.',
};

/** The whole of what was said, in a fixed order: what a repeat must equal to the letter. */
const bodyHash = (op: Operation): string => sha256Hex(JSON.stringify([op.deviceId, op.seq, op.clientAt, Object.entries(op.body).sort(([a], [b]) => (a < b ? -1 : 1))]));

/** Whether answers count now; null while none may come in yet. */
function admissionIn(state: SessionState): Admission | null {
  if (state === 'open') return 'counted';
  return state === 'draft' || state === 'sealed' ? null : 'late';
}

/** The places and lines that the seat's ballot has. */
function ballotOf(tx: Tx, seatId: string, sessionId: string) {
  const glasses = tx.select({ block: servings.block, position: servings.position }).from(servings).where(eq(servings.seatId, seatId)).all();
  const lines = tx.select({ item: ballotItems.position, kind: ballotItems.kind }).from(ballotItems).where(eq(ballotItems.sessionId, sessionId)).all();
  const chosen = tx.select({ block: operations.block }).from(operations).where(and(eq(operations.seatId, seatId), eq(operations.kind, 'choice'))).all();
  return {
    glasses: new Set(glasses.map((glass) => `${glass.block}/${glass.position}`)),
    kinds: new Map(lines.map((line) => [line.item, line.kind])),
    lockedSets: new Set(chosen.map((row) => row.block)),
  };
}

function refusalOf(body: OperationBody, isTriangle: boolean, ballot: ReturnType<typeof ballotOf>): RefusalCode | null {
  if (body.kind === 'submit') return null;
  if (!ballot.glasses.has(`${body.block}/${body.position}`)) return 'no_such_glass';
  if (body.kind === 'comment') return null;
  if ((body.kind === 'choice') !== isTriangle) return 'not_this_method';
  if (body.kind === 'choice') return ballot.lockedSets.has(body.block) ? 'set_locked' : null;
  return ballot.kinds.get(body.item) === (body.kind === 'fault' ? 'flag' : 'line') ? null : 'no_such_line';
}

const valueOf = (body: OperationBody) => ({
  block: 'block' in body ? body.block : null,
  position: 'position' in body ? body.position : null,
  item: 'item' in body ? body.item : null,
  valueNumber: body.kind === 'score' ? body.value : body.kind === 'fault' ? Number(body.isNoted) : null,
  valueText: body.kind === 'comment' ? body.text : null,
  isGuess: body.kind === 'choice' ? body.isGuess : null,
});

/**
 * Takes one delivery of a phone's outbox, whole or not at all. An operation that is known (same id,
 * same content, same seat) gets the receipt that it had; a new one is admitted by the session's
 * state at this moment, never by the phone's clock: `late` after close, kept and not counted.
 * Permanent refusals are answered one by one and don't hold up the others.
 */
export function takeDelivery({ seat, session }: SeatAccess, delivery: SyncRequest): SyncResponse {
  return getDb().transaction((tx) => {
    const state = tx.select({ state: sessions.state }).from(sessions).where(eq(sessions.id, session.id)).get()!.state;
    const holds = tx.select({ generation: seats.tokenGeneration }).from(seats).where(eq(seats.id, seat.id)).get()!.generation === seat.tokenGeneration;
    if (!holds) throw new AppError('unauthenticated', 'This seat was given to another phone.');
    const admission = admissionIn(state);
    const receipts: SyncResponse['receipts'] = [];
    const refused: Refusal[] = [];
    const refuse = (opId: string, code: RefusalCode) => refused.push({ opId, code, message: REFUSAL_TEXT[code] });

    if (delivery.ops.length > 0) {
      const ids = delivery.ops.map((op) => op.opId);
      const known = new Map(tx.select().from(operations).where(inArray(operations.opId, ids)).all().map((row) => [row.opId, row]));
      const ballot = ballotOf(tx, seat.id, session.id);
      const receivedAt = new Date();
      for (const op of delivery.ops) {
        const hash = bodyHash(op);
        const before = known.get(op.opId);
        if (before) {
          // Another seat's id is answered like a changed body: nothing is told of it.
          if (before.seatId === seat.id && before.bodyHash === hash) receipts.push({ opId: op.opId, receiptNo: before.receiptNo, admission: before.admission });
          else refuse(op.opId, 'body_changed');
          continue;
        }
        const code = admission === null ? 'wrong_state' : refusalOf(op.body, session.method === 'triangle', ballot);
        if (code || admission === null) {
          refuse(op.opId, code ?? 'wrong_state');
          continue;
        }
        const row = tx
          .insert(operations)
          .values({
            opId: op.opId, cellarId: seat.cellarId, sessionId: session.id, seatId: seat.id, tokenGeneration: seat.tokenGeneration,
            deviceId: op.deviceId, seq: op.seq, kind: op.body.kind, ...valueOf(op.body), bodyHash: hash,
            clientAt: new Date(op.clientAt), receivedAt, admission,
          })
          .returning()
          .get();
        known.set(op.opId, row);
        receipts.push({ opId: op.opId, receiptNo: row.receiptNo, admission });
        if (op.body.kind === 'choice') ballot.lockedSets.add(op.body.block);
        if (op.body.kind === 'submit' && admission === 'counted') {
          tx.update(seats).set({ submittedAt: receivedAt }).where(and(eq(seats.id, seat.id), isNull(seats.submittedAt))).run();
        }
      }
    }
    tx.update(seats)
      .set({ lastHeardAt: new Date(), onPhone: delivery.onPhone, ...(delivery.at && { atBlock: delivery.at.block, atPosition: delivery.at.position, atPhase: delivery.at.phase }) })
      .where(eq(seats.id, seat.id))
      .run();
    return { protocol: 1, state, receipts, refused };
  }, { behavior: 'immediate' });
}
