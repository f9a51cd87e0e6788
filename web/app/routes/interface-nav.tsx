import { NavLink } from 'react-router-dom'
import type { Role } from '../../../shared/schemas/user.ts'
import { paths } from '../../lib/paths.ts'

export const FOR_PROGRAMS: readonly Role[] = ['analyst', 'admin']
export const PROGRAMS_SHUT = 'The interface for programs is open to analysts.'

const PAGES = [
  { to: paths.interface.to(), words: 'Guide' },
  { to: paths.tokens.to(), words: 'Tokens' },
  { to: paths.webhooks.to(), words: 'Webhooks' },
]

/** What belongs together for whoever connects a program. */
export const InterfaceNav = () => (
  <nav aria-label="Interface" className="flex flex-wrap gap-x-3">
    {PAGES.map(({ to, words }) => (
      <NavLink key={to} end to={to} className={({ isActive }) => (isActive ? 'font-[700] text-ink no-underline' : 'word')}>
        {words}
      </NavLink>
    ))}
  </nav>
)
