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

/** One file of the build, as its list of files tells of it. */
interface Part {
  file: string
  imports?: string[]
  css?: string[]
  assets?: string[]
}
const PHONE_PAGES = ['send', 'my-sheets', 'my-sheet', 'demonstrations', 'demonstration', 'plan-demonstration', 'sign-in']

scope.addEventListener('install', (event: Lasting) => event.waitUntil(keepPhonePages().then(() => scope.skipWaiting())))
scope.addEventListener('activate', (event: Lasting) => event.waitUntil(scope.clients.claim()))

/** A page that opened with a line asks for it: the app may be newer than this worker. */
scope.addEventListener('message', (event: Lasting & { data: unknown }) => {
  if (event.data === 'keep') event.waitUntil(keepPhonePages())
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

/** The pages a phone needs in a field, and the page they stand in, each with all it is made of: scripts, styles, fonts. */
async function keepPhonePages(): Promise<void> {
  const answer = await fetch('/files.json', { cache: 'no-cache' }).catch(() => null)
  if (!answer?.ok) return
  const parts: Record<string, Part> = await answer.json()
  const urls = new Set<string>()
  const seen = new Set<string>()
  const take = (name: string) => {
    const part = parts[name]
    if (!part || seen.has(name)) return
    seen.add(name)
    for (const file of [part.file, ...(part.css ?? []), ...(part.assets ?? [])]) urls.add(`/${file}`)
    for (const other of part.imports ?? []) take(other)
  }
  for (const name of ['index.html', ...PHONE_PAGES.map((page) => `web/app/routes/${page}.tsx`)]) take(name)
  const store = await caches.open(STORE)
  if (!(await store.match(PAGE))) await store.add(PAGE).catch(() => undefined)
  for (const url of urls) {
    if (!(await store.match(url))) await store.add(url).catch(() => undefined)
  }
}
