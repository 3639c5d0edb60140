import { agreementOf } from './agreement';
import { longScores, type GlassFact, type LongScore, type OperationFact, type SeatFact } from './evidence';
import { judgePanel, type NamedLine } from './panel';
import { analyseLine, wereShownToDiffer, type LineNumbers } from './profile-line';
import type { LineView, ProfileView, ScaleView } from './types';
import type { Phase } from '@/db/enums';

export interface LineFact {
  item: number;
  name: string;
  phase: Phase;
  definition: string;
  lowAnchor: string;
  highAnchor: string;
}

export interface ProfileQuestion {
  lines: readonly LineFact[];
  scores: readonly OperationFact[];
  glasses: readonly GlassFact[];
  seats: readonly SeatFact[];
  /** Sample numbers, in the order of columns. */
  samples: readonly number[];
  replicates: number;
  alpha: number;
  scale: ScaleView;
}

/** How many lines per sample are named as highest or lowest. */
const NAMED = 3;

function lineView(line: LineFact, numbers: LineNumbers): LineView {
  const { table, complete: _complete, assessors, ...rest } = numbers;
  const agreement = table ? agreementOf(table) : { kendallW: null, kendallP: null, icc: null };
  return { ...line, ...rest, ...agreement, assessors: assessors.length };
}

/**
 * The lines on which a sample stands most above or below the others, only where the line showed a
 * difference and the sample was shown to differ from at least one; by distance from the mean of the samples in units of what could be shown.
 */
function extremesOf(sample: number, lines: readonly LineView[], alpha: number): { sample: number; highest: string[]; lowest: string[] } {
  const marked = lines.flatMap((line) => {
    const own = line.cells.find((cell) => cell.sample === sample);
    if (!own || !line.smallestDifference || line.product!.p > alpha || !line.cells.some((cell) => wereShownToDiffer(cell, own))) return [];
    const level = line.cells.reduce((sum, cell) => sum + cell.mean, 0) / line.cells.length;
    return [{ name: line.name, distance: (own.mean - level) / line.smallestDifference }];
  });
  const side = (sign: number) => marked.filter((m) => m.distance * sign > 0).sort((a, b) => (b.distance - a.distance) * sign).slice(0, NAMED).map((m) => m.name);
  return { sample, highest: side(1), lowest: side(-1) };
}

/** Which pairs a line showed to differ, in a form that can be compared. */
const pattern = (numbers: LineNumbers, alpha: number): string => {
  if (!numbers.product || numbers.product.p > alpha) return '';
  return numbers.cells
    .flatMap((a) => numbers.cells.filter((b) => a.mean > b.mean && wereShownToDiffer(a, b)).map((b) => `${a.sample}>${b.sample}`))
    .sort()
    .join(' ');
};

/** Everything that a profile session shows: each line, each sample's marks, and the panel itself. */
export function analyseProfile({ lines, scores, glasses, seats, samples, replicates, alpha, scale }: ProfileQuestion): ProfileView {
  const rowsOf = longScores(scores, glasses, seats);
  const analyse = (rows: readonly LongScore[]) => analyseLine(rows, samples, replicates, alpha, scale);
  const named: (NamedLine & { line: LineFact; rows: LongScore[] })[] = lines.map((line) => {
    const rows = rowsOf.get(line.item) ?? [];
    return { line, name: line.name, rows, numbers: analyse(rows) };
  });
  const steadiness = (seat: number) => {
    const tested = named.filter(({ numbers }) => numbers.product !== null && numbers.assessors.includes(seat));
    const kept = tested.filter(({ rows, numbers }) => pattern(analyse(rows.filter((row) => row.assessor !== seat)), alpha) === pattern(numbers, alpha));
    return { kept: kept.length, of: tested.length };
  };
  const views = named.map(({ line, numbers }) => lineView(line, numbers));
  return {
    scale,
    lines: views,
    replicates,
    alpha,
    extremes: samples.map((sample) => extremesOf(sample, views, alpha)),
    panel: judgePanel(seats, named, alpha, steadiness),
  };
}
