import { readHandler } from '@/lib/http/handler';
import { isHealthy } from '@/lib/health';

export const dynamic = 'force-dynamic';

/** Whether the server answers and reads its database. */
export const GET = readHandler(async () => ({ ok: isHealthy() }));
