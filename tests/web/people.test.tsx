import { screen, waitFor } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { z } from 'zod'
import { userSchema } from '../../shared/schemas/user.ts'
import { id } from './support/build-plan.ts'
import { answer, fakeApi } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

test('somebody is disabled only after it was asked once; leaving it changes nothing and gives the focus back', async () => {
  const api = fakeApi()
  const me = signedIn(api, 'admin')
  const other = { ...me, id: id(900), number: 9, name: 'Ossa Brandt', email: 'ossa@fields.example', role: 'clerk' as const }
  api.on('GET', '/users', () => answer(z.array(userSchema), [me, other]))
  api.on('PATCH', `/users/${other.id}`, () => answer(userSchema, { ...other, active: false }))
  const user = userEvent.setup()
  renderApp('/people')
  await user.click(await screen.findByRole('button', { name: 'Disable Ossa Brandt' }))
  expect(screen.getByText('Ossa Brandt is signed out at once and can no longer sign in.')).toBeDefined()
  await user.keyboard('{Escape}')
  expect(document.activeElement?.getAttribute('aria-label')).toBe('Disable Ossa Brandt')
  expect(api.writes()).toEqual([])
  await user.keyboard('{Enter}')
  await user.click(screen.getByRole('button', { name: 'Disable Ossa Brandt now' }))
  await waitFor(() => expect(api.writes().map(({ body }) => body)).toEqual([{ active: false }]))
})
