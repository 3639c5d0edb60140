import { assessorPerformance, type AssessorPerformance } from '@/stats';
import type { SeatFact } from './evidence';
import { count, listWords } from './format';
import type { LineNumbers } from './profile-line';
import type { PanelistView, PanelView } from './types';

/** Below this mean correlation with the rest a panelist needs a refresher (common practice, no standard). */
const AGREEMENT_FLOOR = 0.4;

/** A correlation as negative as this means that the line was read the other way round. */
const REVERSED = -0.4;

/** A panel of fewer says little, however well each one did. */
const FEW = 5;

/** Repeats that are wider than this many times the panel's median need a refresher. */
const LOOSE = 2;

export interface NamedLine {
  name: string;
  numbers: LineNumbers;
}

const isShown = (line: NamedLine, alpha: number) => line.numbers.product !== null && line.numbers.product.p <= alpha;

interface Own {
  line: NamedLine;
  figures: AssessorPerformance;
}

/** A panelist's figures on every line that he or she scored wholly. */
function ownFigures(lines: readonly NamedLine[]): Map<number, Own[]> {
  const bySeat = new Map<number, Own[]>();
  for (const line of lines) {
    if (!line.numbers.table) continue;
    assessorPerformance(line.numbers.table).forEach((figures, index) => {
      const seat = line.numbers.complete[index]!;
      bySeat.set(seat, [...(bySeat.get(seat) ?? []), { line, figures }]);
    });
  }
  return bySeat;
}

const mean = (values: readonly number[]): number | null => (values.length === 0 ? null : values.reduce((sum, value) => sum + value, 0) / values.length);

function median(values: readonly number[]): number | null {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length / 2;
  return sorted.length === 0 ? null : Number.isInteger(middle) ? (sorted[middle - 1]! + sorted[middle]!) / 2 : sorted[Math.floor(middle)]!;
}

function panelistOf(seat: SeatFact, own: readonly Own[], alpha: number): Omit<PanelistView, 'word'> {
  const telling = own.filter(({ line }) => isShown(line, alpha));
  const tested = own.filter(({ figures }) => figures.p !== null);
  const best = tested.filter(({ figures }) => Number.isFinite(figures.f)).sort((a, b) => b.figures.f! - a.figures.f!)[0];
  const meanSquare = mean(own.flatMap(({ figures }) => figures.msError ?? []));
  return {
    seat: seat.number,
    name: seat.name,
    agreement: mean(telling.flatMap(({ figures }) => figures.agreement ?? [])),
    discriminated: tested.length > 0 ? tested.filter(({ figures }) => figures.p! <= alpha).length : null,
    bestF: best ? { F: best.figures.f!, p: best.figures.p!, line: best.line.name } : null,
    repeatability: meanSquare === null ? null : Math.sqrt(meanSquare),
    reversed: telling.filter(({ figures }) => (figures.agreement ?? 0) <= REVERSED).map(({ line }) => line.name),
  };
}

function wordFor(person: Omit<PanelistView, 'word'>, shown: number, usual: number | null): PanelistView['word'] {
  const isLoose = person.repeatability !== null && usual !== null && usual > 0 && person.repeatability > LOOSE * usual;
  if (person.reversed.length > 0 || isLoose) return 'needs a refresher';
  // Where the panel as a whole showed nothing there is no common order to agree with.
  if (shown === 0 || person.agreement === null) return 'not judged';
  return person.agreement < AGREEMENT_FLOOR || person.discriminated === 0 ? 'needs a refresher' : 'fine';
}

const seatsWords = (people: readonly PanelistView[]) => `${people.length === 1 ? 'Seat' : 'Seats'} ${listWords(people.map((p) => p.seat))}`;

function sentencesOf(people: readonly PanelistView[], shown: number, steadiness: string[]): string[] {
  const sentences: string[] = people.length > 1 && people.length < FEW ? [`A panel of ${people.length} says little, however well each one did.`] : [];
  const repeats = people.flatMap((person) => person.repeatability ?? []);
  if (repeats.length > 0) sentences.push(`${repeats.length === 1 ? 'One panelist repeats' : `${repeats.length} panelists repeat`} within ${Math.ceil(Math.max(...repeats))} points.`);
  else if (people.length > 0) sentences.push('With one replicate nobody’s repeatability can be told.');
  for (const person of people.filter((p) => p.reversed.length > 0)) sentences.push(`Seat ${person.seat} used ${listWords(person.reversed.map((name) => name.toLowerCase()))} the other way round.`);
  const refreshers = people.filter((p) => p.word === 'needs a refresher');
  if (refreshers.length > 0) sentences.push(`${seatsWords(refreshers)} ${refreshers.length === 1 ? 'needs' : 'need'} a refresher.`);
  if (shown === 0) sentences.push('No line showed a difference, so agreement can’t be judged here.');
  return [...sentences, ...steadiness];
}

function headlineOf(panelists: number, refreshers: number, shown: number): string {
  if (panelists < 2) return 'Too few panelists to judge.';
  if (shown === 0) return 'Not judged.';
  if (panelists < FEW || refreshers * 2 > panelists) return 'Read with care.';
  return refreshers === 0 ? 'Enough to act on.' : 'Enough to act on, with a remark.';
}

/** For each panelist who needs a refresher: how many lines keep their answer without that seat. */
export type Steadiness = (seat: number) => { kept: number; of: number };

/**
 * Agreement, discrimination and repeatability of each panelist (in the manner of ISO 11132), in
 * words that send nobody to the bottom of a list: seats stand in their own order.
 */
export function judgePanel(seats: readonly SeatFact[], lines: readonly NamedLine[], alpha: number, steadiness: Steadiness): PanelView {
  const figures = ownFigures(lines);
  const shown = lines.filter((line) => isShown(line, alpha)).length;
  const bare = seats.filter((seat) => figures.has(seat.number)).map((seat) => panelistOf(seat, figures.get(seat.number)!, alpha));
  const usual = median(bare.flatMap((person) => person.repeatability ?? []));
  const panelists = bare.map((person) => ({ ...person, word: wordFor(person, shown, usual) }));
  const steady = panelists
    .filter((person) => person.word === 'needs a refresher')
    .map((person) => ({ seat: person.seat, ...steadiness(person.seat) }))
    .map(({ seat, kept, of }) => (kept === of ? `Without seat ${seat} the answer stays.` : `Without seat ${seat}, ${kept} of ${count(of, 'line')} keep their answer.`));
  const refreshers = panelists.filter((person) => person.word === 'needs a refresher').length;
  return { headline: headlineOf(panelists.length, refreshers, shown), sentences: sentencesOf(panelists, shown, steady), lines: lines.length, panelists };
}
