import type { SeatRole } from '@/db/enums';
import { standingOperations, type StandingFact } from '../ballots/standing';

/** One operation, as far as counting needs it. */
export interface OperationFact extends StandingFact {
  number: number | null;
  text: string | null;
  isGuess: boolean | null;
  isLate: boolean;
}

/** The answers of a session that count: one per seat, glass and line. */
export interface CountedAnswers {
  scores: OperationFact[];
  faults: OperationFact[];
  choices: OperationFact[];
  orders: OperationFact[];
  comments: OperationFact[];
  replaced: number;
  cleared: number;
  late: Map<string, number>;
}

/** Sorts what counts from what was late, replaced or taken back. Late operations count nowhere. */
export function countAnswers(operations: readonly OperationFact[]): CountedAnswers {
  const late = new Map<string, number>();
  const counted: OperationFact[] = [];
  for (const op of operations) {
    if (op.kind === 'submit') continue;
    if (op.isLate) late.set(op.seatId, (late.get(op.seatId) ?? 0) + 1);
    else counted.push(op);
  }
  const { standing, replaced } = standingOperations(counted);
  const answers: CountedAnswers = { scores: [], faults: [], choices: [], orders: [], comments: [], replaced, cleared: 0, late };
  for (const op of standing) {
    if (op.kind === 'score' && op.number !== null) answers.scores.push(op);
    else if (op.kind === 'clear') answers.cleared += 1;
    else if (op.kind === 'fault' && op.number === 1) answers.faults.push(op);
    else if (op.kind === 'choice') answers.choices.push(op);
    else if (op.kind === 'order' && op.text !== null) answers.orders.push(op);
    else if (op.kind === 'comment' && op.text?.trim()) answers.comments.push(op);
  }
  return answers;
}

/** A glass whose sample is known, after unsealing. */
export interface GlassFact {
  seatId: string;
  block: number;
  position: number;
  code: string;
  sample: number;
}

export interface SeatFact {
  id: string;
  number: number;
  isReserve: boolean;
  isClaimed: boolean;
  isSubmitted: boolean;
  hasLeft: boolean;
  role: SeatRole;
  name: string | null;
}

/** One score in the long form that statistics take. */
export interface LongScore {
  assessor: number;
  product: number;
  replicate: number;
  /** Place of the glass in its flight, from 1. */
  position: number;
  score: number;
}

const glassKey = (seatId: string, block: number | null, position: number | null) => `${seatId}/${block}/${position}`;

/** Finds the sample of a glass by seat, block and position. */
export function glassFinder(glasses: readonly GlassFact[]): (op: OperationFact) => GlassFact | undefined {
  const byPlace = new Map(glasses.map((glass) => [glassKey(glass.seatId, glass.block, glass.position), glass]));
  return (op) => byPlace.get(glassKey(op.seatId, op.block, op.position));
}

/** The counted scores by ballot line: assessor = seat number, product = sample, replicate = block. */
export function longScores(scores: readonly OperationFact[], glasses: readonly GlassFact[], seats: readonly SeatFact[]): Map<number, LongScore[]> {
  const find = glassFinder(glasses);
  const numberOf = new Map(seats.map((seat) => [seat.id, seat.number]));
  const lines = new Map<number, LongScore[]>();
  for (const op of scores) {
    const glass = find(op);
    const assessor = numberOf.get(op.seatId);
    if (!glass || assessor === undefined || op.item === null || op.number === null) continue;
    const row = { assessor, product: glass.sample, replicate: glass.block, position: glass.position, score: op.number };
    const line = lines.get(op.item);
    if (line) line.push(row);
    else lines.set(op.item, [row]);
  }
  for (const line of lines.values()) line.sort((a, b) => a.assessor - b.assessor || a.product - b.product || a.replicate - b.replicate);
  return lines;
}

/** A line's scores split by whether the panelist scored every glass on it. */
export interface SplitScores {
  complete: LongScore[];
  /** Panelists in `complete`, by seat number. */
  assessors: number[];
  /** Panelists with some scores missing, by seat number. */
  leftOut: number[];
}

/** Keeps the panelists who scored all `products` × `replicates` glasses: a balanced table. */
export function completeScores(rows: readonly LongScore[], products: number, replicates: number): SplitScores {
  const byAssessor = new Map<number, LongScore[]>();
  for (const row of rows) byAssessor.set(row.assessor, [...(byAssessor.get(row.assessor) ?? []), row]);
  const split: SplitScores = { complete: [], assessors: [], leftOut: [] };
  for (const [assessor, own] of [...byAssessor].sort(([a], [b]) => a - b)) {
    if (own.length === products * replicates) {
      split.complete.push(...own);
      split.assessors.push(assessor);
    } else split.leftOut.push(assessor);
  }
  return split;
}

/** One set as answered: its glasses in their order, and the places that were picked (none: not answered). */
export interface SetAnswer {
  seat: SeatFact;
  set: number;
  glasses: GlassFact[];
  picked: GlassFact[];
  isGuess: boolean;
}

/** Every set of every seat that was taken, answered or not. */
export function setAnswers(choices: readonly OperationFact[], glasses: readonly GlassFact[], seats: readonly SeatFact[]): SetAnswer[] {
  const chosen = new Map(choices.map((op) => [`${op.seatId}/${op.block}`, op]));
  return seats.filter((seat) => seat.isClaimed).flatMap((seat) => {
    const own = glasses.filter((glass) => glass.seatId === seat.id);
    const sets = [...new Set(own.map((glass) => glass.block))].sort((a, b) => a - b);
    return sets.map((set) => {
      const inSet = own.filter((glass) => glass.block === set).sort((a, b) => a.position - b.position);
      const choice = chosen.get(`${seat.id}/${set}`);
      // Of two picked glasses the second stands in the number (see `valueOf` of a delivery).
      const places = choice ? [choice.position, choice.number] : [];
      return { seat, set, glasses: inSet, picked: inSet.filter((glass) => places.includes(glass.position)), isGuess: choice?.isGuess ?? false };
    });
  });
}
