import { type ComponentType, type ReactNode, useEffect, useState } from 'react'
import { useOnline } from '../lib/use-online.ts'
import { Page } from '../ui/page.tsx'

interface Opened {
  Component: ComponentType
}
type Load = () => Promise<Opened>

/** A dead access point looks like a line: asked again until the page is here. */
const AGAIN_MS = 4_000

/**
 * A page in a file of its own, for the router's `lazy`. Where the file cannot be fetched the folio stays, a page says so,
 * and the real one takes its place when the line is back.
 */
export const onDemand = (load: Load) => async (): Promise<Opened | { element: ReactNode }> => {
  try {
    const { Component } = await load()
    return { Component }
  } catch {
    return { element: <NotHereYet load={load} /> }
  }
}

function NotHereYet({ load }: { load: Load }) {
  const online = useOnline()
  const [opened, setOpened] = useState<Opened | null>(null)
  useEffect(() => {
    if (opened || !online) return
    let gone = false
    let timer: ReturnType<typeof setTimeout>
    const ask = () =>
      load().then(
        ({ Component }) => gone || setOpened({ Component }),
        () => {
          if (!gone) timer = setTimeout(ask, AGAIN_MS)
        },
      )
    void ask()
    return () => {
      gone = true
      clearTimeout(timer)
    }
  }, [opened, online, load])
  if (opened) return <opened.Component />
  return (
    <Page title="This page is not on this device yet">
      <p className="max-w-[620px] px-margin py-3" role="status">
        It could not be fetched: the line is down. It opens by itself when the line is back. Photos you chose are kept, and Send
        sheets works meanwhile.
      </p>
    </Page>
  )
}
