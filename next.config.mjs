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
};

export default config;
