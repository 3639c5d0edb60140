/// <reference lib="webworker" />
import { CacheableResponsePlugin, CacheFirst, ExpirationPlugin, NetworkFirst, NetworkOnly, Serwist, type PrecacheEntry } from 'serwist';

/*
 * The service worker, bundled by lib/start/build.mjs and served as /sw.js (https and localhost only). It
 * opens sheets and the pull sheet without signal. It never touches /api: what waits to be sent is the
 * page's own business, in IndexedDB, and stays when a cache is forgotten.
 */
declare const self: ServiceWorkerGlobalScope & { readonly __OFFLINE_PAGE: PrecacheEntry };

const DAY_S = 24 * 60 * 60;
/** A slow network is as good as none to somebody with a glass in hand. */
const PATIENCE_S = 4;

const FILES = 'tercet-files';
const SHEETS = 'tercet-sheets';
const CELLAR = 'tercet-cellar';

/** A redirect to another page must never be kept in this one's place. */
const onlyWhole = () => new CacheableResponsePlugin({ statuses: [200] });

const pages = (cacheName: string) =>
  new NetworkFirst({ cacheName, networkTimeoutSeconds: PATIENCE_S, plugins: [onlyWhole(), new ExpirationPlugin({ maxEntries: 20, maxAgeSeconds: 30 * DAY_S })] });

const isSheet = (path: string) => /^\/t\/[^/]+$/.test(path);
const isPull = (path: string) => /^\/pull\/[^/]+$/.test(path);
const isBuiltFile = (path: string) => path.startsWith('/_next/static/') || path.startsWith('/icons/') || path === '/icon.svg';

const serwist = new Serwist({
  precacheEntries: [self.__OFFLINE_PAGE],
  precacheOptions: { cleanupOutdatedCaches: true, ignoreURLParametersMatching: [/.*/] },
  // A new worker waits until the page says that its outbox is empty.
  skipWaiting: false,
  clientsClaim: true,
  navigationPreload: false,
  runtimeCaching: [
    {
      matcher: ({ url, sameOrigin }) => sameOrigin && isBuiltFile(url.pathname),
      handler: new CacheFirst({ cacheName: FILES, plugins: [onlyWhole(), new ExpirationPlugin({ maxEntries: 400, maxAgeSeconds: 60 * DAY_S })] }),
    },
    { matcher: ({ url, request, sameOrigin }) => sameOrigin && request.mode === 'navigate' && isSheet(url.pathname), handler: pages(SHEETS) },
    { matcher: ({ url, request, sameOrigin }) => sameOrigin && request.mode === 'navigate' && isPull(url.pathname), handler: pages(CELLAR) },
    // Every other page needs the network; without it the page for no signal stands in.
    { matcher: ({ request, sameOrigin }) => sameOrigin && request.mode === 'navigate', handler: new NetworkOnly() },
  ],
  fallbacks: { entries: [{ url: '/offline', matcher: ({ request }) => request.mode === 'navigate' }] },
});
serwist.addEventListeners();

/** The page that is open when the worker first starts was fetched without it: it says what to keep. */
async function keep(page: string, files: readonly string[]): Promise<void> {
  const kept = await caches.open(FILES);
  await Promise.all(files.map(async (file) => ((await kept.match(file)) ? undefined : kept.add(file).catch(() => undefined))));
  const { pathname } = new URL(page, self.location.origin);
  const name = isSheet(pathname) ? SHEETS : isPull(pathname) ? CELLAR : null;
  if (!name) return;
  const answer = await fetch(page, { credentials: 'same-origin', redirect: 'manual', headers: { accept: 'text/html' } }).catch(() => null);
  if (answer?.status === 200) await (await caches.open(name)).put(page, answer);
}

self.addEventListener('message', (event) => {
  const data: unknown = event.data;
  if (typeof data !== 'object' || data === null || !('type' in data) || data.type !== 'KEEP') return;
  const { page, files } = data as unknown as { page: string; files: string[] };
  event.waitUntil(keep(page, files));
});
