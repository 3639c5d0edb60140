import { publishedPlanFile } from '@/lib/blind/read-key';
import { ANSWER_HEADERS, readHandler } from '@/lib/http/handler';

export const dynamic = 'force-dynamic';

/** The plan file behind a commitment, to the byte, for anybody, once its session is unsealed. */
export const GET = readHandler(async (_request: Request, { params }: RouteContext<'/api/v1/commitments/[commitment]'>) => {
  const { commitment } = await params;
  return new Response(publishedPlanFile(commitment), {
    headers: {
      ...ANSWER_HEADERS,
      'content-type': 'application/json; charset=utf-8',
      'content-disposition': `attachment; filename="tercet-plan-${commitment.slice(0, 8)}.json"`,
    },
  });
});
