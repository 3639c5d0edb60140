import 'server-only';
import type { Allergen, SessionState } from '@/db/enums';
import { findByJoinKey } from './access';

/** What somebody who has not joined yet may know of a session. */
export interface JoinView {
  title: string;
  state: SessionState;
  allergens: Allergen[];
}

export function joinView(joinKey: string): JoinView | null {
  const session = findByJoinKey(joinKey);
  return session && { title: session.title, state: session.state, allergens: session.allergens };
}
