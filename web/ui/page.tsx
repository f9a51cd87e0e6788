import { type ReactNode, useEffect } from 'react'
import { Foot, type FootKey } from './foot.tsx'

interface PageProps {
  /** Names the tab and, with `sentence` left out, the page. */
  title: string
  /** One sentence that says what is here. */
  sentence?: ReactNode
  /** Stands above the sentence, in graphite. */
  over?: ReactNode
  /** Stands to the right of the sentence: filters, actions. */
  aside?: ReactNode
  keys?: FootKey[]
  note?: ReactNode
  children: ReactNode
}

/** Every screen: one sentence, the work under a 3 px rule, the strip with its keys. */
export function Page({ title, sentence, over, aside, keys, note, children }: PageProps) {
  useEffect(() => {
    document.title = `${title} · Sheafbook`
  }, [title])
  return (
    <>
      <main id="work" tabIndex={-1} className="flex grow flex-col">
        <header className="flex flex-wrap items-end gap-x-6 gap-y-1 px-margin pt-3 pb-2">
          <div className="min-w-0 grow basis-[320px]">
            {over && <div className="label mb-0.5">{over}</div>}
            <h1 className="text-4 leading-[33px] max-sm:text-3 max-sm:leading-[27px]">{sentence ?? title}</h1>
          </div>
          {aside && <div className="flex flex-wrap items-center gap-x-3 gap-y-1">{aside}</div>}
        </header>
        <div className="grow border-t-[3px] border-ink">{children}</div>
      </main>
      <Foot {...(keys ? { keys } : {})} note={note} />
    </>
  )
}
