import { loadSheet } from '@/lib/ballots/loaders';
import { AppError } from '@/lib/errors';
import { readHandler } from '@/lib/http/handler';
import { requestLocale } from '@/lib/i18n/server';
import { requireSeat } from '@/lib/seats/access';
import { joinKeySchema } from '@/lib/seats/schema';

export const dynamic = 'force-dynamic';

/** The sheet of the seat that this phone holds. */
export const GET = readHandler(async (_request: Request, { params }: RouteContext<'/api/v1/sheet/[joinKey]'>) => {
  const joinKey = joinKeySchema.safeParse((await params).joinKey);
  if (!joinKey.success) throw new AppError('not_found');
  return loadSheet(await requireSeat(joinKey.data), await requestLocale());
});
