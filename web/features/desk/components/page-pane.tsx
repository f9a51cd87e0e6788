import { memo, type RefObject, useCallback, useLayoutEffect, useRef } from 'react'
import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import { cellBounds } from '../../../../shared/layouts/geometry.ts'
import { isComb, type LayoutCell } from '../../../../shared/layouts/layout.ts'
import type { Reading } from '../../../../shared/schemas/sheet.ts'
import type { Desk } from '../use-desk.ts'
import { rowOf, SheetMarks } from './sheet-marks.tsx'

interface PagePaneProps {
  desk: Desk
  /** Address of the flattened page; null where there is none and the form itself is drawn. */
  picture: string | null
  pane: RefObject<HTMLElement | null>
}

/** The sheet itself is the form: the picture with its values over their ink. */
export function PagePane({ desk, picture, pane }: PagePaneProps) {
  const { layout } = desk
  const latest = useRef(desk)
  useLayoutEffect(() => {
    latest.current = desk
  })
  const take = useCallback((key: string) => latest.current.takeCell(key), [])
  return (
    <section ref={pane} aria-label="The sheet" className="relative min-h-0 overflow-y-auto bg-board lg:pl-1">
      <div className="relative bg-leaf lg:my-[60vh]" style={{ aspectRatio: `${layout.page.width} / ${layout.page.height}` }}>
        {picture && <img src={picture} alt="The sheet, flattened" className="absolute inset-0 h-full w-full" />}
        <SheetMarks desk={desk} inBox={picture === null} />
        {layout.cells.map((cell) => {
          const reading = desk.view.readings.get(cell.key)
          if (!reading || (desk.sheet.planned && isComb(cell) && cell.planned)) return null
          return (
            <CellButton
              key={cell.key}
              cell={cell}
              reading={reading}
              page={layout.page}
              tabStop={cell.key === (desk.key ?? desk.item?.cells[0] ?? layout.cells[0]?.key)}
              onTake={take}
            />
          )
        })}
      </div>
    </section>
  )
}

/** Lower edge of the row in hand on the page, as a share of the page's height. */
export function rowInHand({ layout, key, item }: Desk): number | null {
  const cell = layout.cells.find((c) => c.key === (key ?? item?.cells[0]))
  return cell ? rowOf(cell).low / layout.page.height : null
}

interface CellButtonProps {
  cell: LayoutCell
  reading: Reading
  page: { width: number; height: number }
  tabStop: boolean
  onTake: (key: string) => void
}

/** Takes a cell in hand with the mouse; with the keyboard the same is "/" and its name. Kept from drawing again: there are 150. */
const CellButton = memo(function CellButton({ cell, reading, page, tabStop, onTake }: CellButtonProps) {
  const bounds = cellBounds(cell)
  const percent = (mm: number, of: number) => `${(100 * mm) / of}%`
  return (
    <button
      type="button"
      // One tab stop for the whole sheet: the cell in hand.
      tabIndex={tabStop ? 0 : -1}
      aria-label={`${cell.label}: ${saidOf(cell, reading)}`}
      onClick={() => onTake(cell.key)}
      className="absolute hover:outline-2 hover:outline-ink hover:outline-solid"
      style={{
        left: percent(bounds.x, page.width),
        top: percent(bounds.y, page.height),
        width: percent(bounds.width, page.width),
        height: percent(bounds.height, page.height),
      }}
    />
  )
})

const saidOf = (cell: LayoutCell, reading: Reading) =>
  `${formatValue(cell, reading.value)}${reading.unit ? ` ${reading.unit}` : ''}, ${reading.settlement ?? reading.state}`
