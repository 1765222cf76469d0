/** The service worker: keeps one page of nobody's and what it loads, and never a page or an answer of a person. */
import { createHash } from 'node:crypto';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { serviceWorker } from '@/lib/offline/service-worker';

const ORIGIN = 'http://127.0.0.1:3000';
const INLINE = 'self.__next_f.push(["static/chunks/late.js"])';
const SHELL = `<html><link href="/_next/static/a.css"><script src="/_next/static/chunks/main.js"></script><script>${INLINE}</script></html>`;

class FakeCache {
  readonly kept = new Map<string, Response>();
  private path = (of: string | { url: string }) =>
    new URL(typeof of === 'string' ? of : of.url, ORIGIN).pathname;
  put(of: string | { url: string }, response: Response) {
    this.kept.set(this.path(of), response);
    return Promise.resolve();
  }
  match(of: string | { url: string }) {
    return Promise.resolve(this.kept.get(this.path(of))?.clone());
  }
}

let stores: Map<string, FakeCache>;
let server: ((path: string) => Response) | null;
let asked: string[];

beforeEach(() => {
  stores = new Map();
  asked = [];
  server = (path) =>
    path === '/offline'
      ? new Response(SHELL)
      : path.endsWith('.css')
        ? new Response('@font-face{src:url(../static/media/face.woff2)}')
        : path.endsWith('late.js')
          ? new Response('load("static/chunks/when-needed.js")')
          : new Response(`content of ${path}`);
  const open = (name: string) => {
    const known = stores.get(name) ?? new FakeCache();
    stores.set(name, known);
    return Promise.resolve(known);
  };
  vi.stubGlobal('caches', {
    open,
    keys: () => Promise.resolve([...stores.keys()]),
    delete: (name: string) => Promise.resolve(stores.delete(name)),
    match: async (of: string | { url: string }) => {
      for (const cache of stores.values()) {
        const found = await cache.match(of);
        if (found) return found;
      }
      return undefined;
    },
  });
  vi.stubGlobal('fetch', (of: string | { url: string }) => {
    const path = new URL(typeof of === 'string' ? of : of.url, ORIGIN).pathname;
    asked.push(path);
    return server ? Promise.resolve(server(path)) : Promise.reject(new TypeError('no network'));
  });
});
afterEach(() => void vi.unstubAllGlobals());

function start(build: string) {
  const listeners = new Map<string, (event: never) => void>();
  const claim = vi.fn(() => Promise.resolve());
  const skipWaiting = vi.fn(() => Promise.resolve());
  serviceWorker(
    {
      location: { origin: ORIGIN },
      clients: { claim },
      skipWaiting,
      addEventListener: (type: string, listener: (event: never) => void) => listeners.set(type, listener),
    } as never,
    build,
  );
  const run = async (type: 'install' | 'activate') => {
    let work: Promise<unknown> = Promise.resolve();
    listeners.get(type)?.({ waitUntil: (promise: Promise<unknown>) => (work = promise) } as never);
    await work;
  };
  const ask = async (path: string, mode = 'navigate', method = 'GET'): Promise<string | null> => {
    let answer: Promise<Response> | null = null;
    const request = { url: ORIGIN + path, mode, method };
    listeners.get('fetch')?.({
      request,
      respondWith: (given: Promise<Response>) => (answer = given),
    } as never);
    return answer ? (await (answer as Promise<Response>)).text() : null;
  };
  return { run, ask, claim, skipWaiting };
}

const survey = '/s/shop/jobs/job/survey';

