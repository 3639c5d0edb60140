import { requireAccess } from '@/lib/auth/access';
import { readBoard } from '@/lib/board/loaders';
import { readHandler } from '@/lib/http/handler';

export const dynamic = 'force-dynamic';

/** The leader's board, asked for every two seconds. */
export const GET = readHandler(async (_request: Request, { params }: RouteContext<'/api/v1/c/[cellar]/sessions/[session]/board'>) => {
  const { cellar, session } = await params;
  return readBoard(await requireAccess(cellar, 'session.run'), session);
});
