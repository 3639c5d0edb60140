import { glassFinder, type CountedAnswers, type GlassFact, type OperationFact, type SeatFact } from './evidence';
import type { ItemFact } from './data';
import { OWED_KINDS } from '../ballots/types';
import type { MethodFacts } from '../methods/types';
import type { CountsView, SaidView, SeatView } from './types';

interface SaidQuestion {
  answers: CountedAnswers;
  glasses: readonly GlassFact[];
  seats: readonly SeatFact[];
  items: readonly ItemFact[];
  samples: readonly number[];
  blockWord: string;
}

/** Comments by sample, and faults noted out of the glasses that were answered. */
export function gatherSaid({ answers, glasses, seats, items, samples, blockWord }: SaidQuestion): SaidView {
  const find = glassFinder(glasses);
  const seatOf = new Map(seats.map((seat) => [seat.id, seat]));
  const comments = answers.comments
    .map((op) => ({
      sample: find(op)?.sample ?? null, seat: seatOf.get(op.seatId)?.number ?? 0, name: seatOf.get(op.seatId)?.name ?? null,
      text: op.text!.trim(), where: `${blockWord.toLowerCase()} ${op.block}, glass ${op.position}`,
    }))
    .sort((a, b) => (a.sample ?? 99) - (b.sample ?? 99) || a.seat - b.seat);
  const answered = new Map<number, Set<string>>();
  for (const op of [...answers.scores, ...answers.faults, ...answers.comments, ...answers.choices]) {
    const glass = find(op);
    if (!glass) continue;
    answered.set(glass.sample, (answered.get(glass.sample) ?? new Set()).add(`${op.seatId}/${glass.block}/${glass.position}`));
  }
  const faults = items
    .filter((item) => item.kind === 'flag')
    .map((item) => ({
      name: item.name,
      counts: samples.map((sample) => ({
        sample,
        noted: answers.faults.filter((op) => op.item === item.item && find(op)?.sample === sample).length,
        of: answered.get(sample)?.size ?? 0,
      })),
    }));
  return { comments, faults };
}

const answersOf = (answers: CountedAnswers): OperationFact[] => [...answers.scores, ...answers.faults, ...answers.choices, ...answers.orders, ...answers.comments];

/** The seats that were taken, with how much of each counts. */
export function viewSeats(seats: readonly SeatFact[], answers: CountedAnswers): SeatView[] {
  const all = answersOf(answers);
  return seats
    .filter((seat) => seat.isClaimed)
    .map((seat) => ({
      number: seat.number, name: seat.name, role: seat.role, isSubmitted: seat.isSubmitted, hasLeft: seat.hasLeft,
      answers: all.filter((op) => op.seatId === seat.id).length, late: answers.late.get(seat.id) ?? 0,
    }));
}

/** Lines that somebody who only smells is asked for. */
const isForNose = (item: ItemFact) => item.phase === 'look' || item.phase === 'nose';

/** What was counted, replaced, taken back, late and never given. */
export function countAll(q: { answers: CountedAnswers; seats: readonly SeatFact[]; glasses: readonly GlassFact[]; items: readonly ItemFact[]; facts: MethodFacts }): CountsView {
  const { answers, seats, glasses, items, facts } = q;
  const views = viewSeats(seats, answers);
  // What is ticked or rated only where it applies is never owed.
  const lines = items.filter((item) => OWED_KINDS.includes(item.kind));
  const isSets = facts.unit === 'set';
  const expected = seats
    .filter((seat) => seat.isClaimed)
    .reduce((sum, seat) => {
      const own = glasses.filter((glass) => glass.seatId === seat.id);
      if (isSets) return sum + new Set(own.map((glass) => glass.block)).size;
      return sum + own.length * (seat.role === 'nose_only' ? lines.filter(isForNose).length : lines.length);
    }, 0);
  const given = isSets ? answers.choices.length + answers.orders.length : answers.scores.filter((op) => lines.some((line) => line.item === op.item)).length;
  return {
    counted: answersOf(answers).length,
    replaced: answers.replaced,
    cleared: answers.cleared,
    late: [...answers.late.values()].reduce((sum, n) => sum + n, 0),
    unanswered: Math.max(0, expected - given),
    seatsTaken: views.length,
    seatsSubmitted: views.filter((seat) => seat.isSubmitted).length,
    seatsLeft: views.filter((seat) => seat.hasLeft).map((seat) => seat.number),
    seatsSilent: views.filter((seat) => !seat.hasLeft && seat.answers === 0).map((seat) => seat.number),
    seatsEmpty: seats.filter((seat) => !seat.isReserve && !seat.isClaimed).map((seat) => seat.number),
  };
}
