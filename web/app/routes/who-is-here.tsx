import { useState } from 'react'
import type { User } from '../../../shared/schemas/user.ts'
import { useSignOut } from '../../features/session/session.queries.ts'
import { currentLight, keepLight } from '../../lib/light.ts'
import { Button } from '../../ui/button.tsx'

/** Name and role, the look for sun or office, and the way out. On a phone they open under the name. */
export function WhoIsHere({ user }: { user: User }) {
  const [open, setOpen] = useState(false)
  const [light, setLight] = useState(currentLight)
  const signOut = useSignOut()
  const other = light === 'sun' ? 'office' : 'sun'
  const change = () => {
    keepLight(other)
    setLight(other)
  }
  return (
    <>
      <span className="max-sm:hidden">
        {user.name}, {user.role}
      </span>
      <button type="button" aria-expanded={open} className="word min-h-[42px] px-1 sm:hidden" onClick={() => setOpen(!open)}>
        {user.name}
      </button>
      <span
        className={`flex flex-wrap items-center gap-x-3 max-sm:basis-full max-sm:justify-end max-sm:pb-1 ${open ? '' : 'max-sm:hidden'}`}
      >
        <Button look="word" className="max-sm:min-h-[42px]" onClick={change}>
          {other} look
        </Button>
        <Button look="word" className="max-sm:min-h-[42px]" onClick={() => signOut.mutate()} disabled={signOut.isPending}>
          Sign out
        </Button>
      </span>
    </>
  )
}
