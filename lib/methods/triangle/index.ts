import { CHANCE, dealOrders, proportionFromDistinguishers, smallestPanel, TRIANGLE_ORDERS } from '@/stats';
import { ALL_CODES, drawCodes } from '../codes';
import type { Draw, MethodDescription, PlannedServing } from '../types';

const GLASSES = 3;

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

/** Three glasses, two alike: which one is different? ISO 4120. */
export const triangle: MethodDescription = {
  method: 'triangle',
  name: 'Triangle',
  answers: 'Is there a difference at all?',
  blockWord: 'Set',
  sampleCount: { min: 2, max: 2 },
  hasItems: false,
  glassesPerBlock: () => GLASSES,

  /** The six orders dealt in blocks of six over the seats, drawn anew for each set (ISO 4120, clause 7.1). */
  plan({ seatCount, replicates }, draw) {
    const codes = codesBySeat(seatCount, replicates * GLASSES, draw);
    const servings: PlannedServing[] = [];
    for (let block = 1; block <= replicates; block += 1) {
      dealOrders(TRIANGLE_ORDERS, seatCount, draw).forEach((order, seatIndex) => {
        order.forEach((letter, place) => {
          const code = codes[seatIndex]![(block - 1) * GLASSES + place]!;
          servings.push({ seat: seatIndex + 1, block, position: place + 1, code, sample: letter + 1 });
        });
      });
    }
    return servings;
  },

  warnings({ seatCount, replicates }) {
    const warnings: string[] = [];
    if (seatCount % 6 !== 0) warnings.push('The six orders come equally often with six seats or a multiple of six.');
    const needed = smallestPanel(0.8, { chance: CHANCE.triangle, alpha: 0.05, pc: proportionFromDistinguishers(0.5, CHANCE.triangle) }).first;
    if (seatCount * replicates < needed) {
      warnings.push(`${seatCount * replicates} answers can show only a gross difference; ${needed} show one that half of the people taste (5 % and 20 % risk).`);
    }
    if (replicates > 1) warnings.push('Several sets by one person: the test of a difference stays valid, a claim of likeness would not (ISO 10399, note to 6.2, by analogy).');
    return warnings;
  },
};
