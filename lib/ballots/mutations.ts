import 'server-only';
import { getDb, type Tx } from '@/db/client';
import type { Admission, ItemKind, SessionState } from '@/db/enums';
import { ballotItems, operations, seats, servings } from '@/db/schema';
import { and, eq } from 'drizzle-orm';
import { AppError } from '../errors';
import { factsOf } from '../methods/facts';
import { sha256Hex } from '../ids';
import type { SeatAccess } from '../seats/access';
import type { Operation, OperationBody, SyncRequest } from './schema';
import { statements } from './statements';
import { valuesOf } from './values';
import { VALUE_RANGE, type Ballot, type SyncResponse } from './types';

type Refusal = SyncResponse['refused'][number];
type RefusalCode = Refusal['code'];

const REFUSAL_TEXT: Record<RefusalCode, string> = {
  body_changed: 'The same operation was sent before with another content.',
  no_such_glass: 'The plan of this seat has no such glass.',
  no_such_line: 'The ballot has no such line.',
  no_such_value: 'The line has no such value.',
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

interface KnownBallot {
  glasses: ReadonlySet<string>;
  kinds: ReadonlyMap<number, ItemKind>;
}

/** Sealing fixes servings and ballot for good, so what was read once stays true. Bounded: a server sees few seats at a time. */
const knownBallots = new Map<string, KnownBallot>();
const KNOWN_LIMIT = 2_000;

/** The places and lines that the seat's ballot has. */
function ballotOf(tx: Tx, seatId: string, sessionId: string): KnownBallot {
  const known = knownBallots.get(seatId);
  if (known) return known;
  const glasses = tx.select({ block: servings.block, position: servings.position }).from(servings).where(eq(servings.seatId, seatId)).all();
  const lines = tx.select({ item: ballotItems.position, kind: ballotItems.kind }).from(ballotItems).where(eq(ballotItems.sessionId, sessionId)).all();
  const ballot: KnownBallot = {
    glasses: new Set(glasses.map((glass) => `${glass.block}/${glass.position}`)),
    kinds: new Map(lines.map((line) => [line.item, line.kind])),
  };
  if (knownBallots.size >= KNOWN_LIMIT) knownBallots.clear();
  knownBallots.set(seatId, ballot);
  return ballot;
}

/** The sets in which the seat has locked its choice. */
const lockedSetsOf = (tx: Tx, seatId: string): Set<number | null> =>
  new Set(tx.select({ block: operations.block }).from(operations).where(and(eq(operations.seatId, seatId), eq(operations.kind, 'choice'))).all().map((row) => row.block));

/** Kinds of answers that a ballot takes, beside remarks and handing in. */
const TAKES: Record<Ballot['kind'], readonly OperationBody['kind'][]> = { glasses: ['score', 'clear', 'fault'], note: ['score', 'clear'], pick: ['choice'], order: ['order'] };

interface Asked {
  ballot: Ballot;
  known: KnownBallot;
  lockedSets: ReadonlySet<number | null>;
}

function refusalOf(body: OperationBody, { ballot, known, lockedSets }: Asked): RefusalCode | null {
  if (body.kind === 'submit') return null;
  const has = (position: number) => known.glasses.has(`${body.block}/${position}`);
  if (body.kind === 'order') {
    if (ballot.kind !== 'order') return 'not_this_method';
    return body.order.every(has) && new Set(body.order).size === body.order.length ? null : 'no_such_glass';
  }
  if (!has(body.position)) return 'no_such_glass';
  if (body.kind === 'comment') return null;
  if (!TAKES[ballot.kind].includes(body.kind)) return 'not_this_method';
  if (body.kind === 'choice') return choiceRefusal(body, ballot, has) ?? (lockedSets.has(body.block) ? 'set_locked' : null);
  const kind = known.kinds.get(body.item);
  if (body.kind === 'fault') return kind === 'flag' ? null : 'no_such_line';
  const range = kind && VALUE_RANGE[kind];
  if (!range) return 'no_such_line';
  return body.kind === 'score' && (body.value < range.low || body.value > range.high) ? 'no_such_value' : null;
}

function choiceRefusal({ position, also }: Extract<OperationBody, { kind: 'choice' }>, ballot: Ballot, has: (position: number) => boolean): RefusalCode | null {
  if (ballot.kind !== 'pick' || (also !== undefined) !== (ballot.picks === 2)) return 'not_this_method';
  if (also !== undefined && (also <= position || !has(also))) return 'no_such_glass';
  return ballot.hasReference && position === 1 ? 'no_such_glass' : null;
}

/**
 * Takes one delivery of a phone's outbox, whole or not at all. An operation that is known (same id,
 * same content, same seat) gets the receipt that it had; a new one is admitted by the session's
 * state at this moment, never by the phone's clock: `late` after close, kept and not counted.
 * Permanent refusals are answered one by one and don't hold up the others.
 */
export function takeDelivery({ seat, session }: SeatAccess, delivery: SyncRequest): SyncResponse {
  return getDb().transaction((tx) => {
    const present = statements().present.get({ seatId: seat.id })!;
    if (present.generation !== seat.tokenGeneration) throw new AppError('unauthenticated', 'This seat was given to another phone.');
    const at = new Date();
    const taken = delivery.ops.length > 0 ? takeOperations(tx, { seat, session }, delivery.ops, admissionIn(present.state), at) : { receipts: [], refused: [], isHandedIn: false };
    const place = delivery.at && { atBlock: delivery.at.block, atPosition: delivery.at.position, atPhase: delivery.at.phase };
    const handedIn = taken.isHandedIn && seat.submittedAt === null && { submittedAt: at };
    // Who left and answers again is back, and owes a ballot like the others.
    const cameBack = seat.leftAt !== null && taken.receipts.length > 0 && present.state === 'open' && { leftAt: null };
    if (place || handedIn || cameBack) tx.update(seats).set({ lastHeardAt: at, onPhone: delivery.onPhone, ...place, ...handedIn, ...cameBack }).where(eq(seats.id, seat.id)).run();
    else statements().heard.run({ at, onPhone: delivery.onPhone, seatId: seat.id });
    return { protocol: 1, state: present.state, receipts: taken.receipts, refused: taken.refused };
  }, { behavior: 'immediate' });
}

function takeOperations(tx: Tx, { seat, session }: SeatAccess, ops: readonly Operation[], admission: Admission | null, receivedAt: Date) {
  const receipts: SyncResponse['receipts'] = [];
  const refused: Refusal[] = [];
  const refuse = (opId: string, code: RefusalCode) => refused.push({ opId, code, message: REFUSAL_TEXT[code] });
  const { ballot } = factsOf(session.method);
  const { knownOperation, keepOperation } = statements();
  const known = ballotOf(tx, seat.id, session.id);
  const lockedSets = ballot.kind === 'pick' ? lockedSetsOf(tx, seat.id) : new Set<number | null>();
  let isHandedIn = false;
  for (const op of ops) {
    const hash = bodyHash(op);
    const before = knownOperation.get({ opId: op.opId });
    if (before) {
      // Another seat's id is answered like a changed body: nothing is told of it.
      if (before.seatId === seat.id && before.bodyHash === hash) receipts.push({ opId: op.opId, receiptNo: before.receiptNo, admission: before.admission });
      else refuse(op.opId, 'body_changed');
      continue;
    }
    const code = admission === null ? 'wrong_state' : refusalOf(op.body, { ballot, known, lockedSets });
    if (code || admission === null) {
      refuse(op.opId, code ?? 'wrong_state');
      continue;
    }
    const { lastInsertRowid } = keepOperation.run({
      opId: op.opId, cellarId: seat.cellarId, sessionId: session.id, seatId: seat.id, tokenGeneration: seat.tokenGeneration,
      deviceId: op.deviceId, seq: op.seq, kind: op.body.kind, ...valuesOf(op.body), bodyHash: hash, clientAt: new Date(op.clientAt), receivedAt, admission,
    });
    receipts.push({ opId: op.opId, receiptNo: Number(lastInsertRowid), admission });
    if (op.body.kind === 'choice') lockedSets.add(op.body.block);
    if (op.body.kind === 'submit' && admission === 'counted') isHandedIn = true;
  }
  return { receipts, refused, isHandedIn };
}
