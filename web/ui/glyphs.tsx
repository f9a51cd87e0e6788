import type { ReactNode } from 'react'

/** Own glyphs, 18 px, one 1.6 px pen, made from leaf, rule, stalk and arrow. Never without their word. */
const LEAF = 'M4 2.5H11.5L14 5V13.5H4Z'

const DRAWN = {
  doubt: <path d="M12.5 2.5 5.5 15.5M12.5 2.5C9.5 3 9 5 10.2 6.8M12.5 2.5C14 5 13 6.6 10.2 6.8" />,
  settled: <path d="M9 3V15.5M9 3C6.6 4 6.6 6 9 7.2 11.4 6 11.4 4 9 3" />,
  kept: (
    <g fill="currentColor" stroke="none">
      <circle cx="4" cy="12" r="1.5" />
      <circle cx="9" cy="12" r="1.5" />
      <circle cx="14" cy="12" r="1.5" />
    </g>
  ),
  corrected: <path d="M2 6.5H16M9 6.5V15.5M5.5 12 9 15.5 12.5 12" />,
  unreadable: <path d="M2.5 4.5H15.5V13.5H2.5ZM2.5 9 7 4.5M2.5 13.5 11.5 4.5M7 13.5 15.5 5M11.5 13.5 15.5 9.5" />,
  blank: <path d="M3 4.5V13.5M15 4.5V13.5M6.5 9H11.5" />,
  'sent back': <path d="M6.5 2.5H13.5V15.5H6.5V12.5M6.5 5.5V2.5M11 9H1.5M4.5 6 1.5 9 4.5 12" />,
  answered: <path d="M6.5 2.5H13.5V15.5H6.5V12.5M6.5 5.5V2.5M1 9H10M7 6 10 9 7 12" />,
  entered: <path d={`${LEAF}M2 15.3H16M2 17.3H16`} />,
  challenged: <path d={`${LEAF}M2 15.3H7.4M10.6 15.3H16M2 17.3H6.4M9.6 17.3H16`} />,
  'set aside': <path d="M2.5 6H13L15.5 8.5V14H2.5Z" strokeDasharray="2.2 1.6" />,
  'not yet sent': (
    <>
      <path d="M5 2H11L13 4V11.5H5Z" />
      <path d="M2 15.5H5.5M7.5 15.5H10.5M12.5 15.5H16" />
    </>
  ),
  printed: <path d={`${LEAF}M6.5 7H11.5M6.5 10H11.5`} />,
  waiting: <path d={`${LEAF}M11 16.5 14.5 9.5`} />,
  'not firm': <path d="M2.5 6H15.5V12H2.5ZM5 12 8 6M9 12 12 6M13 12 15 8" />,
  reading: <path d={`${LEAF}M6.5 6.5H11.5M6.5 9H9`} />,
} satisfies Record<string, ReactNode>

export type GlyphName = keyof typeof DRAWN

/** A state's shape. Decoration beside its word; `pen` where a person made the mark. */
export function Glyph({ name, pen = false, size = 18 }: { name: GlyphName; pen?: boolean; size?: number }) {
  return (
    <svg
      aria-hidden="true"
      width={size}
      height={size}
      viewBox="0 0 18 18"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.6"
      strokeLinejoin="miter"
      className={`inline-block shrink-0 align-[-3px] ${pen ? 'text-pen' : ''}`}
    >
      {DRAWN[name]}
    </svg>
  )
}
