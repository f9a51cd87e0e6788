import { screen } from '@testing-library/react'
import { expect, test } from 'vitest'
import { z } from 'zod'
import { REGISTERS } from '../../shared/schemas/register.ts'
import { sheetSchema } from '../../shared/schemas/sheet.ts'
import { buildDeskSheet, buildReading, SHEET_ID } from './support/build-desk-sheet.ts'
import { KIT } from './support/build-plan.ts'
import { answer, fakeApi } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

function opened(recordNumber: number | null) {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  const state = recordNumber === null ? ('waiting' as const) : ('entered' as const)
  const sheet = buildDeskSheet([buildReading('kit_id', KIT.number)], { recordNumber, state })
  api.on('GET', `/sheets/${SHEET_ID}`, () => answer(sheetSchema, sheet))
  api.on('GET', '/registers/kits', () => answer(z.array(REGISTERS.kits.row), [KIT]))
  renderApp(`/sheets/${SHEET_ID}`)
  return api
}

test('a sheet that is not in the book says what to burn with its kit', async () => {
  opened(null)
  expect(await screen.findByText('Burn at least')).toBeDefined()
  const table = screen.getByText(`kit ${KIT.number}, jar marked each ${KIT.jarMark_ml} mL, one top-up`).closest('table')
  expect(table?.querySelectorAll('tbody tr')).toHaveLength(6)
})

test('an entered sheet does not, and asks for no kit', async () => {
  const api = opened(12)
  await screen.findByText('Record and leaf')
  expect(screen.queryByText('Burn at least')).toBeNull()
  expect(api.reads('/registers/kits')).toEqual([])
})
