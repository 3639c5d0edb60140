import { listWords, sayP, shortName } from './format';
import { wereShownToDiffer } from './profile-line';
import type { CellView, LineView, ProfileView, SampleView, ScaleView, VerdictView } from './types';

type Names = ReadonlyMap<number, string>;

const namesOf = (samples: readonly SampleView[]): Names => new Map(samples.map((sample) => [sample.sample, shortName(sample)]));

const lower = (name: string) => name.charAt(0).toLowerCase() + name.slice(1);

interface Standing {
  line: LineView;
  /** Shown to differ from every other sample, on that side. */
  aloneHigh: number | null;
  aloneLow: number | null;
}

function standingOf(line: LineView): Standing {
  const sorted = [...line.cells].sort((a, b) => b.mean - a.mean);
  const isAlone = (cell: CellView) => line.cells.every((other) => other === cell || wereShownToDiffer(cell, other));
  const top = sorted[0];
  const bottom = sorted[sorted.length - 1];
  return { line, aloneHigh: top && isAlone(top) ? top.sample : null, aloneLow: bottom && isAlone(bottom) ? bottom.sample : null };
}

const hasPair = (line: LineView) => line.cells.some((a) => line.cells.some((b) => wereShownToDiffer(a, b)));

function aloneSentences(standings: readonly Standing[], samples: readonly SampleView[]): string[] {
  return samples.flatMap(({ sample, label }) => {
    const above = standings.filter((s) => s.aloneHigh === sample).map((s) => lower(s.line.name));
    const below = standings.filter((s) => s.aloneLow === sample).map((s) => lower(s.line.name));
    const others = samples.length === 2 ? 'the other' : 'all the others';
    const parts = [above.length > 0 && `above ${others} in ${listWords(above)}`, below.length > 0 && `below ${others} in ${listWords(below)}`].filter(Boolean) as string[];
    return parts.length > 0 ? [`${label} stands ${listWords(parts)}.`] : [];
  });
}

/** More names than this are counted instead. */
const NAMED_AT_MOST = 4;

const namesOrCount = (cells: readonly CellView[], names: Names) => (cells.length > NAMED_AT_MOST ? `${cells.length} of the others` : listWords(cells.map((cell) => names.get(cell.sample)!)));

/** Lines on which nothing stands alone, by the highest sample: what it was shown to lie above. */
function pairSentences(lines: readonly LineView[], samples: readonly SampleView[]): string[] {
  const names = namesOf(samples);
  const byTop = new Map<number, string[]>();
  for (const line of lines) {
    const sorted = [...line.cells].sort((a, b) => b.mean - a.mean);
    const under = (cell: CellView) => sorted.filter((other) => other.mean < cell.mean && wereShownToDiffer(cell, other));
    const top = sorted.find((cell) => under(cell).length > 0)!;
    byTop.set(top.sample, [...(byTop.get(top.sample) ?? []), `above ${namesOrCount(under(top), names)} in ${lower(line.name)}`]);
  }
  return samples.flatMap(({ sample, label }) => (byTop.has(sample) ? [`${label} stands ${listWords(byTop.get(sample)!)}.`] : []));
}

function shownSentences(shown: readonly LineView[], samples: readonly SampleView[]): string[] {
  const standings = shown.filter(hasPair).map(standingOf);
  // Of two samples the higher one says it all.
  const sided = samples.length === 2 ? standings.map((s) => ({ ...s, aloneLow: null })) : standings;
  const open = standings.filter((s) => s.aloneHigh === null && s.aloneLow === null);
  return [
    ...aloneSentences(sided, samples),
    ...pairSentences(open.map((s) => s.line), samples),
    ...shown.filter((line) => !hasPair(line)).map((line) => `${line.name}: a difference was shown over all (${sayP(line.product!.p)}), but not for any single pair.`),
  ];
}

/** "7 to 9 points of 100"; on a short scale with a decimal. */
function range(values: readonly number[], { low: from, high: to }: ScaleView): string {
  const show = (value: number) => (to - from >= 50 ? String(Math.round(value)) : value.toFixed(1));
  const [low, high] = [show(Math.min(...values)), show(Math.max(...values))];
  return `${low === high ? low : `${low} to ${high}`} points on the scale from ${from} to ${to}`;
}

function profileReach(notShown: readonly LineView[], profile: ProfileView): string[] {
  const reach: string[] = [];
  const missed = notShown.flatMap((line) => line.smallestDifference ?? []);
  if (missed.length > 0) {
    reach.push(`Not shown is not alike: on ${missed.length === 1 ? 'that line' : 'those lines'} this panel could have shown no difference between two samples smaller than ${range(missed, profile.scale)}.`);
  }
  reach.push('It speaks of these pulls, on that day, to this panel. How much of a trait is wanted, and whether a barrel is ready, the cellar decides.');
  if (profile.lines.some((line) => line.product)) reach.push('Barrels of one lot differ: what is shown of a barrel is not shown of its lot.');
  return reach;
}

/** What a profile session says, in sentences. */
export function profileVerdict(profile: ProfileView, samples: readonly SampleView[]): VerdictView {
  const tested = profile.lines.filter((line) => line.product !== null);
  const shown = tested.filter((line) => line.product!.p <= profile.alpha);
  const notShown = tested.filter((line) => line.product!.p > profile.alpha);
  if (tested.length === 0) {
    const why = [...new Set(profile.lines.flatMap((line) => line.whyNot ?? []))];
    return { headline: 'Nothing could be tested.', sentences: why.slice(0, 3), reach: ['The means below say what was scored, and no more.'] };
  }
  if (shown.length === 0) {
    const what = tested.length === 1 ? `in ${lower(tested[0]!.name)}` : `on any of the ${tested.length} lines`;
    return { headline: `No difference was shown ${what}.`, sentences: [], reach: profileReach(notShown, profile) };
  }
  const headline = tested.length === 1 ? `The panel told the samples apart in ${lower(shown[0]!.name)}.` : `The panel told the samples apart on ${shown.length} of ${tested.length} lines.`;
  const sentences = shownSentences(shown, samples);
  if (notShown.length > 0) sentences.push(`No difference was shown in ${listWords(notShown.map((line) => lower(line.name)), 'or')}.`);
  return { headline, sentences, reach: profileReach(notShown, profile) };
}
