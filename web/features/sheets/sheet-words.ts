/** The states of a sheet as the demonstrator is told them: what it means for the field. */
import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { SheetState } from '../../../shared/schemas/sheet.ts'
import { momentText } from '../../lib/time.ts'
import type { GlyphName } from '../../ui/glyphs.tsx'

export const STATE_WORDS: Record<SheetState, { glyph: GlyphName; says: string }> = {
  printed: { glyph: 'printed', says: 'printed, not photographed yet' },
  arrived: { glyph: 'reading', says: 'arrived' },
  'being read': { glyph: 'reading', says: 'being read' },
  waiting: { glyph: 'waiting', says: 'waits at the desk' },
  'sent back': { glyph: 'sent back', says: 'sent back to you' },
  settled: { glyph: 'settled', says: 'settled, to be entered' },
  entered: { glyph: 'entered', says: 'entered' },
  challenged: { glyph: 'challenged', says: 'challenged' },
  'set aside': { glyph: 'set aside', says: 'set aside' },
  unreadable: { glyph: 'unreadable', says: 'cannot be read' },
}

interface Named {
  code: string | null
  arrivedAt: string | null
}

/** What a sheet is called: its code; else the file it came in, where that is known, or when it was sent. */
export function sheetName({ code, arrivedAt }: Named, fileName?: string): string {
  if (code) return formatSheetCode(code)
  const told = fileName ?? (arrivedAt ? `sent ${momentText(arrivedAt)}` : null)
  return told ? `sheet without a code, ${told}` : 'sheet without a code'
}

/** What only the person in the field can answer. */
export const wantsAnswer = (state: SheetState): boolean => state === 'sent back' || state === 'unreadable'
