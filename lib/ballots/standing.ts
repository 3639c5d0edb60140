import type { OperationKind } from '@/db/enums';

/** What decides which of several answers stands. */
export interface StandingFact {
  seatId: string;
  tokenGeneration: number;
  seq: number;
  receiptNo: number;
  kind: OperationKind;
  block: number | null;
  position: number | null;
  item: number | null;
}

/** What an operation is an answer to; a score and taking it back share the place. */
function placeOf(op: StandingFact): string {
  const kind = op.kind === 'clear' ? 'score' : op.kind;
  // A set has one choice, whichever glass it names.
  const position = op.kind === 'choice' || op.kind === 'order' ? '' : op.position;
  return `${op.seatId}/${kind}/${op.block}/${position}/${op.item ?? ''}`;
}

/**
 * Whether `op` stands and `kept` gives way. The latest counts, by the holding of the seat and then
 * the phone's own count, whatever the order of arrival; of a choice, which is final, the first received.
 */
function standsOver(op: StandingFact, kept: StandingFact): boolean {
  if (op.kind === 'choice') return op.receiptNo < kept.receiptNo;
  if (op.tokenGeneration !== kept.tokenGeneration) return op.tokenGeneration > kept.tokenGeneration;
  if (op.seq !== kept.seq) return op.seq > kept.seq;
  return op.receiptNo > kept.receiptNo;
}

/** The one rule of which answers stand: the sheet, the results and every count follow it. */
export function standingOperations<Op extends StandingFact>(operations: Iterable<Op>): { standing: Op[]; replaced: number } {
  const byPlace = new Map<string, Op>();
  let replaced = 0;
  for (const op of operations) {
    const place = placeOf(op);
    const kept = byPlace.get(place);
    if (kept) replaced += 1;
    if (!kept || standsOver(op, kept)) byPlace.set(place, op);
  }
  return { standing: [...byPlace.values()], replaced };
}
