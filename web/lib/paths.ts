/** Every address of the web app: its pattern for the router beside the builder of its links. */
export const paths = {
  home: { pattern: '/', to: () => '/' },
  signIn: {
    pattern: '/sign-in',
    to: (back?: string) => (back && back !== '/' ? `/sign-in?back=${encodeURIComponent(back)}` : '/sign-in'),
  },
  forgotten: { pattern: '/sign-in/link', to: () => '/sign-in/link' },
  link: { pattern: '/link/:token', to: (token: string) => `/link/${token}` },
  send: { pattern: '/send', to: (forSheet?: string) => (forSheet ? `/send?for=${forSheet}` : '/send') },
  mySheets: { pattern: '/sheets', to: () => '/sheets' },
  mySheet: { pattern: '/sheets/:id', to: (id: string) => `/sheets/${id}` },
  desk: { pattern: '/desk', to: () => '/desk' },
  deskSheet: { pattern: '/desk/:id', to: (id: string) => `/desk/${id}` },
  demonstrations: { pattern: '/demonstrations', to: () => '/demonstrations' },
  planDemonstration: { pattern: '/demonstrations/plan', to: () => '/demonstrations/plan' },
  demonstration: { pattern: '/demonstrations/:id', to: (id: string) => `/demonstrations/${id}` },
  editDemonstration: { pattern: '/demonstrations/:id/plan', to: (id: string) => `/demonstrations/${id}/plan` },
  book: { pattern: '/book', to: () => '/book' },
  record: {
    pattern: '/book/:number',
    to: (number: number, version?: number) => `/book/${number}${version === undefined ? '' : `?version=${version}`}`,
  },
  readOut: { pattern: '/book/:number/read-out', to: (number: number) => `/book/${number}/read-out` },
  sheetReadOut: { pattern: '/sheets/:id/read-out', to: (id: string) => `/sheets/${id}/read-out` },
  compare: { pattern: '/compare', to: () => '/compare' },
  registers: { pattern: '/registers', to: () => '/registers' },
  register: { pattern: '/registers/:name', to: (name: string) => `/registers/${name}` },
  landUnits: { pattern: '/land-units', to: () => '/land-units' },
  rules: { pattern: '/rules', to: () => '/rules' },
  people: { pattern: '/people', to: () => '/people' },
  outbox: { pattern: '/outbox', to: () => '/outbox' },
  interface: { pattern: '/interface', to: () => '/interface' },
  tokens: { pattern: '/interface/tokens', to: () => '/interface/tokens' },
  webhooks: { pattern: '/interface/webhooks', to: () => '/interface/webhooks' },
  trail: { pattern: '/trail', to: () => '/trail' },
} as const

/** Only addresses of our own are gone back to after signing in. */
export const safeReturn = (back: string | null): string => (back && /^\/(?![/\\])/.test(back) ? back : '/')
