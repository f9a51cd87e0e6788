import { createContext, useContext } from 'react'
import type { User } from '../../shared/schemas/user.ts'

/** Who is signed in; given by the shell, so that a feature need not know the session. */
export const MeContext = createContext<User | null>(null)

/** @throws Error outside the shell: only pages behind the sign-in may ask. */
export function useMe(): User {
  const me = useContext(MeContext)
  if (!me) throw new Error('useMe was called outside the signed-in shell')
  return me
}
