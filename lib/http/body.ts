import 'server-only';
import { AppError } from '../errors';

/**
 * Reads a JSON body and stops at the limit while it streams: a declared length is not believed.
 * @throws AppError `unsupported_media`, `too_large`, `invalid`
 */
export async function readJson(request: Request, maxBytes: number): Promise<unknown> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^application\/json\s*(;|$)/i.test(type)) throw new AppError('unsupported_media');
  if (Number(request.headers.get('content-length') ?? 0) > maxBytes) throw new AppError('too_large');
  if (!request.body) throw new AppError('invalid', 'The request has no body.');
  const chunks: Uint8Array[] = [];
  let size = 0;
  const reader = request.body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.byteLength;
    if (size > maxBytes) {
      await reader.cancel();
      throw new AppError('too_large');
    }
    chunks.push(value);
  }
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks)));
  } catch {
    throw new AppError('invalid', 'The body is not valid JSON.');
  }
}
