import { useQuery } from '@tanstack/react-query'
import { Navigate, useNavigate, useSearchParams } from 'react-router-dom'
import { Cover } from '../../features/session/components/cover.tsx'
import { SignInForm } from '../../features/session/components/sign-in-form.tsx'
import { sessionQueries } from '../../features/session/session.queries.ts'
import { safeReturn } from '../../lib/paths.ts'

export function Component() {
  const session = useQuery(sessionQueries.me())
  const navigate = useNavigate()
  const back = safeReturn(useSearchParams()[0].get('back'))
  if (session.data) return <Navigate replace to={back} />
  return (
    <Cover title="Sheafbook" says="Fuel trials, from the ink to a figure that stands.">
      <SignInForm onDone={() => navigate(back, { replace: true })} />
    </Cover>
  )
}
