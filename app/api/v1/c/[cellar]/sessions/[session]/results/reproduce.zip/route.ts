import { requireAccess } from '@/lib/auth/access';
import { readBundle } from '@/lib/export/loaders';
import { fileAnswer } from '@/lib/http/file';
import { readHandler } from '@/lib/http/handler';

/** Data, figures and the script that computes these from those; 409 until the key is open. */
export const GET = readHandler(async (_request: Request, { params }: RouteContext<'/api/v1/c/[cellar]/sessions/[session]/results/reproduce.zip'>) => {
  const { cellar, session } = await params;
  const { name, body } = readBundle(await requireAccess(cellar, 'results.view'), session);
  return fileAnswer(body, { name, type: 'application/zip' });
});
