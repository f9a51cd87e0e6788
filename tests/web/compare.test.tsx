import { screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { expect, test } from 'vitest'
import type { ComparableRun } from '../../server/db/desk/comparable-runs.ts'
import { compareRuns } from '../../server/features/comparisons/compare-runs.ts'
import { bookComparisonSchema, comparisonQuerySchema, exclusionLogSchema } from '../../shared/schemas/book-comparison.ts'
import { buildComparableRun, buildSixPlots } from '../builders/comparable-run.ts'
import { type HalvedRun, readHalvedRuns } from '../builders/halved-runs.ts'
import { answer, type FakeApi, fakeApi } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

/** The server's own comparison of these runs, for any query. */
function serveBook(api: FakeApi, book: ComparableRun[]): void {
  api.on('GET', '/comparisons', ({ query }) =>
    answer(bookComparisonSchema, compareRuns(book, comparisonQuerySchema.parse(Object.fromEntries(query)))),
  )
  api.on('GET', '/comparisons/exclusions', () => answer(exclusionLogSchema, { lines: [] }))
}

function opened(book: ComparableRun[], address = '/compare') {
  const api = fakeApi()
  signedIn(api, 'analyst')
  serveBook(api, book)
  return { api, user: userEvent.setup(), ...renderApp(address) }
}

/** The page has its answer: until then its head only names it. */
async function headline(): Promise<string> {
  await screen.findByText(/^The one sentence/, {}, { timeout: 20_000 })
  return document.querySelector('h1')?.textContent?.trim() ?? ''
}

test('the sentence that may be said stands first, and the tables hold what R computed for these runs', async () => {
  opened(buildSixPlots())
  expect(await headline()).toMatch(
    /^On 6 paired plots at Kelwadi, ploughing, .*, Ostrel D5 used 0\.9 ± 0\.5 L\/ha less than Tarnfold 50\.$/,
  )
  expect(screen.getByText(/Both tractors worked the same 6 plots/)).toBeDefined()
  const table = screen.getByText('Tarnfold 50 − Ostrel D5', { selector: 'caption' }).closest('table')
  const cells = [...(table?.querySelectorAll('tbody td') ?? [])]
  // R 4.2.2: d̄ 0.866667, s 0.484424, t 4.382299, df 5, p 0.0071392, interval 0.358295 to 1.375039.
  expect(cells.map((cell) => cell.lastElementChild?.textContent)).toEqual([
    '6',
    '0.87',
    '0.484',
    '4.38',
    '5',
    '0.007',
    '0.36 to 1.38',
  ])
})

/** By hand from jar and tape alone: a half's L/ha, and the paired t of the lower number's minus the other's. */
function handCheck(halves: readonly HalvedRun[], [lower, higher]: readonly [number, number]) {
  const plots = [...new Set(halves.map((half) => half.plot))]
  const l_per_ha = (plot: string, tractor: number) => {
    const { readings } = halves.find((half) => half.plot === plot && half.tractor === tractor)!
    return (Number(readings.fuel_used_written_ml) / (Number(readings.side_ab_m) * Number(readings.side_bc_m))) * 10
  }
  const gaps = plots.map((plot) => l_per_ha(plot, lower) - l_per_ha(plot, higher))
  const n = gaps.length
  const mean = gaps.reduce((sum, gap) => sum + gap, 0) / n
  const se = Math.sqrt(gaps.reduce((sum, gap) => sum + (gap - mean) ** 2, 0) / (n - 1) / n)
  // The t that R's interval for SIX_PLOTS (5 df, 95 %) stands on: 0.508372 / (0.484424 / √6).
  return { n, mean, half: 2.5706 * se, t: mean / se }
}

async function pairedTable(pair: string): Promise<string[]> {
  await headline()
  const table = screen.getByText(pair, { selector: 'caption' }).closest('table')
  return [...(table?.querySelectorAll('tbody td') ?? [])].map((cell) => cell.lastElementChild?.textContent ?? '')
}

test('the demo season’s pair that differs is said to, with the figures a hand computes from jar and tape', async () => {
  const halves = readHalvedRuns([11, 14])
  const hand = handCheck(halves, [11, 14])
  opened(halves.map(({ run }) => run))
  expect(await headline()).toBe(
    'On 6 paired plots in Sannipur, ploughing, 15.7 cm deep against 15.7 cm, Tarnfold 50 used 1.7 ± 0.8 L/ha less than Ostrel D5.',
  )
  expect([hand.n, (-hand.mean).toFixed(1), hand.half.toFixed(1)]).toEqual([6, '1.7', '0.8'])
  const cells = await pairedTable('Tarnfold 50 − Ostrel D5')
  expect(cells[3]).toBe(hand.t.toFixed(2).replace('-', '−'))
  expect(cells[6]).toBe(`−${(hand.half - hand.mean).toFixed(2)} to −${(-hand.mean - hand.half).toFixed(2)}`)
  expect(screen.getByText(/leaves out zero, and the gap, 1\.71, is wider than the ± of one run/)).toBeDefined()
  expect(screen.queryByText(/are mixed|each counts as/)).toBeNull()
})

test('the demo season’s pair that does not differ is not said to', async () => {
  const halves = readHalvedRuns([12, 15])
  const hand = handCheck(halves, [12, 15])
  opened(halves.map(({ run }) => run))
  expect(await headline()).toMatch(
    /^No difference may be said: Ostrel D6 measured 0\.3 ± 0\.8 L\/ha less than Tarnfold 60, ploughing\.$/,
  )
  expect([hand.n, hand.mean.toFixed(1), hand.half.toFixed(1)]).toEqual([6, '0.3', '0.8'])
  expect((await pairedTable('Tarnfold 60 − Ostrel D6'))[3]).toBe(hand.t.toFixed(2))
  expect(screen.getByText(/holds zero; the gap, .* is not wider than the ± of one run/)).toBeDefined()
})

test('tractors that kept their own plots are not told apart, and the page says plot and tractor are mixed', async () => {
  const book = buildSixPlots().map((run, i) => ({
    ...run,
    plot: run.tractor!.number === 11 ? 'A' : 'B',
    trialDate: `2026-09-${16 + (i % 3)}`,
  }))
  opened(book)
  expect(await headline()).toMatch(/^No difference may be said/)
  expect(screen.getByText(/^Plot and tractor are mixed: within a day the tractors did not share their plots/)).toBeDefined()
  expect(screen.getByText(/only work on the same plots carries a difference/)).toBeDefined()
})

test('every plot has its files and its table', async () => {
  opened(buildSixPlots())
  await headline()
  const plots = [...document.querySelectorAll('figure')]
  expect(plots.map((plot) => plot.querySelector('h2')?.textContent)).toEqual([
    'Fuel per hectare, each run with its ±',
    'The gaps in fuel per hectare',
    'Fuel per hectare and depth',
    'Fuel per hour and what was to be expected',
    'Seasons and regions',
  ])
  for (const plot of plots) {
    expect([...plot.querySelectorAll('button')].map((button) => button.textContent?.slice(0, 3))).toEqual(['SVG', 'PNG'])
    expect(plot.querySelectorAll('tbody tr').length).toBeGreaterThan(0)
  }
  // Six plots and the mean of their gaps.
  expect(plots[1]!.querySelectorAll('tbody tr')).toHaveLength(7)
})

test('choices go to the address and to the server', async () => {
  const { api, user, router } = opened(buildSixPlots())
  await headline()
  await user.selectOptions(screen.getByLabelText('figure'), 'ml_per_m3')
  await screen.findByText('The gaps in fuel per m³ of soil', { selector: 'h2' })
  await user.click(screen.getByText('tractor', { selector: 'summary *' }))
  await user.click(screen.getByText('Ostrel D5', { selector: 'fieldset label' }))
  await screen.findByText('No analysis: A comparison needs two of tractor; there is one.')
  const search = new URLSearchParams(router.state.location.search)
  expect(search.get('figure')).toBe('ml_per_m3')
  expect(api.reads('/comparisons').at(-1)?.query.get('tractor')).toBe(search.get('tractor'))
  await user.click(screen.getByText('Take the filters off'))
  await screen.findByText('The gaps in fuel per m³ of soil', { selector: 'h2' })
})

test('a run is left out only with a reason', async () => {
  const book = buildSixPlots()
  const { api, user } = opened(book)
  await headline()
  await user.click(screen.getAllByText('leave out')[0]!)
  const reason = screen.getByLabelText(/Why it does not belong in/)
  expect(screen.getByText('Leave out').hasAttribute('disabled')).toBe(true)
  api.on('POST', '/comparisons/exclusions', ({ body }) => {
    book[0] = { ...book[0]!, exclusion: { by: 'Ossa Brandt', reason: (body as { reason: string }).reason } }
    return answer(exclusionLogSchema, { lines: [] })
  })
  await user.type(reason, 'the hose dripped{Enter}')
  await screen.findByText('left out by Ossa Brandt: “the hose dripped”')
  expect(api.writes().at(-1)?.body).toEqual({ number: 41, reason: 'the hose dripped' })
  await screen.findByText(/Both tractors worked the same 5 plots/)
  expect(screen.getByText('no other tractor worked its plot that day')).toBeDefined()
})

test('one run each shows no difference, and the page says so', async () => {
  const [first, second] = buildSixPlots().filter((run) => run.plot === 'K1')
  opened([first!, { ...second!, plot: null, place: { name: 'Orlipet', district: 'Kotavel' } }])
  expect(await headline()).toBe('No difference may be said.')
  expect(screen.getByText('No analysis: One run for each tractor shows no difference.')).toBeDefined()
})

test('a run without the figure is shown with the reason it is missing', async () => {
  const reason = { code: 'stop', text: 'Jar vent open is not ticked: no fuel figure without it.' }
  const stopped = buildComparableRun({ number: 90, results: { l_per_ha: { value: null, U: null, reason } } })
  opened([...buildSixPlots(), stopped])
  expect(await screen.findByText(reason.text)).toBeDefined()
})

test('an empty book says so', async () => {
  opened([])
  expect(await screen.findByText(/No run of the trial book fits these choices/)).toBeDefined()
})

test('the page is for analyst and admin', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  renderApp('/compare')
  expect(await screen.findByText('Comparisons are open to the analyst and the admin.')).toBeDefined()
  expect(api.reads('/comparisons')).toEqual([])
})
