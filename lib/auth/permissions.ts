import type { Role } from '@/db/enums';

/** What a member may do. One word per kind of read or write. */
export const CAPABILITIES = {
  'cellar.view': ['owner', 'winemaker', 'leader', 'cellar_hand'],
  'register.edit': ['owner', 'winemaker', 'cellar_hand'],
  'pull.record': ['owner', 'winemaker', 'leader', 'cellar_hand'],
  'lexicon.edit': ['owner', 'winemaker', 'leader'],
  'session.list': ['owner', 'winemaker', 'leader', 'cellar_hand', 'panelist'],
  'session.design': ['owner', 'winemaker', 'leader'],
  'session.run': ['owner', 'winemaker', 'leader'],
  'results.view': ['owner', 'winemaker', 'leader', 'cellar_hand', 'panelist'],
  'call.make': ['owner', 'winemaker'],
  'members.manage': ['owner'],
  'cellar.manage': ['owner'],
  'audit.view': ['owner', 'winemaker', 'leader'],
} as const satisfies Record<string, readonly Role[]>;

export type Capability = keyof typeof CAPABILITIES;

/** Whether any of the roles carries the capability. */
export function allows(roles: Iterable<Role>, capability: Capability): boolean {
  const allowed: readonly Role[] = CAPABILITIES[capability];
  for (const role of roles) if (allowed.includes(role)) return true;
  return false;
}

/** What decides whether a person may read a session's key (code → sample). */
export interface KeyQuestion {
  state: 'draft' | 'sealed' | 'open' | 'closed' | 'unsealed' | 'abandoned';
  wasUnsealed: boolean;
  isPourer: boolean;
  isTaster: boolean;
  roles: Iterable<Role>;
}

/**
 * The rule of the blind: before unsealing only a named pourer who does not taste; owners are no
 * exception. Afterwards everybody who may see results.
 */
export function mayReadKey(q: KeyQuestion): boolean {
  if (q.wasUnsealed) return allows(q.roles, 'results.view');
  if (q.state === 'draft' || q.state === 'abandoned') return false;
  return q.isPourer && !q.isTaster;
}
