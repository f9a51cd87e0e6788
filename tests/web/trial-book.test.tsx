import { screen, waitFor, within } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { recordListSchema, recordSchema } from '../../shared/schemas/record.ts'
import { PLOUGH, serveRegisters } from './support/build-plan.ts'
import { buildRecord, rowOf } from './support/build-record.ts'
import { answer, type FakeApi, fakeApi } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

const listed = (api: FakeApi, ...records: ReturnType<typeof buildRecord>[]) =>
  api.on('GET', '/records', () => answer(recordListSchema, { records: records.map(rowOf), total: records.length, next: null }))

test('filters stand in the address, are asked of the server, and go with the downloads', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  serveRegisters(api)
  listed(api, buildRecord())
  const user = userEvent.setup()
  const { router } = renderApp('/book?soil=medium')

  await screen.findByRole('link', { name: '0231' })
  expect(screen.getByLabelText<HTMLSelectElement>('soil').value).toBe('medium')
  await screen.findByRole('option', { name: PLOUGH.name })
  await user.selectOptions(screen.getByLabelText('implement'), PLOUGH.id)
  await waitFor(() => expect(router.state.location.search).toBe(`?soil=medium&implement=${PLOUGH.id}`))
  await waitFor(() => expect(api.reads('/records').at(-1)?.query.get('implement')).toBe(PLOUGH.id))
  const csv = new URL(
    screen.getByRole('link', { name: 'CSV, a line a record' }).getAttribute('href') ?? '',
    'http://book.example',
  )
  expect(csv.pathname).toBe('/api/records.csv')
  expect(Object.fromEntries(csv.searchParams)).toEqual({ implement: PLOUGH.id, soil: 'medium' })
})

test('a record is found by its number or its sheet code, and the box keeps the focus', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  serveRegisters(api)
  listed(api, buildRecord())
  const user = userEvent.setup()
  renderApp('/book')
  await screen.findByRole('link', { name: '0231' })
  const box = screen.getByLabelText('record or sheet code')
  await user.type(box, '231{Enter}')
  await waitFor(() => expect(api.reads('/records').at(-1)?.query.get('find')).toBe('231'))
  expect(document.activeElement).toBe(box)
})

test('a view that holds nothing says so and takes the filters off', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  serveRegisters(api)
  listed(api)
  const user = userEvent.setup()
  const { router } = renderApp('/book?soil=coarse')
  await screen.findByText('No run fits these filters.')
  await user.click(screen.getByRole('button', { name: 'Take the filters off' }))
  await screen.findByText(/The book is empty/)
  expect(router.state.location.search).toBe('')
})

test('a run without litres a hectare shows why in its row, and its other figures stand', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  serveRegisters(api)
  const record = buildRecord({ vent_open: false })
  listed(api, record)
  renderApp('/book')
  const row = (await screen.findByRole('link', { name: '0231' })).closest('tr') as HTMLElement
  const reason = record.results.l_per_ha?.reason?.text ?? ''
  expect(reason).not.toBe('')
  expect(within(row).getByText(`none: ${reason}`)).toBeDefined()
  // The short golden sheet: mean depth 15.15 cm.
  expect(within(row).getByText('15.2')).toBeDefined()
})

test('the record page sets the golden sheet as its sum and leads a figure back to where each reading came from', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  const record = buildRecord(
    {},
    {
      jar_start_ml: { origin: 'spreadsheet', cellRef: 'Sheet!C14' },
      jar_end_ml: {
        settlement: 'corrected',
        settledBy: 'Joren Abel',
        why: 'the sum by hand agrees',
        readValue: 2600,
        origin: 'person',
      },
    },
  )
  listed(api, record)
  api.on('GET', '/records/231', () => answer(recordSchema, record))
  const user = userEvent.setup()
  renderApp('/book/231')

  // The short golden sheet: 14.0741 L/ha, shown as its uncertainty allows.
  expect(await screen.findAllByText('14.1')).toHaveLength(2)
  expect(screen.getByRole('img', { name: /The plot/ })).toBeDefined()
  await user.click(screen.getByRole('button', { name: /behind fuel used$/ }))
  expect(screen.getByText('spreadsheet cell Sheet!C14')).toBeDefined()
  expect(screen.getByText(/Joren Abel wrote it for 2600: “the sum by hand agrees”/)).toBeDefined()
})

test('a record without litres a hectare says why in place of the figure, and what else is missing once for each reason', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  const record = buildRecord({ vent_open: false })
  listed(api, record)
  api.on('GET', '/records/231', () => answer(recordSchema, record))
  renderApp('/book/231')
  await screen.findByText('No litres a hectare')
  const reason = record.results.l_per_ha?.reason?.text ?? ''
  expect(screen.getAllByText(reason)).toHaveLength(2)
  expect(screen.queryByText(/Where the ± of/)).toBeNull()
  expect(screen.queryByText('Challenge this record')).toBeNull()
})
