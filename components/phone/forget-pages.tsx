'use client';

import { useEffect } from 'react';

/** Caches of the service worker (`lib/offline/worker.ts`), by what they hold. */
const CACHES = { sheets: 'tercet-sheets', cellar: 'tercet-cellar' } as const;

/** Forgets pages that this device kept for opening without signal. What waits to be sent stays: it is kept elsewhere. */
export function ForgetPages({ which }: { which: keyof typeof CACHES }) {
  useEffect(() => {
    if ('caches' in window) void caches.delete(CACHES[which]);
  }, [which]);
  return null;
}
