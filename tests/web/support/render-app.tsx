import { cleanup, configure, render } from '@testing-library/react'
import { createMemoryRouter, RouterProvider } from 'react-router-dom'
import { afterEach, beforeEach, vi } from 'vitest'
import { type Role, sessionSchema, type User } from '../../../shared/schemas/user.ts'
import { createAppQueryClient, Providers } from '../../../web/app/providers.tsx'
import { routes } from '../../../web/app/router.tsx'
import { answer, type FakeApi } from './fake-api.ts'

// A state is waited for, however busy the machine is.
configure({ asyncUtilTimeout: 8_000 })

/** What jsdom has not, and the page asks for on its way. */
beforeEach(() => {
  vi.stubGlobal('scrollTo', () => undefined)
  Element.prototype.scrollIntoView = () => undefined
  vi.stubGlobal('matchMedia', (query: string) => ({
    matches: false,
    media: query,
    addEventListener: () => undefined,
    removeEventListener: () => undefined,
  }))
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe() {}
      disconnect() {}
    },
  )
})

afterEach(() => {
  cleanup()
  localStorage.clear()
  vi.unstubAllGlobals()
})

export const buildPerson = (role: Role): User => ({
  id: '00000000-0000-4000-8000-000000000001',
  number: 12,
  name: 'Ossa Brandt',
  email: 'ossa@book.example',
  role,
  active: true,
  hasPassword: true,
})

/** Signs somebody in before the page is opened. */
export function signedIn(api: FakeApi, role: Role): User {
  const user = buildPerson(role)
  api.on('GET', '/session', () => answer(sessionSchema, { user }))
  return user
}

/** The whole app at an address, as the browser would open it. */
export function renderApp(path: string) {
  const router = createMemoryRouter(routes, { initialEntries: [path] })
  render(
    <Providers client={createAppQueryClient()}>
      <RouterProvider router={router} />
    </Providers>,
  )
  return { router }
}
