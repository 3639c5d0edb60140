import type { ItemKind } from '@/db/enums';
import { placesOf } from '../ballots/values';
import { glassFinder, setAnswers, type OperationFact } from '../results/evidence';
import type { Evidence } from '../results/loaders';

/** One counted answer in long form. People are seats by number; names stay in the cellar. */
export interface AnswerRow {
  seat: number;
  block: number;
  position: number;
  code: string;
  sample: number;
  label: string;
  /** The kind of line; `pick` and `rank` for sets, `comment` for what was written. */
  kind: ItemKind | 'pick' | 'rank' | 'comment';
  item: number | null;
  name: string;
  phase: string;
  /** Score; 1 or 0 for ticked, picked, noted; place in an order from 1 = least. */
  value: number | null;
  text: string;
  isGuess: boolean | null;
  /** False where a line was left alone and counts as 0. */
  isGiven: boolean;
}

export const COLUMNS = ['seat', 'block', 'position', 'code', 'sample', 'label', 'kind', 'item', 'name', 'phase', 'value', 'text', 'guess', 'given'] as const;

/** A row's cells in the order of `COLUMNS`. */
export const cellsOf = (row: AnswerRow): (string | number | boolean | null)[] => [
  row.seat, row.block, row.position, row.code, row.sample, row.label, row.kind, row.item, row.name, row.phase, row.value, row.text, row.isGuess, row.isGiven,
];

/** Kinds of line that count as 0 where an answered glass leaves them alone. */
const ZERO_WHERE_LEFT: readonly ItemKind[] = ['check', 'rate', 'term'];

/** Every counted answer of the session with the sample that it was about, in the order of seats, blocks and glasses. */
export function answerRows({ answers, glasses, seats, items, results }: Evidence): AnswerRow[] {
  const find = glassFinder(glasses);
  const seatOf = new Map(seats.map((seat) => [seat.id, seat]));
  const itemOf = new Map(items.map((item) => [item.item, item]));
  const labelOf = new Map(results.samples.map((sample) => [sample.sample, sample.label]));
  const base = (op: Pick<OperationFact, 'seatId' | 'block' | 'position'>) => {
    const glass = find(op as OperationFact);
    if (!glass) return null;
    return { seat: seatOf.get(op.seatId)!.number, block: glass.block, position: glass.position, code: glass.code, sample: glass.sample, label: labelOf.get(glass.sample) ?? '', item: null, name: '', phase: '', value: null, text: '', isGuess: null, isGiven: true };
  };
  const rows: AnswerRow[] = [];
  const add = (op: Pick<OperationFact, 'seatId' | 'block' | 'position'>, rest: Partial<AnswerRow> & Pick<AnswerRow, 'kind'>) => {
    const frame = base(op);
    if (frame) rows.push({ ...frame, ...rest });
  };
  for (const op of [...answers.scores, ...answers.faults]) {
    const item = itemOf.get(op.item!);
    if (item) add(op, { kind: item.kind, item: item.item, name: item.name, phase: item.phase, value: op.number });
  }
  const given = new Set(answers.scores.map((op) => `${op.seatId}/${op.block}/${op.position}/${op.item}`));
  const answered = new Set([...answers.scores, ...answers.comments, ...answers.faults].map((op) => `${op.seatId}/${op.block}/${op.position}`));
  for (const glass of glasses) {
    const seat = seatOf.get(glass.seatId)!;
    if (!seat.isClaimed || !(seat.isSubmitted || answered.has(`${glass.seatId}/${glass.block}/${glass.position}`))) continue;
    for (const item of items) {
      if (ZERO_WHERE_LEFT.includes(item.kind) && !given.has(`${glass.seatId}/${glass.block}/${glass.position}/${item.item}`)) add(glass, { kind: item.kind, item: item.item, name: item.name, phase: item.phase, value: 0, isGiven: false });
    }
  }
  for (const set of setAnswers(answers.choices, glasses, seats)) {
    if (set.picked.length > 0) for (const glass of set.glasses) add(glass, { kind: 'pick', value: Number(set.picked.includes(glass)), isGuess: set.isGuess });
  }
  for (const op of answers.orders) {
    const places = placesOf(op.text!);
    const inBlock = glasses.filter((glass) => glass.seatId === op.seatId && glass.block === op.block).length;
    if (places.length === inBlock) places.forEach((position, i) => add({ ...op, position }, { kind: 'rank', value: i + 1 }));
  }
  for (const op of answers.comments) add(op, { kind: 'comment', text: op.text ?? '' });
  return rows.sort((a, b) => a.seat - b.seat || a.block - b.block || a.position - b.position || (a.item ?? 0) - (b.item ?? 0));
}
