import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { AppError } from '@/lib/errors';
import { readHandler } from '@/lib/http/handler';

export const dynamic = 'force-dynamic';

/** The service worker as `lib/start/build.mjs` has bundled it; none in development. */
export const GET = readHandler(async () => {
  const text = await readFile(path.join(/* turbopackIgnore: true */ process.cwd(), '.next', 'sw.js'), 'utf8').catch(() => null);
  if (text === null) throw new AppError('not_found');
  return new Response(text, { headers: { 'content-type': 'text/javascript; charset=utf-8', 'cache-control': 'no-cache', 'x-content-type-options': 'nosniff' } });
});