describe('the service worker', () => {
  it('keeps the page with all that it loads, fonts and pieces fetched later too, under a policy with its scripts’ hashes', async () => {
    const worker = start('one');
    await worker.run('install');
    const kept = stores.get('lampwright-one')?.kept ?? new Map<string, Response>();
    expect([...kept.keys()].sort()).toEqual([
      '/_next/static/a.css',
      '/_next/static/chunks/late.js',
      '/_next/static/chunks/main.js',
      '/_next/static/chunks/when-needed.js',
      '/_next/static/media/face.woff2',
      '/offline',
    ]);
    const policy = kept.get('/offline')?.headers.get('content-security-policy') ?? '';
    const hash = createHash('sha256').update(INLINE).digest('base64');
    expect(policy).toContain(`script-src 'self' 'sha256-${hash}'`);
    expect(policy).not.toMatch(/script-src[^;]*unsafe/);
  });

  it('is not installed by halves', async () => {
    const whole = server;
    server = (path) => (path.endsWith('late.js') ? new Response('', { status: 404 }) : whole!(path));
    await expect(start('one').run('install')).rejects.toThrow('late.js answered 404');
    expect(stores.get('lampwright-one')?.kept.has('/offline')).toBe(false);
  });

  it('answers with it where no server does, on the screens that work so; with the server there, the server does', async () => {
    const worker = start('one');
    await worker.run('install');
    server = () => new Response('the person’s own page');
    expect(await worker.ask(survey)).toBe('the person’s own page');
    server = () => new Response('broken', { status: 502 });
    expect(await worker.ask(survey)).toBe(SHELL);
    server = null;
    for (const path of [survey, '/s/shop/sheets/sheet', '/s/shop/jobs/job/circuits/one'])
      expect(await worker.ask(path)).toBe(SHELL);
    expect(await worker.ask('/_next/static/chunks/main.js', 'no-cors')).toBe(
      'content of /_next/static/chunks/main.js',
    );
  });

  it('takes a server that does not answer for gone', async () => {
    const worker = start('one');
    await worker.run('install');
    vi.useFakeTimers();
    vi.stubGlobal('fetch', () => new Promise(() => undefined));
    const answer = worker.ask(survey);
    await vi.advanceTimersByTimeAsync(10_000);
    expect(await answer).toBe(SHELL);
    vi.useRealTimers();
  });

  it('leaves answers of the API, writes, customers’ pages and sign-in alone, and keeps no page of a person', async () => {
    const worker = start('one');
    await worker.run('install');
    const before = [...(stores.get('lampwright-one')?.kept.keys() ?? [])];
    expect(await worker.ask('/api/v1/shops/shop/jobs/job/survey', 'cors')).toBeNull();
    expect(await worker.ask(survey, 'cors', 'POST')).toBeNull();
    expect(await worker.ask('/l/link')).toBeNull();
    expect(await worker.ask('/sign-in')).toBeNull();
    await worker.ask(survey);
    await worker.ask('/s/shop/jobs');
    expect([...(stores.get('lampwright-one')?.kept.keys() ?? [])]).toEqual(before);
  });

  it('a new build takes over at once; a tab of the build before keeps its files, and no signal shows the newest page', async () => {
    const [first, second, third] = ['mi0000a', 'mi0000b', 'mi0000c'] as const;
    const older = start(first);
    await older.run('install');
    await older.run('activate');
    server = (path) =>
      path === '/offline' ? new Response('<html>two</html>') : new Response('', { status: 404 });
    const newer = start(second);
    await newer.run('install');
    expect(newer.skipWaiting).toHaveBeenCalled();
    await newer.run('activate');
    expect(newer.claim).toHaveBeenCalled();
    expect([...stores.keys()]).toEqual([`lampwright-${first}`, `lampwright-${second}`]);
    expect(await newer.ask('/_next/static/chunks/main.js', 'no-cors')).toContain('main.js');
    const whole = server;
    server = null;
    expect(await newer.ask(survey)).toBe('<html>two</html>');
    server = whole;
    const newest = start(third);
    await newest.run('install');
    await newest.run('activate');
    expect([...stores.keys()]).toEqual([`lampwright-${second}`, `lampwright-${third}`]);
  });

  it('leaves what is not its own in the browser’s caches alone', async () => {
    stores.set('another-site', new FakeCache());
    const worker = start('one');
    await worker.run('install');
    await worker.run('activate');
    expect(stores.has('another-site')).toBe(true);
  });
});
