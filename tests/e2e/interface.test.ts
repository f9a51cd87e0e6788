/** What an analyst sets up for programs, in Chromium: the guide, a token that a program then uses, a webhook. */
import { AxeBuilder } from '@axe-core/playwright'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { startWholeApp, type WholeApp } from '../support/whole-app.ts'

const ANALYST = 301
let app: WholeApp
beforeAll(async () => {
  app = await startWholeApp()
})
afterAll(() => app.close())

/** No violation of WCAG 2.2 AA that axe can find. */
async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page: page as never })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze()
  expect(violations.map((v) => `${v.id}: ${v.nodes.map((n) => n.target.join(' ')).join(', ')}`)).toEqual([])
}

test.each([
  ['a desk', { width: 1440, height: 900 }],
  ['a phone', { width: 360, height: 740 }],
])('on %s the guide is readable, and what it says works', async (where, size) => {
  const page = await app.enter(ANALYST, size)
  await page.getByRole('link', { name: 'Interface' }).click()
  await page.getByText('/values.csv').first().waitFor()
  await page.getByText('/changes').first().click()
  await expectAccessible(page)
  expect(await page.evaluate(() => document.documentElement.scrollWidth <= window.innerWidth)).toBe(true)

  await page.getByRole('link', { name: 'Tokens' }).click()
  await page.getByRole('button', { name: 'Make a token' }).click()
  await page.getByLabel('What it is for').fill(`copy for ${where}`)
  await page.getByLabel(/^changes:/).check()
  await expectAccessible(page)
  await page.getByRole('button', { name: 'Make the token' }).click()
  const token = (await page.getByText(/^sheafbook_/).textContent()) ?? ''
  await expectAccessible(page)
  const headers = { Authorization: `Bearer ${token}` }
  expect((await fetch(`${app.server.url}/api/changes`, { headers })).status).toBe(200)
  await page.getByRole('button', { name: /take it off the screen/ }).click()
  await page.getByRole('button', { name: `Revoke copy for ${where}` }).click()
  await page.getByText(`Revoked: copy for ${where}.`).waitFor()
  expect((await fetch(`${app.server.url}/api/changes`, { headers })).status).toBe(401)
  await expectAccessible(page)

  await page.getByRole('link', { name: 'Webhooks' }).click()
  await page.getByRole('button', { name: 'Make a webhook' }).click()
  await page.getByLabel('Address').fill(`https://data.example/${size.width}`)
  await page.getByRole('button', { name: 'Make the webhook' }).click()
  await page.getByText(/^whsec_/).waitFor()
  await page.getByRole('button', { name: 'what was sent' }).first().click()
  await page.getByText('Nothing has been sent to it yet.').waitFor()
  await expectAccessible(page)
  expect(app.complaints).toEqual([])
  await page.context().close()
})
