import { compactLetters, compareRankSums, friedman, friedmanPermutation, rankSumHsd } from '@/stats';
import { placesOf } from '../ballots/values';
import { orNull } from './agreement';
import { setAnswers } from './evidence';
import { viewOf, type Found, type MethodQuestion } from './found';
import { count, listWords, sayP, showPercent } from './format';
import type { SampleView, VerdictView } from './types';

/** Up to this many people the exact distribution is used where it can be counted. */
const SMALL_PANEL = 13;

/** Steps that the exact count may take while somebody waits for a page. */
const BUDGET = 300_000;

/**
 * Orders of samples by people who ranked them all: Friedman's test (exact or by draws for a small panel), Kendall's W,
 * rank sums with the difference that is shown allowing for all pairs. Several orders by one person count as
 * their mean ranks, one row a person.
 */
export function orderFound({ answers, glasses, seats, items, samples, replicates, alpha }: MethodQuestion): Found {
  const given = new Map(answers.orders.map((op) => [`${op.seatId}/${op.block}`, placesOf(op.text!)]));
  const sets = setAnswers([], glasses, seats);
  const bySeat = seats.filter((seat) => seat.isClaimed).map((seat) => ({
    seat: seat.number, name: seat.name,
    orders: sets.filter((set) => set.seat === seat).flatMap((set) => {
      const places = given.get(`${seat.id}/${set.set}`) ?? [];
      if (places.length !== set.glasses.length) return [];
      return [{ block: set.set, samples: places.map((place) => set.glasses[place - 1]!.sample) }];
    }),
  }));
  const whole = bySeat.filter((seat) => seat.orders.length === replicates);
  const rows = whole.map((seat) => samples.map((sample) => seat.orders.reduce((sum, order) => sum + order.samples.indexOf(sample) + 1, 0) / replicates));
  const frame = {
    trait: items.find((item) => item.kind === 'ask')?.name ?? '', assessors: whole.length, replicates, alpha, bySeat,
    leftOut: bySeat.filter((seat) => seat.orders.length > 0 && seat.orders.length < replicates).map((seat) => seat.seat),
  };
  const test = rows.length >= 2 ? orNull(() => friedman(rows)) : null;
  if (!test) {
    const cells = samples.map((sample, j) => ({ sample, rankSum: rows.reduce((sum, row) => sum + row[j]!, 0), meanRank: rows.length > 0 ? rows.reduce((sum, row) => sum + row[j]!, 0) / rows.length : NaN, letters: '' }));
    const why = rows.length < 2 ? 'A test needs whole orders by two people at least.' : 'Nobody told any two samples apart.';
    return { kind: 'order', order: { ...frame, cells: cells.filter((cell) => !Number.isNaN(cell.meanRank)), friedman: null, kendallW: null, hsd: null, isShown: false, whyNot: why } };
  }
  const exact = rows.length < SMALL_PANEL ? orNull(() => friedmanPermutation(rows, { budget: BUDGET })) : null;
  const p = exact?.p ?? test.imanDavenport.p;
  const isShown = p <= alpha;
  const pairs = compareRankSums(rows, alpha).pairs.filter((pair) => pair.exceedsHsd);
  // Letters speak only where the test over all samples does.
  const letters = compactLetters(test.rankSums, isShown ? pairs.map((pair) => [pair.a, pair.b] as const) : []);
  return {
    kind: 'order',
    order: {
      ...frame,
      cells: samples.map((sample, j) => ({ sample, rankSum: test.rankSums[j]!, meanRank: test.meanRanks[j]!, letters: letters[j]! })),
      friedman: { statistic: test.chiSquare, df: test.df, p, isExact: exact?.method === 'exact' },
      kendallW: test.kendallW, hsd: rankSumHsd(rows.length, samples.length, alpha), isShown, whyNot: null,
    },
  };
}

/** What a ranking says, in sentences. */
export function orderSays(found: Found, samples: readonly SampleView[]): VerdictView {
  const order = viewOf(found, 'order');
  const trait = order.trait.toLowerCase();
  if (!order.friedman) return { headline: 'Nothing could be tested.', sentences: [order.whyNot ?? ''], reach: ['The rank sums below say what was ordered, and no more.'] };
  const sorted = [...order.cells].sort((a, b) => a.rankSum - b.rankSum);
  const nameOf = (sample: number) => samples.find((view) => view.sample === sample)!.label;
  const inOrder = listWords(sorted.map((cell) => nameOf(cell.sample)));
  const headline = order.isShown ? `An order was shown in ${trait}: from least to most ${inOrder}.` : `No order was shown in ${trait}.`;
  const apart = sorted.flatMap((a, i) => sorted.slice(i + 1).filter((b) => ![...a.letters].some((letter) => b.letters.includes(letter))).map((b) => `${nameOf(b.sample)} above ${nameOf(a.sample)}`));
  const sentences = order.isShown
    ? [apart.length > 0 ? `Shown pair by pair: ${listWords(apart)}.` : `A difference was shown over all (${sayP(order.friedman.p)}), but not for any single pair.`]
    : [`${count(order.assessors, 'person', 'people')} ordered them (${sayP(order.friedman.p)} at ${showPercent(order.alpha)} risk).`];
  return {
    headline, sentences,
    reach: [...(order.isShown ? [] : ['Not shown is not alike.']), 'An order says which is more, not by how much: a profile says that.', 'It speaks of these pulls, on that day, to this panel.'],
  };
}

export function orderCautions(found: Found): string[] {
  const order = viewOf(found, 'order');
  const warnings: string[] = [];
  if (order.leftOut.length > 0) warnings.push(`Orders are missing (${order.leftOut.length === 1 ? 'seat' : 'seats'} ${listWords(order.leftOut)}): only people with whole orders are counted.`);
  if (order.assessors > 0 && order.assessors < 12) warnings.push(`${count(order.assessors, 'person', 'people')} only: a ranking is usually made by 12 or more, and fewer show large differences only (common practice).`);
  if (order.replicates > 1) warnings.push('Several orders by one person were averaged: each person counts once.');
  return warnings;
}
