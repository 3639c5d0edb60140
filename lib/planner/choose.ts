import { CHANCE, power, smallestPanel } from '@/stats';
import { effectOfDPrime, SIZE_D_PRIME } from './effect';
import { factsOf } from '../methods/facts';
import { NEEDS_OF, mostGlassesOf, type MethodNeeds } from './methods';
import type { Method } from '@/db/enums';
import type { Choice, Choosing, Misfit, Needs, Question, UsualAndFewest } from './types';

/** Risk of a false "different", and the chances of finding the difference that a usual and a smallest panel are counted for. */
const ALPHA = 0.05;
const USUAL_POWER = 0.8;
const FEWEST_POWER = 0.5;

/** Glasses that a palate bears in one flight, and minutes between flights (common practice). */
const FLIGHT = { strong: 6, light: 8 };
const BREAK_MIN = 10;

const DIFFERENCE: readonly Method[] = ['tetrad', 'triangle', 'duo_trio', 'duo_trio_constant', 'two_of_five'];
const GENTLE_DIFFERENCE: readonly Method[] = ['duo_trio', 'duo_trio_constant', 'triangle', 'tetrad', 'two_of_five'];

/** Methods that answer a question, best first. */
function candidates({ question, samples, isStrong }: Choosing): readonly Method[] {
  const byQuestion: Record<Question, readonly Method[]> = {
    difference: [...(isStrong ? GENTLE_DIFFERENCE : DIFFERENCE), ...(samples > 2 ? (['profile', 'ranking'] as const) : [])],
    direction: ['directional_pair', 'ranking', 'profile', 'category_profile'],
    order: samples > 2 ? ['ranking', 'profile', 'category_profile'] : ['directional_pair', 'profile', 'category_profile', 'ranking'],
    taste: ['profile', 'category_profile', 'rate_all', 'check_all', 'free_note'],
    right: ['just_right', 'rate_all', 'profile'],
    liking: samples > 2 ? ['liking', 'just_right', 'preference'] : ['preference', 'liking', 'just_right'],
  };
  return byQuestion[question];
}

/** Panel of a discrimination test that finds the asked difference with the usual and the fewest's chance. */
function countedPanel(test: NonNullable<MethodNeeds['test']>, choosing: Choosing): UsualAndFewest {
  const plan = { alpha: ALPHA, chance: CHANCE[test.protocol], pc: effectOfDPrime(test.protocol, SIZE_D_PRIME[choosing.size]).pc, twoSided: test.twoSided };
  return { usual: smallestPanel(USUAL_POWER, plan).first, fewest: smallestPanel(FEWEST_POWER, plan).first };
}

function panelOf(facts: MethodNeeds, choosing: Choosing): UsualAndFewest {
  const { practice } = facts;
  const counted = facts.test && countedPanel(facts.test, choosing);
  if (!counted) return practice!;
  return practice ? { usual: Math.max(practice.usual, counted.usual), fewest: Math.max(practice.fewest, counted.fewest) } : counted;
}

function basisOf(facts: MethodNeeds, choosing: Choosing): string {
  if (facts.practice) return facts.basis;
  const size = SIZE_D_PRIME[choosing.size];
  return `counted: a ${choosing.size} difference (d′ ${size}) is found ${USUAL_POWER * 10} times in 10 by the usual panel and ${FEWEST_POWER * 10} in 10 by the fewest, at α ${ALPHA}`;
}

/** Glasses of one sample for so many people, one spare counted. */
const glassesOfSample = (facts: MethodNeeds, people: number): number => 1 + (facts.orders ? mostGlassesOf(facts.orders, people) : facts.times * people);

/**
 * The largest panel that the wine reaches for: 0 when not even one person's glasses can be poured.
 * @param wineMl millilitres of each sample, one spare glass counted
 */
export function reachOf(method: Method, wineMl: number, servingMl: number): number {
  const facts = NEEDS_OF[method];
  const glasses = Math.floor(wineMl / servingMl);
  // Each person takes at least half a glass of the sample on average, so this is beyond the answer.
  let [enough, tooMany] = [0, 2 * glasses + 2];
  while (tooMany - enough > 1) {
    const middle = Math.floor((enough + tooMany) / 2);
    if (glassesOfSample(facts, middle) <= glasses) enough = middle;
    else tooMany = middle;
  }
  return enough;
}

