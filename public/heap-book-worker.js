/**
 * Serves a page for writing in the heap book where the network serves none. It keeps that one page and its scripts: no
 * figures, no entries, nothing of a holding, so there is nothing to take away when somebody signs out. Every other request
 * goes its way untouched.
 */
const SHELL = '/offline-book';
const KEPT = 'heap-book-shell-1';

self.addEventListener('install', (event) => {
  event.waitUntil(keepShell().then(() => self.skipWaiting()));
});

self.addEventListener('activate', (event) => {
  event.waitUntil(forgetOthers().then(() => self.clients.claim()));
});

/** The book was opened with a line: a new release may have a new shell. */
self.addEventListener('message', (event) => {
  if (event.data === 'look-for-new') event.waitUntil(keepShell().catch(() => undefined));
});

self.addEventListener('fetch', (event) => {
  const { request } = event;
  const url = new URL(request.url);
  if (request.method !== 'GET' || url.origin !== self.location.origin) return;
  if (request.mode === 'navigate') {
    const house = /^\/([^/]+)\/heap-book$/.exec(url.pathname)?.[1];
    if (house !== undefined) event.respondWith(bookOrShell(request, house, url.searchParams.get('heap')));
    else if (url.pathname === SHELL) event.respondWith(shellOrNetwork(request));
  } else if (url.pathname.startsWith('/_next/static/')) {
    event.respondWith(keptOrNetwork(request));
  }
});

async function bookOrShell(request, house, heap) {
  try {
    return await fetch(request);
  } catch (error) {
    const cache = await caches.open(KEPT);
    if ((await cache.match(SHELL)) === undefined) throw error;
    const to = new URLSearchParams(heap === null ? { house } : { house, heap });
    return Response.redirect(`${SHELL}?${to}`, 302);
  }
}

async function shellOrNetwork(request) {
  const cache = await caches.open(KEPT);
  // the network first: a shell that is older than its server may speak another release's words
  try {
    return await fetch(request);
  } catch (error) {
    const kept = await cache.match(SHELL);
    if (kept === undefined) throw error;
    return kept;
  }
}

/** Names of these files change with what is in them, so one that is kept is right. */
async function keptOrNetwork(request) {
  const kept = await (await caches.open(KEPT)).match(request);
  return kept ?? fetch(request);
}

/** The page, and all that it names: scripts, styles and faces. What an older shell needed goes. */
async function keepShell() {
  const answer = await fetch(SHELL, { credentials: 'omit', cache: 'no-store' });
  if (!answer.ok) throw new Error(`the shell answered ${answer.status}`);
  const page = await answer.clone().text();
  const wanted = new Set(page.match(/\/_next\/static\/[^"'\\\s<>?)]+/g) ?? []);
  const cache = await caches.open(KEPT);
  for (const file of [...wanted]) {
    const kept = (await cache.match(file)) ?? (await fetch(file));
    if (!kept.ok) throw new Error(`${file} answered ${kept.status}`);
    await cache.put(file, kept.clone());
    if (!file.endsWith('.css')) continue;
    for (const [, face] of (await kept.text()).matchAll(/url\(["']?([^"')]+\.woff2)["']?\)/g)) {
      const { pathname } = new URL(face, new URL(file, self.location.origin));
      wanted.add(pathname);
      if ((await cache.match(pathname)) === undefined) await cache.add(pathname);
    }
  }
  await cache.put(SHELL, answer);
  for (const request of await cache.keys()) {
    const { pathname } = new URL(request.url);
    if (pathname !== SHELL && !wanted.has(pathname)) await cache.delete(request);
  }
}

async function forgetOthers() {
  const names = await caches.keys();
  await Promise.all(
    names.filter((name) => name.startsWith('heap-book-') && name !== KEPT).map((name) => caches.delete(name)),
  );
}
