import 'server-only';
import { AppError } from '../errors';

/**
 * Refuses a writing request that another site could have made: the browser's own word
 * (`Sec-Fetch-Site`) must say same origin where it is sent, and `Origin` must be present and name
 * the host that was asked. Plain requests without `Origin` are refused too.
 * @throws AppError `bad_origin`
 */
export function requireSameOrigin(headers: Headers): void {
  const site = headers.get('sec-fetch-site');
  if (site !== null && site !== 'same-origin') throw new AppError('bad_origin');
  const origin = headers.get('origin');
  const host = headers.get('x-forwarded-host') ?? headers.get('host');
  if (!origin || origin === 'null' || !host) throw new AppError('bad_origin');
  let originHost: string;
  try {
    originHost = new URL(origin).host;
  } catch {
    throw new AppError('bad_origin');
  }
  if (originHost !== host) throw new AppError('bad_origin');
}
