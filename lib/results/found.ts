import type { ItemFact } from './data';
import type { CountedAnswers, GlassFact, SeatFact } from './evidence';
import type { ChoiceView, OrderView, PairFoundView, ProfileView, RightView, TicksView } from './types';

/** What an analysis works on: the counted answers, with the key open. */
export interface MethodQuestion {
  answers: CountedAnswers;
  glasses: readonly GlassFact[];
  seats: readonly SeatFact[];
  items: readonly ItemFact[];
  /** Sample numbers, in the order of columns. */
  samples: readonly number[];
  replicates: number;
  alpha: number;
}

interface Views {
  profile: ProfileView;
  choice: ChoiceView;
  pair: PairFoundView;
  order: OrderView;
  ticks: TicksView;
  right: RightView;
}

/** What a method found: exactly one of the views. */
export type Found = { [Kind in keyof Views]: { kind: Kind } & Pick<Views, Kind> }[keyof Views];

/** The view of that kind. @throws Error when a method hands its findings to another method's words */
export function viewOf<Kind extends keyof Views>(found: Found, kind: Kind): Views[Kind] {
  if (found.kind !== kind) throw new Error(`found ${found.kind} where ${kind} was expected`);
  return (found as unknown as Views)[kind];
}

/** All views, those of other methods null: as a page takes them. */
export function spreadFound(found: Found): { [Kind in keyof Views]: Views[Kind] | null } {
  const none = { profile: null, choice: null, pair: null, order: null, ticks: null, right: null };
  return { ...none, [found.kind]: viewOf(found, found.kind) };
}
