import { useState } from 'react'
import type { User } from '../../../../shared/schemas/user.ts'
import { Button } from '../../../ui/button.tsx'

interface SignInSwitchProps {
  person: User
  onActive: (active: boolean) => void
}

/** Disabling asks once: it ends what the person is doing at that moment. Enabling takes nothing from anybody. */
export function SignInSwitch({ person: { name, active }, onActive }: SignInSwitchProps) {
  /** null until it was asked a first time: who leaves it finds the focus where it was. */
  const [asked, setAsked] = useState<boolean | null>(null)
  if (!active) {
    return (
      <Button look="word" aria-label={`Enable ${name}`} onClick={() => onActive(true)}>
        enable
      </Button>
    )
  }
  if (!asked) {
    return (
      <Button look="word" autoFocus={asked === false} aria-label={`Disable ${name}`} onClick={() => setAsked(true)}>
        disable
      </Button>
    )
  }
  return (
    <fieldset className="flex flex-wrap gap-x-2" onKeyDown={(event) => event.key === 'Escape' && setAsked(false)}>
      <legend>{name} is signed out at once and can no longer sign in.</legend>
      <Button look="word" autoFocus aria-label={`Leave ${name} as they are`} onClick={() => setAsked(false)}>
        leave it
      </Button>
      <Button
        look="word"
        aria-label={`Disable ${name} now`}
        onClick={() => {
          setAsked(false)
          onActive(false)
        }}
      >
        disable now
      </Button>
    </fieldset>
  )
}
