import { Link } from 'react-router-dom'
import type { SheetRow } from '../../../../shared/schemas/sheet.ts'
import { paths } from '../../../lib/paths.ts'
import { dateText } from '../../../lib/time.ts'
import { Glyph } from '../../../ui/glyphs.tsx'
import { STATE_WORDS, sheetName } from '../sheet-words.ts'

/** Rows for a thumb: what the sheet is of, its state in words, and the reason where it came back. */
export function MySheetList({ rows, fileNames }: { rows: readonly SheetRow[]; fileNames: ReadonlyMap<string, string> }) {
  return (
    <ul className="border-t-[1.5px] border-ink">
      {rows.map((row) => (
        <li key={row.id} className="border-b border-line">
          <Link
            to={paths.mySheet.to(row.id)}
            className="grid min-h-[64px] gap-x-3 px-margin py-1 no-underline sm:grid-cols-[180px_1fr_1fr]"
          >
            <span className={row.code ? 'figures' : ''}>{sheetName(row, fileNames.get(row.id))}</span>
            <span>
              <strong>
                {[row.tractor, row.implement].filter(Boolean).join(', ') || 'tractor not known yet'}
                {row.runNumber ? `, run ${row.runNumber}` : ''}
              </strong>
              <br />
              <span className="text-graphite">
                {[row.place, row.trialDate ? dateText(row.trialDate) : null].filter(Boolean).join(', ')}
              </span>
            </span>
            <span>
              <Glyph name={STATE_WORDS[row.state].glyph} /> {STATE_WORDS[row.state].says}
              {row.state === 'sent back' && row.why && <span className="block text-pen">“{row.why}”</span>}
              {row.state === 'entered' && row.recordNumber !== null && ` as record ${row.recordNumber}`}
            </span>
          </Link>
        </li>
      ))}
    </ul>
  )
}
