import { call } from './call';

const cacheName = 'lampyrid-page';
const page = '/display';

/** Everything this page has loaded from /assets. */
const partsOfPage = (): string[] =>
  performance
    .getEntriesByType('resource')
    .map(({ name }) => name)
    .filter((name) => new URL(name).pathname.startsWith('/assets/'));

/**
 * Keeps the page in the browser, so that it opens while the hub is away. Secure pages only; elsewhere a display that is
 * reloaded waits for the hub.
 */
export async function keepPage(): Promise<void> {
  if (!('serviceWorker' in navigator && 'caches' in window)) return;
  if ((await call('GET', '/healthz')).status !== 200) return;
  try {
    await navigator.serviceWorker.register('/displayKept.js', { scope: page });
    const cache = await caches.open(cacheName);
    const parts = new Set(partsOfPage());
    for (const url of parts) if (!(await cache.match(url))) await cache.add(url);
    const answer = await fetch(page);
    const named = (await answer.clone().text()).match(/\/assets\/[^"]+/g) ?? [];
    // A newer page than this one, whose parts are not here: what was kept before still fits together.
    if (!answer.ok || !named.every((path) => parts.has(location.origin + path))) return;
    await cache.put(page, answer);
    for (const { url } of await cache.keys())
      if (!parts.has(url) && new URL(url).pathname !== page) await cache.delete(url);
  } catch {
    // Full, forbidden, or the hub went away meanwhile: the next load tries again.
  }
}
