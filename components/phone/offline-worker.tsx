'use client';

import { useEffect } from 'react';
import { countWaiting } from '@/lib/offline/waiting';

/** Files that this page was made of, for a worker that was not there yet. */
const filesOfPage = (): string[] =>
  performance.getEntriesByType('resource').map((entry) => new URL(entry.name)).filter((url) => url.origin === location.origin && url.pathname.startsWith('/_next/static/')).map((url) => url.pathname);

/** Lets a new worker take over only while nothing waits to be sent, so that no half-sent sheet meets a new build. */
async function updateWhenEmpty(registration: ServiceWorkerRegistration): Promise<void> {
  if (registration.waiting && (await countWaiting()) === 0) registration.waiting?.postMessage({ type: 'SKIP_WAITING' });
}

async function start(): Promise<() => void> {
  const registration = await navigator.serviceWorker.register('/sw.js', { scope: '/', updateViaCache: 'none' });
  const look = () => void updateWhenEmpty(registration);
  registration.addEventListener('updatefound', () => registration.installing?.addEventListener('statechange', look));
  document.addEventListener('visibilitychange', look);
  look();
  const ready = await navigator.serviceWorker.ready;
  const keep = () => ready.active?.postMessage({ type: 'KEEP', page: location.pathname, files: filesOfPage() });
  // Once at the start and once when what loads late has come.
  keep();
  const later = setTimeout(keep, 6_000);
  return () => {
    clearTimeout(later);
    document.removeEventListener('visibilitychange', look);
  };
}

/** Starts the service worker where the browser allows one (https, localhost), in the built application. */
export function OfflineWorker() {
  useEffect(() => {
    if (process.env.NODE_ENV !== 'production' || !('serviceWorker' in navigator) || !window.isSecureContext) return;
    let stop = () => {};
    start().then((end) => (stop = end), () => undefined);
    return () => stop();
  }, []);
  return null;
}
