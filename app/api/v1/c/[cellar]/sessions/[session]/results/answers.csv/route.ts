import { requireAccess } from '@/lib/auth/access';
import { isWithNames } from '@/lib/export/format';
import { readAnswersCsv } from '@/lib/export/loaders';
import { fileAnswer } from '@/lib/http/file';
import { readHandler } from '@/lib/http/handler';

/** Every answer that counts, one a row; 409 until the key is open. `?names=yes` puts names beside the seats. */
export const GET = readHandler(async (request: Request, { params }: RouteContext<'/api/v1/c/[cellar]/sessions/[session]/results/answers.csv'>) => {
  const { cellar, session } = await params;
  const { name, body } = readAnswersCsv(await requireAccess(cellar, 'results.view'), session, { withNames: isWithNames(request.url) });
  return fileAnswer(body, { name, type: 'text/csv; charset=utf-8' });
});
