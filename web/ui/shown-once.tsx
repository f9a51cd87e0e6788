import { useEffect, useRef } from 'react'
import { Button } from './button.tsx'

interface ShownOnceProps {
  /** What it is: "The token “nightly copy”". */
  what: string
  secret: string
  onDone: () => void
}

/** A secret that nobody can look up later: it stands here until the person says that they have it. */
export function ShownOnce({ what, secret, onDone }: ShownOnceProps) {
  const place = useRef<HTMLElement>(null)
  useEffect(() => place.current?.focus(), [])
  return (
    <section ref={place} tabIndex={-1} aria-label={what} className="border-y-[1.5px] border-ink bg-straw-pale px-margin py-2">
      <p>
        <strong>{what}</strong> is shown now and never again. Copy it to where it is used.
      </p>
      <p className="figures my-1 bg-leaf px-2 py-1 break-all select-all">{secret}</p>
      <Button look="word" onClick={onDone}>
        I have it: take it off the screen
      </Button>
    </section>
  )
}
