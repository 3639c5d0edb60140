import type { ChoiceView, PairFoundView } from '../results/types';
import { figuresUnder, type Figure } from './figure';

/** The figures of a forced choice with a right answer. */
export function choiceFigures(choice: ChoiceView): Figure[] {
  const { n, correct, guesses, correctGuesses, unanswered, p, minimumCorrect, pd, dPrime, power, neededForHalf } = choice;
  return [
    ...figuresUnder('choice', 'Choices', { n, correct, guesses, correct_guesses: correctGuesses, unanswered, p, minimum_correct: minimumCorrect, needed_for_half: neededForHalf }),
    ...(pd ? figuresUnder('choice.pd', 'Share who taste it', { value: pd.value, low: pd.lower, high: pd.upper }) : []),
    ...(dPrime ? figuresUnder('choice.d_prime', 'Size of the difference, d′', { value: dPrime.value, low: dPrime.lower, high: dPrime.upper }) : []),
    ...power.flatMap((point) => figuresUnder('choice.power', 'Chance to show it, percent who taste it', { [Math.round(point.pd * 100)]: point.power })),
  ];
}

/** The figures of a pair in which no answer is right. */
export function pairFigures({ n, unanswered, chosen, p, needed, share }: PairFoundView): Figure[] {
  return [
    ...figuresUnder('pair', 'Pairs', { n, unanswered, p, needed }),
    ...chosen.flatMap(({ sample, count }) => figuresUnder('pair.chosen', 'Chose sample', { [sample]: count })),
    ...(share ? figuresUnder('pair.share', 'Share for the first sample', { value: share.value, low: share.low, high: share.high }) : []),
  ];
}
