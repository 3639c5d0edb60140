import { dealOrders, proportionFromDistinguishers, smallestPanel, type Order } from '@/stats';
import { ALL_CODES, drawCodes } from './codes';
import type { Draw, PlannedServing, PlanQuestion } from './types';

/**
 * One code for each serving. When the session has more glasses than there are codes, seats may
 * share codes, but no seat meets one twice.
 */
function codesBySeat(seatCount: number, perSeat: number, draw: Draw): string[][] {
  if (seatCount * perSeat <= ALL_CODES.length) {
    const all = drawCodes(seatCount * perSeat, draw);
    return Array.from({ length: seatCount }, (_, seat) => all.slice(seat * perSeat, (seat + 1) * perSeat));
  }
  return Array.from({ length: seatCount }, () => drawCodes(perSeat, draw));
}

/** The orders of a test of two samples, dealt in whole sets over the seats, drawn anew for each set. */
export function planSets(orders: readonly Order[], { seatCount, replicates }: PlanQuestion, draw: Draw): PlannedServing[] {
  const glasses = orders[0]!.length;
  const codes = codesBySeat(seatCount, replicates * glasses, draw);
  const servings: PlannedServing[] = [];
  for (let block = 1; block <= replicates; block += 1) {
    dealOrders(orders, seatCount, draw).forEach((order, seatIndex) => {
      order.forEach((letter, place) => {
        const code = codes[seatIndex]![(block - 1) * glasses + place]!;
        servings.push({ seat: seatIndex + 1, block, position: place + 1, code, sample: letter + 1 });
      });
    });
  }
  return servings;
}

const NUMBERS: Record<number, string> = { 2: 'two', 4: 'four', 6: 'six', 20: 'twenty' };

/** What is weak in a forced choice: orders that don't come equally often, too few answers, several sets each. */
export function setWarnings(orders: readonly Order[], { seatCount, replicates }: PlanQuestion, chance: number): string[] {
  const warnings: string[] = [];
  const all = orders.length;
  if (seatCount % all !== 0) warnings.push(`The ${NUMBERS[all] ?? all} orders come equally often with ${NUMBERS[all] ?? all} seats or a multiple of ${NUMBERS[all] ?? all}.`);
  const needed = smallestPanel(0.8, { chance, alpha: 0.05, pc: proportionFromDistinguishers(0.5, chance) }).first;
  if (seatCount * replicates < needed) {
    warnings.push(`${seatCount * replicates} answers can show only a gross difference; ${needed} show one that half of the people taste (5 % and 20 % risk).`);
  }
  if (replicates > 1) warnings.push('Several sets by one person: the test of a difference stays valid, a claim of likeness would not (ISO 10399, note to 6.2, by analogy).');
  return warnings;
}
