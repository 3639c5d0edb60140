import type { ResultsView } from '../results/types';

/** One number of the report under a name that the script builds too. */
export interface Figure {
  id: string;
  value: number;
}

/** The report's figures that base R can compute from the answers alone. */
export function figuresOf({ profile, choice, pair, order, ticks, right, samples }: ResultsView): Figure[] {
  const figures: Figure[] = [];
  const add = (id: string, value: number | null | undefined) => {
    if (value !== null && value !== undefined && Number.isFinite(value)) figures.push({ id, value });
  };
  if (choice) {
    add('answers', choice.n);
    add('correct', choice.correct);
    add('needed', choice.minimumCorrect);
    add('p', choice.p);
    add('distinguishers', choice.pd?.value);
    add('distinguishers low', choice.pd?.lower);
    add('distinguishers high', choice.pd?.upper);
  }
  if (pair) {
    add('answers', pair.n);
    for (const { sample, count } of pair.chosen) add(`chosen ${sample}`, count);
    add('p', pair.p);
    add('share low', pair.share?.low);
    add('share high', pair.share?.high);
  }
  if (order) {
    add('people', order.assessors);
    for (const cell of order.cells) add(`rank sum ${cell.sample}`, cell.rankSum);
    add('chi-square', order.friedman?.statistic);
    add("Kendall's W", order.kendallW);
  }
  for (const line of profile?.lines ?? []) {
    if (line.method !== 'anova') continue;
    for (const cell of line.cells) add(`mean ${line.item}/${cell.sample}`, cell.mean);
    add(`F ${line.item}`, line.product?.F);
    add(`p ${line.item}`, line.product?.p);
    add(`interaction F ${line.item}`, line.interaction?.F);
    add(`HSD ${line.item}`, line.smallestDifference);
    for (const { a, b, p } of line.pairs) add(`pair p ${line.item}/${a}-${b}`, p);
  }
  for (const line of ticks?.lines ?? []) {
    for (const cell of line.counts) {
      add(`ticked ${line.item}/${cell.sample}`, cell.ticked);
      add(`of ${line.item}/${cell.sample}`, cell.of);
    }
  }
  for (const line of right?.lines ?? []) {
    for (const cell of line.cells) {
      add(`answers ${line.item}/${cell.sample}`, cell.n);
      add(`too little ${line.item}/${cell.sample}`, cell.low.share);
      add(`too much ${line.item}/${cell.sample}`, cell.high.share);
      add(`drop low ${line.item}/${cell.sample}`, cell.low.drop);
      add(`drop high ${line.item}/${cell.sample}`, cell.high.drop);
    }
  }
  add('samples', samples.length);
  return figures;
}
