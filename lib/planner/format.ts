import type { DiscriminationPlan, DiscriminationQuestion } from './plan-discrimination';
import type { PlannedProtocol, Question, Size } from './types';

export const QUESTION_WORDS: Record<Question, string> = {
  difference: 'Is there a difference at all?',
  direction: 'In which direction do they differ?',
  order: 'Which order are they in?',
  taste: 'What do they taste like?',
  right: 'How much is right?',
  liking: 'Do people like it?',
};

export const SIZE_WORDS: Record<Size, string> = {
  clear: 'clear: most people notice (d′ 2)',
  middling: 'middling: many people notice (d′ 1.5)',
  slight: 'slight: attentive people notice (d′ 1)',
};

export const PROTOCOL_WORDS: Record<PlannedProtocol, string> = {
  triangle: 'Triangle', tetrad: 'Tetrad', duo_trio: 'Duo-trio', two_afc: 'Pair: direction or preference', two_out_of_five: 'Two out of five',
};

/** A chance in percent, whole or with `digits`; never 0 or 100 of what is not certain. */
export function showChance(p: number, digits = 0): string {
  const percent = (100 * p).toFixed(digits);
  if (p > 0 && Number(percent) === 0) return `under ${10 ** -digits} %`;
  return p < 1 && Number(percent) === 100 ? `over ${(100 - 10 ** -digits).toFixed(digits)} %` : `${percent} %`;
}

export const people = (n: number): string => `${n.toLocaleString('en')} ${n === 1 ? 'person' : 'people'}`;

/** A difference on the line from 0 to 100, to one decimal; more than the whole line is said so. */
export const showPoints = (points: number): string => (points > 100 ? 'over 100' : points.toFixed(1));

/** What the plan comes to: the smallest panel. */
export function headlineOf(plan: DiscriminationPlan, q: DiscriminationQuestion): string {
  if (!plan.people) return 'More than a million answers would be needed.';
  const { hopeful, safe } = plan.people;
  const panel = hopeful === safe ? people(safe) : `between ${hopeful.toLocaleString('en')} and ${people(safe)}`;
  return `The smallest panel is ${panel}${hopeful === safe ? '' : `, with ${q.replicates} sets each`}.`;
}

/** What the panel at hand can do, and the number correct that decides. */
export function sentencesOf(plan: DiscriminationPlan, q: DiscriminationQuestion): string[] {
  const { answers, power, powerIfRepeatsSayNothing, critical } = plan.atHand;
  const who = `Your ${people(q.panel)}`;
  // Exact power is saw-toothed: more answers may, seldom, find a little less.
  const [low, high] = [power, powerIfRepeatsSayNothing].sort((a, b) => a - b).map((p) => showChance(p));
  const chance = low === high ? low! : `${low} to ${high}`;
  const sentences = q.aim === 'difference'
    ? [`${who} would show a difference of that size with a chance of ${chance}; the goal is ${showChance(plan.goal)}.`]
    : [`If nobody tastes a difference, your ${people(q.panel)} would show likeness with a chance of ${chance}; the goal is ${showChance(plan.goal)}.`];
  if (critical === null) sentences.push(q.aim === 'difference' ? 'So few answers can’t show a difference at this risk, however clear it is.' : 'So few answers can’t show likeness at this risk, however alike the wines are.');
  else if (q.aim === 'difference') sentences.push(q.protocol === 'two_afc' && q.twoSided ? `At least ${critical} of ${answers} must agree on one wine.` : `At least ${critical} of ${answers} must be right.`);
  else sentences.push(`At most ${critical} of ${answers} may be right.`);
  if (plan.smallest && plan.smallest.steadyFrom > plan.smallest.answers) sentences.push(`From ${plan.smallest.steadyFrom.toLocaleString('en')} answers on, every number reaches the goal.`);
  const { pd, pc, dPrime } = plan.effect;
  sentences.push(`That size: ${showChance(pd)} of people taste it, ${showChance(pc)} of answers are right${dPrime === null ? '' : `, d′ ${dPrime.toFixed(2)}`}.`);
  return sentences;
}

/** Where the number of people at hand comes from. */
export function panelHint({ members, ballots }: { members: number; ballots: number }): string {
  if (ballots > 0) return `${ballots} ballots at most came in at a past session; the cellar has ${members} ${members === 1 ? 'member' : 'members'}.`;
  return members > 0 ? `The cellar has ${members} ${members === 1 ? 'member' : 'members'}.` : 'Nobody belongs to the cellar yet.';
}
