import { screen, waitFor } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { enteredSchema, type Sheet, sheetSchema } from '../../shared/schemas/sheet.ts'
import { buildDeskSheet, buildReading, SHEET_ID } from './support/build-desk-sheet.ts'
import { answer, type FakeApi, fakeApi, nothing, refusal } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

/** Ten depths with two doubts of ink: on the first, ink and sums agree; on the second they favour different values. */
const twoDoubts = () =>
  buildDeskSheet([
    ...[1, 2, 3, 6, 7, 8, 9, 10].map((n) => buildReading(`depth_cm[${n}]`, 14 + (n % 4) / 2)),
    buildReading('depth_cm[4]', 14, [
      { value: 14, p: 0.9, ink: 0.8 },
      { value: 19, p: 0.1, ink: 0.2 },
    ]),
    buildReading('depth_cm[5]', 16, [
      { value: 16, p: 0.8, ink: 0.3 },
      { value: 15, p: 0.2, ink: 0.7 },
    ]),
  ])

/** A server that keeps the sheet's version and says what it was asked. */
function serve(api: FakeApi, start: Sheet) {
  let sheet = start
  const next = (change: Partial<Sheet> = {}) => {
    sheet = { ...sheet, ...change, version: sheet.version + 1 }
    return answer(sheetSchema, sheet)
  }
  const settle = (body: { key: string; how: 'kept' | 'corrected' | 'unreadable' | 'blank on purpose'; value?: number }) =>
    next({
      readings: sheet.readings.map((r) =>
        r.key === body.key
          ? {
              ...r,
              settlement: body.how,
              settledBy: 'Ossa Brandt',
              value: body.how === 'corrected' ? (body.value ?? null) : body.how === 'kept' ? r.value : null,
            }
          : r,
      ),
    })
  api.on('GET', `/sheets/${SHEET_ID}`, () => answer(sheetSchema, sheet))
  api.on('POST', `/sheets/${SHEET_ID}/take`, () => answer(sheetSchema, sheet))
  api.on('DELETE', `/sheets/${SHEET_ID}/take`, () => nothing)
  api.on('POST', `/sheets/${SHEET_ID}/settle-reading`, ({ body }) => settle(body as Parameters<typeof settle>[0]))
  api.on('POST', `/sheets/${SHEET_ID}/unsettle`, ({ body }) => {
    const { key } = body as { key: string }
    return next({ readings: sheet.readings.map((r) => (r.key === key ? { ...r, settlement: null, value: r.readValue } : r)) })
  })
  api.on('POST', `/sheets/${SHEET_ID}/enter`, () => answer(enteredSchema, { recordNumber: 7, version: 1, next: null }))
}

const settled = (api: FakeApi) => api.writes().filter((one) => !one.path.endsWith('/take'))
const heading = (name: string) => screen.findByRole('heading', { level: 1, name })

test('Enter settles as proposed and goes on; where ink and sums disagree it takes neither and says so', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')

  await user.keyboard('{Enter}')
  await heading('Depth 5')
  await waitFor(() => expect(settled(api)).toHaveLength(1))
  expect(settled(api)[0]?.body).toMatchObject({ key: 'depth_cm[4]', how: 'kept', version: 1 })

  await user.keyboard('{Enter}')
  expect(await screen.findByText(/Enter takes neither/)).toBeDefined()
  expect(settled(api)).toHaveLength(1)

  await user.keyboard('2')
  await heading('Ready to enter')
  await waitFor(() => expect(settled(api)).toHaveLength(2))
  expect(settled(api)[1]?.body).toMatchObject({ key: 'depth_cm[5]', how: 'corrected', value: 15, why: 'by the ink', version: 2 })
})

test('the value shown, taken by the sums against the ink, is no keeping', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  await user.keyboard('{ArrowDown}')
  await heading('Depth 5')
  await user.keyboard('1')
  await waitFor(() => expect(settled(api)).toHaveLength(1))
  expect(settled(api)[0]?.body).toMatchObject({ key: 'depth_cm[5]', how: 'corrected', value: 16, why: 'by the sums' })
})

