import type { Phase } from '@/db/enums';
import type { KeptState } from '@/lib/offline/answers';

export const PHASE_WORDS: Record<Phase, string> = { look: 'Look', nose: 'Nose', palate: 'Palate', mouthfeel: 'Mouthfeel', after: 'After' };

/** The states of an answer, in words. Never merged. */
export const KEPT_WORDS: Record<KeptState, string> = {
  saving: 'keeping…',
  'on-phone': 'on this phone',
  received: 'received',
  late: 'late, set aside',
  refused: 'refused',
};
