import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import type { Role } from '../../../shared/schemas/user.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { Page } from '../../ui/page.tsx'

export const AT_THE_DESK: readonly Role[] = ['clerk', 'admin']
export const DESK_SHUT = 'The desk is open to clerks.'
export const ADMIN: readonly Role[] = ['admin']

interface OnlyForProps {
  roles: readonly Role[]
  title: string
  /** For whom the page is, said to anybody else. */
  says: string
  children: ReactNode
}

/** The page for those whose work it is; anybody else is told so, and nothing is asked of the server. */
export function OnlyFor({ roles, title, says, children }: OnlyForProps) {
  if (roles.includes(useMe().role)) return children
  return (
    <Page title={title} sentence={says}>
      <p className="px-margin py-3">
        <Link className="word" to={paths.home.to()}>
          To your own pages
        </Link>
      </p>
    </Page>
  )
}
