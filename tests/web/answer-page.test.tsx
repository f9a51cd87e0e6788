import { screen } from '@testing-library/react'
import { expect, test } from 'vitest'
import { sheetListSchema, sheetSchema } from '../../shared/schemas/sheet.ts'
import { uploadSchema } from '../../shared/schemas/upload.ts'
import { uploadListSchema } from '../../web/features/uploads/uploads.queries.ts'
import { buildDeskSheet, SHEET_ID } from './support/build-desk-sheet.ts'
import { answer, fakeApi } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

const CODE = '7K4QM2K9TAX'
const ID = '00000000-0000-4000-8000-000000000001'
const UPLOAD = {
  id: ID,
  fileName: 'old.jpg',
  kind: 'jpeg' as const,
  bytes: 4_100_000,
  sha256: 'a',
  receivedAt: '2026-10-13T10:16:00.000Z',
  state: 'done' as const,
  reason: null,
  seenBefore: true,
}

test('who answers sees which sheet it is and what the clerk asks, and that an old picture answers nothing', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  const asked = { code: CODE, state: 'sent back' as const, sentBackReason: 'Is the third depth 14 or 19?' }
  api.on('GET', `/sheets/${SHEET_ID}`, () => answer(sheetSchema, buildDeskSheet([], asked)))
  const page = { id: ID, number: 1, state: 'read' as const, takeAgain: null }
  const upload = uploadSchema.parse({
    ...UPLOAD,
    pages: [{ ...page, sheet: { id: SHEET_ID, code: CODE, state: 'sent back', openDoubts: 1 } }],
  })
  api.on('GET', '/uploads', () => answer(uploadListSchema, { uploads: [upload] }))
  renderApp(`/send?for=${SHEET_ID}`)
  const question = await screen.findByText(/Is the third depth 14 or 19/)
  expect(question.parentElement?.textContent).toContain('7K4QM-2K9TA-X')
  await screen.findByText(/already with the sheet and does not answer the question/)
})

test('a sheet without a code is told apart by its file, or by when it was sent', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  const sheet = buildDeskSheet([], { code: null, state: 'waiting', arrivedAt: new Date(2026, 9, 13, 10, 16).toISOString() })
  api.on('GET', '/sheets', () => answer(sheetListSchema, { sheets: [sheet, { ...sheet, id: ID }], next: null }))
  const page = { id: ID, number: 1, state: 'read' as const, takeAgain: null }
  const uploads = [{ ...UPLOAD, pages: [{ ...page, sheet: { id: ID, code: null, state: 'waiting' as const, openDoubts: 1 } }] }]
  api.on('GET', '/uploads', () => answer(uploadListSchema, { uploads }))
  renderApp('/sheets')
  await screen.findByText(/^sheet without a code, sent .*10:16$/)
  await screen.findByText('sheet without a code, old.jpg')
})
