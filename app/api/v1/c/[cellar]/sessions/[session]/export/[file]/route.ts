import { requireAccess } from '@/lib/auth/access';
import { exportFile } from '@/lib/export/files';
import { ANSWER_HEADERS, readHandler } from '@/lib/http/handler';

/** Raw answers as CSV or XLSX, or the reproduce bundle; 409 until the key is open. */
export const GET = readHandler(async (_request: Request, { params }: RouteContext<'/api/v1/c/[cellar]/sessions/[session]/export/[file]'>) => {
  const { cellar, session, file } = await params;
  const { type, body, name } = await exportFile(await requireAccess(cellar, 'results.view'), session, file);
  return new Response(body, { headers: { ...ANSWER_HEADERS, 'content-type': type, 'content-disposition': `attachment; filename="${name}"` } });
});
