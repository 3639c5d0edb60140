import { minimumCorrect, pairedPreference } from '@/stats';
import { setAnswers } from './evidence';
import { setCautions } from './choice';
import { viewOf, type Found, type MethodQuestion } from './found';
import { count, sayP, showPercent } from './format';
import type { PairFoundView, SampleView, VerdictView } from './types';

/** Orders of a pair: AB and BA. */
const ORDERS = 2;

/**
 * Two samples compared: exact two-sided binomial that both are chosen equally often, with the share of
 * the first and its exact limits. Two-sided, since which of them would have more was not fixed beforehand.
 */
export function pairFound({ answers, glasses, seats, items, samples, alpha }: MethodQuestion, asks: PairFoundView['asks']): Found {
  const sets = setAnswers(answers.choices, glasses, seats).map((set) => ({ ...set, sample: set.picked[0]?.sample ?? null }));
  const chosen = samples.map((sample) => ({ sample, count: sets.filter((set) => set.sample === sample).length }));
  const n = chosen.reduce((sum, { count: times }) => sum + times, 0);
  const frame = {
    asks, trait: items.find((item) => item.kind === 'ask')?.name ?? null, n, unanswered: sets.length - n, sets: Math.max(1, ...sets.map(({ set }) => set)), alpha, chosen,
    bySeat: seats.filter((seat) => seat.isClaimed).map((seat) => ({
      seat: seat.number, name: seat.name, sets: sets.filter((set) => set.seat === seat).map(({ set, sample, isGuess }) => ({ set, sample, isGuess })),
    })),
  };
  if (n === 0) return { kind: 'pair', pair: { ...frame, p: null, needed: null, isShown: false, share: null, whyNot: 'Nobody answered, so there is nothing to test.' } };
  const test = pairedPreference(chosen[0]!.count, chosen[1]!.count);
  const needed = minimumCorrect(n, alpha, 1 / 2, { twoSided: true });
  return {
    kind: 'pair',
    pair: {
      ...frame, p: test.pTwoSided, needed, isShown: needed !== null && Math.max(...chosen.map(({ count: times }) => times)) >= needed,
      share: { value: test.share, low: test.lower, high: test.upper }, whyNot: null,
    },
  };
}

/** What a pair says, in sentences. */
export function pairSays(found: Found, samples: readonly SampleView[]): VerdictView {
  const pair = viewOf(found, 'pair');
  if (pair.p === null || pair.share === null) return { headline: 'Nothing could be tested.', sentences: [pair.whyNot ?? ''], reach: [] };
  const [first, second] = [...pair.chosen].sort((a, b) => b.count - a.count);
  const nameOf = (sample: number) => samples.find((view) => view.sample === sample)?.label ?? '';
  const what = pair.asks === 'liked' ? 'a preference' : `a difference in ${pair.trait?.toLowerCase() ?? 'the trait'}`;
  const headline = pair.isShown
    ? `${nameOf(first!.sample)} ${pair.asks === 'liked' ? 'was liked better' : `has more ${pair.trait?.toLowerCase() ?? 'of it'}`}: ${first!.count} of ${pair.n} chose it.`
    : `${what.charAt(0).toUpperCase()}${what.slice(1)} was not shown: ${first!.count} chose ${nameOf(first!.sample)}, ${second!.count} ${nameOf(second!.sample)}.`;
  const needed = pair.needed === null ? `So few answers could not show ${what} at ${showPercent(pair.alpha)}.` : `${pair.needed} of ${pair.n} for one of the two were needed at ${showPercent(pair.alpha)} risk.`;
  const a = samples.find((view) => view.sample === pair.chosen[0]!.sample);
  return {
    headline,
    sentences: [`${needed} Were both chosen alike, so uneven a count or a more uneven one comes with ${sayP(pair.p)} (two-sided).`],
    reach: [
      `Of all such people ${showPercent(pair.share.low)} to ${showPercent(pair.share.high)} might choose ${a?.label ?? 'the first'} (95 % limits).`,
      ...(pair.isShown ? [] : ['Not shown is not alike.']),
      pair.asks === 'liked' ? 'It speaks of these people: a few from the cellar are not those who buy.' : 'It says which has more of this one trait, not by how much, nor whether that is wanted.',
    ],
  };
}

export const pairCautions = (found: Found): string[] => {
  const pair = viewOf(found, 'pair');
  const few = pair.n > 0 && pair.n < 30 ? [`${count(pair.n, 'answer')} can show only a clear majority: about 30 are usual for a directional pair, 60 for a preference (common practice).`] : [];
  return [...few, ...setCautions({ ...pair, orders: ORDERS })];
};
