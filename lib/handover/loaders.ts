import 'server-only';
import { getDb } from '@/db/client';
import { loadAccess } from '../auth/access';
import { findSession } from '../sessions/find';

/** The session whose sheets are scanned, for those who may run it. */
export async function loadHandover(cellar: string, sessionId: string): Promise<{ id: string; title: string }> {
  const access = await loadAccess(cellar, 'session.run');
  const { id, title } = findSession(getDb(), access.cellar.id, sessionId);
  return { id, title };
}
