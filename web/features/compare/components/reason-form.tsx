import { useEffect, useId, useRef, useState } from 'react'
import { Button } from '../../../ui/button.tsx'
import { ErrorNote } from '../../../ui/says.tsx'

interface ReasonFormProps {
  label: string
  act: string
  pending: boolean
  error: unknown
  onReason: (reason: string) => void
  onClose: () => void
}

/** A reason, and what it is for. Escape leaves things as they are. */
export function ReasonForm({ label, act, pending, error, onReason, onClose }: ReasonFormProps) {
  const id = useId()
  const field = useRef<HTMLInputElement>(null)
  const [reason, setReason] = useState('')
  useEffect(() => field.current?.focus(), [])
  const short = reason.trim().length < 3
  return (
    <form
      className="py-1"
      onSubmit={(event) => {
        event.preventDefault()
        if (!short) onReason(reason.trim())
      }}
      onKeyDown={(event) => event.key === 'Escape' && onClose()}
    >
      <label htmlFor={id} className="label block">
        {label}; it stands in the log with your name
      </label>
      <input
        ref={field}
        id={id}
        className="figures w-full min-w-[200px] border-b-[1.5px] border-ink bg-leaf px-1 text-pen max-sm:min-h-[44px]"
        value={reason}
        maxLength={500}
        onChange={(event) => setReason(event.target.value)}
      />
      {error != null && <ErrorNote error={error} />}
      <span className="flex gap-x-3 pt-0.5">
        <Button look="word" type="submit" disabled={pending || short}>
          {act}
        </Button>
        <Button look="word" onClick={onClose}>
          Leave it as it is
        </Button>
      </span>
    </form>
  )
}
