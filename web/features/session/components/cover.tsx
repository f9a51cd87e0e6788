import { type ReactNode, useEffect } from 'react'
import { Mark } from '../../../ui/mark.tsx'

/** The cover of the book: a leaf on strawboard, tied by the band with the mark in its knot. */
export function Cover({ title, says, children }: { title: string; says: ReactNode; children?: ReactNode }) {
  useEffect(() => {
    document.title = title === 'Sheafbook' ? title : `${title} · Sheafbook`
  }, [title])
  return (
    <div className="relative flex min-h-dvh flex-col bg-board max-sm:bg-paper">
      <Band />
      <main
        id="work"
        className="relative z-10 mx-auto my-auto grid w-[calc(100%-48px)] max-w-[1016px] grid-cols-[minmax(96px,26%)_1fr] border-2 border-ink bg-paper outline-1 -outline-offset-[11px] outline-line outline-solid max-md:grid-cols-1 max-md:w-full max-md:border-0 max-md:outline-0"
      >
        <div className="relative flex items-center justify-center max-md:justify-start max-md:px-margin max-md:pt-4">
          <span className="absolute inset-y-0 left-1/2 w-[112px] -translate-x-1/2 border-x-2 border-ink bg-straw max-md:hidden" />
          <span className="relative border-y-[3px] border-ink bg-paper px-2 py-8 max-md:border-y-0 max-md:p-0">
            <span className="max-md:hidden">
              <Mark size={156} />
            </span>
            <span className="md:hidden">
              <Mark size={72} />
            </span>
          </span>
        </div>
        <div className="px-6 py-8 max-md:px-margin max-md:py-3 max-lg:px-4">
          <h1 className="text-6 leading-[48px] max-sm:text-5 max-sm:leading-[36px]">{title}</h1>
          <p className="mt-1 mb-4 text-3 leading-[28px] text-graphite max-sm:text-2 max-sm:leading-[24px]">{says}</p>
          {children}
        </div>
      </main>
      <div className="relative z-10 h-[54px] border-t-2 border-ink bg-[repeating-linear-gradient(var(--leaf)_0_6px,var(--line)_6px_7.5px)] max-md:hidden" />
    </div>
  )
}

/** Runs from edge to edge behind the leaf, under the mark's column. */
function Band() {
  return (
    <div aria-hidden="true" className="absolute inset-0 mx-auto w-[calc(100%-48px)] max-w-[1016px] max-md:hidden">
      <div className="grid h-full grid-cols-[minmax(96px,26%)_1fr]">
        <div className="relative">
          <span className="absolute inset-y-0 left-1/2 z-20 w-[112px] -translate-x-1/2 border-x-2 border-ink bg-straw" />
        </div>
      </div>
    </div>
  )
}
