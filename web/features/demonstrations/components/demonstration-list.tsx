import { Link } from 'react-router-dom'
import type { DemonstrationRow } from '../../../../shared/schemas/demonstration.ts'
import { paths } from '../../../lib/paths.ts'
import { dateText, weekdayOf } from '../../../lib/time.ts'
import { counted } from '../../../lib/words.ts'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import { RunStalks, runWords } from './run-stalks.tsx'

const progressOf = (row: DemonstrationRow) => ({ runs: row.runs, arrived: row.sheetsArrived, entered: row.records })

const day: LedgerColumn<DemonstrationRow> = {
  key: 'day',
  head: 'day',
  tight: true,
  stack: 'lead',
  cell: (row) => (
    <Link className="word max-sm:inline-flex max-sm:min-h-[44px] max-sm:items-center" to={paths.demonstration.to(row.id)}>
      {weekdayOf(`${row.heldOn}T12:00`)} {dateText(row.heldOn)}, {row.place.name}
    </Link>
  ),
}
const district: LedgerColumn<DemonstrationRow> = { key: 'district', head: 'district', cell: (row) => row.place.district }
const by: LedgerColumn<DemonstrationRow> = { key: 'by', head: 'demonstrator', tight: true, cell: (row) => row.demonstrator.name }
const trials: LedgerColumn<DemonstrationRow> = { key: 'trials', head: 'trials', figures: true, cell: (row) => row.trials }
const progress: LedgerColumn<DemonstrationRow> = {
  key: 'progress',
  head: 'runs: to come, arrived, entered',
  cell: (row) => (
    <span className="inline-flex flex-wrap items-baseline gap-x-2">
      <RunStalks {...progressOf(row)} />
      <span className="text-graphite">{runWords(progressOf(row))}</span>
    </span>
  ),
}

/** Days to come first, the nearest on top; then those held, newest first. `all` names who holds each. */
export function DemonstrationList({ rows, today, all }: { rows: readonly DemonstrationRow[]; today: string; all: boolean }) {
  const coming = rows.filter((row) => row.heldOn >= today).reverse()
  const held = rows.filter((row) => row.heldOn < today)
  const says = (words: string, count: number) => (
    <>
      <strong>{words}</strong> <span className="text-graphite">{counted(count, 'demonstration')}</span>
    </>
  )
  return (
    <LedgerTable
      stacked
      caption="Demonstrations: those to come, then those held"
      columns={all ? [day, district, by, trials, progress] : [day, district, trials, progress]}
      groups={[
        { key: 'coming', says: says('To come', coming.length), rows: coming },
        { key: 'held', says: says('Held', held.length), rows: held },
      ].filter((group) => group.rows.length > 0)}
      rowKey={(row) => row.id}
    />
  )
}
