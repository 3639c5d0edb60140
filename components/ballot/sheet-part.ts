import type { Sheet } from '@/lib/ballots/types';
import type { SheetState, SheetStore } from '@/lib/offline/store';
import type { Place } from '@/lib/offline/types';

/** What each part of the sheet is given. */
export interface SheetPart {
  sheet: Sheet;
  store: SheetStore;
  state: SheetState;
  place: Place;
  go(place: Place): void;
}
