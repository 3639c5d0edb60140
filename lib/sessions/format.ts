import type { SessionState } from '@/db/enums';

export const STATE_ORDER = ['draft', 'sealed', 'open', 'closed', 'unsealed'] as const satisfies readonly SessionState[];
