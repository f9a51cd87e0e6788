import type { ApiToken } from '../../../../shared/schemas/token.ts'
import { dateText, momentText } from '../../../lib/time.ts'
import { Button } from '../../../ui/button.tsx'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'

const hasRunOut = (token: ApiToken) => Date.parse(token.expiresAt) <= Date.now()
export const isLive = (token: ApiToken) => token.revokedAt === null && !hasRunOut(token)

function stateOf(token: ApiToken): string {
  if (token.revokedAt !== null) return `revoked ${dateText(token.revokedAt)}`
  return `${hasRunOut(token) ? 'ran out' : 'until'} ${dateText(token.expiresAt)}`
}

/** Newest first; what is worth nothing any more stays listed, in graphite. */
export function TokenTable({ tokens, onRevoke }: { tokens: readonly ApiToken[]; onRevoke: (token: ApiToken) => void }) {
  const columns: LedgerColumn<ApiToken>[] = [
    { key: 'name', head: 'what it is for', stack: 'lead', cell: (t) => t.name },
    { key: 'ending', head: 'ends with', tight: true, stack: 'named', cell: (t) => <span className="figures">…{t.ending}</span> },
    { key: 'scopes', head: 'it may', stack: 'named', cell: (t) => t.scopes.join(', ') },
    { key: 'state', head: 'in use', tight: true, stack: 'named', cell: stateOf },
    {
      key: 'used',
      head: 'last used',
      tight: true,
      stack: 'named',
      cell: (t) => (t.lastUsedAt === null ? 'never' : momentText(t.lastUsedAt)),
    },
    {
      key: 'act',
      head: <span className="away">change</span>,
      tight: true,
      cell: (t) =>
        isLive(t) && (
          <Button look="word" aria-label={`Revoke ${t.name}`} onClick={() => onRevoke(t)}>
            revoke
          </Button>
        ),
    },
  ]
  return (
    <LedgerTable
      stacked
      caption="Your tokens"
      columns={columns}
      groups={[{ key: 'all', rows: tokens }]}
      rowKey={(t) => t.id}
      quiet={(t) => !isLive(t)}
    />
  )
}
