import { screen, waitFor } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { z } from 'zod'
import { kitSchema } from '../../shared/schemas/register.ts'
import { userSchema } from '../../shared/schemas/user.ts'
import { id, KIT, serveRegisters } from './support/build-plan.ts'
import { answer, fakeApi, refusal } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

test('a kit is changed on the version it was seen in; if somebody was quicker, what they changed is said and the typing kept', async () => {
  const api = fakeApi()
  signedIn(api, 'admin')
  serveRegisters(api)
  api.on('PUT', `/registers/kits/${KIT.id}`, () =>
    refusal(412, 'changed', 'Not saved: somebody changed this kit.', [
      { path: 'jarMark_ml', message: 'jar marked each: 200 became 100' },
    ]),
  )
  const user = userEvent.setup()
  renderApp('/registers/kits')
  await user.click(await screen.findByRole('button', { name: 'Change kit A' }))
  const mark = await screen.findByLabelText<HTMLInputElement>('Jar marked each')
  await user.clear(mark)
  await user.type(mark, '50')
  await user.click(screen.getByRole('button', { name: 'Save' }))
  expect((await screen.findByRole('alert')).textContent).toContain('jar marked each: 200 became 100')
  expect(mark.value).toBe('50')
  expect(api.writes()[0]?.body).toMatchObject({ jarMark_ml: 50, version: 1 })
})

test('a number that cannot be is refused in words under its cell, and nothing is sent', async () => {
  const api = fakeApi()
  signedIn(api, 'admin')
  serveRegisters(api)
  const user = userEvent.setup()
  renderApp('/registers/kits')
  await user.click(await screen.findByRole('button', { name: 'Change kit A' }))
  const holds = await screen.findByLabelText('Jar holds')
  await user.clear(holds)
  await user.type(holds, '5 litres')
  await user.click(screen.getByRole('button', { name: 'Save' }))
  await screen.findByText('A number is needed, such as 12 or 1.5.')
  expect(api.writes()).toEqual([])
})

test('who is no admin reads the registers and is offered no change', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  api.on('GET', '/registers/kits', () => answer(z.array(kitSchema), [KIT]))
  renderApp('/registers/kits')
  await screen.findByText('J-4')
  expect(screen.queryByRole('button', { name: /Change|Add/ })).toBeNull()
})

test('choosing a role changes nothing until it is saved', async () => {
  const api = fakeApi()
  const me = signedIn(api, 'admin')
  const lene = userSchema.parse({ ...me, id: id(7), number: 7, name: 'Lene Osk', email: 'lene@book.example', role: 'clerk' })
  api.on('GET', '/users', () => answer(z.array(userSchema), [me, lene]))
  api.on('PATCH', `/users/${lene.id}`, () => answer(userSchema, { ...lene, role: 'analyst' }))
  const user = userEvent.setup()
  renderApp('/people')
  await user.selectOptions(await screen.findByLabelText('Lene Osk works as'), 'analyst')
  expect(api.writes()).toEqual([])
  await user.click(screen.getByRole('button', { name: 'Save: Lene Osk works as analyst' }))
  await waitFor(() => expect(api.writes()).toHaveLength(1))
  expect(api.writes()[0]).toMatchObject({ method: 'PATCH', body: { role: 'analyst' } })
  expect(await screen.findByText('Saved: Lene Osk works as analyst.')).toHaveProperty('role', 'status')
})
