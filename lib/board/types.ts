import type { Phase, SessionState } from '@/db/enums';

export interface BoardSeat {
  number: number;
  label: string;
  name: string;
  isClaimed: boolean;
  isReserve: boolean;
  hasLeft: boolean;
  isSubmitted: boolean;
  at: { block: number; position: number; phase: Phase | null } | null;
  /** Glasses (profile) or sets (triangle) with at least one answer here. */
  received: number;
  /** What the phone said that it had not sent yet. */
  onPhone: number;
  /** Seconds since the phone was last heard; null when never. */
  silentS: number | null;
}

/** Counts and progress only: nobody sees a score before unsealing. */
export interface Board {
  state: SessionState;
  unitsPerSeat: number;
  seats: BoardSeat[];
}
