import { blockDesigns, blockEfficiency, blockParameters, checkBalance, isRuledOut, williamsSquare } from '@/stats';
import { at, has, type Columns } from './tables';
import type { Answerer } from './types';

export const answers: Answerer[] = [
  {
    matches: (c) => typeof c.inputs.treatments === 'number',
    answer({ inputs }) {
      const t = inputs.treatments as number;
      const balance = checkBalance(williamsSquare(t), t);
      return {
        minimum_sequences_by_this_construction: balance.sequences,
        each_treatment_per_position: balance.positionBalanced ? balance.positionCounts[0][0] : null,
        each_ordered_pair: balance.carryOverCount,
      };
    },
  },
  {
    matches: (c) => Array.isArray(c.inputs.design_rows),
    answer({ inputs }) {
      const rows = (inputs.design_rows as number[][]).map((row) => row.map((sample) => sample - 1));
      const balance = checkBalance(rows, Math.max(...rows.flat()) + 1);
      return {
        n_sequences: balance.sequences,
        length: balance.length,
        treatments: balance.treatments,
        replication: balance.replication,
        position_counts: balance.positionCounts,
        position_balanced: balance.positionBalanced,
        carryover_counts_from_row_to_column: balance.carryOver,
        carryover_balanced_first_order: balance.carryOverBalanced,
        carryover_count: balance.carryOverCount,
        concurrence: balance.concurrence,
        balanced_incomplete_block: balance.balancedIncompleteBlock,
      };
    },
  },
  {
    matches: (c) => typeof c.inputs.identities === 'string' && has(c, 'rows'),
    answer(c) {
      const [most, repeats] = /t <= (\d+), r <= (\d+)/.exec(c.case)!.slice(1).map(Number);
      const asked = at(c.given, 'rows') as { t: number; k: number; r: number }[] | Columns;
      const list = Array.isArray(asked) ? asked : (asked.t as number[]).map((t, i) => ({ t, k: asked.k[i] as number, r: asked.r[i] as number }));
      return {
        rows: list.map(({ t, k, r }) => {
          const design = blockDesigns().find((entry) => entry.t === t && entry.k === k && entry.r === r);
          if (!design) return null;
          const balance = checkBalance(design.blocks, t);
          const { b, lambda } = design;
          const built = balance.balancedIncompleteBlock && balance.sequences === b && balance.replication[0] === r && balance.concurrence[0][1] === lambda;
          return { t, k, b, r, lambda, efficiency: blockEfficiency(design), verified_by_construction: built };
        }),
        satisfy_identities_but_do_not_exist: blockParameters(most, repeats).filter(isRuledOut),
      };
    },
  },
];
