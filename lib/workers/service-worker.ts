/// <reference lib="webworker" />
import { CacheFirst, Serwist } from 'serwist';
import { ASSET_CACHE, PLAN_WORKER_PATH, SHELL_CACHE, SHELL_PATH } from '@/lib/client/shell-names';

/** In a plant room a connection may be there in name only; nobody is made to wait longer for it. */
const PATIENCE_MS = 6000;

/**
 * Opens Evenhead where there is no network. Pages come from the server for as long as it answers; where it does not, the page that was
 * taken along opens in their place and finds by the address what to show. Answers of the server's interface are never kept here.
 */
const worker = new Serwist({
  skipWaiting: true,
  clientsClaim: true,
  runtimeCaching: [
    {
      matcher: ({ url, sameOrigin }) => sameOrigin && url.pathname.startsWith('/_next/static/'),
      // Named by their content, so what was stored under a name is always right. Only "Take along" stores.
      handler: new CacheFirst({ cacheName: ASSET_CACHE, plugins: [{ cacheWillUpdate: async () => null }] }),
    },
    {
      matcher: ({ url, sameOrigin }) => sameOrigin && url.pathname === PLAN_WORKER_PATH,
      handler: async ({ request }) => {
        try {
          return await fetch(request);
        } catch (error) {
          const kept = await caches.match(PLAN_WORKER_PATH, { cacheName: ASSET_CACHE });
          if (kept) return kept;
          throw error;
        }
      },
    },
    {
      matcher: ({ request }) => request.mode === 'navigate',
      handler: async ({ request }) => {
        const shell = await caches.match(SHELL_PATH, { cacheName: SHELL_CACHE });
        if (!shell) return fetch(request);
        try {
          const answer = await Promise.race([fetch(request), tooLate()]);
          return isFromBefore(answer) ? shell : answer;
        } catch {
          return shell;
        }
      },
    },
  ],
});

worker.addEventListeners();

const tooLate = (): Promise<never> =>
  new Promise((_, reject) => setTimeout(() => reject(new DOMException('No answer in time', 'TimeoutError')), PATIENCE_MS));

/** The word of something that stands before a server which is away. */
const isFromBefore = ({ status }: Response): boolean => status === 502 || status === 503 || status === 504;
