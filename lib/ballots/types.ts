import type { Allergen, ItemKind, Method, Phase, SeatRole, SessionState } from '@/db/enums';

/**
 * How a method is answered. `glasses`: line by line, glass by glass. `note`: written, then the words found in it.
 * `pick`: one or two glasses of a set; with a reference, its first glass is the one to compare with. `order`:
 * a set's glasses from least to most.
 */
export type Ballot =
  | { kind: 'glasses' }
  | { kind: 'note' }
  | { kind: 'pick'; picks: 1 | 2; hasReference: boolean; asksGuess: boolean }
  | { kind: 'order' };

/** Values that a line takes; null: it is not scored. */
export const VALUE_RANGE: Record<ItemKind, { low: number; high: number } | null> = {
  line: { low: 0, high: 100 }, category: { low: 0, high: 5 }, check: { low: 0, high: 1 }, rate: { low: 0, high: 3 },
  just_right: { low: 1, high: 5 }, liking: { low: 1, high: 9 }, term: { low: 0, high: 3 }, ask: null, flag: null,
};

/** Lines that a panelist owes an answer; ticks and ratings of what applies are never owed. */
export const OWED_KINDS: readonly ItemKind[] = ['line', 'category', 'just_right', 'liking'];

/** One line of the ballot as a panelist gets it. */
export interface SheetItem {
  item: number;
  phase: Phase;
  kind: ItemKind;
  name: string;
  definition: string;
  lowAnchor: string;
  highAnchor: string;
  /** Other words for it, where a note is searched for them. */
  synonyms?: readonly string[];
}

export interface SheetGlass {
  position: number;
  code: string;
}

/** The panelist's own latest answers, so that another phone can take over. */
export interface SheetAnswers {
  scores: { block: number; position: number; item: number; value: number }[];
  faults: { block: number; position: number; item: number }[];
  choices: { block: number; position: number; also?: number; isGuess: boolean }[];
  orders: { block: number; order: number[] }[];
  comments: { block: number; position: number; text: string }[];
}

/**
 * Everything that a seat is sent. Codes, order and words of the ballot; never an id, name, date or
 * order of lot, vessel, pull or sample.
 */
export interface Sheet {
  protocol: 1;
  joinKey: string;
  state: SessionState;
  method: Method;
  ballot: Ballot;
  title: string;
  instruction: string;
  seatLabel: string;
  seatRole: SeatRole;
  commitment: string;
  /** Marks a handover by code as this seat's own. */
  handoverKey: string;
  restS: number;
  servingVolumeMl: number;
  allergens: Allergen[];
  blocks: { block: number; glasses: SheetGlass[] }[];
  items: SheetItem[];
  answers: SheetAnswers;
  isSubmitted: boolean;
}

/** The server's word on each operation of a delivery. */
export interface SyncResponse {
  protocol: 1;
  state: SessionState;
  receipts: { opId: string; receiptNo: number; admission: 'counted' | 'late' }[];
  /** Permanent: sending it again will not help. The phone shows and keeps it. */
  refused: { opId: string; code: 'body_changed' | 'no_such_glass' | 'no_such_line' | 'no_such_value' | 'set_locked' | 'not_this_method' | 'wrong_state'; message: string }[];
}
