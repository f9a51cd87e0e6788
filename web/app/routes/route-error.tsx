import { isRouteErrorResponse, Link, useRouteError } from 'react-router-dom'
import { ApiError } from '../../lib/api-error.ts'
import { paths } from '../../lib/paths.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { wordsOf } from '../../ui/says.tsx'

/** What a page shows when it failed: by status, in words, with the next step. */
export function RouteError() {
  const error = useRouteError()
  const missing = isRouteErrorResponse(error) ? error.status === 404 : error instanceof ApiError && error.status === 404
  if (missing) return <NotFound />
  return (
    <Page title="This page failed">
      <div className="max-w-[620px] px-margin py-3">
        <p role="alert" className="border-l-[3px] border-ink pl-2">
          {wordsOf(error)}
        </p>
        <Button look="outline" className="mt-3" onClick={() => window.location.reload()}>
          Load it again
        </Button>
      </div>
    </Page>
  )
}

export function NotFound() {
  return (
    <Page title="No such page" sentence="Nothing stands at this address.">
      <p className="px-margin py-3">
        It may have been mistyped, or what stood here is not yours to see.{' '}
        <Link className="word" to={paths.home.to()}>
          Back to the start
        </Link>
      </p>
    </Page>
  )
}
