/*
 * Lets a display page open while the hub is away: what the page was made of last time is kept in the browser. Browsers
 * run this on secure pages only (https, or the hub's own machine).
 */
const kept = 'lampyrid-page';
/** A network that swallows questions is waited for no longer than this, ms. */
const patience = 2000;

self.addEventListener('install', () => self.skipWaiting());
self.addEventListener('activate', (event) => event.waitUntil(self.clients.claim()));

/** The newest page there is; the kept one when the hub does not answer with one. The page itself keeps it, once whole. */
async function page(request) {
  const cache = await caches.open(kept);
  try {
    const answer = await fetch(request, { signal: AbortSignal.timeout(patience) });
    return answer.ok ? answer : ((await cache.match('/display')) ?? answer);
  } catch (error) {
    const last = await cache.match('/display');
    if (last) return last;
    throw error;
  }
}

/** Scripts, styles and fonts are named after their content: one that is here is the right one. */
async function part(request) {
  const cache = await caches.open(kept);
  const found = await cache.match(request.url);
  if (found) return found;
  const answer = await fetch(request);
  if (answer.ok) await cache.put(request.url, answer.clone());
  return answer;
}

self.addEventListener('fetch', (event) => {
  const { request } = event;
  const { origin, pathname } = new URL(request.url);
  if (request.method !== 'GET' || origin !== self.location.origin) return;
  if (request.mode === 'navigate') event.respondWith(page(request));
  else if (pathname.startsWith('/assets/')) event.respondWith(part(request));
});
