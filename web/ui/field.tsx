import { type InputHTMLAttributes, type ReactNode, type SelectHTMLAttributes, useId } from 'react'

interface FieldFrame {
  label: string
  /** Unit or hint, in graphite, at the right of the cell. */
  unit?: string
  hint?: string
  error?: string | undefined
}

interface Tied {
  id: string
  'aria-invalid': boolean
  'aria-describedby': string | undefined
}

/** A ruled cell of a form: label in the left column, the cell at the right, the error under it. */
export function FieldRow({ label, unit, hint, error, children }: FieldFrame & { children: (tied: Tied) => ReactNode }) {
  const id = useId()
  const says = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ')
  return (
    <div className="border-b border-line">
      <div className="grid grid-cols-[minmax(110px,3fr)_7fr] items-stretch max-sm:grid-cols-1">
        <label htmlFor={id} className="flex items-center py-1 pr-2 font-[600] max-sm:pb-0">
          {label}
        </label>
        <div className="flex items-stretch border-l border-line bg-leaf max-sm:mb-1 max-sm:border-2 max-sm:border-ink">
          {children({ id, 'aria-invalid': error !== undefined, 'aria-describedby': says === '' ? undefined : says })}
          {unit && <span className="flex items-center px-1 text-graphite">{unit}</span>}
        </div>
      </div>
      {hint && (
        <p id={`${id}-hint`} className="label py-0.5">
          {hint}
        </p>
      )}
      {error && (
        <p id={`${id}-error`} role="alert" className="my-0.5 border-l-[3px] border-ink pl-1 font-[600]">
          {error}
        </p>
      )}
    </div>
  )
}

/** What a person types is pen blue Mono. */
const TYPED = 'figures w-full min-w-0 grow bg-transparent px-2 min-h-[48px] text-2 text-pen'

type FieldProps = FieldFrame & InputHTMLAttributes<HTMLInputElement>

/** A field to type in; spread react-hook-form's `register(...)` on it. */
export function Field({ label, unit, hint, error, className = '', ...input }: FieldProps) {
  return (
    <FieldRow label={label} {...(unit ? { unit } : {})} {...(hint ? { hint } : {})} error={error}>
      {(tied) => <input {...tied} {...input} className={`${TYPED} ${className}`} />}
    </FieldRow>
  )
}

export interface FieldOption {
  value: string
  words: string
}

/** One of several: the browser's own list, in the same ruled cell. */
export function FieldChoice({
  label,
  unit,
  hint,
  error,
  options,
  none,
  ...select
}: FieldFrame & { options: readonly FieldOption[]; none?: string } & SelectHTMLAttributes<HTMLSelectElement>) {
  return (
    <FieldRow label={label} {...(unit ? { unit } : {})} {...(hint ? { hint } : {})} error={error}>
      {(tied) => (
        <select {...tied} {...select} className={TYPED}>
          {none !== undefined && <option value="">{none}</option>}
          {options.map(({ value, words }) => (
            <option key={value} value={value}>
              {words}
            </option>
          ))}
        </select>
      )}
    </FieldRow>
  )
}
