import { useQuery } from '@tanstack/react-query'
import { useSearchParams } from 'react-router-dom'
import { type BookFilters, bookQueries, FILTERS, filtersOf } from '../../features/book/book.queries.ts'
import { BookFilterBar } from '../../features/book/components/book-filters.tsx'
import { BookTable } from '../../features/book/components/book-table.tsx'
import { Downloads } from '../../features/book/components/downloads.tsx'
import { useMe } from '../../lib/me.ts'
import { counted } from '../../lib/words.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading } from '../../ui/says.tsx'

export function Component() {
  const me = useMe()
  const [search, setSearch] = useSearchParams()
  const filters = filtersOf(search)
  const after = search.get('after') ?? ''
  const book = useQuery(bookQueries.list(filters, after))
  const filtered = FILTERS.some((name) => filters[name] !== '')
  const change = (name: keyof BookFilters, value: string) =>
    setSearch((before) => {
      const next = new URLSearchParams(before)
      next.delete('after')
      if (value === '') next.delete(name)
      else next.set(name, value)
      return next
    })
  const total = book.data?.total ?? 0
  const said = book.data
    ? `${counted(total, 'run', 'runs')} ${filtered ? 'in this view of' : total === 1 ? 'stands in' : 'stand in'} the trial book, the last entered first.`
    : 'The trial book.'
  return (
    <Page title="Trial book" sentence={said} aside={me.role !== 'demonstrator' && <Downloads filters={filters} />}>
      <BookFilterBar filters={filters} onChange={change} />
      {book.error && <ErrorState error={book.error} again={() => book.refetch()} />}
      {book.isPending && <Loading what="Opening the trial book" />}
      {book.data && book.data.records.length === 0 && (
        <EmptyState
          says={
            filtered
              ? 'No run fits these filters.'
              : 'The book is empty. Sheets come in once they are settled at the desk and entered.'
          }
          next={
            filtered && (
              <Button look="word" onClick={() => setSearch({})}>
                Take the filters off
              </Button>
            )
          }
        />
      )}
      {book.data && book.data.records.length > 0 && <BookTable records={book.data.records} />}
      {book.data?.next && (
        <p className="px-margin py-2">
          <Button look="word" onClick={() => setSearch((s) => new URLSearchParams([...s, ['after', String(book.data?.next)]]))}>
            Runs entered before these
          </Button>
        </p>
      )}
    </Page>
  )
}
