import type { Method, SessionState } from '@/db/enums';

export const STATE_ORDER = ['draft', 'sealed', 'open', 'closed', 'unsealed'] as const satisfies readonly SessionState[];

export const METHOD_WORDS: Record<Method, string> = { profile: 'Profile', triangle: 'Triangle' };

/** What one unit of a ballot is called. */
export const UNIT_WORDS: Record<Method, [one: string, many: string]> = { profile: ['glass', 'glasses'], triangle: ['set', 'sets'] };
