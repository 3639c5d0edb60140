import 'server-only';
import { getDb } from '@/db/client';
import type { VesselKind } from '@/db/enums';
import { fills, lots, vessels } from '@/db/schema';
import { and, eq, isNull } from 'drizzle-orm';
import encodeQR from 'qr';
import { loadAccess } from '../auth/access';
import { reach } from '../reach';

/** A barrel that holds something, as the pull sheet lists it. */
export interface PullBarrel {
  vesselId: string;
  name: string;
  kind: VesselKind;
  lot: string;
  lotName: string;
  location: string;
}

export interface PullSheetView {
  cellar: string;
  cellarName: string;
  /** Whose pulls these are: another person's on the same phone are not sent with them. */
  userId: string;
  barrels: PullBarrel[];
}

const natural = new Intl.Collator('en', { numeric: true });

function listBarrels(cellarId: string): PullBarrel[] {
  return getDb()
    .select({ vesselId: vessels.id, name: vessels.name, kind: vessels.kind, lot: lots.code, lotName: lots.name, location: vessels.location })
    .from(vessels)
    .innerJoin(fills, and(eq(fills.vesselId, vessels.id), isNull(fills.toDay)))
    .innerJoin(lots, eq(lots.id, fills.lotId))
    .where(and(eq(vessels.cellarId, cellarId), isNull(vessels.archivedAt)))
    .all()
    .sort((a, b) => natural.compare(a.name, b.name));
}

/** What the pull sheet needs to work without signal. */
export async function loadPullSheet(slug: string): Promise<PullSheetView> {
  const { cellar, user } = await loadAccess(slug, 'pull.record');
  return { cellar: cellar.slug, cellarName: cellar.name, userId: user.id, barrels: listBarrels(cellar.id) };
}

/** A barrel's tag: its name and the address of the pull sheet, as a picture. */
export interface BarrelTag extends PullBarrel {
  qr: string;
}

/** Tags of all filled barrels, for the printer. The part of the address after # never leaves the phone. */
export async function loadTags(slug: string): Promise<{ cellarName: string; tags: BarrelTag[] }> {
  const { cellar } = await loadAccess(slug, 'cellar.view');
  const { url } = reach();
  const picture = (vesselId: string) => `data:image/svg+xml;base64,${Buffer.from(encodeQR(`${url}/pull/${cellar.slug}#${vesselId}`, 'svg', { border: 2, ecc: 'quartile' })).toString('base64')}`;
  return { cellarName: cellar.name, tags: listBarrels(cellar.id).map((barrel) => ({ ...barrel, qr: picture(barrel.vesselId) })) };
}
