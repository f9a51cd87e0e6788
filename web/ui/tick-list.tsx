import { type InputHTMLAttributes, useId } from 'react'

interface TickListProps {
  legend: string
  ticks: ReadonlyArray<{ value: string; words: string }>
  error?: string | undefined
  /** What react-hook-form's `register(...)` gives: all ticks are one field, a list of values. */
  field: InputHTMLAttributes<HTMLInputElement>
}

/** Several of a few, as tick boxes. */
export function TickList({ legend, ticks, error, field }: TickListProps) {
  const id = useId()
  return (
    <fieldset className="border-b border-line py-1" aria-describedby={error ? `${id}-error` : undefined}>
      <legend className="float-left w-full font-[600]">{legend}</legend>
      <div className="clear-both flex flex-col">
        {ticks.map(({ value, words }) => (
          <label key={value} className="flex min-h-[30px] items-center gap-1 max-sm:min-h-[44px]">
            <input type="checkbox" className="size-[20px] shrink-0" value={value} {...field} />
            {words}
          </label>
        ))}
      </div>
      {error && (
        <p id={`${id}-error`} role="alert" className="my-0.5 border-l-[3px] border-ink pl-1 font-[600]">
          {error}
        </p>
      )}
    </fieldset>
  )
}
