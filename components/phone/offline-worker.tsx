'use client';

import { useEffect } from 'react';
import { MODE_COOKIE } from '@/lib/mode';
import { countWaiting } from '@/lib/offline/waiting';
import { CONTRAST_COOKIE, HAND_COOKIE } from '@/lib/phone/settings';

/** Files that this page was made of, for a worker that was not there yet. */
const filesOfPage = (): string[] =>
  performance.getEntriesByType('resource').map((entry) => new URL(entry.name)).filter((url) => url.origin === location.origin && url.pathname.startsWith('/_next/static/')).map((url) => url.pathname);

/** Lets a new worker take over only while nothing waits to be sent, so that no half-sent sheet meets a new build. */
async function updateWhenEmpty(registration: ServiceWorkerRegistration): Promise<void> {
  if (registration.waiting && (await countWaiting()) === 0) registration.waiting?.postMessage({ type: 'SKIP_WAITING' });
}

const keep = (worker: ServiceWorker | null): void => worker?.postMessage({ type: 'KEEP', page: location.pathname, files: filesOfPage() });

async function start(): Promise<() => void> {
  const registration = await navigator.serviceWorker.register('/sw.js', { scope: '/', updateViaCache: 'none' });
  const look = () => {
    void updateWhenEmpty(registration);
    // Put away: what was chosen since the page was kept goes along.
    if (document.visibilityState === 'hidden') keep(registration.active);
  };
  registration.addEventListener('updatefound', () => registration.installing?.addEventListener('statechange', look));
  document.addEventListener('visibilitychange', look);
  look();
  const ready = await navigator.serviceWorker.ready;
  // Once at the start and once when what loads late has come.
  keep(ready.active);
  const later = setTimeout(() => keep(ready.active), 6_000);
  return () => {
    clearTimeout(later);
    document.removeEventListener('visibilitychange', look);
  };
}

/** A page that was kept may show the view of another day: the cookies know today's. */
function restoreView(): void {
  const kept = new Map(document.cookie.split('; ').map((part) => part.split('=') as [string, string]));
  for (const [what, cookie] of [['mode', MODE_COOKIE], ['contrast', CONTRAST_COOKIE], ['hand', HAND_COOKIE]] as const) {
    const value = kept.get(cookie);
    if (value && document.documentElement.dataset[what] !== value) document.documentElement.dataset[what] = value;
  }
}

/** Starts the service worker where the browser allows one (https, localhost), in the built application. */
export function OfflineWorker() {
  useEffect(restoreView, []);
  useEffect(() => {
    if (process.env.NODE_ENV !== 'production' || !('serviceWorker' in navigator) || !window.isSecureContext) return;
    let stop = () => {};
    start().then((end) => (stop = end), () => undefined);
    return () => stop();
  }, []);
  return null;
}
