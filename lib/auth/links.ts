import 'server-only';
import type { Db, Tx } from '@/db/client';
import { oneTimeLinks } from '@/db/schema';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { AppError } from '../errors';
import { newId, newToken, sha256Hex } from '../ids';

type LinkPurpose = (typeof oneTimeLinks.$inferSelect)['purpose'];

const HOURS: Record<LinkPurpose, number> = { set_password: 7 * 24, first_owner: 7 * 24, seat: 4 };

/** Makes a link that works once. @returns its token, which is stored nowhere */
export function createLink(tx: Tx | Db, link: { purpose: LinkPurpose; userId?: string; seatId?: string; createdBy?: string }): string {
  const token = newToken();
  const now = Date.now();
  tx.insert(oneTimeLinks)
    .values({
      id: newId(),
      purpose: link.purpose,
      tokenHash: sha256Hex(token),
      userId: link.userId ?? null,
      seatId: link.seatId ?? null,
      createdBy: link.createdBy ?? null,
      createdAt: new Date(now),
      expiresAt: new Date(now + HOURS[link.purpose] * 3_600_000),
    })
    .run();
  return token;
}

const isOpen = (purpose: LinkPurpose, token: string) =>
  and(eq(oneTimeLinks.tokenHash, sha256Hex(token)), eq(oneTimeLinks.purpose, purpose), isNull(oneTimeLinks.usedAt), gt(oneTimeLinks.expiresAt, new Date()));

/** The link that a token opens, without using it up; null when spent, expired or unknown. */
export function findLink(db: Tx | Db, purpose: LinkPurpose, token: string): { userId: string | null; seatId: string | null } | null {
  return db.select({ userId: oneTimeLinks.userId, seatId: oneTimeLinks.seatId }).from(oneTimeLinks).where(isOpen(purpose, token)).get() ?? null;
}

/** Uses the link up. @throws AppError `expired` */
export function useLink(tx: Tx, purpose: LinkPurpose, token: string): { userId: string | null; seatId: string | null } {
  const used = tx
    .update(oneTimeLinks)
    .set({ usedAt: new Date() })
    .where(isOpen(purpose, token))
    .returning({ userId: oneTimeLinks.userId, seatId: oneTimeLinks.seatId })
    .get();
  if (!used) throw new AppError('expired');
  return used;
}
