import { screen, within } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { leafStatusSchema } from '../../shared/schemas/leaf.ts'
import { recordSchema } from '../../shared/schemas/record.ts'
import { buildRecord } from './support/build-record.ts'
import { answer, type FakeApi, fakeApi } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

const shown = (api: FakeApi, record: ReturnType<typeof buildRecord>) =>
  api.on('GET', `/records/${record.number}`, () => answer(recordSchema, record))

test('the read-out says the golden run in large figures, in words, and what was not tested', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  shown(api, buildRecord())
  renderApp('/book/231/read-out')
  const figure = await screen.findByRole('region', { name: 'The figure' })
  expect(within(figure).getByText('14.1')).toBeDefined()
  expect(within(figure).getByText('give or take 0.7')).toBeDefined()
  expect(screen.getByText(/fourteen point one litres a hectare, give or take nought point seven/)).toBeDefined()
  expect(screen.getByText(/other soils, other gears/)).toBeDefined()
})

test('a figure that a rule refuses is not read out: the screen says why', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  const record = buildRecord({ vent_open: false })
  shown(api, record)
  renderApp('/book/231/read-out')
  const none = await screen.findByRole('region', { name: 'No figure' })
  expect(within(none).getByText(record.results.l_per_ha?.reason?.text ?? 'no reason was kept')).toBeDefined()
  expect(screen.queryByText('give or take', { exact: false })).toBeNull()
})

test('the leaf goes out once: afterwards the page says when, and offers it no more', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  shown(api, buildRecord())
  api.on('GET', '/records/231/leaf', () => answer(leafStatusSchema, { why: null, planId: null, sent: [] }))
  const gone = { version: 1, by: 'Ossa Brandt', at: '2026-10-15T09:00:00.000Z', state: 'queued' as const, error: null }
  api.on('POST', '/records/231/leaf', () =>
    answer(leafStatusSchema, { why: 'It has gone out already.', planId: null, sent: [gone] }),
  )
  renderApp('/book/231')
  await userEvent.setup().click(await screen.findByRole('button', { name: 'Send it to the farmer' }))
  expect(await screen.findByText(/version 1: waits to go out/)).toBeDefined()
  expect(screen.queryByRole('button', { name: 'Send it to the farmer' })).toBeNull()
})
