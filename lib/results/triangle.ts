import { binomialTest, CHANCE, distinguishers, dPrime, minimumCorrect, power, proportionFromDistinguishers, smallestPanel } from '@/stats';
import type { SeatFact, TriangleAnswer } from './evidence';
import type { TriangleView } from './types';

const CHANCE_OF_ONE = CHANCE.triangle;

/** True shares of people who taste it, for which the panel's chance of showing it is given. */
const SHARES = [0.2, 0.3, 0.5, 0.7];

/** Power at which the needed panel is stated. */
const GOAL = 0.8;

const neededForHalf = (alpha: number): number =>
  smallestPanel(GOAL, { alpha, chance: CHANCE_OF_ONE, pc: proportionFromDistinguishers(0.5, CHANCE_OF_ONE) }).first;

const finiteOrNull = (value: number): number | null => (Number.isFinite(value) ? value : null);

/**
 * The triangle test of the answers given: exact one-sided binomial against one third, share of
 * distinguishers with exact limits, d′, and the chance that so many answers would have shown a true
 * difference. Sets that nobody answered count nowhere.
 */
export function analyseTriangle(answers: readonly TriangleAnswer[], seats: readonly SeatFact[], alpha: number): TriangleView {
  const given = answers.filter((answer) => answer.isCorrect !== null);
  const n = given.length;
  const correct = given.filter((answer) => answer.isCorrect).length;
  const guesses = given.filter((answer) => answer.isGuess);
  const bySeat = seats
    .filter((seat) => seat.isClaimed)
    .map((seat) => ({
      seat: seat.number, name: seat.name,
      sets: answers.filter((a) => a.seat === seat.number).map(({ set, isCorrect, isGuess }) => ({ set, isCorrect, isGuess })),
    }));
  const frame = {
    n, correct, guesses: guesses.length, correctGuesses: guesses.filter((a) => a.isCorrect).length,
    sets: Math.max(1, ...answers.map((a) => a.set)), unanswered: answers.length - n, alpha, neededForHalf: neededForHalf(alpha), bySeat,
  };
  if (n === 0) {
    return { ...frame, p: null, minimumCorrect: null, isShown: false, pd: null, dPrime: null, power: [], whyNot: 'Nobody answered, so there is nothing to test.' };
  }
  const least = minimumCorrect(n, alpha, CHANCE_OF_ONE);
  const size = dPrime({ protocol: 'triangle', correct, n });
  const share = distinguishers({ correct, n, chance: CHANCE_OF_ONE });
  return {
    ...frame,
    p: binomialTest({ correct, n, chance: CHANCE_OF_ONE }).p,
    minimumCorrect: least,
    isShown: least !== null && correct >= least,
    pd: { value: share.pd, lower: share.exact.pd.lower, upper: share.exact.pd.upper },
    dPrime: { value: finiteOrNull(size.dPrime), lower: size.likelihood.lower, upper: finiteOrNull(size.likelihood.upper) },
    power: SHARES.map((pd) => ({ pd, power: power(n, { alpha, chance: CHANCE_OF_ONE, pc: proportionFromDistinguishers(pd, CHANCE_OF_ONE) }) })),
    whyNot: null,
  };
}
