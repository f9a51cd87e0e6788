import type { RefObject } from 'react'
import type { Desk } from '../use-desk.ts'
import type { DeskActs } from '../use-desk-acts.ts'
import { InkCrop } from './ink-crop.tsx'

interface CropOrOriginProps {
  desk: Desk
  acts: DeskActs
  picture: string | null
  boxRef: RefObject<HTMLElement | null>
}

/** The band arrives here: the ink of the cell in hand, enlarged; or where its value came from. */
export function CropOrOrigin({ desk, acts, picture, boxRef }: CropOrOriginProps) {
  const shown = acts.cell ?? desk.layout.cells.find((c) => c.key === desk.item?.cells[0]) ?? null
  if (!shown) return <span ref={boxRef} />
  const reading = desk.view.readings.get(shown.key)
  return (
    <section ref={boxRef} aria-label="Where it stands" className="border-y-[1.5px] border-ink bg-straw px-3 py-2">
      {picture ? (
        <InkCrop
          layout={desk.layout}
          cell={shown}
          picture={picture}
          className="max-h-[150px] border-[1.5px] border-ink bg-leaf"
        />
      ) : (
        <p className="border-[1.5px] border-ink bg-leaf px-2 py-1">
          <span className="label">{reading?.cellRef ? 'from the spreadsheet cell' : 'keyed beside the picture'}</span>{' '}
          <span className="figures text-2">{reading?.cellRef ?? shown.label}</span>
        </p>
      )}
    </section>
  )
}
