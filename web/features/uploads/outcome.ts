/** What became of a file and of each page, in plain words: what happened, what was kept, what to do. */
import type { Upload } from '../../../shared/schemas/upload.ts'
import { counted } from '../../lib/words.ts'
import type { GlyphName } from '../../ui/glyphs.tsx'

type UploadPage = Upload['pages'][number]

export interface Outcome {
  glyph: GlyphName
  /** The word of the state. */
  head: string
  says: string
  /** The person in the field can do something about it now. */
  takeAgain: boolean
}

export function outcomeOfFile(upload: Upload): Outcome | null {
  if (upload.state === 'not accepted') {
    return { glyph: 'set aside', head: 'Not accepted', says: upload.reason ?? 'The file cannot be taken.', takeAgain: false }
  }
  if (upload.pages.length === 0) return { glyph: 'reading', head: 'Arrived', says: 'It waits to be read.', takeAgain: false }
  return null
}

/** "reading page 3 of 8" while a file of several pages is on its way. */
export function progressOf(upload: Upload): string | null {
  const read = upload.pages.filter((page) => page.state !== 'arrived' && page.state !== 'being read').length
  if (upload.state === 'not accepted' || read === upload.pages.length) return null
  return `reading page ${read + 1} of ${upload.pages.length}`
}

export function outcomeOfPage(page: UploadPage): Outcome {
  switch (page.state) {
    case 'arrived':
      return { glyph: 'reading', head: 'Arrived', says: 'It waits to be read.', takeAgain: false }
    case 'being read':
      return { glyph: 'reading', head: 'Being read', says: 'A few seconds more.', takeAgain: false }
    case 'take again':
      return { glyph: 'sent back', head: 'Take it again.', says: page.takeAgain?.advice ?? 'It cannot be read.', takeAgain: true }
    case 'unreadable':
      return { glyph: 'unreadable', head: 'Cannot be read.', says: 'The desk has the picture and looks at it.', takeAgain: true }
    case 'read':
      return { glyph: 'entered', head: 'Read.', says: doubtsSaid(page), takeAgain: false }
  }
}

function doubtsSaid({ sheet }: UploadPage): string {
  if (!sheet) return 'It is kept.'
  if (sheet.state === 'set aside') return 'It joined a sheet that was here before.'
  if (sheet.state === 'entered') return 'The sheet is entered.'
  if (sheet.state === 'sent back') return 'The desk has sent the sheet back with a question. Answer it before you leave.'
  if (sheet.state === 'challenged') return 'The record was challenged; the sheet is at the desk again.'
  if (sheet.openDoubts === 0) return 'No doubts. You can leave.'
  return `${counted(sheet.openDoubts, 'doubt')} ${sheet.openDoubts === 1 ? 'goes' : 'go'} to the desk. You can leave.`
}

/** What was sent just now stands first, also when it was here before; the list knows best how far each is. */
export function justSentFirst(listed: readonly Upload[], answers: readonly Upload[]): Upload[] {
  const byId = new Map(listed.map((upload) => [upload.id, upload]))
  const sent = new Map(
    answers.map((answer) => [answer.id, { ...(byId.get(answer.id) ?? answer), seenBefore: answer.seenBefore }]),
  )
  return [...sent.values(), ...listed.filter((upload) => !sent.has(upload.id))]
}
