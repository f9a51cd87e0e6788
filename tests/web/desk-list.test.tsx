import { screen, waitFor } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test, vi } from 'vitest'
import { type Sheet, sheetListSchema } from '../../shared/schemas/sheet.ts'
import { buildDeskSheet } from './support/build-desk-sheet.ts'
import { answer, type FakeApi, fakeApi } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const waiting = (n: number, change: Partial<Sheet>) => buildDeskSheet([], { id: id(n), openDoubts: 2, stops: 0, ...change })

const serve = (api: FakeApi) =>
  api.on('GET', '/sheets', () =>
    answer(sheetListSchema, {
      sheets: [waiting(1, { place: 'Kelbrun' }), waiting(2, { place: 'Dhamrin' }), waiting(3, { place: 'Orrelbeck' })],
      next: null,
    }),
  )

test('the find box takes every letter, opens the first hit by Enter, and says when nothing fits', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api)
  const user = userEvent.setup()
  const { router } = renderApp('/desk')
  await screen.findByText('Kelbrun')
  await user.keyboard('/no such place')
  expect(screen.getByLabelText<HTMLInputElement>('find').value).toBe('no such place')
  expect(await screen.findByRole('heading', { name: 'No sheet at the desk fits that.' })).toBeDefined()
  await user.keyboard('{Escape}/orrel{Enter}')
  await waitFor(() => expect(router.state.location.pathname).toBe(`/desk/${id(3)}`))
})

test('a sheet without a code shows the file it came in', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  api.on('GET', '/sheets', () => answer(sheetListSchema, { sheets: [waiting(1, { fileName: 'rooka-3.jpg' })], next: null }))
  renderApp('/desk')
  expect((await screen.findByText('rooka-3.jpg')).closest('a')?.getAttribute('href')).toBe(`/desk/${id(1)}`)
})

test('the row in hand is brought into view', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api)
  const user = userEvent.setup()
  renderApp('/desk')
  await screen.findByText('Kelbrun')
  const shown = vi.fn()
  Element.prototype.scrollIntoView = shown
  await user.keyboard('{ArrowDown}')
  expect(shown).toHaveBeenCalledWith({ block: 'nearest' })
  expect(shown.mock.contexts[0]).toHaveProperty('textContent', expect.stringContaining('Dhamrin'))
})

test('whoever does not work there is told for whom the desk is, and nothing is asked of the server', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  renderApp('/desk')
  expect(await screen.findByRole('heading', { name: 'The desk is open to clerks.' })).toBeDefined()
  expect(screen.getByRole('link', { name: 'To your own pages' })).toBeDefined()
  expect(api.reads('/sheets')).toEqual([])
})

test('people are for the admin: nobody else is offered an invitation', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  renderApp('/people')
  expect(await screen.findByRole('heading', { name: 'People are managed by the admin.' })).toBeDefined()
  expect(screen.queryByRole('button', { name: /Invite/ })).toBeNull()
})