test('typed digits fill the comb from its right end, and a changed value carries its reason', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')

  await user.keyboard('{F2}')
  await user.type(await screen.findByLabelText(/type its digits/), '145{Enter}')
  await screen.findByLabelText('depth 4: 14.0 becomes 14.5. Why?')
  await user.keyboard('{Enter}')
  await heading('Depth 5')
  await waitFor(() => expect(settled(api)).toHaveLength(1))
  expect(settled(api)[0]?.body).toMatchObject({ key: 'depth_cm[4]', how: 'corrected', value: 14.5, why: 'so the ink reads' })
})

test('Ctrl z takes the last act back and returns to its doubt', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  await user.keyboard('u')
  await heading('Depth 5')
  await user.keyboard('{Control>}z{/Control}')
  await heading('Depth 4')
  await waitFor(() => expect(settled(api).map((one) => one.path.split('/').at(-1))).toEqual(['settle-reading', 'unsettle']))
})

test('when another clerk wrote first, what they changed is said and what was typed is kept until one of both is chosen', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  const served = twoDoubts()
  api.on('POST', `/sheets/${SHEET_ID}/settle-reading`, () => {
    serve(api, { ...served, version: 5 })
    return refusal(412, 'changed', 'Not saved: R. Imhaut: depth 4: 14.0 became 19.0.', [
      { path: 'depth_cm[4]', message: 'R. Imhaut: depth 4: 14.0 became 19.0' },
    ])
  })

  await user.keyboard('{Enter}')
  expect((await screen.findByRole('alert')).textContent).toContain('R. Imhaut: depth 4: 14.0 became 19.0')
  await user.click(screen.getByRole('button', { name: 'Mine stands' }))
  await waitFor(() => expect(settled(api)).toHaveLength(2))
  expect(settled(api)[1]?.body).toMatchObject({ key: 'depth_cm[4]', how: 'kept', version: 5 })
  await waitFor(() => expect(screen.queryByRole('alert')).toBeNull())
})

test('when another clerk settled the same value first, theirs stands and nothing is asked', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  const served = twoDoubts()
  const readings = served.readings.map((r) =>
    r.key === 'depth_cm[4]' ? { ...r, settlement: 'kept' as const, settledBy: 'R. Imhaut' } : r,
  )
  api.on('POST', `/sheets/${SHEET_ID}/settle-reading`, () => {
    serve(api, { ...served, readings, version: 5 })
    return refusal(412, 'changed', 'Not saved: R. Imhaut: depth 4: 14.0, kept.')
  })
  await user.keyboard('{Enter}')
  await waitFor(() => expect(settled(api)).toHaveLength(1))
  await waitFor(() => expect(localStorage.getItem(`sheafbook.desk.${SHEET_ID}`)).toBeNull())
  expect(screen.queryByRole('button', { name: 'Mine stands' })).toBeNull()
})

test('a sheet in another hand is only looked at, until it is free', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  const since = new Date(2026, 9, 14, 9, 40).toISOString()
  const other = { userId: '00000000-0000-4000-8000-0000000000bb', name: 'R. Imhaut', since }
  serve(api, { ...twoDoubts(), inHand: other })
  api.on('POST', `/sheets/${SHEET_ID}/take`, () => refusal(409, 'conflict', 'R. Imhaut has this sheet in hand.'))
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await screen.findByText('R. Imhaut has this sheet in hand since 09:40.')
  await user.keyboard('{Enter}u1s{Shift>}{Enter}{/Shift}')
  expect(screen.queryByRole('textbox')).toBeNull()
  const keys = screen.getByRole('list', { name: 'Keys of this page' })
  expect(keys.textContent).not.toMatch(/unreadable|settle as|send back|undo/)
  await user.keyboard('{ArrowDown}')
  await heading('Depth 5')
  expect(settled(api)).toEqual([])

  api.on('POST', `/sheets/${SHEET_ID}/take`, () => answer(sheetSchema, twoDoubts()))
  await waitFor(() => expect(screen.queryByText(/has this sheet in hand/)).toBeNull(), { timeout: 8_000 })
  await user.keyboard('u')
  await waitFor(() => expect(settled(api)).toHaveLength(1))
}, 20_000)

