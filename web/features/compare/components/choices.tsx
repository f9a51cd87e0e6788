import { useId } from 'react'
import {
  type BookComparison,
  COMPARED_FIGURES,
  COMPARED_THINGS,
  COMPARISON_FILTERS,
  type ComparisonFilter,
} from '../../../../shared/schemas/book-comparison.ts'
import { RESULTS } from '../../../../shared/trial/result.ts'
import { Button } from '../../../ui/button.tsx'
import type { Choices } from '../compare.queries.ts'

interface ChoicesBarProps {
  choices: Choices
  offered: BookComparison['choices']
  unit: string
  onChange: (change: Partial<Choices>) => void
}

const CELL = 'min-h-[36px] max-sm:min-h-[44px] border-b-[1.5px] border-ink bg-leaf px-1 text-pen'

/** What is compared, by what, and which runs; all of it stands in the address. */
export function ChoicesBar({ choices, offered, unit, onChange }: ChoicesBarProps) {
  const { figure, of, gap, filters } = choices
  const filtered = COMPARISON_FILTERS.some((name) => filters[name].length > 0)
  return (
    <section aria-label="Choices" className="border-b border-line px-margin py-1.5">
      <div className="flex flex-wrap items-end gap-x-3 gap-y-1">
        <Choice
          label="figure"
          value={figure}
          options={COMPARED_FIGURES.map((key) => [key, `${RESULTS[key].label}, ${RESULTS[key].unit}`])}
          onPick={(value) => onChange({ figure: value as Choices['figure'], gap: '' })}
        />
        <Choice
          label="compared by"
          value={of}
          options={COMPARED_THINGS.map((thing) => [thing, thing])}
          onPick={(value) => onChange({ of: value as Choices['of'] })}
        />
        <Gap key={gap} unit={unit} gap={gap} onGap={(value) => onChange({ gap: value })} />
        {filtered && (
          <Button
            look="word"
            className="pb-1"
            onClick={() =>
              onChange({ filters: Object.fromEntries(COMPARISON_FILTERS.map((n) => [n, []])) as unknown as Choices['filters'] })
            }
          >
            Take the filters off
          </Button>
        )}
      </div>
      <div className="flex flex-wrap gap-x-3 gap-y-0.5 pt-1 max-sm:grid max-sm:grid-cols-2">
        {COMPARISON_FILTERS.map((name) => (
          <Filter
            key={name}
            name={name}
            offered={offered[name]}
            kept={filters[name]}
            onKeep={(kept) => onChange({ filters: { ...filters, [name]: kept } })}
          />
        ))}
      </div>
    </section>
  )
}

function Choice({
  label,
  value,
  options,
  onPick,
}: {
  label: string
  value: string
  options: ReadonlyArray<readonly [string, string]>
  onPick: (value: string) => void
}) {
  const id = useId()
  return (
    <div className="flex min-w-0 flex-col max-sm:w-full">
      <label htmlFor={id} className="label">
        {label}
      </label>
      <select id={id} className={CELL} value={value} onChange={(event) => onPick(event.target.value)}>
        {options.map(([key, words]) => (
          <option key={key} value={key}>
            {words}
          </option>
        ))}
      </select>
    </div>
  )
}

function Gap({ unit, gap, onGap }: { unit: string; gap: string; onGap: (gap: string) => void }) {
  const id = useId()
  return (
    <div className="flex flex-col max-sm:w-full">
      <label htmlFor={id} className="label">
        gap worth seeing, {unit}
      </label>
      <input
        id={id}
        inputMode="decimal"
        className={`${CELL} figures w-[160px] placeholder:text-graphite placeholder:opacity-100 max-sm:w-full`}
        defaultValue={gap}
        placeholder="the ± of a run"
        onBlur={(event) => event.target.value !== gap && onGap(event.target.value)}
        onKeyDown={(event) => event.key === 'Enter' && event.currentTarget.blur()}
      />
    </div>
  )
}

interface FilterProps {
  name: ComparisonFilter
  offered: BookComparison['choices'][ComparisonFilter]
  kept: readonly string[]
  onKeep: (kept: string[]) => void
}

/** One filter: closed it says what it keeps, open it lists everything in the book. */
function Filter({ name, offered = [], kept, onKeep }: FilterProps) {
  const words = offered.filter((c) => kept.includes(c.value)).map((c) => c.words)
  return (
    <details className="min-w-0 max-sm:open:col-span-2">
      <summary className="py-0.5 max-sm:min-h-[44px]">
        <span className="label">{name}</span>{' '}
        <span className={kept.length > 0 ? 'text-pen' : ''}>{words.join(', ') || 'all'}</span>
      </summary>
      <fieldset className="border-l border-line py-0.5 pl-2">
        <legend className="away">{name}</legend>
        {offered.length === 0 && <p className="label">no run names one</p>}
        {offered.map(({ value, words: name, runs }) => (
          <label key={value} className="flex min-h-[26px] cursor-pointer items-center gap-1 max-sm:min-h-[44px]">
            <input
              type="checkbox"
              checked={kept.includes(value)}
              onChange={() => onKeep(kept.includes(value) ? kept.filter((v) => v !== value) : [...kept, value])}
            />
            {name} <span className="label">{runs === 1 ? '1 run' : `${runs} runs`}</span>
          </label>
        ))}
      </fieldset>
    </details>
  )
}
