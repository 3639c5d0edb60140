import type { Allergen, Method, Phase, SeatRole, SessionState } from '@/db/enums';

/** One line of the ballot as a panelist gets it. */
export interface SheetItem {
  item: number;
  phase: Phase;
  kind: 'line' | 'flag';
  name: string;
  definition: string;
  lowAnchor: string;
  highAnchor: string;
}

export interface SheetGlass {
  position: number;
  code: string;
}

/** The panelist's own latest answers, so that another phone can take over. */
export interface SheetAnswers {
  scores: { block: number; position: number; item: number; value: number }[];
  faults: { block: number; position: number; item: number }[];
  choices: { block: number; position: number; isGuess: boolean }[];
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
  refused: { opId: string; code: 'body_changed' | 'no_such_glass' | 'no_such_line' | 'set_locked' | 'not_this_method' | 'wrong_state'; message: string }[];
}
