import type { ReactNode } from 'react'
import { ApiError } from '../lib/api-error.ts'
import { Button } from './button.tsx'

/** What is going on, in words and a count; never a spinner. */
export function Loading({ what }: { what: string }) {
  return (
    <p className="px-margin py-3 text-graphite" role="status">
      {what}
    </p>
  )
}

/** What was saved just now, for eyes and ears. */
export function Saved({ says }: { says: string }) {
  return (
    <p role="status" className="border-b border-line bg-straw-pale px-margin py-1">
      {says}
    </p>
  )
}

/** Nothing is here: why, and what to do next. */
export function EmptyState({ says, next }: { says: string; next?: ReactNode }) {
  return (
    <div className="max-w-[620px] px-margin py-4">
      <p className="text-2 leading-[27px]">{says}</p>
      {next && <div className="mt-2">{next}</div>}
    </div>
  )
}

/** What happened, what was kept, what to do: with a 3 px ink bar at the left. */
export function ErrorState({ error, kept, again }: { error: unknown; kept?: string; again?: () => void }) {
  return (
    <div className="px-margin py-3">
      <ErrorNote error={error} {...(kept ? { kept } : {})} />
      {again && (
        <Button look="word" className="mt-1 ml-2" onClick={again}>
          Try again
        </Button>
      )}
    </div>
  )
}

export function ErrorNote({ error, kept }: { error: unknown; kept?: string }) {
  const issues = error instanceof ApiError ? error.issues : []
  return (
    <div role="alert" className="max-w-[720px] border-l-[3px] border-ink py-0.5 pl-2">
      <p>
        {wordsOf(error)} {kept}
      </p>
      {issues.length > 0 && (
        <ul>
          {issues.map((issue) => (
            <li key={issue.path + issue.message}>{issue.message}</li>
          ))}
        </ul>
      )}
    </div>
  )
}

/** The words of an error for people: those of the server's refusals as they are, of anything else ours. */
export function wordsOf(error: unknown): string {
  if (error instanceof ApiError) {
    const wait = error.code === 'too_many' && error.retryAfter_s ? ` Wait ${error.retryAfter_s} s.` : ''
    return error.message + wait
  }
  return 'This page failed at something it did not expect. What was saved is safe; load the page again.'
}
