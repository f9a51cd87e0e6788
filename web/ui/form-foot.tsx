import { Button } from './button.tsx'
import { ErrorNote } from './says.tsx'

interface FormFootProps {
  /** What saves the form. */
  act: { error: unknown; isPending: boolean }
  /** The word on the button. */
  does: string
  onLeave: () => void
}

/** The end of a form: why it was refused, what saves it, and the way out. */
export function FormFoot({ act, does, onLeave }: FormFootProps) {
  return (
    <>
      {act.error !== null && <ErrorNote error={act.error} kept="What you typed is kept here." />}
      <div className="mt-2 flex gap-3">
        <Button look="ink" type="submit" disabled={act.isPending}>
          {does}
        </Button>
        <Button look="word" onClick={onLeave}>
          Leave it
        </Button>
      </div>
    </>
  )
}
