import { Navigate } from 'react-router-dom'
import { useMe } from '../../lib/me.ts'
import { HOME } from '../nav.ts'

/** Each role starts where its work is. */
export function Home() {
  return <Navigate replace to={HOME[useMe().role]} />
}
