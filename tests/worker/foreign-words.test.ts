import { afterAll, beforeAll, expect, it } from 'vitest'
import type { UploadKind } from '../../shared/schemas/upload.ts'
import { readPicture } from '../../worker/child/read-picture.ts'
import { createPhotoReader, type PhotoReader } from '../../worker/readers/photo/read-page.ts'
import { FOREIGN_KINDS, makeForeign } from '../simulator/foreign.ts'

let reader: PhotoReader
beforeAll(async () => {
  reader = await createPhotoReader()
  // Draws the sheets that the others are cut from.
  await makeForeign(0)
}, 180_000)
afterAll(() => reader.close())

const none = new Set<number>()
const NOTHING_KNOWN = {
  known: { people: none, places: none, tractors: none, implements: none, kits: none },
  today: '2026-11-30',
}

/** What the demonstrator is told: what is wrong, then what to do. */
const SAID: ReadonlyArray<readonly [kind: string, upload: UploadKind, advice: RegExp]> = [
  ['bare ground', 'jpeg', /^No sheet was found in the picture\. Lay the sheet flat and let it fill the picture/],
  ['other codes', 'jpeg', /^No sheet was found in the picture\. /],
  ['a page of text', 'jpeg', /^No sheet was found in the picture\. /],
  ['a PDF of text', 'pdf', /^No sheet was found in the picture\. /],
  ['a screenshot', 'png', /^(No sheet was found|The sheet is too small) in the picture\. /],
  ['half a sheet', 'jpeg', /^The .* corners are outside the picture\. Move the phone a hand /],
  ['two sheets', 'jpeg', /^Two sheets are in the picture\. Take one picture of each sheet\.$/],
  ['four different sheets in four corners', 'jpeg', /^Two sheets are in the picture\. /],
  [
    'a sheet of an unknown kind',
    'jpeg',
    /^This kind of sheet is not known here\. Check that it was printed by this trial book\.$/,
  ],
  ['waves stronger than paper bends', 'jpeg', /^The printed boxes could not be found\. Lay the sheet flat, without folds/],
  ['cut short', 'jpeg', /^The picture is damaged or incomplete\. Take it again, or send the original file\.$/],
  ['claims to be huge', 'jpeg', /^The picture has more than 50 million pixels\. Send it in a smaller size\.$/],
  [
    'random bytes',
    'jpeg',
    /^(This is not a picture or PDF that can be read|The picture is damaged or incomplete)\. (Send|Take) /,
  ],
]

it.each(SAID)('%s: the worker says what is wrong and what to do', async (kind, upload, advice) => {
  const { bytes } = await makeForeign(FOREIGN_KINDS.indexOf(kind))
  const picture = { bytes, fileName: 'foreign', kind: upload, page: 1, placed: null, planned: false }
  const { outcome } = await readPicture(reader, picture, NOTHING_KNOWN)
  expect(outcome).toMatchObject({ kind: 'take again', advice: expect.stringMatching(advice) })
})
