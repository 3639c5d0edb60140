import { requireAccess } from '@/lib/auth/access';
import { SYNC_MAX_BYTES } from '@/lib/ballots/schema';
import { receiveHandover } from '@/lib/handover/receive';
import { handoverSchema } from '@/lib/handover/schema';
import { writeHandler } from '@/lib/http/handler';

export const dynamic = 'force-dynamic';

/** Takes a sheet that the leader's device has scanned from a phone without signal. */
export const POST = writeHandler(handoverSchema, SYNC_MAX_BYTES, async ({ text }, _request, { params }: RouteContext<'/api/v1/c/[cellar]/sessions/[session]/handover'>) => {
  const { cellar, session } = await params;
  return receiveHandover(await requireAccess(cellar, 'session.run'), session, text);
});
