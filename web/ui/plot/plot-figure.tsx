import { type ReactNode, useId, useLayoutEffect, useRef, useState } from 'react'
import { Button } from '../button.tsx'
import { downloadPng, downloadSvg } from './download-plot.ts'

interface PlotFigureProps {
  title: string
  /** How to read it, in one sentence. */
  says: ReactNode
  /** Name of the downloaded files, without ending. */
  file: string
  draw: (width_px: number) => { height: number; body: ReactNode }
  /** The same as a table, for those who cannot see it. */
  table: ReactNode
}

const WIDTH_PX = 720

/** A plot with its head, its files and its table. */
export function PlotFigure({ title, says, file, draw, table }: PlotFigureProps) {
  const id = useId()
  const frame = useRef<HTMLDivElement>(null)
  const svg = useRef<SVGSVGElement>(null)
  const [failed, setFailed] = useState(false)
  const width = useWidth(frame)
  const { height, body } = draw(width)
  const take = (how: typeof downloadSvg | typeof downloadPng) => async () => {
    setFailed(false)
    try {
      if (svg.current) await how(svg.current, file, title)
    } catch {
      setFailed(true)
    }
  }
  return (
    <figure className="border-t border-line px-margin pt-2 pb-3" aria-labelledby={id}>
      <figcaption className="flex flex-wrap items-baseline gap-x-3">
        <h2 id={id} className="text-2">
          {title}
        </h2>
        <span className="ml-auto flex gap-x-2 print:hidden">
          <Button look="word" className="max-sm:min-h-[44px]" onClick={take(downloadSvg)}>
            SVG<span className="away"> of {title}</span>
          </Button>
          <Button look="word" className="max-sm:min-h-[44px]" onClick={take(downloadPng)}>
            PNG<span className="away"> of {title}</span>
          </Button>
        </span>
        <span className="label basis-full">{says}</span>
      </figcaption>
      {failed && <p role="alert">This browser could not draw the picture. The SVG holds the same.</p>}
      <div ref={frame} className="mt-1 max-w-[1100px]">
        <svg
          ref={svg}
          role="img"
          aria-label={`${title}; the table below says the same`}
          width={width}
          height={height}
          viewBox={`0 0 ${width} ${height}`}
          className="block max-w-full"
        >
          {body}
        </svg>
      </div>
      <details className="pt-1">
        <summary className="word inline-block max-sm:min-h-[44px]">As a table</summary>
        <div className="pt-1">{table}</div>
      </details>
    </figure>
  )
}

/** The room a plot has; it is drawn again when that changes. */
function useWidth(frame: React.RefObject<HTMLDivElement | null>): number {
  const [width, setWidth] = useState(WIDTH_PX)
  useLayoutEffect(() => {
    const element = frame.current
    if (!element) return
    const measure = () => element.clientWidth > 0 && setWidth(element.clientWidth)
    measure()
    const watcher = new ResizeObserver(measure)
    watcher.observe(element)
    return () => watcher.disconnect()
  }, [frame])
  return width
}
