/**
 * The service worker: keeps one whole build of the page in the browser and answers from it, so that the page opens and works without a network. It asks
 * no other server for anything, and keeps nothing but files of the build, each checked against its SHA-256.
 *
 * A new build waits until it is asked to take over: by the page, or by a reload while no other tab shows the old one.
 */
import { fileAt } from './address.ts';
import { TAKE_OVER } from './messages.ts';

/** Set by src/tools/offline-worker.mjs: the files with their hashes ("sha256-..."), and a name for all of them together. */
declare const FILES: readonly [file: string, integrity: string][];
declare const VERSION: string;

// What this file needs of a service worker's world: the standard types have it only without those of a page.
interface Lasting extends Event {
  waitUntil(work: Promise<unknown>): void;
}
interface Asking extends Event {
  readonly request: Request;
  respondWith(answer: Promise<Response>): void;
}
interface World {
  readonly registration: { readonly scope: string; readonly waiting: { postMessage(message: unknown): void } | null };
  readonly clients: { claim(): Promise<void>; matchAll(options: { type: 'window' }): Promise<readonly unknown[]> };
  skipWaiting(): Promise<void>;
  addEventListener(type: 'install' | 'activate', hear: (event: Lasting) => void): void;
  addEventListener(type: 'fetch', hear: (event: Asking) => void): void;
  addEventListener(type: 'message', hear: (event: MessageEvent<unknown>) => void): void;
}
const world = self as unknown as World;
const { scope } = world.registration;

/** Other copies of the page may live in other folders of the same server, and share its caches. */
const PREFIX = `halfmark ${scope} `;
const CACHE = PREFIX + VERSION;
const NAMES: ReadonlySet<string> = new Set(FILES.map(([file]) => file));

world.addEventListener('install', (event) => event.waitUntil(keepAll()));
world.addEventListener('activate', (event) => event.waitUntil(Promise.all([dropOld(), world.clients.claim()])));
world.addEventListener('message', ({ data }) => {
  if (data === TAKE_OVER) void world.skipWaiting();
});
world.addEventListener('fetch', (event) => {
  const { method, url, mode } = event.request;
  if (method === 'GET' && url.startsWith(scope)) event.respondWith(mode === 'navigate' ? page(event.request) : answer(event.request));
});

/** All files or none: a build of which one file is missing or another one is not kept, and the former stays. */
async function keepAll(): Promise<void> {
  const cache = await caches.open(CACHE);
  await cache.addAll(FILES.map(([file, integrity]) => new Request(new URL(file, scope), { integrity, cache: 'no-cache' })));
}

/** The build before this one stays as well: a tab that still shows it may yet ask for its parts. */
async function dropOld(): Promise<void> {
  const others = (await caches.keys()).filter((name) => name.startsWith(PREFIX) && name !== CACHE);
  await Promise.all(others.slice(0, -1).map((name) => caches.delete(name)));
}

async function answer(request: Request): Promise<Response> {
  const file = fileAt(request.url, scope, NAMES);
  if (file !== null) {
    const kept = await (await caches.open(CACHE)).match(new URL(file, scope), { ignoreVary: true });
    if (kept !== undefined) return kept;
  }
  for (const name of await caches.keys()) {
    const kept = name.startsWith(PREFIX) && name !== CACHE ? await (await caches.open(name)).match(request, { ignoreVary: true, ignoreSearch: true }) : undefined;
    if (kept !== undefined) return kept;
  }
  return fetch(request);
}

/** When a waiting build was last asked to take over, ms; it may take a moment to follow. */
let asked = -Infinity;

/** A reload is the moment when nothing is being edited. With one tab open, the build that waits takes over and the page is asked for once more. */
async function page(request: Request): Promise<Response> {
  const { waiting } = world.registration;
  if (waiting !== null && Date.now() - asked > 5000 && (await world.clients.matchAll({ type: 'window' })).length < 2) {
    asked = Date.now();
    waiting.postMessage(TAKE_OVER);
    return new Response('', { headers: { Refresh: '0', 'Content-Type': 'text/html' } });
  }
  return answer(request);
}
