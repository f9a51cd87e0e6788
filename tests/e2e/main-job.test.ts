/**
 * The whole job in four roles, in Chromium: from a plan and its printed sheet to a photo, its doubts, the record and the
 * download. The photo is samples/golden: the short golden sheet, whose figures are worked out by hand in the method.
 */

import { readFile } from 'node:fs/promises'
import { AxeBuilder } from '@axe-core/playwright'
import Papa from 'papaparse'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { startWholeApp, type WholeApp } from '../support/whole-app.ts'

let app: WholeApp
beforeAll(async () => {
  app = await startWholeApp()
})
afterAll(() => app.close())

const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']

/** No violation of WCAG 2.2 AA that axe can find. */
async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page: page as never }).withTags(WCAG).analyze()
  const said = violations.map((v) => `${page.url()} ${v.id}: ${v.nodes.map((n) => n.target.join(' ')).join(', ')}`)
  expect(said).toEqual([])
}

/** Takes the option that names it, whatever number stands before it. */
async function choose(page: Page, label: string, words: string): Promise<void> {
  const list = page.getByLabel(label, { exact: true })
  const option = list.locator('option', { hasText: words })
  await option.first().waitFor({ state: 'attached' })
  await list.selectOption({ label: (await option.first().textContent()) ?? words })
}

interface SampleSheet {
  case: string
  sheetCode: string
}

/** The code that was printed on the sample's sheet. */
async function codeOfSample(name: string): Promise<string> {
  const sheets = JSON.parse(await readFile('samples/season.json', 'utf8')) as SampleSheet[]
  return sheets.find((s) => s.case === name)!.sheetCode
}

