import type { OrderView, ResultsView, RightView, TicksView } from '../results/types';
import { figuresUnder, type Figure } from './figure';

/** From this many people on, an order's p comes from F; below, arrangements are counted, which the script does not do. */
const PEOPLE_FOR_F = 13;

/** How many answers count, and the faults. `flagItems`: lines of the ballot that are faults, in the order of the results. */
export function countFigures({ counts, said }: ResultsView, flagItems: readonly number[]): Figure[] {
  return [
    ...figuresUnder('answers', 'Answers', { counted: counts.counted }),
    ...said.faults.flatMap((fault, index) =>
      fault.counts.flatMap(({ sample, noted, of }) => figuresUnder(`fault.${flagItems[index]}.${sample}`, `${fault.name}, sample ${sample}`, { noted, of }))),
  ];
}

/** The figures of samples in an order. */
export function orderFigures({ assessors, cells, friedman, kendallW, hsd }: OrderView): Figure[] {
  return [
    ...figuresUnder('order', 'Orders', { assessors, statistic: friedman?.statistic, df: friedman?.df, p: assessors >= PEOPLE_FOR_F ? friedman?.p : null, kendall_w: kendallW, hsd }),
    ...cells.flatMap(({ sample, rankSum, meanRank }) => figuresUnder(`order.sample.${sample}`, `Sample ${sample}`, { rank_sum: rankSum, mean_rank: meanRank })),
  ];
}

/** How often each word was ticked or named, and how strong it was where that was said. */
export function tickFigures({ lines }: TicksView): Figure[] {
  return lines.flatMap((line) =>
    line.counts.flatMap(({ sample, ticked, of, strength }) => figuresUnder(`tick.${line.item}.${sample}`, `${line.name}, sample ${sample}`, { ticked, of, strength })));
}

/** How often each point of "too little, right, too much" was chosen, and the liking lost on either side. */
export function rightFigures({ lines }: RightView): Figure[] {
  return lines.flatMap((line) =>
    line.cells.flatMap(({ sample, n, counts, right, low, high }) =>
      figuresUnder(`right.${line.item}.${sample}`, `${line.name}, sample ${sample}`, { n, share: right, low_share: low.share, low_drop: low.drop, high_share: high.share, high_drop: high.drop, ...Object.fromEntries(counts.map((count, point) => [`point_${point + 1}`, count])) })));
}
