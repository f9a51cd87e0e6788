import { useInfiniteQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { TrailEntry } from '../../../shared/schemas/trail.ts'
import { trailQueries } from '../../features/trail/trail.queries.ts'
import { actWords } from '../../features/trail/trail-words.ts'
import { paths } from '../../lib/paths.ts'
import { momentText } from '../../lib/time.ts'
import { Button } from '../../ui/button.tsx'
import { type LedgerColumn, LedgerTable } from '../../ui/ledger-table.tsx'
import { Page } from '../../ui/page.tsx'
import { ErrorState, Loading } from '../../ui/says.tsx'
import { ADMIN, OnlyFor } from './only-for.tsx'

const columns: LedgerColumn<TrailEntry>[] = [
  {
    key: 'at',
    head: 'when',
    tight: true,
    cell: (e) => <span className="figures text-[13.5px] font-normal">{momentText(e.at)}</span>,
  },
  { key: 'who', head: 'who', tight: true, cell: (e) => e.who },
  { key: 'what', head: 'what', tight: true, cell: actWords },
  { key: 'text', head: 'in words', stack: 'lead', cell: inWords },
]

/** What was done; on a sheet with the way to it, since its readings alone name none. */
function inWords({ subject, subjectId, sheetCode, text }: TrailEntry) {
  if (subject !== 'sheet' || !subjectId) return text
  return (
    <>
      <Link className="word figures" to={paths.deskSheet.to(subjectId)}>
        {sheetCode ? formatSheetCode(sheetCode) : 'sheet without a code'}
      </Link>{' '}
      {text}
    </>
  )
}

export const Component = () => (
  <OnlyFor roles={ADMIN} title="Trail" says="The trail is open to the admin.">
    <TrailPage />
  </OnlyFor>
)

function TrailPage() {
  const trail = useInfiniteQuery(trailQueries.lines())
  return (
    <Page title="Trail" sentence="Every change, newest first. Nobody can alter or take out a line.">
      {trail.error && <ErrorState error={trail.error} again={() => trail.refetch()} />}
      {trail.isPending && <Loading what="Opening the trail" />}
      {trail.data && (
        <LedgerTable
          stacked
          caption="The audit trail, newest first"
          columns={columns}
          groups={[{ key: 'all', rows: trail.data.pages.flatMap((p) => p.entries) }]}
          rowKey={(e) => String(e.id)}
        />
      )}
      {trail.hasNextPage && (
        <p className="px-margin py-2">
          <Button look="word" disabled={trail.isFetchingNextPage} onClick={() => trail.fetchNextPage()}>
            Older lines
          </Button>
        </p>
      )}
    </Page>
  )
}
