import type { Phase } from '@/db/enums';
import type { Words } from '@/lib/i18n/words';
import type { KeptState } from '@/lib/offline/answers';

/** The parts of a tasting, in the panelist's language. */
export const phaseWord = (t: Words, phase: Phase): string => t(`phases.${phase}`);

const KEPT = { saving: 'kept.saving', 'on-phone': 'kept.onPhone', sent: 'kept.sent', received: 'kept.received', late: 'kept.late', refused: 'kept.refused' } as const;

/** The states of an answer, in words. Never merged. */
export const keptWord = (t: Words, state: KeptState): string => t(KEPT[state]);
