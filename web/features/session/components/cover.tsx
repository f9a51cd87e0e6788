import { type ReactNode, useEffect } from 'react'
import { Mark } from '../../../ui/mark.tsx'

/** The cover of the book: a leaf on strawboard, tied by the band with the mark in its knot. */
export function Cover({ title, says, children }: { title: string; says: ReactNode; children?: ReactNode }) {
  useEffect(() => {
    document.title = title === 'Sheafbook' ? title : `${title} · Sheafbook`
  }, [title])
  return (
    <div className="relative flex min-h-dvh flex-col overflow-hidden bg-board max-md:bg-paper">
      <main
        id="work"
        className="relative z-10 mx-auto my-auto grid w-[calc(100%-48px)] max-w-[1016px] grid-cols-[minmax(240px,27%)_1fr] border-2 border-ink bg-paper outline-1 -outline-offset-[11px] outline-line outline-solid max-md:m-0 max-md:w-full max-md:grid-cols-1 max-md:border-0 max-md:outline-0"
      >
        <Band />
        <div className="px-6 py-8 max-lg:px-4 max-md:px-margin max-md:py-3">
          <h1 className="text-6 leading-[48px] max-sm:text-5 max-sm:leading-[36px]">{title}</h1>
          <p className="mt-1 mb-4 text-3 leading-[28px] text-graphite max-sm:text-2 max-sm:leading-[24px]">{says}</p>
          {children}
        </div>
      </main>
      <div className="h-[54px] border-t-2 border-ink bg-[repeating-linear-gradient(var(--leaf)_0_6px,var(--line)_6px_7.5px)] max-md:hidden" />
    </div>
  )
}

/** One band from edge to edge of the window, over the leaf and under the mark; on a phone it lies across the top. */
function Band() {
  return (
    <div
      className="relative flex items-center justify-center max-md:h-[108px] max-md:justify-start max-md:px-margin"
      aria-hidden="true"
    >
      <span className="absolute -top-[100vh] left-1/2 h-[300vh] w-[112px] -translate-x-1/2 border-x-2 border-ink bg-straw max-md:inset-x-0 max-md:top-[34px] max-md:left-0 max-md:h-[42px] max-md:w-full max-md:translate-x-0 max-md:border-x-0 max-md:border-y-[3px]" />
      <span className="relative border-y-[4px] border-ink bg-paper px-3 py-8 max-md:border-x-[3px] max-md:border-y-0 max-md:px-1 max-md:py-0">
        <span className="max-md:hidden">
          <Mark size={140} />
        </span>
        <span className="md:hidden">
          <Mark size={72} />
        </span>
      </span>
    </div>
  )
}
