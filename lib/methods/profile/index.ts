import { dealOrders, shuffled, williamsSquare } from '@/stats';
import { drawCodes } from '../codes';
import type { MethodDescription, PlannedServing } from '../types';

/** Glasses of tannic or strong wine that a palate bears in one flight (common practice). */
const FLIGHT_LIMIT = 8;

/** Line scales by descriptor: every seat tastes every sample, once in each block. */
export const profile: MethodDescription = {
  method: 'profile',
  name: 'Profile',
  answers: 'What do they taste like, and how much of it?',
  blockWord: 'Flight',
  sampleCount: { min: 2, max: 12 },
  hasItems: true,
  glassesPerBlock: (sampleCount) => sampleCount,

  /**
   * Orders from Williams squares, balanced for position and first-order carry-over, dealt in whole
   * squares; which sample takes which letter of the square, and which seat which row, is drawn
   * anew for each block. One code per sample and block, so that a bottle can carry it.
   */
  plan({ sampleCount, seatCount, replicates }, draw) {
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
  },

  warnings({ sampleCount, seatCount, replicates }) {
    const warnings: string[] = [];
    const square = sampleCount % 2 === 0 ? sampleCount : 2 * sampleCount;
    if (sampleCount > 1 && seatCount % square !== 0) {
      warnings.push(`Orders balance fully for ${square} seats or a multiple of it; with ${seatCount} they balance as far as they can.`);
    }
    if (sampleCount > FLIGHT_LIMIT) warnings.push(`More than ${FLIGHT_LIMIT} glasses in a flight tire the palate; six are enough for a tannic red (common practice).`);
    if (replicates === 1) warnings.push('With one replicate the panel’s repeatability can’t be told from its disagreement.');
    if (seatCount < 8) warnings.push('Profiles are usually scored by 8 to 12 trained panelists; fewer show large differences only.');
    return warnings;
  },
};
