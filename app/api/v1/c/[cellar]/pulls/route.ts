import { requireAccess } from '@/lib/auth/access';
import { writeHandler } from '@/lib/http/handler';
import { takePulls } from '@/lib/pulls/mutations';
import { PULLS_MAX_BYTES, pullsSchema } from '@/lib/pulls/schema';

export const dynamic = 'force-dynamic';

/** Takes the pulls that a cellar hand's phone has kept. */
export const POST = writeHandler(pullsSchema, PULLS_MAX_BYTES, async ({ pulls }, _request, { params }: RouteContext<'/api/v1/c/[cellar]/pulls'>) =>
  takePulls(await requireAccess((await params).cellar, 'pull.record'), pulls),
);
