import { binomialTest, CHANCE, distinguishers, dPrime, minimumCorrect, power, proportionFromDistinguishers, smallestPanel, type Protocol } from '@/stats';
import { setAnswers, type SetAnswer } from './evidence';
import { viewOf, type Found, type MethodQuestion } from './found';
import { count, sayP, showPercent } from './format';
import type { ChoiceView, VerdictView } from './types';

/** True shares of people who taste it, for which the panel's chance of showing it is given. */
const SHARES = [0.2, 0.3, 0.5, 0.7];

/** Power at which the needed panel is stated. */
const GOAL = 0.8;

const finiteOrNull = (value: number): number | null => (Number.isFinite(value) ? value : null);

/** Glasses of the set that hold the same sample as this one. */
const alike = (set: SetAnswer, sample: number) => set.glasses.filter((glass) => glass.sample === sample).length;

/** What a right answer is. Null: not answered. */
const IS_RIGHT: Record<Exclude<Protocol, 'two_afc' | 'three_afc'>, (set: SetAnswer) => boolean> = {
  triangle: (set) => alike(set, set.picked[0]!.sample) === 1,
  tetrad: (set) => set.picked[0]!.sample === set.picked[1]!.sample,
  // The first glass is the reference.
  duo_trio: (set) => set.picked[0]!.sample === set.glasses[0]!.sample,
  two_out_of_five: (set) => set.picked[0]!.sample === set.picked[1]!.sample && alike(set, set.picked[0]!.sample) === 2,
};

export type ChoiceProtocol = keyof typeof IS_RIGHT;

const PICKS: Record<ChoiceProtocol, number> = { triangle: 1, tetrad: 2, duo_trio: 1, two_out_of_five: 2 };

/**
 * A forced choice of the answers given: exact one-sided binomial against guessing, share of
 * distinguishers with exact limits, d′ where Thurstone's model has one, and the chance that so many answers
 * would have shown a true difference. Sets that nobody answered count nowhere.
 */
export function choiceFound({ answers, glasses, seats, alpha }: MethodQuestion, protocol: ChoiceProtocol, orders: number): Found {
  const sets = setAnswers(answers.choices, glasses, seats).map((set) => ({ ...set, isCorrect: set.picked.length === PICKS[protocol] ? IS_RIGHT[protocol](set) : null }));
  const given = sets.filter((set) => set.isCorrect !== null);
  const n = given.length;
  const correct = given.filter((set) => set.isCorrect).length;
  const guesses = given.filter((set) => set.isGuess);
  const chance = CHANCE[protocol];
  const half = smallestPanel(GOAL, { alpha, chance, pc: proportionFromDistinguishers(0.5, chance) }).first;
  const frame = {
    n, correct, guesses: guesses.length, correctGuesses: guesses.filter((set) => set.isCorrect).length,
    sets: Math.max(1, ...sets.map(({ set }) => set)), unanswered: sets.length - n, alpha, chance, orders, neededForHalf: half,
    bySeat: seats.filter((seat) => seat.isClaimed).map((seat) => ({
      seat: seat.number, name: seat.name,
      sets: sets.filter((set) => set.seat === seat).map(({ set, isCorrect, isGuess }) => ({ set, isCorrect, isGuess })),
    })),
  };
  if (n === 0) {
    return { kind: 'choice', choice: { ...frame, p: null, minimumCorrect: null, isShown: false, pd: null, dPrime: null, power: [], whyNot: 'Nobody answered, so there is nothing to test.' } };
  }
  const least = minimumCorrect(n, alpha, chance);
  const share = distinguishers({ correct, n, chance });
  return {
    kind: 'choice',
    choice: {
      ...frame,
      p: binomialTest({ correct, n, chance }).p,
      minimumCorrect: least,
      isShown: least !== null && correct >= least,
      pd: { value: share.pd, lower: share.exact.pd.lower, upper: share.exact.pd.upper },
      dPrime: protocol === 'two_out_of_five' ? null : sizeOf(protocol, correct, n),
      power: SHARES.map((pd) => ({ pd, power: power(n, { alpha, chance, pc: proportionFromDistinguishers(pd, chance) }) })),
      whyNot: null,
    },
  };
}

