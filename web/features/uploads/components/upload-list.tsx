import type { ReactNode } from 'react'
import { formatSheetCode } from '../../../../shared/layouts/sheet-code.ts'
import type { Upload } from '../../../../shared/schemas/upload.ts'
import { momentText } from '../../../lib/time.ts'
import { bytesText } from '../../../lib/words.ts'
import { Glyph } from '../../../ui/glyphs.tsx'
import { type Outcome, outcomeOfFile, outcomeOfPage, progressOf } from '../outcome.ts'

type SheetLink = (sheet: { id: string; code: string }) => ReactNode

/** What became of each file, page by page. `sheetLink` is the way to a sheet for the person who looks. */
export function UploadList({ uploads, sheetLink }: { uploads: readonly Upload[]; sheetLink: SheetLink }) {
  return (
    <ol className="border-t border-feint">
      {uploads.map((upload) => (
        <li key={upload.id} className="border-b border-line px-margin py-2">
          <FileHead upload={upload} />
          <FileOutcome upload={upload} sheetLink={sheetLink} />
        </li>
      ))}
    </ol>
  )
}

function FileHead({ upload }: { upload: Upload }) {
  return (
    <div className="label flex flex-wrap gap-x-2">
      <span className="min-w-0 break-all">{upload.fileName}</span>
      <span className="figures">{bytesText(upload.bytes)}</span>
      <span className="ml-auto figures">{momentText(upload.receivedAt)}</span>
    </div>
  )
}

function FileOutcome({ upload, sheetLink }: { upload: Upload; sheetLink: SheetLink }) {
  const whole = outcomeOfFile(upload)
  const progress = progressOf(upload)
  return (
    <>
      {upload.seenBefore && <SentBefore upload={upload} />}
      {progress && upload.pages.length > 1 && <p role="status">{progress}</p>}
      {whole ? (
        <Said outcome={whole} />
      ) : (
        <ul>
          {upload.pages.map((page) => (
            <li key={page.id} className="flex flex-wrap items-baseline gap-x-2">
              <Said outcome={outcomeOfPage(page)} page={upload.pages.length > 1 ? page.number : null} />
              {page.sheet && page.state === 'read' && (
                <span className="ml-auto">
                  {sheetLink({
                    id: page.sheet.id,
                    code: page.sheet.code ? formatSheetCode(page.sheet.code) : 'sheet without a code',
                  })}
                </span>
              )}
            </li>
          ))}
        </ul>
      )}
    </>
  )
}

/** The picture the desk already had answers nothing. */
function SentBefore({ upload }: { upload: Upload }) {
  if (!upload.pages.some((page) => page.sheet?.state === 'sent back')) return <p>Sent before: it stays one sheet.</p>
  return (
    <p role="status" className="border-l-[3px] border-ink pl-1 text-2">
      Sent before: this picture was already with the sheet and does not answer the question. Take a new photo.
    </p>
  )
}

function Said({ outcome, page = null }: { outcome: Outcome; page?: number | null }) {
  return (
    <p className={outcome.takeAgain ? 'border-l-[3px] border-ink pl-1 text-2' : 'text-2'}>
      {page !== null && <span className="text-graphite">Page {page}: </span>}
      <Glyph name={outcome.glyph} /> <strong>{outcome.head}</strong> {outcome.says}
    </p>
  )
}
