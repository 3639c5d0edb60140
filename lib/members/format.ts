import type { Role } from '@/db/enums';

export const ROLE_WORDS: Record<Role, string> = {
  owner: 'Owner: settings and people',
  winemaker: 'Winemaker: asks and decides',
  leader: 'Leader: plans and runs sessions',
  cellar_hand: 'Cellar hand: pulls and pours',
  panelist: 'Panelist: tastes',
};
