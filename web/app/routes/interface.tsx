import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { TOKEN_LIMITS } from '../../../shared/schemas/token.ts'
import { RouteEntry } from '../../features/interface/components/route-entry.tsx'
import { interfaceQueries } from '../../features/interface/interface.queries.ts'
import { type ApiDocument, nounsOf } from '../../features/interface/interface-model.ts'
import { counted } from '../../lib/words.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { ErrorState, Loading } from '../../ui/says.tsx'
import { FOR_PROGRAMS, InterfaceNav, PROGRAMS_SHUT } from './interface-nav.tsx'
import { OnlyFor } from './only-for.tsx'

export const Component = () => (
  <OnlyFor roles={FOR_PROGRAMS} title="Interface" says={PROGRAMS_SHUT}>
    <InterfacePage />
  </OnlyFor>
)

function InterfacePage() {
  const [all, setAll] = useState(false)
  const document = useQuery(interfaceQueries.document())
  return (
    <Page
      title="Interface"
      over={<InterfaceNav />}
      sentence="What a program may ask of the book, and how."
      aside={
        <>
          <Button look="word" aria-pressed={all} onClick={() => setAll(!all)}>
            {all ? 'Only what takes a token' : 'All routes, also those of the screens'}
          </Button>
          <a className="word" href="/api/openapi.json" download="openapi.json">
            the same as OpenAPI 3.1
          </a>
        </>
      }
    >
      {document.error && <ErrorState error={document.error} again={() => document.refetch()} />}
      {document.isPending && <Loading what="Opening the description of the interface" />}
      {document.data && <Guide document={document.data} all={all} />}
    </Page>
  )
}

function Guide({ document, all }: { document: ApiDocument; all: boolean }) {
  const nouns = nounsOf(document, all)
  return (
    <div className="px-margin py-2">
      <div className="max-w-[720px]">
        <p>{document.info.description}</p>
        <p className="mt-1">
          A token may be used {TOKEN_LIMITS.calls_per_min} times a minute. A refusal answers with its reason:{' '}
          {'{ error: { code, message, issues?, requestId } }'}. To keep a copy of the book, ask for the changes after the last
          position seen, again and again; nothing comes late.
        </p>
      </div>
      {nouns.map(({ noun, entries }) => (
        <section key={noun} className="mt-3">
          <h2 className="border-b-[1.5px] border-ink text-3">
            {noun} <span className="label font-normal">{counted(entries.length, 'route')}</span>
          </h2>
          <ul>
            {entries.map((entry) => (
              <RouteEntry key={entry.method + entry.path} entry={entry} />
            ))}
          </ul>
        </section>
      ))}
    </div>
  )
}