/** Glasses, wine and time of a method for its panel; a set test is always of two samples. */
function needsOf(facts: MethodNeeds, panelists: UsualAndFewest, choosing: Choosing): Needs {
  const { samples, servingMl, glassS, restS, isStrong } = choosing;
  const glassesEach = facts.orders ? facts.orders[0]!.length : samples * facts.times;
  const limit = isStrong ? FLIGHT.strong : FLIGHT.light;
  const flights = facts.orders ? 1 : facts.times * Math.ceil(samples / limit);
  // Glasses of a set are compared without a rest between them; single glasses are rested from.
  const rests = facts.orders ? 1 : glassesEach;
  return {
    panelists, glassesEach, flights,
    glassesInAll: { usual: glassesEach * panelists.usual, fewest: glassesEach * panelists.fewest },
    mlPerSample: { usual: servingMl * glassesOfSample(facts, panelists.usual), fewest: servingMl * glassesOfSample(facts, panelists.fewest) },
    minutesEach: Math.ceil((glassesEach * glassS + rests * restS) / 60) + BREAK_MIN * (flights - 1),
  };
}

function countReason(method: Method, samples: number): string | null {
  const { sampleCount } = factsOf(method);
  if (samples > sampleCount.max) {
    const pairs = (samples * (samples - 1)) / 2;
    return sampleCount.max === 2 ? `It compares two wines; ${samples} make ${pairs} pairs, each a test of its own.` : `It takes ${sampleCount.max} samples at most; you have ${samples}.`;
  }
  return samples < sampleCount.min ? `It needs ${sampleCount.min} samples at least; you have ${samples}.` : null;
}

function wineReason(method: Method, { panelists, mlPerSample }: Needs, { wineMl, servingMl }: Choosing): string | null {
  if (wineMl === null) return null;
  const reach = reachOf(method, wineMl, servingMl);
  if (reach >= panelists.fewest) return null;
  return `Too little wine: ${wineMl} mL of each reaches for ${reach} ${reach === 1 ? 'person' : 'people'}; the fewest, ${panelists.fewest}, need ${mlPerSample.fewest} mL.`;
}

const peopleReason = ({ panelists: { fewest } }: Needs, people: number | null): string | null =>
  people === null || people >= fewest ? null : `Too few people: it needs ${fewest} at least, and you have ${people}.`;

/** What so many people can show, in words, where a calculation says it. */
function showing(facts: MethodNeeds, people: number, choosing: Choosing): string {
  if (!facts.test || facts.practice) return '';
  const { pc } = effectOfDPrime(facts.test.protocol, SIZE_D_PRIME[choosing.size]);
  const found = power(people, { alpha: ALPHA, chance: CHANCE[facts.test.protocol], pc, twoSided: facts.test.twoSided });
  return ` They find a ${choosing.size} difference ${Math.round(100 * found)} times in 100.`;
}

function cautionsOf(method: Method, needs: Needs, choosing: Choosing): string[] {
  const facts = NEEDS_OF[method];
  const { usual, fewest } = needs.panelists;
  const reach = choosing.wineMl === null ? Infinity : reachOf(method, choosing.wineMl, choosing.servingMl);
  const at = Math.min(choosing.people ?? Infinity, reach);
  const cautions: string[] = [];
  if (reach < usual && reach >= fewest && reach === at) cautions.push(`The wine reaches for ${reach} people, not for the usual ${usual}.`);
  if (at < usual && at > 0) cautions.push(`${at} ${at === 1 ? 'person is' : 'people are'} fewer than the usual ${usual}.${showing(facts, at, choosing)}`);
  const limit = choosing.isStrong ? FLIGHT.strong : FLIGHT.light;
  if (!facts.orders && choosing.samples > limit) cautions.push(`${choosing.samples} glasses at once are too many for ${choosing.isStrong ? 'such' : 'a'} wine: ${needs.flights} flights with ${BREAK_MIN} minutes between them (common practice).`);
  if (facts.caution) cautions.push(facts.caution);
  return cautions;
}

/**
 * The methods that answer the question with what is at hand, best first, each with what it needs; and
 * those that would answer it and don't fit, with the reasons. There is always one or the other.
 * Panels of discrimination tests are the smallest that reach 80 % (usual) and 50 % (fewest) power at
 * α .05 for the asked d′, by Thurstone's psychometric functions; the others are common practice.
 * Millilitres count the most-poured sample and one spare glass; minutes are whole and rounded up.
 * @param choosing counts are whole and above 0 (lib/planner/schema.ts sees to it)
 */
export function choose(choosing: Choosing): Choice {
  const choice: Choice = { offers: [], misfits: [] };
  for (const method of candidates(choosing)) {
    const facts = NEEDS_OF[method];
    const needs = needsOf(facts, panelOf(facts, choosing), choosing);
    const offer = { method, name: factsOf(method).name, why: facts.why, needs, basis: basisOf(facts, choosing), isCounted: facts.practice === null, cautions: cautionsOf(method, needs, choosing) };
    const reasons = [countReason(method, choosing.samples), wineReason(method, needs, choosing), peopleReason(needs, choosing.people)].filter((reason) => reason !== null);
    if (reasons.length === 0) choice.offers.push(offer);
    else choice.misfits.push({ ...offer, reasons } satisfies Misfit);
  }
  return choice;
}
