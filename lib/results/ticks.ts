import { cochranQ, cochranQPermutation, compactLetters, mcnemar } from '@/stats';
import { orNull } from './agreement';
import { glassFinder, type GlassFact } from './evidence';
import { viewOf, type Found, type MethodQuestion } from './found';
import { count, listWords, sayP } from './format';
import { likingLine } from './profile-family';
import type { SampleView, TickLineView, TicksView, VerdictView } from './types';

/** Informative people times samples from which chi-square may be trusted (Tate and Brown); below, arrangements are counted. */
const ENOUGH = 24;
const BUDGET = 300_000;

/** From this many tested words on, one that stands out alone is called exploratory. */
const MANY = 5;

/** Holm's step-down: which of the pairs are shown at alpha with the chance of any false one kept. */
export function holmShown<Pair extends { p: number }>(pairs: readonly Pair[], alpha: number): Pair[] {
  const sorted = [...pairs].sort((a, b) => a.p - b.p);
  const first = sorted.findIndex((pair, i) => pair.p > alpha / (sorted.length - i));
  return first < 0 ? sorted : sorted.slice(0, first);
}

interface Cell {
  glass: GlassFact;
  value: number;
}

/**
 * Words ticked, or found in a note and confirmed: how often for each sample, Cochran's Q over the people who
 * answered every sample (a word counts for a person's sample when it stands in at least half of its glasses), pairs by
 * McNemar's exact test with Holm's correction. A word that was left alone on an answered glass counts as no.
 */
export function ticksFound(question: MethodQuestion, kind: TicksView['kind']): Found {
  const { answers, glasses, seats, items, samples, alpha } = question;
  const find = glassFinder(glasses);
  const claimed = seats.filter((seat) => seat.isClaimed);
  const answered = new Set([...answers.scores, ...answers.comments, ...answers.faults].flatMap((op) => (find(op) ? [`${op.seatId}/${op.block}/${op.position}`] : [])));
  const isAnswered = (glass: GlassFact) => answered.has(`${glass.seatId}/${glass.block}/${glass.position}`) || claimed.some((seat) => seat.id === glass.seatId && seat.isSubmitted);
  const own = glasses.filter((glass) => claimed.some((seat) => seat.id === glass.seatId) && isAnswered(glass));
  const whole = claimed.filter((seat) => samples.every((sample) => own.some((glass) => glass.seatId === seat.id && glass.sample === sample)));
  const likingItem = items.find((item) => item.kind === 'liking');
  const likingOf = new Map(answers.scores.filter((op) => op.item === likingItem?.item).map((op) => [`${op.seatId}/${op.block}/${op.position}`, op.number!]));
  const lines = items.filter((item) => item.kind === kind).flatMap((item): TickLineView[] => {
    const values = new Map(answers.scores.filter((op) => op.item === item.item).map((op) => [`${op.seatId}/${op.block}/${op.position}`, op.number!]));
    const cells: Cell[] = own.map((glass) => ({ glass, value: values.get(`${glass.seatId}/${glass.block}/${glass.position}`) ?? 0 }));
    // Of the whole lexicon only what somebody named is a result.
    if (kind === 'term' && cells.every((cell) => cell.value === 0)) return [];
    const matrix = whole.map((seat) => samples.map((sample) => {
      const mine = cells.filter((cell) => cell.glass.seatId === seat.id && cell.glass.sample === sample);
      return Number(mine.filter((cell) => cell.value > 0).length * 2 >= mine.length);
    }));
    const test = matrix.length >= 2 && samples.length >= 2 ? orNull(() => cochranQ(matrix)) : null;
    const isFew = test !== null && test.informativeBlocks * samples.length < ENOUGH;
    const exact = isFew ? orNull(() => cochranQPermutation(matrix, { budget: BUDGET })) : null;
    const p = exact?.p ?? test?.p ?? null;
    const pairs = p !== null && p <= alpha ? holmShown(pairsOf(matrix, samples.length), alpha) : [];
    const rate = (sample: number) => {
      const mine = cells.filter((cell) => cell.glass.sample === sample);
      const named = mine.filter((cell) => cell.value > 0);
      return { sample, ticked: named.length, of: mine.length, strength: kind === 'term' && named.length > 0 ? named.reduce((sum, cell) => sum + cell.value, 0) / named.length : null };
    };
    const rates = samples.map(rate);
    const letters = p === null ? samples.map(() => '') : compactLetters(rates.map(({ ticked, of }) => (of > 0 ? ticked / of : 0)), pairs.map((pair) => [pair.a, pair.b] as const));
    return [{
      item: item.item, name: item.name, phase: item.phase, counts: rates.map((cell, j) => ({ ...cell, letters: letters[j]! })),
      p, isExact: exact?.method === 'exact', lift: likingItem ? liftOf(cells, likingOf) : null,
    }];
  });
  if (kind === 'term') lines.sort((a, b) => total(b) - total(a));
  return {
    kind: 'ticks',
    ticks: {
      kind, lines, assessors: whole.length, alpha,
      liking: likingItem ? likingLine(question, likingItem) : null,
      whyNot: own.length === 0 ? 'Nobody answered a glass.' : whole.length < 2 ? 'A test needs two people who answered every sample.' : null,
    },
  };
}

