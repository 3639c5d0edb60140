import {
  blockDesigns,
  checkBalance,
  DUO_TRIO_BALANCED_ORDERS,
  findBlockDesign,
  PAIR_ORDERS,
  TETRAD_ORDERS,
  TRIANGLE_ORDERS,
  TWO_OUT_OF_FIVE_ORDERS,
  williamsSquare,
  type Order,
} from '@/stats';
import type { WorkedAnswerer } from './types';

const spell = (order: Order): string => order.map((sample) => 'AB'[sample]).join('');

export const answers: WorkedAnswerer[] = [
  {
    matches: ({ test, inputs }) => Array.isArray(inputs.samples) && /carry-over/.test(test),
    answer({ inputs }) {
      const samples = inputs.samples as number[];
      const balances = samples.map((t) => checkBalance(williamsSquare(t), t));
      return {
        balanced: balances.every(({ positionBalanced, carryOverBalanced }) => positionBalanced && carryOverBalanced),
        ...Object.fromEntries(samples.map((t) => [String(t), williamsSquare(t).map((row) => row.map((sample) => sample + 1))])),
      };
    },
  },
  {
    matches: ({ inputs }) => Array.isArray(inputs.designs),
    answer({ inputs }) {
      const designs = inputs.designs as [number, number, number, number, number][];
      const counted = designs.every(([t, k, b, r, lambda]) => {
        const design = blockDesigns().find((entry) => entry.t === t && entry.k === k && entry.r === r) ?? findBlockDesign(t, k);
        // Several rounds of the smallest design are a design too: its blocks are laid out as often as fits the r asked for.
        const rounds = Math.max(1, Math.floor(r / design.r));
        const balance = checkBalance(Array.from({ length: rounds }, () => design.blocks).flat(), t);
        return balance.balancedIncompleteBlock && balance.sequences === b && balance.replication[0] === r && balance.concurrence[0][1] === lambda;
      });
      return { all_hold: counted };
    },
  },
  {
    matches: ({ test }) => /^presentation orders/.test(test),
    answer: () => ({
      triangle: TRIANGLE_ORDERS.map(spell),
      tetrad: TETRAD_ORDERS.map(spell),
      paired: PAIR_ORDERS.map(spell),
      duo_trio_balanced: DUO_TRIO_BALANCED_ORDERS.map(([reference, ...rest]) => `${spell([reference])}:${spell(rest)}`),
      two_of_five_count: TWO_OUT_OF_FIVE_ORDERS.length,
      tetrad_count: TETRAD_ORDERS.length,
      triangle_count: TRIANGLE_ORDERS.length,
    }),
  },
];
