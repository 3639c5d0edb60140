import { dealOrders, shuffled, williamsSquare } from '@/stats';
import { drawCodes } from './codes';
import type { Draw, PlannedServing, PlanQuestion } from './types';

/** Glasses of tannic or strong wine that a palate bears in one flight (common practice). */
const FLIGHT_LIMIT = 8;

/**
 * Every seat tastes every sample once in each block. Orders from Williams squares, balanced for position
 * and first-order carry-over, dealt in whole squares; which sample takes which letter of the square, and
 * which seat which row, is drawn anew for each block. One code per sample and block, so that a bottle can
 * carry it.
 */
export function planFlights({ sampleCount, seatCount, replicates }: PlanQuestion, draw: Draw): PlannedServing[] {
  const codes = drawCodes(sampleCount * replicates, draw);
  const servings: PlannedServing[] = [];
  for (let block = 1; block <= replicates; block += 1) {
    const letters = shuffled(Array.from({ length: sampleCount }, (_, i) => i + 1), draw);
    const orders = dealOrders(williamsSquare(sampleCount), seatCount, draw);
    orders.forEach((order, seatIndex) => {
      order.forEach((letter, place) => {
        const sample = letters[letter]!;
        servings.push({ seat: seatIndex + 1, block, position: place + 1, code: codes[(block - 1) * sampleCount + sample - 1]!, sample });
      });
    });
  }
  return servings;
}

/** What is weak in the orders: seats that don't fill the squares, flights that tire. */
export function flightWarnings({ sampleCount, seatCount }: PlanQuestion): string[] {
  const warnings: string[] = [];
  const square = sampleCount % 2 === 0 ? sampleCount : 2 * sampleCount;
  if (sampleCount > 1 && seatCount % square !== 0) {
    warnings.push(`Orders balance fully for ${square} seats or a multiple of it; with ${seatCount} they balance as far as they can.`);
  }
  if (sampleCount > FLIGHT_LIMIT) warnings.push(`More than ${FLIGHT_LIMIT} glasses in a flight tire the palate; six are enough for a tannic red (common practice).`);
  return warnings;
}

/** Liking and ticks are for many people who are asked like drinkers, not a few trained ones. */
export function fewPeopleWarning({ seatCount }: PlanQuestion, enough: number, what: string): string[] {
  return seatCount < enough ? [`${what} usually asks ${enough} people or more, untrained and used to such wines (common practice); ${seatCount} say little of others.`] : [];
}