const total = (line: TickLineView) => line.counts.reduce((sum, cell) => sum + cell.ticked, 0);

function pairsOf(matrix: readonly (readonly number[])[], samples: number): { a: number; b: number; p: number }[] {
  const pairs: { a: number; b: number; p: number }[] = [];
  for (let a = 0; a < samples; a += 1) {
    for (let b = a + 1; b < samples; b += 1) {
      const only = (x: number, y: number) => matrix.filter((row) => row[x] === 1 && row[y] === 0).length;
      pairs.push({ a, b, p: mcnemar(only(a, b), only(b, a)).pExact });
    }
  }
  return pairs;
}

function liftOf(cells: readonly Cell[], likingOf: ReadonlyMap<string, number>): TickLineView['lift'] {
  const sides = [true, false].map((isTicked) =>
    cells.filter((cell) => (cell.value > 0) === isTicked).flatMap(({ glass }) => likingOf.get(`${glass.seatId}/${glass.block}/${glass.position}`) ?? []));
  const [ticked, left] = sides as [number[], number[]];
  if (ticked.length === 0 || left.length === 0) return null;
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  return { difference: mean(ticked) - mean(left), with: ticked.length, without: left.length };
}

/** What the words say, in sentences. */
export function ticksSays(found: Found, samples: readonly SampleView[]): VerdictView {
  const ticks = viewOf(found, 'ticks');
  const tested = ticks.lines.filter((line) => line.p !== null);
  const shown = tested.filter((line) => line.p! <= ticks.alpha);
  const verb = ticks.kind === 'check' ? 'ticked' : 'named';
  if (tested.length === 0) {
    const most = ticks.lines.slice(0, 3).map((line) => line.name.toLowerCase());
    return { headline: most.length > 0 ? `Nothing could be tested; most ${verb}: ${listWords(most)}.` : 'Nothing could be tested.', sentences: ticks.whyNot ? [ticks.whyNot] : [], reach: [`The counts below say what was ${verb}, and no more.`] };
  }
  const headline = shown.length > 0 ? `The samples were told apart by ${count(shown.length, 'word')} of ${tested.length}.` : `No word of ${tested.length} told the samples apart.`;
  const sentences = shown.map((line) => {
    const top = [...line.counts].sort((a, b) => b.ticked / b.of - a.ticked / a.of)[0]!;
    return `${line.name} was ${verb} most of ${samples.find((view) => view.sample === top.sample)!.label} (${top.ticked} of ${top.of}; ${sayP(line.p!)}).`;
  });
  return { headline, sentences, reach: ['A word that was not shown to differ may still differ: so few ticks show only large differences.', 'It speaks of these pulls, on that day, to these people.'] };
}

export function ticksCautions(found: Found): string[] {
  const ticks = viewOf(found, 'ticks');
  const tested = ticks.lines.filter((line) => line.p !== null);
  const warnings: string[] = [];
  if (ticks.assessors > 0 && ticks.assessors < 30) warnings.push(`${count(ticks.assessors, 'person', 'people')} answered every sample: words that are ticked or named need many people to tell samples apart (common practice: 60 or more).`);
  if (tested.length >= MANY) warnings.push(`${tested.length} words were tested: with no difference at all about ${(tested.length * ticks.alpha).toFixed(1)} of them would still seem to show one. One that stands out alone is exploratory.`);
  if (ticks.lines.some((line) => line.lift)) warnings.push('Liking with a word less liking without it goes together with the word; it is not shown to come of it.');
  return warnings;
}
