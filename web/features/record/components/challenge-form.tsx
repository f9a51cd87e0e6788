import { useState } from 'react'
import { Button } from '../../../ui/button.tsx'
import { Field } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'

interface ChallengeFormProps {
  pending: boolean
  error: unknown
  onChallenge: (reason: string) => void
}

/** Opens the sheet at the desk again, with the reason. The record stays in the book, marked. */
export function ChallengeForm({ pending, error, onChallenge }: ChallengeFormProps) {
  const [reason, setReason] = useState('')
  const [asked, setAsked] = useState(false)
  const short = reason.trim().length < 3
  return (
    <details className="px-margin py-2">
      <summary className="word">Challenge this record</summary>
      <form
        className="mt-1 max-w-[640px]"
        onSubmit={(event) => {
          event.preventDefault()
          setAsked(true)
          if (!short) onChallenge(reason.trim())
        }}
      >
        <p className="pb-1">
          Its sheet goes back to the desk with your reason. The record stays in the book, marked as challenged.
        </p>
        <div className="border-t-2 border-ink">
          <Field
            label="What cannot be so"
            value={reason}
            onChange={(event) => setReason(event.target.value)}
            error={asked && short ? 'Say what cannot be so: the clerk sees only this.' : undefined}
          />
        </div>
        {error !== null && error !== undefined && <ErrorNote error={error} />}
        <Button type="submit" className="mt-2" disabled={pending}>
          Challenge
        </Button>
      </form>
    </details>
  )
}
