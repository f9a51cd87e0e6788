import { screen, waitFor, within } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { USUAL_LAYOUT } from '../../shared/layouts/registry.ts'
import { demonstrationSchema } from '../../shared/schemas/demonstration.ts'
import { buildDay, id, KIT, PLACE, PLOUGH, serveRegisters, TRACTORS } from './support/build-plan.ts'
import { answer, fakeApi, refusal } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

const [first, second] = TRACTORS

test('an unfinished plan says under each cell what it needs, and nothing is sent', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  serveRegisters(api)
  const user = userEvent.setup()
  renderApp('/demonstrations/plan')

  await user.click(await screen.findByRole('button', { name: 'Save the plan and make its sheets' }))
  await screen.findByText('A date is needed.')
  expect(screen.getByLabelText('Place').getAttribute('aria-invalid')).toBe('true')
  expect(screen.getByLabelText('tractor').getAttribute('aria-invalid')).toBe('true')
  expect(screen.getByLabelText('Driver').getAttribute('aria-invalid')).toBe('false')
  expect(screen.getByText(/^Not saved/)).toBeDefined()
  expect(api.writes()).toEqual([])
})

test('a demonstrator plans two trials for themselves; the second keeps implement and kit, and asks for its own tractor', async () => {
  const api = fakeApi()
  const me = signedIn(api, 'demonstrator')
  serveRegisters(api)
  api.on('POST', '/demonstrations', () => answer(demonstrationSchema, buildDay(), 201))
  api.on('GET', `/demonstrations/${id(100)}`, () => answer(demonstrationSchema, buildDay()))
  const user = userEvent.setup()
  const { router } = renderApp('/demonstrations/plan')

  await user.type(await screen.findByLabelText('Date'), '2026-12-08')
  await user.selectOptions(screen.getByLabelText('Place'), PLACE.id)
  await user.type(screen.getByLabelText('Name'), 'Matis Orrel')
  await user.selectOptions(screen.getByLabelText('tractor'), first?.id ?? '')
  await user.selectOptions(screen.getByLabelText('implement'), PLOUGH.id)
  await user.selectOptions(screen.getByLabelText('kit'), KIT.id)
  await user.type(screen.getByLabelText('plot'), 'upper')
  await user.click(screen.getByRole('button', { name: 'Add a trial' }))
  const added = within(screen.getByRole('group', { name: 'Trial 2' }))
  expect(added.getByLabelText<HTMLSelectElement>('tractor').value).toBe('')
  await user.selectOptions(added.getByLabelText('tractor'), second?.id ?? '')
  await user.selectOptions(added.getByLabelText('sheet'), 'haulage and PTO work')
  expect(added.queryByLabelText('plot')).toBeNull()
  await user.type(added.getByLabelText('way or yard'), 'lower')
  await user.click(screen.getByRole('button', { name: 'Save the plan and make its sheets' }))

  await waitFor(() => expect(router.state.location.pathname).toBe(`/demonstrations/${id(100)}`))
  expect(api.writes()).toHaveLength(1)
  expect(api.writes()[0]?.body).toEqual({
    heldOn: '2026-12-08',
    placeId: PLACE.id,
    demonstratorId: me.id,
    driver: '',
    farmer: { name: 'Matis Orrel', phone: '', email: '' },
    trials: [
      { tractorId: first?.id, implementId: PLOUGH.id, kitId: KIT.id, plot: 'upper', layout: USUAL_LAYOUT, runs: 3 },
      { tractorId: second?.id, implementId: PLOUGH.id, kitId: KIT.id, plot: 'lower', layout: 'haulage', runs: 3 },
    ],
  })
})

test('a kit whose check is over a year old on the day is named, with the months', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  serveRegisters(api)
  const user = userEvent.setup()
  renderApp('/demonstrations/plan')
  await user.type(await screen.findByLabelText('Date'), '2027-06-02')
  await user.selectOptions(screen.getByLabelText('kit'), KIT.id)
  expect(screen.queryByText(/last checked/)).toBeNull()
  await user.clear(screen.getByLabelText('Date'))
  await user.type(screen.getByLabelText('Date'), '2027-08-03')
  expect(await screen.findByText(/last checked 14 months before that day; 12 are allowed/)).toBeDefined()
})

