import type { Phase } from '@/db/enums';
import type { Operation } from '../ballots/schema';
import type { PhonePull } from '../pulls/schema';

/** One operation on the phone, kept until the sheet is forgotten. The operation itself never changes. */
export interface OutboxRow {
  opId: string;
  /** Session and seat: another person's sheet on this phone is never sent with this one. */
  sheetKey: string;
  op: Operation;
  state: 'waiting' | 'received' | 'refused';
  receiptNo?: number;
  isLate?: boolean;
  message?: string;
}

/** Where the panelist is, so that a reload comes back to the same place. */
export interface Place {
  view: 'glass' | 'rest' | 'review' | 'done' | 'handover';
  block: number;
  position: number;
  phase: Phase | null;
  /** While resting: until when, by the phone's clock. */
  restUntil: number | null;
}

export interface SheetMeta {
  sheetKey: string;
  deviceId: string;
  nextSeq: number;
  place: Place | null;
}

/** One pull on a cellar hand's phone. The pull itself never changes. */
export interface PullRow {
  opId: string;
  cellar: string;
  /** Who drew it; it is sent only while the same person is signed in. */
  userId: string;
  /** The barrel's name and lot as they stood on the sheet, for the label. */
  barrel: string;
  lot: string;
  pull: PhonePull;
  state: 'waiting' | 'received' | 'refused';
  message?: string;
}
