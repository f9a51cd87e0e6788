import type { ReactNode } from 'react'

/** Four things that decide whether a photo can be read; drawn, with their words. */
const ADVICE: ReadonlyArray<{ words: string; drawn: ReactNode }> = [
  {
    words: 'all four corners in',
    drawn: <path d="M6 6H14M6 6V14M34 6H26M34 6V14M6 34H14M6 34V26M34 34H26M34 34V26M12 12H28V28H12Z" />,
  },
  { words: 'sharp, held still', drawn: <path d="M11 5H29V35H11ZM15 12H25M15 18H25M15 24H25" /> },
  { words: 'no glare', drawn: <path d="M11 5H29V35H11ZM14 26 26 14M20 15a5 5 0 1 0 .1 0" /> },
  { words: 'no shadow of yours', drawn: <path d="M11 5H29V35H11ZM11 22H29M15 26V31M20 26V31M25 26V31" /> },
]

export function BeforeYouShoot() {
  return (
    <ul
      aria-label="Before you press"
      className="grid grid-cols-4 pointer-fine:hidden border-y-[1.5px] border-ink max-sm:border-y-[3px]"
    >
      {ADVICE.map(({ words, drawn }) => (
        <li
          key={words}
          className="flex flex-col items-center border-l border-line p-1 text-center font-[650] leading-[19px] first:border-l-0"
        >
          <svg aria-hidden="true" width="40" height="40" viewBox="0 0 40 40" fill="none" stroke="var(--ink)" strokeWidth="2.6">
            {drawn}
          </svg>
          {words}
        </li>
      ))}
    </ul>
  )
}
