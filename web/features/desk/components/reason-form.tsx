import { useEffect, useRef, useState } from 'react'
import { Button } from '../../../ui/button.tsx'

interface ReasonFormProps {
  /** What is asked: "Why may this stand?" */
  asks: string
  hint?: string
  starts?: string
  does: string
  /** Least number of characters; 0: may stay empty. */
  least: number
  onReason: (reason: string) => void
  onCancel: () => void
}

/** One line of reason. Enter does it, Escape leaves everything as it was. */
export function ReasonForm({ asks, hint, starts = '', does, least, onReason, onCancel }: ReasonFormProps) {
  const [reason, setReason] = useState(starts)
  const [short, setShort] = useState(false)
  const field = useRef<HTMLTextAreaElement>(null)
  useEffect(() => {
    field.current?.focus()
    field.current?.select()
  }, [])
  const done = () => {
    // A digit pressed for a cell or an offer that has meanwhile gone is no reason.
    const words = reason.trim()
    if (words.length < least || (words !== '' && !/\p{L}/u.test(words))) setShort(true)
    else onReason(words)
  }
  return (
    <form
      className="border-y-[1.5px] border-ink py-2"
      onSubmit={(event) => {
        event.preventDefault()
        done()
      }}
    >
      <label htmlFor="reason" className="font-[650]">
        {asks}
      </label>
      {hint && <p className="label">{hint}</p>}
      <textarea
        ref={field}
        id="reason"
        rows={3}
        maxLength={500}
        value={reason}
        aria-invalid={short}
        aria-describedby={short ? 'reason-short' : undefined}
        onChange={(event) => setReason(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Enter' && !event.shiftKey) {
            event.preventDefault()
            done()
          }
          if (event.key === 'Escape') {
            event.preventDefault()
            onCancel()
          }
        }}
        className="figures mt-0.5 w-full border border-line bg-leaf px-1 py-0.5 text-pen"
      />
      {short && (
        <p id="reason-short" role="alert" className="mb-1 border-l-[3px] border-ink pl-1">
          A few words are needed: whoever reads this later was not here.
        </p>
      )}
      <div className="flex items-center gap-3">
        <Button type="submit" look="outline" className="min-h-[36px]">
          {does}
        </Button>
        <Button look="word" onClick={onCancel}>
          Leave it as it was
        </Button>
      </div>
    </form>
  )
}
