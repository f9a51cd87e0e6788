import type { ReactNode } from 'react'
import type { Layout } from '../../../../shared/layouts/layout.ts'
import { workOf } from '../../../../shared/layouts/registry.ts'
import { counted } from '../../../lib/words.ts'

/** Papers for the day. The day's own sheets carry the plan in print; the blank sheet and the form serve what nobody planned. */
interface TakeAlongProps {
  id: string
  runs: number
  /** The day is to come and sheets are missing: printing them is what to do next. */
  first: boolean
  mayPrint: boolean
  /** Blank sheets and forms there are. */
  layouts: readonly Layout[]
}

const FIRST =
  'mb-1 inline-flex min-h-[48px] items-center bg-ink px-4 text-2 font-[650] text-white no-underline max-sm:w-full max-sm:justify-center'

export function TakeAlong({ id, runs, first, mayPrint, layouts }: TakeAlongProps) {
  const print = (
    <a
      href={`/api/demonstrations/${id}/sheets.pdf`}
      target="_blank"
      rel="noreferrer"
      className={first ? FIRST : 'word max-sm:min-h-[44px]'}
    >
      Print {runs === 1 ? 'the sheet' : `all ${counted(runs, 'sheet')}`}
    </a>
  )
  return (
    <section aria-labelledby="take-along" className="px-margin pt-3">
      <h2 id="take-along" className="pb-1 text-2">
        Papers for the day
      </h2>
      {mayPrint && first && <p>{print}</p>}
      <p className="label">for a run nobody planned</p>
      <ul className="pb-1">
        {layouts.map((layout) => (
          <BlankPapers key={layout.key} layout={layout} />
        ))}
      </ul>
      {mayPrint && !first && (
        <p className="flex flex-wrap gap-x-3 pb-1">
          <span className="label">the sheets of the plan once more</span>
          {print}
        </p>
      )}
    </section>
  )
}

const BlankPapers = ({ layout }: { layout: Layout }) => (
  <li className="flex flex-wrap gap-x-3">
    <span className="min-w-[180px]">{workOf(layout)}</span>
    <Paper href={`/api/layouts/${layout.key}/blank.pdf`}>
      a blank sheet<span className="away">: {workOf(layout)}</span>
    </Paper>
    <Paper href={`/api/layouts/${layout.key}/form.xlsx`}>
      spreadsheet form, XLSX<span className="away">: {workOf(layout)}</span>
    </Paper>
    <Paper href={`/api/layouts/${layout.key}/form.csv`}>
      CSV<span className="away">: {workOf(layout)}</span>
    </Paper>
  </li>
)

const Paper = ({ href, children }: { href: string; children: ReactNode }) => (
  <a
    className="word max-sm:min-h-[44px]"
    href={href}
    {...(href.endsWith('.pdf') ? { target: '_blank', rel: 'noreferrer' } : { download: true })}
  >
    {children}
  </a>
)
