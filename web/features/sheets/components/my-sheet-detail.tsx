import type { ReactNode } from 'react'
import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import { findLayout } from '../../../../shared/layouts/registry.ts'
import type { Sheet } from '../../../../shared/schemas/sheet.ts'
import { paths } from '../../../lib/paths.ts'
import { momentText } from '../../../lib/time.ts'
import { counted } from '../../../lib/words.ts'
import { ButtonLink } from '../../../ui/button.tsx'
import { Glyph } from '../../../ui/glyphs.tsx'
import { STATE_WORDS, wantsAnswer } from '../sheet-words.ts'

/** One sheet as its demonstrator sees it: where it stands, what is asked, the picture, what was read, what happened. */
export function MySheetDetail({ sheet, children }: { sheet: Sheet; children?: ReactNode }) {
  return (
    <div className="grid lg:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
      <div className="px-margin py-3">
        <p className="text-3">
          <Glyph name={STATE_WORDS[sheet.state].glyph} /> <strong>{STATE_WORDS[sheet.state].says}</strong>
        </p>
        {sheet.sentBackReason && sheet.state === 'sent back' && (
          <p className="mt-1 text-3 leading-[28px] text-pen">“{sheet.sentBackReason}”</p>
        )}
        {sheet.reason && <p className="mt-1 border-l-[3px] border-ink pl-1">{sheet.reason}</p>}
        {wantsAnswer(sheet.state) && (
          <ButtonLink look="ink" to={paths.send.to(sheet.id)} className="mt-3 min-h-[66px] max-sm:w-full">
            Answer with a new photo
          </ButtonLink>
        )}
        {sheet.openDoubts > 0 && <OpenDoubts sheet={sheet} />}
        {children}
        <History sheet={sheet} />
      </div>
      <Pictures sheet={sheet} />
    </div>
  )
}

function OpenDoubts({ sheet }: { sheet: Sheet }) {
  const layout = sheet.layout ? findLayout(sheet.layout, sheet.layoutVersion ?? undefined) : null
  const cellOf = (key: string) => layout?.cells.find((c) => c.key === key)
  const read = sheet.readings.filter((r) => r.state === 'in doubt' && r.settlement === null)
  const found = sheet.doubts.filter((d) => d.severity !== 'note' && d.settledAt === null)
  return (
    <section aria-labelledby="doubts" className="mt-4">
      <h2 id="doubts" className="text-2">
        {counted(sheet.openDoubts, 'doubt')} for the desk
      </h2>
      <ul className="border-t-[1.5px] border-ink">
        {read.map((r) => (
          <li key={r.key} className="border-b border-feint py-0.5">
            <Glyph name="doubt" /> {cellOf(r.key)?.label ?? r.key}:{' '}
            <span className="figures">{formatValue(cellOf(r.key), r.value)}</span>{' '}
            <span className="text-graphite">{r.reasons[0]?.text}</span>
          </li>
        ))}
        {found.map((d) => (
          <li key={d.id} className="border-b border-feint py-0.5">
            <Glyph name="doubt" /> {d.text}
          </li>
        ))}
      </ul>
    </section>
  )
}

function History({ sheet }: { sheet: Sheet }) {
  return (
    <section aria-labelledby="history" className="mt-4">
      <h2 id="history" className="text-2">
        History
      </h2>
      <ol className="border-t-[1.5px] border-ink">
        {sheet.history.map((line) => (
          <li key={line.at + line.text} className="grid gap-x-2 border-b border-feint py-0.5 sm:grid-cols-[108px_1fr]">
            <span className="figures text-[14px] text-graphite">{momentText(line.at)}</span>
            <span>
              {line.who}: {line.text}
            </span>
          </li>
        ))}
      </ol>
    </section>
  )
}

function Pictures({ sheet }: { sheet: Sheet }) {
  const shown = sheet.pages.filter((page) => page.flattened)
  return (
    <div className="border-line lg:border-l-[3px] lg:border-double">
      {shown.map((page) => (
        <img
          key={page.id}
          src={`/api/pages/${page.id}/picture`}
          alt={`The sheet as photographed: ${page.fileName}, page ${page.number}`}
          loading="lazy"
          className="block aspect-[210/297] w-full"
        />
      ))}
      {shown.length === 0 && <p className="px-margin py-3 text-graphite">No flattened picture of this sheet.</p>}
    </div>
  )
}
