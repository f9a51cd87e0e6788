import type { ReactNode } from 'react'

export interface FootKey {
  /** As printed on keyboards: "Enter", "Shift Enter", "↑ ↓". */
  keys: string
  does: string
  /** Pressing the words does what the key does: nothing is for the keyboard, or the mouse, alone. */
  press?: () => void
  off?: boolean
}

/** A key as a flat ink frame. */
export function KeyCap({ children }: { children: ReactNode }) {
  return (
    <kbd className="figures inline-block border-[1.5px] border-ink bg-leaf px-1 text-1 leading-[18px] whitespace-nowrap">
      {children}
    </kbd>
  )
}

/** The strip at the bottom: which keys work here, and a note. */
export function Foot({ keys = [], note }: { keys?: FootKey[]; note?: ReactNode }) {
  if (keys.length === 0 && !note) return null
  return (
    <footer className="sticky bottom-0 z-20 flex flex-wrap items-center gap-x-3 border-t-[3px] border-ink bg-board px-margin py-1 text-[14px] print:hidden max-sm:static">
      <ul className="flex flex-wrap items-center gap-x-2 gap-y-0.5" aria-label="Keys of this page">
        {keys.map((key) => (
          <li key={key.keys + key.does}>{key.press ? <PressedKey {...key} /> : <KeyWords {...key} />}</li>
        ))}
      </ul>
      {note && <div className="ml-auto">{note}</div>}
    </footer>
  )
}

function KeyWords({ keys, does }: FootKey) {
  return (
    <span className="inline-flex min-h-[26px] items-center gap-1">
      <KeyCap>{keys}</KeyCap>
      <span>{does}</span>
    </span>
  )
}

function PressedKey(key: FootKey) {
  return (
    <button type="button" className="min-h-[26px] disabled:opacity-60" onClick={key.press} disabled={key.off ?? false}>
      <KeyWords {...key} />
    </button>
  )
}
