import { useEffect, useRef } from 'react'
import { isComb, type LayoutCell } from '../../../../shared/layouts/layout.ts'
import type { Values } from '../../../../shared/schemas/sheet.ts'
import { boxCharacters, typedValue } from '../model/typed-value.ts'

interface TypingProps {
  cell: LayoutCell
  values: Values
  text: string
  onText: (text: string) => void
  onDone: () => void
  onCancel: () => void
  problem: string | null
}

/** Another reading, typed into a comb with the sheet's own heavy ends; digits fill it from the right, as on paper. */
export function Typing({ cell, values, text, onText, onDone, onCancel, problem }: TypingProps) {
  const input = useRef<HTMLInputElement>(null)
  useEffect(() => input.current?.focus(), [])
  return (
    <form
      className="py-1"
      onSubmit={(event) => {
        event.preventDefault()
        onDone()
      }}
    >
      <label htmlFor="typed" className="label block">
        {cell.label}: type {isComb(cell) ? 'its digits' : 'what is written'}
      </label>
      <span className="relative mt-0.5 block focus-within:bg-straw-pale focus-within:outline-3 focus-within:outline-ink focus-within:outline-solid">
        {isComb(cell) && <Comb characters={shownIn(cell, text, values)} format={cell.format} unit={cell.unit} />}
        <input
          ref={input}
          id="typed"
          value={text}
          inputMode={isComb(cell) ? 'decimal' : 'text'}
          autoComplete="off"
          aria-invalid={problem !== null}
          aria-describedby={problem ? 'typed-problem' : undefined}
          onChange={(event) => onText(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'Escape') {
              event.preventDefault()
              event.stopPropagation()
              onCancel()
            }
          }}
          className={
            isComb(cell) ? 'absolute inset-0 h-full w-full opacity-0' : 'figures min-h-[42px] w-full bg-leaf px-1 text-2 text-pen'
          }
        />
      </span>
      {problem && (
        <p id="typed-problem" role="alert" className="mt-0.5 border-l-[3px] border-ink pl-1">
          {problem}
        </p>
      )}
    </form>
  )
}

function shownIn(cell: LayoutCell, text: string, values: Values): string[] {
  if (!isComb(cell)) return []
  const typed = typedValue(cell, text, values)
  const count = cell.format.replaceAll(/[^9]/g, '').length
  const fitted = typed.problem === null && /[.,]/.test(text) ? boxCharacters(cell, typed.value, values) : null
  return fitted ?? [...text.replaceAll(/\D/g, '').slice(-count).padStart(count)].map((c) => c.trim())
}

/** Boxes for one digit each, with a bar at either end and the printed points between. */
function Comb({ characters, format, unit }: { characters: readonly string[]; format: string; unit: string | null }) {
  let box = 0
  const marks = [...format].map((mark, at) => ({ mark, at, box: mark === '9' ? box++ : -1 }))
  return (
    <span aria-hidden="true" className="flex h-[54px] items-stretch border-x-4 border-ink bg-leaf">
      {marks.map(({ mark, at, box }) =>
        box >= 0 ? (
          <span key={at} className="figures flex w-[42px] items-center justify-center border border-line text-4 text-pen">
            {characters[box]}
          </span>
        ) : (
          <span key={at} className="figures flex w-2 items-end justify-center text-3">
            {mark}
          </span>
        ),
      )}
      {unit && <span className="ml-auto flex items-center px-1 text-graphite">{unit}</span>}
    </span>
  )
}
