import { useQuery } from '@tanstack/react-query'
import { useEffect, useId, useRef } from 'react'
import { OPERATIONS } from '../../../../shared/trial/facts.ts'
import { registerQueries } from '../../../lib/register-rows.ts'
import type { BookFilters } from '../book.queries.ts'

interface Choice {
  value: string
  words: string
}

const named = (row: { id: string; name: string }): Choice => ({ value: row.id, words: row.name })

const words = (text: string): Choice => ({ value: text, words: text.replaceAll('_', ' ') })

/** The filters stand in the address: a view can be sent to a colleague as it is. */
export function BookFilterBar({
  filters,
  onChange,
}: {
  filters: BookFilters
  onChange: (name: keyof BookFilters, value: string) => void
}) {
  const tractors = useQuery(registerQueries.rows('tractors'))
  const tools = useQuery(registerQueries.rows('implements'))
  const places = useQuery(registerQueries.rows('places'))
  const set = (name: keyof BookFilters) => (value: string) => onChange(name, value)
  return (
    <section
      aria-label="Filters"
      className="flex flex-wrap items-end gap-x-3 gap-y-1 border-b border-line px-margin py-1.5 max-sm:grid max-sm:grid-cols-2"
    >
      <Find value={filters.find} onFind={set('find')} />
      <Pick label="tractor" value={filters.tractor} choices={tractors.data?.map(named) ?? []} onPick={set('tractor')} />
      <Pick label="implement" value={filters.implement} choices={tools.data?.map(named) ?? []} onPick={set('implement')} />
      <Pick label="operation" value={filters.operation} choices={OPERATIONS.map(words)} onPick={set('operation')} />
      <Pick label="place" value={filters.place} choices={places.data?.map(named) ?? []} onPick={set('place')} />
      <Pick label="soil" value={filters.soil} choices={['fine', 'medium', 'coarse'].map(words)} onPick={set('soil')} />
      <Day label="from" value={filters.from} onPick={set('from')} />
      <Day label="to" value={filters.to} onPick={set('to')} />
    </section>
  )
}

const LOOK = 'w-full min-w-0 min-h-[36px] max-sm:min-h-[44px] border-b-[1.5px] border-ink bg-leaf px-1 text-pen'

/** Looked for when the box is left or Enter is pressed: letter by letter would fill the browser's way back. */
function Find({ value, onFind }: { value: string; onFind: (value: string) => void }) {
  const id = useId()
  const field = useRef<HTMLInputElement>(null)
  // The address may change without the box: by the way back, or as the filters are taken off.
  useEffect(() => {
    if (field.current) field.current.value = value
  }, [value])
  const find = (typed: string) => typed.trim() !== value && onFind(typed.trim())
  return (
    <div className="flex min-w-0 flex-col">
      <label htmlFor={id} className="label">
        record or sheet code
      </label>
      <input
        ref={field}
        id={id}
        type="search"
        maxLength={20}
        autoComplete="off"
        className={`${LOOK} figures`}
        defaultValue={value}
        onBlur={(event) => find(event.currentTarget.value)}
        onKeyDown={(event) => event.key === 'Enter' && find(event.currentTarget.value)}
      />
    </div>
  )
}

function Pick({
  label,
  value,
  choices,
  onPick,
}: {
  label: string
  value: string
  choices: readonly Choice[]
  onPick: (value: string) => void
}) {
  const id = useId()
  return (
    <div className="flex min-w-0 flex-col">
      <label htmlFor={id} className="label">
        {label}
      </label>
      <select id={id} className={LOOK} value={value} onChange={(event) => onPick(event.target.value)}>
        <option value="">all</option>
        {choices.map((c) => (
          <option key={c.value} value={c.value}>
            {c.words}
          </option>
        ))}
      </select>
    </div>
  )
}

function Day({ label, value, onPick }: { label: string; value: string; onPick: (value: string) => void }) {
  const id = useId()
  return (
    <div className="flex min-w-0 flex-col">
      <label htmlFor={id} className="label">
        {label}
      </label>
      <input id={id} type="date" className={`${LOOK} figures`} value={value} onChange={(event) => onPick(event.target.value)} />
    </div>
  )
}
