import { NextResponse, type NextRequest } from 'next/server';
import { PHONE_HEADER } from '@/lib/phone/settings';

/** Pages in the device's language: sheets, joining, seats, pulling. */
const PHONE_PAGES = /^\/(t|j|seat|offline|pull|check)(\/|$)/;

/** What every answer says to the browser, whatever the page. */
const HEADERS: Record<string, string> = {
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'same-origin',
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'permissions-policy': 'camera=(self), microphone=(), geolocation=(), payment=(), usb=()',
};

/**
 * Headers only: no sign-in and no permission is checked here, so that nothing rests on it. Scripts
 * run with this answer's nonce or not at all; styles may stand in attributes (React writes them).
 */
export function proxy(request: NextRequest): NextResponse {
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(16))).toString('base64');
  const isDevelopment = process.env.NODE_ENV === 'development';
  const policy = [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${isDevelopment ? " 'unsafe-eval'" : ''}`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    "connect-src 'self'",
    "worker-src 'self'",
    "manifest-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ');
  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  headers.set('content-security-policy', policy);
  headers.set(PHONE_HEADER, PHONE_PAGES.test(request.nextUrl.pathname) ? '1' : '0');
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('content-security-policy', policy);
  for (const [name, value] of Object.entries(HEADERS)) response.headers.set(name, value);
  return response;
}

export const config = {
  // Built files and the icon carry no page, and answers of handlers set their own heads (lib/http).
  matcher: [{ source: '/((?!_next/static|icon.svg|sw.js|icons/|manifest.webmanifest|api/).*)' }],
};