function sizeOf(protocol: Exclude<ChoiceProtocol, 'two_out_of_five'>, correct: number, n: number): NonNullable<ChoiceView['dPrime']> {
  const size = dPrime({ protocol, correct, n });
  return { value: finiteOrNull(size.dPrime), lower: size.likelihood.lower, upper: finiteOrNull(size.likelihood.upper) };
}

function limitsWords({ value, lower: low, upper: high }: NonNullable<ChoiceView['pd']>): string {
  const best = value <= 0 ? 'none' : showPercent(value);
  return `The best guess of the share of people who taste a difference is ${best}; ${low <= 0 ? 'none' : showPercent(low)} to ${showPercent(Math.max(0, high))} would fit these answers too.`;
}

/** What a forced choice says, in sentences. */
export function choiceSays(found: Found): VerdictView {
  const choice = viewOf(found, 'choice');
  const { n, correct, p, minimumCorrect: least, pd, isShown, alpha } = choice;
  if (p === null || pd === null) return { headline: 'Nothing could be tested.', sentences: [choice.whyNot ?? ''], reach: [] };
  const headline = `${isShown ? 'A difference was shown' : 'No difference was shown'}: ${correct} of ${count(n, 'answer')} ${correct === 1 ? 'was' : 'were'} right.`;
  const needed = least === null ? `With ${count(n, 'answer')} no number correct would have been enough at ${showPercent(alpha)}.` : `${least} of ${n} were needed at ${showPercent(alpha)} risk.`;
  const beside = [limitsWords(pd)];
  if (choice.guesses > 0) beside.push(`${choice.guesses} of ${n} said that they guessed; ${choice.correctGuesses === 0 ? 'none' : choice.correctGuesses} of those ${choice.correctGuesses < 2 ? 'was' : 'were'} right.`);
  const third = choice.power.find((point) => point.pd === 0.3);
  const reach = isShown
    ? ['It says that the two differ, not in what, nor which is better: a paired test or a profile answers that.', 'It speaks of these two pulls, on that day, to this panel.']
    : [
        `Not shown is not alike: had ${showPercent(third!.pd)} of people tasted a difference, this test would have shown it with a chance of ${showPercent(third!.power)}.`,
        'To claim likeness, plan a test for it beforehand, with about 60 people (ISO 4120).',
      ];
  return { headline, sentences: [`${needed} Guessing alone gives ${correct} or more with ${sayP(p)}.`], reach: [...beside, ...reach] };
}

/** The assumptions and weak points that travel with a forced choice. */
export function choiceCautions(found: Found): string[] {
  const choice = viewOf(found, 'choice');
  const warnings: string[] = [];
  if (choice.n > 0 && choice.n < choice.neededForHalf) {
    warnings.push(`${count(choice.n, 'answer')} can show only a gross difference: ${choice.neededForHalf} show one that half of the people taste (${showPercent(choice.alpha)} and 20 % risk).`);
  }
  return [...warnings, ...setCautions(choice)];
}

/** What concerns every method that is answered set by set. */
export function setCautions({ n, unanswered, sets, orders }: { n: number; unanswered: number; sets: number; orders: number }): string[] {
  const warnings: string[] = [];
  if (unanswered > 0) warnings.push(`${count(unanswered, 'set')} unanswered: not counted either way.`);
  if (n > 0 && n % orders !== 0) warnings.push(`The ${orders} orders did not come equally often, so a leaning to one place is not wholly evened out.`);
  if (sets > 1) warnings.push('Several sets by one person: the test of a difference stays valid, a claim of likeness would not (ISO 10399, note to 6.2, by analogy).');
  return warnings;
}
