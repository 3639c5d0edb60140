import 'server-only';
import { ANSWER_HEADERS } from './handler';

/** A file to be saved under the name, never cached and never shown as a page. `name`: letters, digits, hyphens and dots. */
export function fileAnswer(body: string | Uint8Array<ArrayBuffer>, { name, type }: { name: string; type: string }): Response {
  return new Response(body, { headers: { ...ANSWER_HEADERS, 'content-type': type, 'content-disposition': `attachment; filename="${name}"` } });
}
