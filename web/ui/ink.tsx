import { cellBounds } from '../../shared/layouts/geometry.ts'
import type { Layout, LayoutCell } from '../../shared/layouts/layout.ts'

interface InkProps {
  layout: Layout
  cell: LayoutCell
  /** Address of the flattened page. */
  picture: string
  /** Screen pixels to the millimetre. */
  scale?: number
  around_mm?: number
}

/** The ink of one cell as it stands on the page, cut from the flattened picture by the layout's own millimetres. */
export function Ink({ layout, cell, picture, scale = 3.2, around_mm = 1 }: InkProps) {
  const { x, y, width, height } = cellBounds(cell)
  const [wide, tall] = [width + 2 * around_mm, height + 2 * around_mm]
  return (
    <svg
      role="img"
      aria-label={`ink of ${cell.label}`}
      width={wide * scale}
      height={tall * scale}
      viewBox={`${x - around_mm} ${y - around_mm} ${wide} ${tall}`}
      className="inline-block max-w-full border border-line bg-leaf align-middle"
    >
      <image href={picture} width={layout.page.width} height={layout.page.height} preserveAspectRatio="none" />
    </svg>
  )
}
