import '@fontsource-variable/hepta-slab';
import '@fontsource-variable/hanken-grotesk';
import './globals.css';
import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import { MODE_COOKIE, readMode } from '@/lib/mode';

export const metadata: Metadata = {
  title: { default: 'Tercet', template: '%s · Tercet' },
  description: 'Blind tasting of barrel samples, from pull to call.',
  robots: { index: false, follow: false },
};

export const viewport: Viewport = { width: 'device-width', initialScale: 1, colorScheme: 'light dark' };

/** The mode comes with the first byte, so that a dark cellar sees no white flash. */
export default async function RootLayout({ children }: { children: React.ReactNode }) {
  const mode = readMode((await cookies()).get(MODE_COOKIE)?.value);
  return (
    <html lang="en" data-mode={mode}>
      <body>{children}</body>
    </html>
  );
}
