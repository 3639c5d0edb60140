import 'server-only';
import { NextResponse } from 'next/server';
import type { z } from 'zod';
import { AppError, asAppError } from '../errors';
import { readJson } from './body';
import { requireSameOrigin } from './origin';

/** No page, no script, no frame: an answer is data only. */
export const ANSWER_HEADERS = {
  'cache-control': 'private, no-store',
  'content-security-policy': "default-src 'none'; frame-ancestors 'none'",
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
};

/** The body of every refusal by a handler. */
export interface ErrorBody {
  error: { code: string; message: string; fields?: Record<string, string> };
}

/** Turns a thrown value into the one shape of refusal; a fault of ours is logged by its kind only. */
export function errorResponse(error: unknown): NextResponse<ErrorBody> {
  const known = asAppError(error);
  if (!known) console.error('unexpected fault in a handler:', error instanceof Error ? `${error.name}\n${error.stack?.split('\n').slice(1, 4).join('\n')}` : typeof error);
  const body: ErrorBody = known
    ? { error: { code: known.code, message: known.message, ...(Object.keys(known.fieldErrors).length > 0 && { fields: { ...known.fieldErrors } }) } }
    : { error: { code: 'fault', message: 'The server failed at that. Nothing was saved.' } };
  const headers: Record<string, string> = { ...ANSWER_HEADERS };
  if (known?.code === 'busy') headers['retry-after'] = '1';
  if (known?.code === 'too_many') headers['retry-after'] = '300';
  return NextResponse.json(body, { status: known?.status ?? 500, headers });
}

/**
 * A writing route handler: origin, media type, size, then the schema, then `run`.
 * @param schema strict zod schema of the body
 * @param maxBytes most bytes of body that are read
 */
export function writeHandler<Schema extends z.ZodType, Context>(
  schema: Schema,
  maxBytes: number,
  run: (input: z.output<Schema>, request: Request, context: Context) => Promise<unknown>,
) {
  return async (request: Request, context: Context): Promise<Response> => {
    try {
      requireSameOrigin(request.headers);
      const parsed = schema.safeParse(await readJson(request, maxBytes));
      if (!parsed.success) {
        const issue = parsed.error.issues[0];
        throw new AppError('invalid', `${issue?.path.join('.') || 'body'}: ${issue?.message ?? 'not valid'}`);
      }
      const result = await run(parsed.data, request, context);
      return result instanceof Response ? result : NextResponse.json(result, { headers: ANSWER_HEADERS });
    } catch (error) {
      return errorResponse(error);
    }
  };
}

/** A reading route handler: `run`'s value as JSON, never cached. */
export function readHandler<Context>(run: (request: Request, context: Context) => Promise<unknown>) {
  return async (request: Request, context: Context): Promise<Response> => {
    try {
      const result = await run(request, context);
      return result instanceof Response ? result : NextResponse.json(result, { headers: ANSWER_HEADERS });
    } catch (error) {
      return errorResponse(error);
    }
  };
}
