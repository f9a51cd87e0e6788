import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { findLayout, workOf } from '../../../../shared/layouts/registry.ts'
import { formatSheetCode } from '../../../../shared/layouts/sheet-code.ts'
import type { Trial } from '../../../../shared/schemas/demonstration.ts'
import { paths } from '../../../lib/paths.ts'
import { counted } from '../../../lib/words.ts'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'

type Run = Trial['runs'][number]

export interface RunLinks {
  /** Where this reader opens a sheet, or null. */
  sheetPath: ((sheetId: string) => string) | null
  /** A sheet's state in words, with its shape. */
  stateMark: (state: string) => ReactNode
  mayPrint: boolean
}

/** The trials of a day with their runs: each run's sheet, where it stands, and its record. */
export function TrialRuns({ trials, links }: { trials: readonly Trial[]; links: RunLinks }) {
  return (
    <LedgerTable
      stacked
      caption="Trials and their runs, with sheet and record"
      columns={columnsFor(links)}
      groups={trials.map((trial) => ({ key: trial.id, says: <TrialHead trial={trial} />, rows: trial.runs }))}
      rowKey={(run) => run.id}
    />
  )
}

const TrialHead = ({ trial }: { trial: Trial }) => (
  <>
    <strong>
      {trial.tractor.name} with {trial.implement.name}
    </strong>{' '}
    <span className="text-graphite">
      plot {trial.plot}, kit {trial.kit.number} ({trial.kit.name}), {sheetWords(trial)}, {counted(trial.runs.length, 'run')}
    </span>
  </>
)

/** "tillage sheet"; a layout this page does not know yet is called by its key. */
function sheetWords({ layout }: Trial): string {
  const known = findLayout(layout)
  return `${known ? workOf(known) : layout} sheet`
}

function columnsFor({ sheetPath, stateMark, mayPrint }: RunLinks): LedgerColumn<Run>[] {
  return [
    { key: 'run', head: 'run', tight: true, stack: 'named', cell: (run) => <strong>{run.number}</strong> },
    { key: 'sheet', head: 'sheet', tight: true, stack: 'named', cell: (run) => sheetOf(run, sheetPath) },
    {
      key: 'state',
      head: 'where it stands',
      stack: 'named',
      cell: (run) => (
        <span className="inline-flex items-baseline gap-2">
          {stateMark(run.sheetState ?? 'printed')}
          {mayPrint && !hasArrived(run) && printOf(run)}
        </span>
      ),
    },
    { key: 'record', head: 'record', tight: true, stack: 'named', cell: recordOf },
  ]
}

/** A sheet that has arrived is not printed again: its twin would only make a doubt. */
export const hasArrived = (run: Run): boolean => run.sheetState !== null && run.sheetState !== 'printed'

function sheetOf(run: Run, sheetPath: RunLinks['sheetPath']): ReactNode {
  if (!run.sheetCode) return '–'
  const code = formatSheetCode(run.sheetCode)
  if (!hasArrived(run) || !sheetPath || !run.sheetId) return <span className="figures">{code}</span>
  return (
    <Link className="word figures" to={sheetPath(run.sheetId)}>
      {code}
    </Link>
  )
}

const recordOf = (run: Run): ReactNode =>
  run.recordNumber === null ? (
    '–'
  ) : (
    <Link className="word figures" to={paths.record.to(run.recordNumber)}>
      {String(run.recordNumber).padStart(4, '0')}
    </Link>
  )

const printOf = (run: Run): ReactNode =>
  run.sheetId && (
    <a className="word" href={`/api/sheets/${run.sheetId}/sheet.pdf`} target="_blank" rel="noreferrer">
      print it<span className="away">: the sheet of run {run.number}</span>
    </a>
  )
