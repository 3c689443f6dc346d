import { RequestError } from './http';
import { ASSET_CACHE, PLAN_WORKER_PATH, SHELL_CACHE, SHELL_PATH } from './shell-names';

/** Whether this browser can open Evenhead without a network: it needs HTTPS (or this machine) and a service worker. */
export const canStartOffline = (): boolean => 'serviceWorker' in navigator && 'caches' in globalThis;

/**
 * Puts the application's own page and everything it is made of on this device: first the parts, then the page that needs them, last away
 * with parts that only an earlier page needed. Cut off in between, the earlier page still works.
 */
export async function storeShell(): Promise<void> {
  if (!canStartOffline()) throw new RequestError('no-worker', 'This browser cannot open Evenhead without a network: it needs HTTPS.', 0);
  const page = await fetched(SHELL_PATH);
  const html = await page.clone().text();
  const assets = await caches.open(ASSET_CACHE);
  const needed = new Set<string>();
  for (const path of assetPathsIn(html)) {
    needed.add(path);
    if (!path.endsWith('.css')) continue;
    const style = await (await stored(assets, path)).text();
    for (const inner of pathsInStyle(style, path)) needed.add(inner);
  }
  await Promise.all([...needed].map((path) => stored(assets, path)));
  await assets.put(PLAN_WORKER_PATH, await fetched(PLAN_WORKER_PATH));
  needed.add(PLAN_WORKER_PATH);
  await (await caches.open(SHELL_CACHE)).put(SHELL_PATH, page);
  const old = (await assets.keys()).filter(({ url }) => !needed.has(new URL(url).pathname));
  await Promise.all(old.map((request) => assets.delete(request)));
}

/** Takes the page off the device; at sign-out, for it names the person. */
export async function dropShell(): Promise<void> {
  if ('caches' in globalThis) await Promise.all([caches.delete(SHELL_CACHE), caches.delete(ASSET_CACHE)]);
}

/** Paths of scripts, styles and fonts that a page names, in its tags or in the data it carries. */
export function assetPathsIn(html: string): string[] {
  const found = html.matchAll(/\/_next\/static\/[\w./~@%[\]()-]+?\.(?:js|css|woff2?|svg|png|ico)\b/g);
  return [...new Set([...found].map(([path]) => path))];
}

/** Paths of the files that a style sheet names, relative to its own path. */
export function pathsInStyle(style: string, stylePath: string): string[] {
  const found = style.matchAll(/url\((['"]?)(?!data:)([^'")]+)\1\)/g);
  return [...new Set([...found].map(([, , path]) => new URL(path!, new URL(stylePath, 'http://localhost')).pathname))];
}

async function stored(assets: Cache, path: string): Promise<Response> {
  const known = await assets.match(path);
  if (known) return known;
  const response = await fetched(path);
  await assets.put(path, response.clone());
  return response;
}

async function fetched(path: string): Promise<Response> {
  let response: Response;
  try {
    response = await fetch(path, { credentials: 'same-origin' });
  } catch {
    throw new RequestError('offline', 'The server could not be reached. Check the connection and try again.', 0);
  }
  if (response.redirected) throw new RequestError('signed-out', 'Your session has ended. Sign in again.', 401);
  if (!response.ok) throw new RequestError('unexpected', `The server answered ${response.status}. Try again.`, response.status);
  return response;
}
