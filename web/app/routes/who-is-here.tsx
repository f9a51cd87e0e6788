import { useState } from 'react'
import type { User } from '../../../shared/schemas/user.ts'
import { useSignOut } from '../../features/session/session.queries.ts'
import { currentLight, keepLight } from '../../lib/light.ts'
import { Button } from '../../ui/button.tsx'

/** Name and role, the look for sun or office, and the way out. */
export function WhoIsHere({ user }: { user: User }) {
  const [light, setLight] = useState(currentLight)
  const signOut = useSignOut()
  const other = light === 'sun' ? 'office' : 'sun'
  const change = () => {
    keepLight(other)
    setLight(other)
  }
  return (
    <>
      <span>
        {user.name}, {user.role}
      </span>
      <Button look="word" onClick={change}>
        {other} look
      </Button>
      <Button look="word" onClick={() => signOut.mutate()} disabled={signOut.isPending}>
        Sign out
      </Button>
    </>
  )
}
