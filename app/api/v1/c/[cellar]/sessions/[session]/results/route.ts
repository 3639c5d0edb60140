import { requireAccess } from '@/lib/auth/access';
import { readHandler } from '@/lib/http/handler';
import { readResults } from '@/lib/results/loaders';

/** The results as JSON, as the page shows them; 409 until the key is open. */
export const GET = readHandler(async (_request: Request, { params }: RouteContext<'/api/v1/c/[cellar]/sessions/[session]/results'>) => {
  const { cellar, session } = await params;
  return readResults(await requireAccess(cellar, 'results.view'), session);
});
