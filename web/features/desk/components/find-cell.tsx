import { useEffect, useRef, useState } from 'react'
import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import type { Desk } from '../use-desk.ts'

const MOST = 8

/** Any cell of the sheet by its words; Enter takes the first that is left. */
export function FindCell({ desk, onFound, onCancel }: { desk: Desk; onFound: () => void; onCancel: () => void }) {
  const [words, setWords] = useState('')
  const field = useRef<HTMLInputElement>(null)
  useEffect(() => field.current?.focus(), [])
  const wanted = words.toLowerCase().split(/\s+/).filter(Boolean)
  const found = desk.layout.cells
    .filter((cell) => desk.view.readings.has(cell.key))
    .filter((cell) => wanted.every((word) => `${cell.label} ${cell.key}`.toLowerCase().includes(word)))
    .slice(0, MOST)
  const take = (key: string | undefined) => {
    if (!key) return
    desk.takeCell(key)
    onFound()
  }
  return (
    <form
      className="py-1"
      onSubmit={(event) => {
        event.preventDefault()
        take(found[0]?.key)
      }}
    >
      <label htmlFor="find-cell" className="font-[650]">
        Which cell?
      </label>
      <input
        ref={field}
        id="find-cell"
        value={words}
        autoComplete="off"
        onChange={(event) => setWords(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Escape') onCancel()
        }}
        className="figures mt-0.5 min-h-[36px] w-full border border-line bg-leaf px-1 text-pen"
      />
      <ul>
        {found.map((cell) => (
          <li key={cell.key} className="border-b border-feint">
            <button type="button" className="flex min-h-[30px] w-full gap-2 text-left" onClick={() => take(cell.key)}>
              <span className="grow">{cell.label}</span>
              <span className="figures">{formatValue(cell, desk.view.readings.get(cell.key)?.value ?? null)}</span>
            </button>
          </li>
        ))}
      </ul>
      {found.length === 0 && <p>No cell is called that.</p>}
    </form>
  )
}
