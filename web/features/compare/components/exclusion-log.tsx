import { useQuery } from '@tanstack/react-query'
import type { ExclusionLine } from '../../../../shared/schemas/book-comparison.ts'
import { momentText } from '../../../lib/time.ts'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import { ErrorState, Loading } from '../../../ui/says.tsx'
import { compareQueries } from '../compare.queries.ts'
import { recordName } from '../plot-rows.ts'

const columns: LedgerColumn<ExclusionLine>[] = [
  { key: 'at', head: 'when', tight: true, cell: (line) => momentText(line.at) },
  {
    key: 'number',
    head: 'record',
    tight: true,
    stack: 'lead',
    cell: (line) => <span className="figures">{recordName(line.number)}</span>,
  },
  { key: 'act', head: 'what', tight: true, cell: (line) => line.act },
  { key: 'reason', head: 'reason', cell: (line) => `“${line.reason}”` },
  { key: 'by', head: 'who', tight: true, cell: (line) => line.by },
]

/** Who left which run out, when and why, and what was taken back. Nothing of it can be changed. */
export function ExclusionLog() {
  const log = useQuery(compareQueries.log())
  return (
    <details className="border-t border-line py-2">
      <summary className="word inline-block px-margin max-sm:min-h-[44px]">The log of runs left out</summary>
      {log.error && <ErrorState error={log.error} again={() => log.refetch()} />}
      {log.isPending && <Loading what="Opening the log" />}
      {log.data?.lines.length === 0 && <p className="px-margin pt-1">Nobody has left a run out.</p>}
      {log.data && log.data.lines.length > 0 && (
        <LedgerTable
          stacked
          caption="Runs left out of comparisons and taken back, newest first"
          columns={columns}
          groups={[{ key: 'all', rows: log.data.lines }]}
          rowKey={(line) => `${line.number} ${line.at}`}
        />
      )}
    </details>
  )
}
