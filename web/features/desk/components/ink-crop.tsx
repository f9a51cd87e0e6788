import { cellBounds } from '../../../../shared/layouts/geometry.ts'
import type { Layout, LayoutCell } from '../../../../shared/layouts/layout.ts'

interface InkCropProps {
  layout: Layout
  cell: LayoutCell
  picture: string
  /** How much of the surroundings is shown, mm. */
  around_mm?: number
  className?: string
}

/** A piece of the flattened page around one cell, as large as its place allows. */
export function InkCrop({ layout, cell, picture, around_mm = 2.4, className = '' }: InkCropProps) {
  const { x, y, width, height } = cellBounds(cell)
  // A single box is shown with more around it: alone it tells nothing.
  const least = cell.kind === 'tick' || cell.kind === 'choice' ? 34 : 16
  const wide = Math.max(width + 2 * around_mm, least)
  const tall = height + 2 * around_mm
  return (
    <svg
      role="img"
      aria-label={`The ink of ${cell.label}, enlarged`}
      viewBox={`${x + width / 2 - wide / 2} ${y - around_mm} ${wide} ${tall}`}
      className={`block w-full ${className}`}
    >
      <image href={picture} width={layout.page.width} height={layout.page.height} preserveAspectRatio="none" />
    </svg>
  )
}
