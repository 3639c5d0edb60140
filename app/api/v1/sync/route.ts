import { takeDelivery } from '@/lib/ballots/mutations';
import { SYNC_MAX_BYTES, syncSchema } from '@/lib/ballots/schema';
import { ANSWER_HEADERS, writeHandler } from '@/lib/http/handler';
import { requireSeat } from '@/lib/seats/access';
import { NextResponse } from 'next/server';

export const dynamic = 'force-dynamic';

/** Takes a phone's outbox. 422 when every operation was refused for good. */
export const POST = writeHandler(syncSchema, SYNC_MAX_BYTES, async (delivery) => {
  const answer = takeDelivery(await requireSeat(delivery.joinKey), delivery);
  const isAllRefused = delivery.ops.length > 0 && answer.receipts.length === 0;
  return NextResponse.json(answer, { status: isAllRefused ? 422 : 200, headers: ANSWER_HEADERS });
});
