import type { ItemFact } from '@/lib/results/data';
import type { OperationFact, SeatFact } from '@/lib/results/evidence';

/** A seat that was taken and handed in. */
export const seatFact = (number: number): SeatFact => ({ id: `s${number}`, number, isReserve: false, isClaimed: true, isSubmitted: true, hasLeft: false, role: 'taste', name: null });

/** A counted answer of a seat about a glass. */
export const operationFact = (seatId: string, block: number, position: number | null, rest: Partial<OperationFact>): OperationFact => ({
  seatId, block, position, item: null, kind: 'score', number: null, text: null, isGuess: false, isLate: false, tokenGeneration: 1, seq: 1, receiptNo: 1, ...rest,
});

/** A line of the ballot. */
export const itemFact = (n: number, kind: ItemFact['kind'], name = `Line ${n}`): ItemFact => ({ item: n, kind, phase: 'palate', name, definition: '', lowAnchor: 'none', highAnchor: 'very strong' });
