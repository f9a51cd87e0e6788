import { type ReactNode, useId } from 'react'

interface Tied {
  id: string
  className: string
  'aria-invalid': boolean
  'aria-describedby': string | undefined
}

interface FormCellProps {
  label: string
  error?: string | undefined
  note?: string | null
  className?: string
  children: (tied: Tied) => ReactNode
}

/** What a person types or chooses is pen blue. */
const TYPED = 'figures min-h-[44px] w-full min-w-0 border-b-[1.5px] border-ink bg-leaf max-sm:border-2 px-1 text-pen'

/** A cell of a ruled row: its label above it as on a printed form, error and note below. */
export function FormCell({ label, error, note, className = '', children }: FormCellProps) {
  const id = useId()
  const says = [error ? `${id}-error` : '', note ? `${id}-note` : ''].filter(Boolean).join(' ')
  return (
    <div className={`min-w-0 ${className}`}>
      <label htmlFor={id} className="label block">
        {label}
      </label>
      {children({
        id,
        className: TYPED,
        'aria-invalid': error !== undefined,
        'aria-describedby': says === '' ? undefined : says,
      })}
      {error && (
        <p id={`${id}-error`} role="alert" className="my-0.5 border-l-[3px] border-ink pl-1 font-[600]">
          {error}
        </p>
      )}
      {note && (
        <p id={`${id}-note`} className="label py-0.5">
          {note}
        </p>
      )}
    </div>
  )
}
