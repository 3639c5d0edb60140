import { requireAccess } from '@/lib/auth/access';
import { isWithNames } from '@/lib/export/format';
import { readWorkbook } from '@/lib/export/loaders';
import { fileAnswer } from '@/lib/http/file';
import { readHandler } from '@/lib/http/handler';

/** The answers as a workbook, with samples, seats and how it was run; 409 until the key is open. */
export const GET = readHandler(async (request: Request, { params }: RouteContext<'/api/v1/c/[cellar]/sessions/[session]/results/answers.xlsx'>) => {
  const { cellar, session } = await params;
  const { name, body } = await readWorkbook(await requireAccess(cellar, 'results.view'), session, { withNames: isWithNames(request.url) });
  return fileAnswer(body, { name, type: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet' });
});