describe.sequential('from plan to download', () => {
  test('a demonstrator plans a demonstration and prints its sheet', async () => {
    const page = await app.enter(101)
    await page.getByRole('link', { name: 'Plan a demonstration' }).first().click()
    await page.getByLabel('Date').fill('2026-09-18')
    await choose(page, 'Place', 'Dhamrin')
    await page.getByLabel('Name', { exact: true }).fill('Harun Dello')
    await choose(page, 'tractor', 'Tarnfold 50')
    await choose(page, 'implement', 'plough, 3 bottoms')
    await choose(page, 'kit', 'kit A')
    await page.getByLabel('plot', { exact: true }).fill('A, by the road')
    await page.getByLabel('runs, 1 to 12').fill('1')
    await expectAccessible(page)
    await page.getByRole('button', { name: 'Save the plan and make its sheets' }).click()
    const print = page.getByRole('link', { name: /Print/ }).first()
    await print.waitFor()
    await expectAccessible(page)
    const pdf = await page.request.get((await print.getAttribute('href'))!)
    expect(pdf.headers()['content-type']).toContain('application/pdf')
    expect((await pdf.body()).subarray(0, 5).toString()).toBe('%PDF-')
    // The sample was printed with a code of its own; the plan's sheet takes it, as if this print-out had been photographed.
    await app.server.deps.source.query('UPDATE sheets SET code = $1', [await codeOfSample('golden')])
    await page.context().close()
  })

  test('on a phone the demonstrator sends the photo and learns that it was read', async () => {
    const page = await app.enter(101, { width: 360, height: 740 })
    await page.getByRole('link', { name: 'Send sheets' }).click()
    await page.getByLabel('Choose files').setInputFiles('samples/golden/golden.jpg')
    await page.getByText('Read.').waitFor({ timeout: 60_000 })
    await expectAccessible(page)
    await page.getByLabel('Choose files').setInputFiles('samples/nothing/nothing.jpg')
    await page.getByText('Take it again.').waitFor({ timeout: 60_000 })
    await page.getByRole('link', { name: 'My sheets' }).click()
    await page.getByText('27NWM-7FSRS-Z').waitFor()
    await expectAccessible(page)
    await page.context().close()
  })

  test('the clerk settles what is doubtful by keyboard and enters the sheet', async () => {
    const page = await app.enter(201)
    await page.getByText('27NWM-7FSRS-Z').waitFor()
    await expectAccessible(page)
    await page.getByRole('link', { name: '27NWM-7FSRS-Z' }).click()
    await page.getByRole('img', { name: /sheet/i }).first().waitFor()
    await expectAccessible(page)
    await settleByKeyboard(page)
    await page.keyboard.press('Shift+Enter')
    await expect.poll(async () => records(), { timeout: 30_000 }).toHaveLength(1)
    await page.context().close()
  })

  test('the analyst finds the golden result, its ink, and takes the data away', async () => {
    const page = await app.enter(301)
    await page.getByRole('heading', { name: /1 run stands/ }).waitFor()
    await expectAccessible(page)
    await page.getByRole('link', { name: '0001' }).click()
    await page.getByRole('heading', { name: /Tarnfold 50 with plough/ }).waitFor()
    await page.getByText('litres a hectare').first().waitFor()
    // The golden sheet: 14.1 ± 0.7 L/ha; mean depth 15.15 cm, mean width 0.908 m.
    for (const figure of ['14.1', '± 0.7', '4.38', '± 0.22', '0.908'])
      await page.getByText(figure, { exact: true }).first().waitFor()
    await page.getByRole('img', { name: 'ink of jar, start' }).first().waitFor()
    await expectAccessible(page)
    await page.getByRole('link', { name: 'Trial book' }).click()
    await page.getByText('take the data away').click()
    await expectAccessible(page)
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('link', { name: 'CSV, a line a record', exact: true }).click(),
    ])
    const [header, line] = (await readFile((await download.path())!, 'utf8')).split('\r\n')
    expect(header).toContain('l_per_ha [L/ha]')
    expect(line).toContain('14.074074074')
    expect(line).toContain('9.28981')
    // 14.0741 ± 0.6765 L/ha and 4.38 ± 0.22 L/h, unrounded.
    const [names = [], values = []] = Papa.parse<string[]>(`${header}\n${line}`).data
    const figure = (name: string) => Number(values[names.indexOf(name)])
    for (const [name, value] of Object.entries({
      'l_per_ha [L/ha]': 14.0741,
      'l_per_ha_U [L/ha]': 0.6765,
      'l_per_h [L/h]': 4.3846,
      'l_per_h_U [L/h]': 0.2151,
    }))
      expect(figure(name), name).toBeCloseTo(value, 4)
    await page.context().close()
  })

  test('the admin sees people, registers, outbox and trail', async () => {
    const page = await app.enter(401)
    for (const [link, words] of [
      ['Registers', 'Tarnfold 50'],
      ['People', 'Joost Abara'],
      ['Outbox', 'mail'],
      ['Trail', 'entered as record 1'],
    ] as const) {
      await page.getByRole('navigation', { name: 'Sections' }).getByRole('link', { name: link }).click()
      await page.getByText(words).first().waitFor()
      await expectAccessible(page)
    }
    await page.context().close()
  })

  test('no page broke or left the content policy', () => {
    expect(app.complaints).toEqual([])
  })
})

/** Whatever the reader left: take the proposed value, and let the rules' doubts stand with a reason. */
async function settleByKeyboard(page: Page): Promise<void> {
  await expect
    .poll(
      async () => {
        const [sheet] = await open()
        if (sheet?.state === 'settled') return 'settled'
        await page.keyboard.press('Enter')
        // Where ink and sums differ no key takes either by default. The first offer, which fits the sums, is what was written.
        if (await page.getByText('Choose one.').isVisible()) await page.keyboard.press('1')
        const reason = page.getByLabel(/why|reason/i)
        if (await reason.isVisible().catch(() => false)) {
          await reason.fill('as the paper shows')
          await page.keyboard.press('Enter')
        }
        return sheet?.state
      },
      { timeout: 60_000, interval: 500 },
    )
    .toBe('settled')
}

const open = (): Promise<Array<{ state: string }>> =>
  app.server.deps.source.query("SELECT state FROM sheets WHERE code = '27NWM7FSRSZ'")
const records = (): Promise<unknown[]> => app.server.deps.source.query('SELECT number FROM records')