test('a plan that somebody changed meanwhile is not overwritten: it says who, and offers the newer one', async () => {
  const api = fakeApi()
  signedIn(api, 'admin')
  serveRegisters(api)
  api.on('GET', '/demonstrators', () => ({ status: 200, body: [{ id: id(1), number: 12, name: 'Ossa Brandt' }] }))
  api.on('GET', `/demonstrations/${id(100)}`, () => answer(demonstrationSchema, buildDay()))
  api.on('PUT', `/demonstrations/${id(100)}`, () => {
    api.on('GET', `/demonstrations/${id(100)}`, () => answer(demonstrationSchema, buildDay({ driver: 'P. Iver', version: 4 })))
    return refusal(412, 'changed', 'Lene Osk changed this plan after you loaded it. Yours was not saved.')
  })
  const user = userEvent.setup()
  renderApp(`/demonstrations/${id(100)}/plan`)

  const driver = await screen.findByLabelText<HTMLInputElement>('Driver')
  await user.clear(driver)
  await user.type(driver, 'R. Mavel')
  await user.click(screen.getByRole('button', { name: 'Save the plan' }))
  expect((await screen.findByRole('alert')).textContent).toContain('Lene Osk changed this plan')
  expect(screen.getByLabelText<HTMLInputElement>('Driver').value).toBe('R. Mavel')
  expect(api.writes()[0]?.body).toMatchObject({ driver: 'R. Mavel', version: 3 })

  await user.click(await screen.findByRole('button', { name: /Take the newer plan/ }))
  await waitFor(() => expect(screen.getByLabelText<HTMLInputElement>('Driver').value).toBe('P. Iver'))
})

test('a day shows where each run stands; consent is withdrawn only with a reason and a sure hand, and says what is erased', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  api.on('GET', `/demonstrations/${id(100)}`, () => answer(demonstrationSchema, buildDay()))
  api.on('POST', `/demonstrations/${id(100)}/withdraw-consent`, () => {
    const erased = buildDay({ farmer: null, version: 4 })
    api.on('GET', `/demonstrations/${id(100)}`, () => answer(demonstrationSchema, erased))
    return answer(demonstrationSchema, erased)
  })
  const user = userEvent.setup()
  renderApp(`/demonstrations/${id(100)}`)

  expect((await screen.findByRole('link', { name: '0231' })).getAttribute('href')).toBe('/book/231')
  expect(screen.getByText('not come in yet')).toBeDefined()
  expect(screen.getByRole('link', { name: /sheet of run 2/ }).getAttribute('href')).toBe(`/api/sheets/${id(105)}/sheet.pdf`)
  expect(screen.queryByRole('link', { name: /sheet of run 1/ })).toBeNull()

  await user.click(screen.getByText('The farmer withdraws consent'))
  expect(screen.getByText(/Erased for good: name, phone and e-mail/)).toBeDefined()
  const erase = screen.getByRole<HTMLButtonElement>('button', { name: 'Erase the farmer' })
  expect(erase.disabled).toBe(true)
  await user.click(screen.getByRole('checkbox', { name: /cannot be undone/ }))
  await user.click(erase)
  expect(await screen.findByText('At least 3 characters.')).toBeDefined()
  expect(api.writes()).toEqual([])

  await user.type(screen.getByLabelText('Why, and how you know'), 'asked by phone on 9 December')
  await user.click(erase)
  expect(await screen.findByText('erased: consent was withdrawn')).toBeDefined()
  expect(api.writes()[0]?.body).toEqual({ reason: 'asked by phone on 9 December' })
  expect(screen.queryByText('Matis Orrel, 0555 0142')).toBeNull()
})
