import { useQuery } from '@tanstack/react-query'
import { useNavigate, useParams } from 'react-router-dom'
import { Cover } from '../../features/session/components/cover.tsx'
import { SetPasswordForm } from '../../features/session/components/set-password-form.tsx'
import { type OneTimeLink, sessionQueries } from '../../features/session/session.queries.ts'
import { paths } from '../../lib/paths.ts'
import { ButtonLink } from '../../ui/button.tsx'
import { ErrorNote } from '../../ui/says.tsx'

const SAYS: Record<OneTimeLink['kind'], string> = {
  invitation: 'You are invited. Set a password, and the book opens.',
  reset: 'Set a new password. The old one stops working.',
  'first admin': 'The book is empty. Whoever uses this link becomes its first admin.',
}

export function Component() {
  const { token = '' } = useParams()
  const link = useQuery(sessionQueries.link(token))
  const navigate = useNavigate()
  if (link.error) {
    return (
      <Cover title="This link is used up" says="A link works once, and not for long.">
        <ErrorNote error={link.error} />
        <ButtonLink look="outline" className="mt-3" to={paths.forgotten.to()}>
          Have a new link sent
        </ButtonLink>
      </Cover>
    )
  }
  if (!link.data) return <Cover title="Sheafbook" says="Looking at the link" />
  return (
    <Cover title={link.data.name ?? 'The first admin'} says={SAYS[link.data.kind]}>
      <SetPasswordForm token={token} link={link.data} onDone={() => navigate(paths.home.to(), { replace: true })} />
    </Cover>
  )
}
