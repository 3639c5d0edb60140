import { readFile } from 'node:fs/promises';
import path from 'node:path';

export const dynamic = 'force-dynamic';

/** The service worker as `lib/start/build.mjs` has bundled it; none in development. */
export async function GET(): Promise<Response> {
  try {
    const text = await readFile(path.join(/* turbopackIgnore: true */ process.cwd(), '.next', 'sw.js'), 'utf8');
    return new Response(text, { headers: { 'content-type': 'text/javascript; charset=utf-8', 'cache-control': 'no-cache', 'x-content-type-options': 'nosniff' } });
  } catch {
    return new Response('not built', { status: 404 });
  }
}
