/** What every answer carries; the page's content policy, which changes each time, comes from proxy.ts. */
const SECURITY_HEADERS = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  // Not `no-referrer`: with it browsers send `Origin: null` for plain forms, and the origin check refuses them.
  { key: 'Referrer-Policy', value: 'same-origin' },
  { key: 'Permissions-Policy', value: 'accelerometer=(), camera=(self), display-capture=(), geolocation=(), gyroscope=(), magnetometer=(), microphone=(), payment=(), usb=()' },
  { key: 'X-Frame-Options', value: 'DENY' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
];

/** @type {import('next').NextConfig} */
const config = {
  agentRules: false,
  reactStrictMode: true,
  poweredByHeader: false,
  // The image optimiser is not used; leaving it on would only be a way in.
  images: { unoptimized: true },
  serverExternalPackages: ['better-sqlite3', '@node-rs/argon2'],
  experimental: { serverActions: { bodySizeLimit: '256kb' } },
  devIndicators: false,
  headers: async () => [
    { source: '/:path*', headers: SECURITY_HEADERS },
    // Should a browser ever show an answer of the API as a page, nothing in it runs.
    { source: '/api/:path*', headers: [{ key: 'Content-Security-Policy', value: "default-src 'none'; frame-ancestors 'none'" }] },
  ],
};

export default config;
