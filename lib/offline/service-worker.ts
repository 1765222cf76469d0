/**
 * The service worker, as one function without anything from outside: its text is what `/sw.js` answers. It keeps one
 * page without private data (`/offline`, with all that it loads) and answers with it where a screen that works from the
 * device's own store can't reach the server. It never keeps a page of a person, nor an answer of the API.
 */
interface Extendable {
  waitUntil: (work: Promise<unknown>) => void;
}
interface FetchLike extends Extendable {
  request: Request;
  respondWith: (answer: Promise<Response>) => void;
}
export interface WorkerScope {
  location: { origin: string };
  clients: { claim: () => Promise<void> };
  skipWaiting: () => Promise<void>;
  addEventListener(type: 'install' | 'activate', listener: (event: Extendable) => void): void;
  addEventListener(type: 'fetch', listener: (event: FetchLike) => void): void;
}

export function serviceWorker(scope: WorkerScope, build: string): void {
  const PREFIX = 'lampwright-';
  const CACHE = `${PREFIX}${build}`;
  const SHELL = '/offline';
  const STATIC = '/_next/static/';
  const WORKS_OFFLINE = /^\/s\/[^/]+\/(jobs\/[^/]+\/(survey|circuits(\/[^/]+)?)|sheets\/[^/]+)$/;
  /** A server that does not answer for so long is taken for gone, where the device has all that is needed. */
  const PATIENCE_MS = 4000;

  const base64 = (bytes: ArrayBuffer) => btoa(String.fromCharCode(...new Uint8Array(bytes)));

  /** The page's own scripts stand in it: each is allowed by its hash, and nothing else that is inline. */
  async function policyFor(html: string): Promise<string> {
    const hashes: string[] = [];
    for (const match of html.matchAll(/<script(?![^>]*\ssrc=)[^>]*>([\s\S]*?)<\/script>/g)) {
      const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(match[1] ?? ''));
      hashes.push(`'sha256-${base64(digest)}'`);
    }
    return [
      "default-src 'self'",
      `script-src 'self' ${[...new Set(hashes)].join(' ')}`,
      "style-src 'self' 'unsafe-inline'",
      "img-src 'self' blob: data:",
      "connect-src 'self'",
      "object-src 'none'",
      "base-uri 'none'",
      "form-action 'self'",
      "frame-ancestors 'none'",
    ].join('; ');
  }

  const scriptsAndStyles = (html: string): string[] => [
    ...new Set(
      [...html.matchAll(/static\/[\w./~%-]+\.(?:js|css|woff2?)/g)].map((match) => `/_next/${match[0]}`),
    ),
  ];

  const fontsIn = (css: string, address: string): string[] =>
    [...css.matchAll(/url\(["']?([^"')]+)["']?\)/g)]
      .map((match) => new URL(match[1] ?? '', new URL(address, scope.location.origin)).pathname)
      .filter((path) => path.startsWith(STATIC));

  /** With what it loads in its turn: a style's fonts, a script's pieces that are fetched when they are needed. */
  async function keep(cache: Cache, address: string): Promise<void> {
    if (await cache.match(address)) return;
    const response = await fetch(address);
    if (!response.ok) throw new Error(`${address} answered ${response.status}`);
    await cache.put(address, response.clone());
    const text = /\.(css|js)$/.test(address) ? await response.text() : '';
    const loads = address.endsWith('.css') ? fontsIn(text, address) : scriptsAndStyles(text);
    for (const one of loads) await keep(cache, one);
  }

  async function install(): Promise<void> {
    const cache = await caches.open(CACHE);
    const response = await fetch(SHELL, { cache: 'no-store' });
    if (!response.ok) throw new Error(`${SHELL} answered ${response.status}`);
    const html = await response.text();
    for (const address of scriptsAndStyles(html)) await keep(cache, address);
    const headers = {
      'content-type': 'text/html; charset=utf-8',
      'content-security-policy': await policyFor(html),
      'x-content-type-options': 'nosniff',
    };
    await cache.put(SHELL, new Response(html, { headers }));
    await scope.skipWaiting();
  }

  const madeAt = (name: string) => Number.parseInt(name.slice(PREFIX.length), 36) || 0;

  /**
   * A phone's tab may stay open for months: a new worker does not wait for it, or the page without a signal would be as
   * old as the tab. The build before is kept for tabs that still run it; older ones ask the server.
   */
  async function activate(): Promise<void> {
    const others = (await caches.keys())
      .filter((name) => name.startsWith(PREFIX) && name !== CACHE)
      .sort((a, b) => madeAt(b) - madeAt(a));
    for (const name of others.slice(1)) await caches.delete(name);
    await scope.clients.claim();
  }

  /** Their names hold their hashes: what is kept is what is asked for. */
  async function fromStore(request: Request): Promise<Response> {
    const known = await caches.match(request, { ignoreSearch: true });
    if (known) return known;
    const response = await fetch(request);
    if (response.ok) await (await caches.open(CACHE)).put(request, response.clone());
    return response;
  }

  const after = (milliseconds: number) =>
    new Promise<null>((resolve) => setTimeout(() => resolve(null), milliseconds));

  async function page(request: Request, path: string): Promise<Response> {
    const shell = await (await caches.open(CACHE)).match(SHELL);
    const asked = fetch(request).catch(() => null);
    if (!shell) return (await asked) ?? Response.error();
    if (!WORKS_OFFLINE.test(path)) return (await asked) ?? shell;
    const answered = await Promise.race([asked, after(PATIENCE_MS)]);
    return answered && answered.status < 500 ? answered : shell;
  }

  scope.addEventListener('install', (event) => event.waitUntil(install()));
  scope.addEventListener('activate', (event) => event.waitUntil(activate()));
  scope.addEventListener('fetch', (event) => {
    const { request } = event;
    const { origin, pathname } = new URL(request.url);
    if (request.method !== 'GET' || origin !== scope.location.origin) return;
    if (pathname.startsWith(STATIC)) event.respondWith(fromStore(request));
    else if (request.mode === 'navigate' && pathname.startsWith('/s/'))
      event.respondWith(page(request, pathname));
  });
}
