import type { ItemKind, Phase } from '@/db/enums';
import { placesOf } from '../ballots/values';
import { glassFinder, type CountedAnswers, type GlassFact, type OperationFact, type SeatFact } from '../results/evidence';
import type { Cell, Table } from './table';

/** What an export is made of: the facts behind the results of an unsealed session. */
export interface ExportFacts {
  answers: CountedAnswers;
  glasses: readonly GlassFact[];
  seats: readonly SeatFact[];
  items: readonly { item: number; name: string; phase: Phase; kind: ItemKind }[];
  samples: readonly { sample: number; label: string }[];
}

/** One answer that counts. What an answer of its kind does not have is null. */
export interface LongRow {
  seat: number;
  name: string | null;
  block: number | null;
  /** Place of the glass in its block; of a choice, the place of the chosen glass. */
  position: number | null;
  /** Where two glasses were chosen: the place of the other. */
  position2: number | null;
  code: string | null;
  sample: number | null;
  sampleLabel: string | null;
  item: number | null;
  itemName: string | null;
  phase: Phase | null;
  kind: OperationFact['kind'];
  /** The score; 1 for a fault that was noted. */
  value: number | null;
  /** Choices only. */
  guess: boolean | null;
  /** A comment; of an order, the places of its glasses from least to most. */
  text: string | null;
}

const KIND_ORDER = ['choice', 'order', 'score', 'fault', 'comment'];

function textOf({ kind, text }: OperationFact): string | null {
  if (text === null) return null;
  // Spaces, not commas: "2,1,3" would be taken for a number or a date.
  return kind === 'order' ? placesOf(text).join(' ') : text.trim();
}

const compare = (a: LongRow, b: LongRow): number =>
  a.seat - b.seat || (a.block ?? 0) - (b.block ?? 0) || (a.position ?? 0) - (b.position ?? 0) || KIND_ORDER.indexOf(a.kind) - KIND_ORDER.indexOf(b.kind) || (a.item ?? 0) - (b.item ?? 0);

/**
 * One row for each answer that counts, by seat, block and place: scores, faults that were noted, choices, orders and
 * comments. What was replaced, taken back or late is in no row.
 */
export function longRows({ answers, glasses, seats, items, samples }: ExportFacts): LongRow[] {
  const glassOf = glassFinder(glasses);
  const seatOf = new Map(seats.map((seat) => [seat.id, seat]));
  const itemOf = new Map(items.map((item) => [item.item, item]));
  const labelOf = new Map(samples.map((sample) => [sample.sample, sample.label]));
  const rows = [...answers.scores, ...answers.faults, ...answers.choices, ...answers.orders, ...answers.comments].flatMap((op): LongRow[] => {
    const seat = seatOf.get(op.seatId);
    if (!seat) return [];
    const glass = glassOf(op);
    const item = op.item === null ? undefined : itemOf.get(op.item);
    return [{
      seat: seat.number, name: seat.name, block: op.block, position: op.position, position2: op.kind === 'choice' ? op.number : null,
      code: glass?.code ?? null, sample: glass?.sample ?? null, sampleLabel: glass ? labelOf.get(glass.sample) ?? null : null,
      item: op.item, itemName: item?.name ?? null, phase: item?.phase ?? null, kind: op.kind,
      value: op.kind === 'score' || op.kind === 'fault' ? op.number : null,
      guess: op.kind === 'choice' ? op.isGuess ?? false : null,
      text: textOf(op),
    }];
  });
  return rows.sort(compare);
}

const yesNo = (is: boolean | null): Cell => (is === null ? null : is ? 'yes' : 'no');

/** The rows as a table. Names of panelists are left out unless asked for: the seat's number tells them apart. */
export function answersTable(rows: readonly LongRow[], { withNames = false } = {}): Table {
  return {
    columns: ['seat', ...(withNames ? ['name'] : []), 'block', 'position', 'position_2', 'code', 'sample', 'sample_label', 'item', 'item_name', 'phase', 'kind', 'value', 'guess', 'text'],
    rows: rows.map((row) => [
      row.seat, ...(withNames ? [row.name] : []), row.block, row.position, row.position2, row.code, row.sample, row.sampleLabel, row.item, row.itemName, row.phase, row.kind,
      row.value, yesNo(row.guess), row.text,
    ]),
  };
}

/** Every glass that stood before a taken seat, answered or not: what a choice was made from. */
export function glassesTable({ glasses, seats, samples }: ExportFacts): Table {
  const numberOf = new Map(seats.filter((seat) => seat.isClaimed).map((seat) => [seat.id, seat.number]));
  const labelOf = new Map(samples.map((sample) => [sample.sample, sample.label]));
  const rows = glasses.flatMap((glass) => {
    const seat = numberOf.get(glass.seatId);
    return seat === undefined ? [] : [{ ...glass, seat }];
  });
  rows.sort((a, b) => a.seat - b.seat || a.block - b.block || a.position - b.position);
  return {
    columns: ['seat', 'block', 'position', 'code', 'sample', 'sample_label'],
    rows: rows.map((glass) => [glass.seat, glass.block, glass.position, glass.code, glass.sample, labelOf.get(glass.sample) ?? null]),
  };
}
