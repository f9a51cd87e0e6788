import { useQuery } from '@tanstack/react-query'
import type { Delivery } from '../../../../shared/schemas/webhook.ts'
import { momentText } from '../../../lib/time.ts'
import { counted } from '../../../lib/words.ts'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import { ErrorState, Loading } from '../../../ui/says.tsx'
import { webhookQueries } from '../webhooks.queries.ts'

const STATES = { waiting: 'on the way', delivered: 'delivered', failed: 'not delivered' } as const

const columns: LedgerColumn<Delivery>[] = [
  {
    key: 'at',
    head: 'written',
    tight: true,
    stack: 'named',
    cell: (d) => <span className="figures">{momentText(d.createdAt)}</span>,
  },
  { key: 'event', head: 'what', tight: true, stack: 'lead', cell: (d) => d.event },
  { key: 'state', head: 'became', tight: true, stack: 'named', cell: (d) => STATES[d.state] },
  { key: 'attempts', head: 'attempts', figures: true, cell: (d) => d.attempts },
  { key: 'status', head: 'answer', figures: true, cell: (d) => d.status ?? 'none' },
  { key: 'last', head: 'last attempt', tight: true, stack: 'named', cell: (d) => (d.lastAt ? momentText(d.lastAt) : 'not yet') },
  { key: 'trouble', head: 'trouble', cell: (d) => d.trouble ?? '' },
]

/** The newest messages of one webhook. */
export function DeliveryLog({ id }: { id: string }) {
  const log = useQuery(webhookQueries.deliveries(id))
  if (log.error) return <ErrorState error={log.error} again={() => log.refetch()} />
  if (!log.data) return <Loading what="Opening the log" />
  if (log.data.length === 0) return <p className="px-margin py-1 text-graphite">Nothing has been sent to it yet.</p>
  return (
    <LedgerTable
      stacked
      caption={`The newest ${counted(log.data.length, 'message')}`}
      columns={columns}
      groups={[{ key: 'all', rows: log.data }]}
      rowKey={(d) => d.id}
    />
  )
}
