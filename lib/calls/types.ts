import type { CallKind, VesselKind } from '@/db/enums';

/** `standing`: the newest one on a fill that is still in its vessel. An earlier one is `superseded`. */
export type CallStatus = 'standing' | 'superseded' | 'emptied' | 'withdrawn';

/** A decision as a screen shows it. */
export interface CallView {
  id: string;
  kind: CallKind;
  reasons: string;
  /** `YYYY-MM-DD`, or null. */
  nextDay: string | null;
  /** Whether it stands and its next day is here or past. */
  isDue: boolean;
  status: CallStatus;
  vessel: { id: string; name: string; kind: VesselKind };
  lot: { id: string; code: string };
  session: { id: string; title: string } | null;
  decidedBy: string;
  decidedOn: string;
  withdrawn: { by: string; on: string; reason: string } | null;
}

/** A fill that a call can be made on. */
export interface FillOption {
  fillId: string;
  label: string;
}

/** What the form of a call starts with. */
export interface CallDraft {
  options: FillOption[];
  fillId: string | null;
  session: { id: string; title: string } | null;
  today: string;
}
