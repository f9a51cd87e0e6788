import { screen, within } from '@testing-library/react'
import { expect, test } from 'vitest'
import { type Upload, uploadSchema } from '../../shared/schemas/upload.ts'
import { uploadListSchema } from '../../web/features/uploads/uploads.queries.ts'
import { answer, fakeApi } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
type Page = Upload['pages'][number]

const upload = (n: number, change: Partial<Upload>): Upload =>
  uploadSchema.parse({
    id: id(n),
    fileName: `photo ${n}.jpg`,
    kind: 'jpeg',
    bytes: 4_100_000,
    sha256: 'a',
    receivedAt: '2026-10-13T10:16:00.000Z',
    state: 'done',
    reason: null,
    seenBefore: false,
    pages: [],
    ...change,
  })
const page = (n: number, change: Partial<Page>): Page => ({
  id: id(50 + n),
  number: 1,
  state: 'read',
  takeAgain: null,
  sheet: null,
  ...change,
})
const sheet = (openDoubts: number) => ({ id: id(90), code: '7K4QM2K9TAX', state: 'waiting' as const, openDoubts })

test('each file says in plain words what became of it and what to do', async () => {
  const api = fakeApi()
  signedIn(api, 'demonstrator')
  api.on('GET', '/uploads', () =>
    answer(uploadListSchema, {
      uploads: [
        upload(1, { pages: [page(1, { sheet: sheet(2) })] }),
        upload(2, { pages: [page(2, { sheet: sheet(0) })], seenBefore: true }),
        upload(3, {
          pages: [page(3, { state: 'take again', takeAgain: { code: 'corners', advice: 'The lower left corner is outside.' } })],
        }),
        upload(4, { state: 'not accepted', kind: null, reason: 'This is a text document. Send a photo of the sheet.' }),
      ],
    }),
  )
  renderApp('/send')
  await screen.findByText('photo 1.jpg')
  const items = screen.getAllByRole('listitem')
  const said = (n: number) => items.find((item) => within(item).queryByText(`photo ${n}.jpg`) !== null)?.textContent ?? ''
  expect(said(1)).toContain('Read. 2 doubts go to the desk.')
  expect(said(2)).toContain('Read. No doubts.')
  expect(said(2)).toContain('Sent before: it stays one sheet.')
  expect(said(3)).toContain('Take it again. The lower left corner is outside.')
  expect(said(4)).toContain('Not accepted This is a text document. Send a photo of the sheet.')
  expect(screen.getAllByRole('link', { name: '7K4QM-2K9TA-X' })[0]?.getAttribute('href')).toBe(`/sheets/${id(90)}`)
})
