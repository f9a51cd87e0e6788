import { useQuery } from '@tanstack/react-query'
import { useEffect } from 'react'
import { Navigate, Outlet, ScrollRestoration, useLocation } from 'react-router-dom'
import { sessionQueries } from '../../features/session/session.queries.ts'
import { NotYetSentCount } from '../../features/uploads/components/not-yet-sent.tsx'
import { useOutboxAtWork } from '../../features/uploads/use-outbox.ts'
import { MeContext } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { useOnline } from '../../lib/use-online.ts'
import { Folio } from '../../ui/folio.tsx'
import { ErrorState, Loading } from '../../ui/says.tsx'
import { HOME, NAV } from '../nav.ts'
import { WhoIsHere } from './who-is-here.tsx'

/** Everything behind the sign-in: the folio, then the page. */
export function Shell() {
  const session = useQuery(sessionQueries.me())
  const here = useLocation()
  if (session.data === null) return <Navigate replace to={paths.signIn.to(here.pathname + here.search)} />
  if (!session.data) {
    if (session.error) return <ErrorState error={session.error} again={() => session.refetch()} />
    return <Loading what="Opening the book" />
  }
  const { user } = session.data
  return (
    <MeContext value={user}>
      <Folio home={HOME[user.role]} links={NAV[user.role]}>
        <NotYetSentCount />
        <WhoIsHere user={user} />
      </Folio>
      <OutboxAtWork userId={user.id} />
      <LineDown />
      <Outlet />
      <ScrollRestoration />
    </MeContext>
  )
}

function LineDown() {
  if (useOnline()) return null
  return (
    <p role="status" className="border-b border-ink bg-straw-pale px-margin py-1 text-ink">
      The line is down: what you see may be old, and nothing more can be saved now. Photos are kept here and go when it is back.
    </p>
  )
}

function OutboxAtWork({ userId }: { userId: string }) {
  useOutboxAtWork(userId)
  useEffect(() => {
    // The send page is fetched while there is a line: it must open where there is none.
    void import('./send.tsx').catch(() => undefined)
  }, [])
  return null
}
