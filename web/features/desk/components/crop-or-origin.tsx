import type { RefObject } from 'react'
import type { Sheet } from '../../../../shared/schemas/sheet.ts'
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
      ) : desk.sheet.origin === 'keyed' ? (
        <UnplacedPicture sheet={desk.sheet} />
      ) : (
        <p className="border-[1.5px] border-ink bg-leaf px-2 py-1">
          <span className="label">{reading?.cellRef ? 'from the spreadsheet cell' : 'no picture shows it'}</span>{' '}
          <span className="figures text-2">{reading?.cellRef ?? shown.label}</span>
        </p>
      )}
    </section>
  )
}

/** The picture a sheet is keyed from, twice as wide as its place: it is moved about under it. */
function UnplacedPicture({ sheet }: { sheet: Sheet }) {
  const [page] = sheet.pages
  if (!page) return <p className="border-[1.5px] border-ink bg-leaf px-2 py-1">This sheet has no picture.</p>
  const src = `/api/pages/${page.id}/original?as=picture`
  return (
    <div className="h-[30vh] overflow-auto border-[1.5px] border-ink bg-leaf">
      <a href={src} target="_blank" rel="noreferrer" title="Open it in a window of its own">
        <img src={src} alt={`The sheet as it came: ${page.fileName}`} className="w-[200%] max-w-none" />
      </a>
    </div>
  )
}