test('a digit alone is no reason', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  await user.keyboard('a')
  await user.type(await screen.findByLabelText(/Why is it set aside/), '1234{Enter}')
  expect((await screen.findByRole('alert')).textContent).toMatch(/words are needed/)
  expect(settled(api)).toEqual([])
})

test('Shift Enter opens the sheet the server names next', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  const next = '00000000-0000-4000-8000-0000000000cc'
  serve(api, twoDoubts())
  api.on('POST', `/sheets/${SHEET_ID}/enter`, () => {
    api.on('GET', `/sheets/${SHEET_ID}`, () => answer(sheetSchema, { ...twoDoubts(), state: 'entered', recordNumber: 7 }))
    return answer(enteredSchema, { recordNumber: 7, version: 1, next })
  })
  api.on('GET', `/sheets/${next}`, () => answer(sheetSchema, { ...twoDoubts(), id: next }))
  api.on('POST', `/sheets/${next}/take`, () => answer(sheetSchema, { ...twoDoubts(), id: next }))
  api.on('DELETE', `/sheets/${next}/take`, () => nothing)
  const user = userEvent.setup()
  const { router } = renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  await user.keyboard('{Enter}b')
  await screen.findByText(/all saved/)
  await user.keyboard('{Shift>}{Enter}{/Shift}')
  await waitFor(() => expect(router.state.location.pathname).toBe(`/desk/${next}`))
  expect(await screen.findByText('Entered as record 7. This is the next sheet.')).toBeDefined()
})

test('a challenged sheet says who challenged it, and is entered again with a line of answer', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  const line = { at: '2026-12-01T09:00:00Z', who: 'Pell Varga', action: 'challenged', text: 'speed', key: null }
  serve(api, { ...twoDoubts(), state: 'challenged', reason: 'speed cannot be', history: [line] })
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  expect(screen.getByText(/Challenged by Pell Varga after it was entered: “speed cannot be”/)).toBeDefined()
  await user.keyboard('{Enter}b')
  await heading('Answer the challenge')
  await screen.findByText(/all saved/)
  expect(screen.getByText('2 of 2 doubts settled')).toBeDefined()
  await user.keyboard('{Shift>}{Enter}{/Shift}')
  await user.type(await screen.findByLabelText(/How is the challenge answered/), 'read twice{Enter}')
  await waitFor(() => expect(settled(api).at(-1)?.path).toBe(`/sheets/${SHEET_ID}/enter`))
  expect(settled(api).at(-1)?.body).toEqual({ version: 3, answer: 'read twice' })
})

test('Shift Enter enters nothing while a doubt is open, and enters the settled sheet', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  const { router } = renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  await user.keyboard('{Shift>}{Enter}{/Shift}')
  expect(await screen.findByText(/2 doubts are open/)).toBeDefined()

  await user.keyboard('{Enter}b')
  await heading('Ready to enter')
  await screen.findByText(/all saved/)
  api.on('GET', `/sheets/${SHEET_ID}`, () =>
    answer(sheetSchema, { ...twoDoubts(), state: 'entered', recordNumber: 7, version: 9 }),
  )
  await user.keyboard('{Shift>}{Enter}{/Shift}')
  await screen.findByText('No other sheet waits at the desk.')
  expect(await screen.findByText('Entered as record 7.')).toBeDefined()
  expect(settled(api).at(-1)).toMatchObject({ path: `/sheets/${SHEET_ID}/enter`, body: { version: 3 } })
  await user.keyboard('{Enter}')
  await waitFor(() => expect(router.state.location.pathname).toBe('/desk'))
})

test('single letters can be switched off', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  serve(api, twoDoubts())
  const user = userEvent.setup()
  renderApp(`/desk/${SHEET_ID}`)
  await heading('Depth 4')
  await user.keyboard('?')
  await user.click(await screen.findByLabelText('single letters work as keys'))
  await user.click(screen.getByRole('button', { name: 'Back to the doubt' }))
  await user.keyboard('u')
  await user.keyboard('{ArrowDown}')
  await heading('Depth 5')
  expect(settled(api)).toEqual([])
})
