import { screen } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { sheetListSchema } from '../../shared/schemas/sheet.ts'
import { sessionSchema } from '../../shared/schemas/user.ts'
import { answer, fakeApi, refusal } from './support/fake-api.ts'
import { buildPerson, renderApp } from './support/render-app.tsx'

test('a refused sign-in says why and keeps what was typed; the next one goes back to where it was asked', async () => {
  const api = fakeApi()
  let signedIn = false
  api.on('GET', '/session', () =>
    signedIn ? answer(sessionSchema, { user: buildPerson('clerk') }) : refusal(401, 'not_signed_in', 'Sign in first.'),
  )
  api.on('GET', '/sheets', () => answer(sheetListSchema, { sheets: [], next: null }))
  api.on('POST', '/session', () => refusal(401, 'not_signed_in', 'E-mail or password is wrong.'))
  const user = userEvent.setup()
  const { router } = renderApp('/desk?find=7K')

  await user.type(await screen.findByLabelText('E-mail'), 'ossa@book.example')
  await user.type(screen.getByLabelText('Password'), 'not my password')
  await user.click(screen.getByRole('button', { name: 'Open the book' }))
  expect((await screen.findByRole('alert')).textContent).toContain('E-mail or password is wrong.')
  expect(screen.getByLabelText<HTMLInputElement>('E-mail').value).toBe('ossa@book.example')

  api.on('POST', '/session', () => {
    signedIn = true
    return answer(sessionSchema, { user: buildPerson('clerk') })
  })
  await user.click(screen.getByRole('button', { name: 'Open the book' }))
  await screen.findByRole('heading', { name: 'Nothing waits at the desk.' })
  expect(router.state.location.pathname + router.state.location.search).toBe('/desk?find=7K')
})

test('an address without a name before the @ is refused before anything is sent', async () => {
  const api = fakeApi()
  api.on('GET', '/session', () => refusal(401, 'not_signed_in', 'Sign in first.'))
  const user = userEvent.setup()
  renderApp('/sign-in')
  await user.type(await screen.findByLabelText('E-mail'), 'ossa')
  await user.click(screen.getByRole('button', { name: 'Open the book' }))
  expect(await screen.findByText(/An e-mail address is needed/)).toBeDefined()
  expect(api.writes()).toEqual([])
})
