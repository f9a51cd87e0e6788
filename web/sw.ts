/**
 * Lets the app open in a field without a line, so that sheets can be photographed and kept. It keeps the page and its own
 * files, and touches nothing under /api: what the server says is never older than the line.
 */
interface Lasting extends Event {
  waitUntil: (work: Promise<unknown>) => void
}
interface Asked extends Lasting {
  request: Request
  respondWith: (answer: Promise<Response>) => void
}
interface Scope {
  skipWaiting: () => Promise<void>
  clients: { claim: () => Promise<void> }
  addEventListener: (name: string, heard: (event: never) => void) => void
}
const scope = globalThis as unknown as Scope

const STORE = 'sheafbook-1'
const PAGE = '/'

scope.addEventListener('install', (event: Lasting) => event.waitUntil(scope.skipWaiting()))
scope.addEventListener('activate', (event: Lasting) => event.waitUntil(scope.clients.claim()))

/** The page tells which files it was made of: those it loaded before this worker listened. */
scope.addEventListener('message', (event: Lasting & { data: unknown }) => {
  const { data } = event
  if (Array.isArray(data)) event.waitUntil(keepAll(data.filter((url): url is string => typeof url === 'string' && isOurs(url))))
})

scope.addEventListener('fetch', (event: Asked) => {
  const { request } = event
  if (request.method !== 'GET' || new URL(request.url).pathname.startsWith('/api/')) return
  if (request.mode === 'navigate') event.respondWith(freshPage(request))
  else if (isOurs(request.url)) event.respondWith(keptFile(request))
})

/** Files with a hash in their name never change. */
const isOurs = (url: string) => {
  const { origin, pathname } = new URL(url, location.href)
  return origin === location.origin && pathname.startsWith('/assets/')
}

async function freshPage(request: Request): Promise<Response> {
  const store = await caches.open(STORE)
  try {
    const fresh = await fetch(request)
    // Every address of the app is the same page.
    if (fresh.ok && fresh.headers.get('Content-Type')?.includes('text/html')) await store.put(PAGE, fresh.clone())
    return fresh
  } catch (cause) {
    const kept = await store.match(PAGE)
    if (kept) return kept
    throw cause
  }
}

async function keptFile(request: Request): Promise<Response> {
  const store = await caches.open(STORE)
  const kept = await store.match(request)
  if (kept) return kept
  const fresh = await fetch(request)
  if (fresh.ok) await store.put(request, fresh.clone())
  return fresh
}

async function keepAll(urls: readonly string[]): Promise<void> {
  const store = await caches.open(STORE)
  for (const url of [PAGE, ...urls]) {
    if (!(await store.match(url))) await store.add(url).catch(() => undefined)
  }
}
