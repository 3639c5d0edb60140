import '@fontsource-variable/hepta-slab';
import '@fontsource-variable/hanken-grotesk';
import './globals.css';
import type { Metadata, Viewport } from 'next';
import { cookies, headers } from 'next/headers';
import { OfflineWorker } from '@/components/phone/offline-worker';
import { requestLocale } from '@/lib/i18n/server';
import { MODE_COOKIE, readMode } from '@/lib/mode';
import { CONTRAST_COOKIE, HAND_COOKIE, PHONE_HEADER, readContrast, readHand } from '@/lib/phone/settings';

export const metadata: Metadata = {
  title: { default: 'Tercet', template: '%s · Tercet' },
  description: 'Blind tasting of barrel samples, from pull to call.',
  robots: { index: false, follow: false },
  appleWebApp: { capable: true, title: 'Tercet', statusBarStyle: 'black' },
  icons: { icon: '/icon.svg', apple: '/icons/apple-180.png' },
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  viewportFit: 'cover',
  colorScheme: 'light dark',
};

/** Mode, contrast and hand come with the first byte, so that a dark cellar sees no white flash. */
export default async function RootLayout({ children }: { children: React.ReactNode }) {
  const kept = await cookies();
  const isPhone = (await headers()).get(PHONE_HEADER) === '1';
  return (
    <html
      lang={isPhone ? await requestLocale() : 'en'} data-mode={readMode(kept.get(MODE_COOKIE)?.value)}
      data-contrast={readContrast(kept.get(CONTRAST_COOKIE)?.value)} data-hand={readHand(kept.get(HAND_COOKIE)?.value)}
    >
      <body>
        {children}
        <OfflineWorker />
      </body>
    </html>
  );
}
