import { NextResponse, type NextRequest } from 'next/server';

/**
 * The content policy of a page: only scripts that carry this answer's nonce run. It is one more
 * wall, no check of rights: the application is right without it.
 * No `upgrade-insecure-requests`: phones in a cellar come over plain http.
 */
function contentPolicy(nonce: string, isDev: boolean): string {
  return [
    "default-src 'self'",
    // React in development evaluates text to rebuild stack traces.
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${isDev ? " 'unsafe-eval'" : ''}`,
    isDev ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    // Positions of marks on scales stand in style attributes; they can't fetch or run anything.
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    isDev ? "connect-src 'self' ws: wss:" : "connect-src 'self'",
    "manifest-src 'self'",
    "worker-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ');
}

export function proxy(request: NextRequest): NextResponse {
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(18))).toString('base64');
  const policy = contentPolicy(nonce, process.env.NODE_ENV === 'development');
  const headers = new Headers(request.headers);
  // The framework reads the nonce out of the request's policy and puts it on its own scripts.
  headers.set('Content-Security-Policy', policy);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('Content-Security-Policy', policy);
  return response;
}

export const config = { matcher: ['/((?!api/|_next/static/).*)'] };
