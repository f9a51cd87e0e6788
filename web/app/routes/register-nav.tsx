import { NavLink } from 'react-router-dom'
import { REGISTER_NAMES } from '../../../shared/schemas/register.ts'
import { REGISTER_WORDS } from '../../features/registers/register-fields.ts'
import { paths } from '../../lib/paths.ts'

const LINKS = [
  ...REGISTER_NAMES.map((name) => ({ to: paths.register.to(name), words: REGISTER_WORDS[name].title })),
  { to: paths.landUnits.to(), words: 'Land units' },
]

/** From one register to another. */
export const RegisterNav = () => (
  <nav aria-label="Registers" className="flex flex-wrap gap-x-3">
    {LINKS.map(({ to, words }) => (
      <NavLink key={to} to={to} className={({ isActive }) => (isActive ? 'font-[700] text-ink no-underline' : 'word')}>
        {words}
      </NavLink>
    ))}
  </nav>
)
