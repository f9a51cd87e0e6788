import { screen, waitFor, within } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { z } from 'zod'
import { landUnitSchema } from '../../shared/schemas/land-unit.ts'
import { type RulePage, rulePageSchema } from '../../shared/schemas/rules.ts'
import { id } from './support/build-plan.ts'
import { answer, fakeApi, refusal } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

const PAGE: RulePage = {
  rulesVersion: '1.1.0',
  settingsVersion: 2,
  versions: [{ version: 2, setBy: 'Ada Rook', setAt: '2026-11-02T09:00:00Z', why: 'new jars' }],
  limits: [
    {
      name: 'jar_lowest_ml',
      value: 600,
      usual: 500,
      unit: 'mL',
      source: '[P] the outlet uncovers',
      certainty: 'common practice',
    },
  ],
  rules: [
    {
      id: 'Q10',
      version: 1,
      name: 'jar ran low',
      severity: ['doubt'],
      why: 'Air is drawn [P].',
      limits: ['jar_lowest_ml'],
      fired: 5,
      right: 3,
      letStand: 1,
      open: 1,
    },
  ],
}

test('each rule stands with its limits, how sure they are, and how often it was right', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  api.on('GET', '/rules', () => answer(rulePageSchema, PAGE))
  renderApp('/rules')
  const row = (await screen.findByText('jar ran low')).closest('tr')
  if (!row) throw new Error('a rule stands in a row')
  expect(row.textContent).toContain('jar lowest 600 mL common practice: the outlet uncovers; set here, shipped as 500 mL')
  expect(row.textContent).toContain('3 of 4')
  expect(screen.queryByRole('button', { name: /Set limits/ })).toBeNull()
  expect(screen.getByText(/“new jars”/)).toBeTruthy()
})

test('a rule that never fired has nothing to be right about', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  const [rule] = PAGE.rules
  const quiet = { ...rule!, fired: 0, right: 0, letStand: 0, open: 0 }
  const unanswered = { ...quiet, id: 'Q11', name: 'too little burned', fired: 2 }
  api.on('GET', '/rules', () => answer(rulePageSchema, { ...PAGE, rules: [quiet, unanswered] }))
  renderApp('/rules')
  const rowOf = async (name: string) => (await screen.findByText(name)).closest('tr')?.textContent
  expect(await rowOf('jar ran low')).toContain('–')
  expect(await rowOf('jar ran low')).not.toContain('none answered')
  expect(await rowOf('too little burned')).toContain('none answered')
})

test('an admin sets a limit with a reason; what was typed stays when somebody was quicker', async () => {
  const api = fakeApi()
  signedIn(api, 'admin')
  api.on('GET', '/rules', () => answer(rulePageSchema, PAGE))
  api.on('POST', '/rules/limits', () =>
    refusal(412, 'changed', 'Somebody set limits after you loaded them. Yours were not saved.'),
  )
  const user = userEvent.setup()
  renderApp('/rules')
  await user.click(await screen.findByRole('button', { name: 'Set limits of Q10, jar ran low' }))
  const cell = await screen.findByLabelText<HTMLInputElement>('jar lowest')
  expect(document.activeElement).toBe(cell)
  await user.clear(cell)
  await user.type(cell, 'low')
  await user.click(screen.getByRole('button', { name: 'Save' }))
  await screen.findByText('A number is needed, such as 12 or 1.5.')
  expect(api.writes()).toEqual([])
  await user.clear(cell)
  await user.type(cell, '700')
  await user.type(screen.getByLabelText('Why'), 'the old jars again')
  await user.click(screen.getByRole('button', { name: 'Save' }))
  await screen.findByText(/Somebody set limits/)
  expect(cell.value).toBe('700')
  expect(api.writes()[0]?.body).toEqual({ limits: { jar_lowest_ml: 700 }, why: 'the old jars again', version: 2 })
})

test('limits open under their rule; Escape, and a save that changes nothing, give the focus back', async () => {
  const api = fakeApi()
  signedIn(api, 'admin')
  api.on('GET', '/rules', () => answer(rulePageSchema, PAGE))
  const user = userEvent.setup()
  renderApp('/rules')
  const opener = await screen.findByRole('button', { name: 'Set limits of Q10, jar ran low' })
  await user.click(opener)
  const cell = await screen.findByLabelText('jar lowest')
  expect(opener.closest('tr')?.nextElementSibling?.contains(cell)).toBe(true)
  await user.keyboard('{Escape}')
  expect(screen.queryByLabelText('jar lowest')).toBeNull()
  expect(document.activeElement).toBe(opener)
  await user.click(opener)
  const again = await screen.findByLabelText('jar lowest')
  await user.clear(again)
  await user.type(again, '-3')
  await user.click(screen.getByRole('button', { name: 'Save' }))
  await screen.findByText('The jar lowest must lie between 0 mL and 5000 mL.')
  await user.clear(again)
  await user.type(again, '600.0')
  await user.click(screen.getByRole('button', { name: 'Save' }))
  await screen.findByText('These limits are in force already. No new version was made.')
  expect(document.activeElement).toBe(opener)
  expect(api.writes()).toEqual([])
})

test('a suggested unit of land is confirmed for a district by a person', async () => {
  const api = fakeApi()
  const me = signedIn(api, 'admin')
  const unit = { id: id(9), name: 'guntha', district: 'Sannipur', size_m2: 101.17141056, source: 'land office' }
  api.on('GET', '/land-units', () => answer(z.array(landUnitSchema), []))
  api.on('POST', '/land-units', () =>
    answer(landUnitSchema, { ...unit, confirmedBy: me.name, confirmedAt: '2026-11-02T09:00:00Z' }, 201),
  )
  const user = userEvent.setup()
  renderApp('/land-units')
  await screen.findByText(/No unit of land is confirmed yet/)
  const suggested = await screen.findByRole('table', { name: 'Suggested units of land, unconfirmed' })
  await user.click(within(suggested).getByRole('button', { name: 'Confirm guntha, 1089 ft², for a district' }))
  await user.type(await screen.findByLabelText('District'), 'Sannipur')
  await user.type(screen.getByLabelText('Said by'), 'land office')
  await user.click(screen.getByRole('button', { name: 'Confirm' }))
  await waitFor(() => expect(api.writes()).toHaveLength(1))
  expect(api.writes()[0]?.body).toMatchObject({ name: 'guntha', district: 'Sannipur', size_m2: 101.17141056 })
  expect(await screen.findByText(/Confirmed: 1 guntha in Sannipur is 101.17141056 m²/)).toBeTruthy()
})
