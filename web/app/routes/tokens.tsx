import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { CreatedToken } from '../../../shared/schemas/token.ts'
import { TokenForm } from '../../features/tokens/components/token-form.tsx'
import { isLive, TokenTable } from '../../features/tokens/components/token-table.tsx'
import { tokenQueries, useRevokeToken } from '../../features/tokens/tokens.queries.ts'
import { counted } from '../../lib/words.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorNote, ErrorState, Loading, Saved } from '../../ui/says.tsx'
import { ShownOnce } from '../../ui/shown-once.tsx'
import { FOR_PROGRAMS, InterfaceNav, PROGRAMS_SHUT } from './interface-nav.tsx'
import { OnlyFor } from './only-for.tsx'

export const Component = () => (
  <OnlyFor roles={FOR_PROGRAMS} title="Tokens" says={PROGRAMS_SHUT}>
    <TokensPage />
  </OnlyFor>
)

function TokensPage() {
  const [making, setMaking] = useState(false)
  const [made, setMade] = useState<CreatedToken | null>(null)
  const [saved, setSaved] = useState<string | null>(null)
  const tokens = useQuery(tokenQueries.list())
  const revoke = useRevokeToken()
  const live = tokens.data?.filter(isLive).length ?? 0
  const said = tokens.data ? `${counted(live, 'token')} of yours ${live === 1 ? 'is' : 'are'} in use.` : 'Your tokens.'
  return (
    <Page
      title="Tokens"
      over={<InterfaceNav />}
      sentence={said}
      aside={<Button onClick={() => setMaking(true)}>Make a token</Button>}
    >
      {making && (
        <TokenForm
          onLeave={() => setMaking(false)}
          onMade={(token) => {
            setMade(token)
            setMaking(false)
            setSaved(null)
          }}
        />
      )}
      {made && <ShownOnce what={`The token “${made.name}”`} secret={made.token} onDone={() => setMade(null)} />}
      {saved && <Saved says={saved} />}
      {revoke.error && (
        <div className="px-margin py-2">
          <ErrorNote error={revoke.error} />
        </div>
      )}
      {tokens.error && <ErrorState error={tokens.error} again={() => tokens.refetch()} />}
      {tokens.isPending && <Loading what="Looking up your tokens" />}
      {tokens.data?.length === 0 && (
        <EmptyState says="You have no token yet. A program uses one instead of signing in: it may read what you may, until a day you choose." />
      )}
      {tokens.data && tokens.data.length > 0 && (
        <TokenTable
          tokens={tokens.data}
          onRevoke={({ id, name }) =>
            revoke.mutate(id, { onSuccess: () => setSaved(`Revoked: ${name}. Its next call is refused.`) })
          }
        />
      )}
    </Page>
  )
}
