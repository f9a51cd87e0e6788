import type { ReactNode } from 'react'
import { Link, NavLink } from 'react-router-dom'
import { Mark } from './mark.tsx'

export interface FolioLink {
  to: string
  words: string
}

interface FolioProps {
  home: string
  links: readonly FolioLink[]
  /** Right side: what is not yet sent, who is signed in. */
  children?: ReactNode
}

/** The head of every page: words only, the section marked by a bar on top. */
export function Folio({ home, links, children }: FolioProps) {
  return (
    <header className="flex min-h-[42px] flex-wrap items-stretch gap-x-3 border-b-[1px] border-line px-margin print:hidden">
      <a
        href="#work"
        className="away focus-visible:static focus-visible:h-auto focus-visible:w-auto focus-visible:[clip-path:none]"
      >
        To the work
      </a>
      <Link to={home} className="flex items-center gap-1 pr-2 font-[760] no-underline">
        <Mark size={20} />
        <span className="max-sm:away">Sheafbook</span>
      </Link>
      <nav aria-label="Sections" className="order-2 flex max-sm:order-3 max-sm:basis-full">
        <ul className="flex flex-wrap max-sm:-mx-1">
          {links.map(({ to, words }) => (
            <li key={to} className="flex">
              <NavLink
                to={to}
                className={({ isActive }) =>
                  `flex min-h-[42px] items-center border-t-[4px] px-1.5 no-underline max-sm:px-1 ${isActive ? 'border-ink font-[700]' : 'border-transparent'}`
                }
              >
                {words}
              </NavLink>
            </li>
          ))}
        </ul>
      </nav>
      <div className="order-2 ml-auto flex flex-wrap items-center gap-x-3 text-[14px]">{children}</div>
    </header>
  )
}
