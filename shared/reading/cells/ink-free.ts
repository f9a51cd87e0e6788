/** Cells that plainly hold no ink: told by their darkest spot, without the net. */
import { CELL_HEIGHT_PX, CELL_PX, CELL_WIDTH_PX } from '../classes.ts'

/** Kept off the edge, pixels: the printed frame stands there, and what reaches in from next door. */
const MARGIN_PX = 5
/**
 * Darkness a spot of 3 x 3 pixels needs to be looked at. On simulated photos the palest of 16,600 digits had 0.13 (hard ones,
 * pencil) and 0.48 (easy ones), empty cells at most 0.08 for 99 of 100; grain above it only means that the net looks as well.
 */
const SPOT_FROM = 0.08

export function inkFree(cells: Float32Array, cell: number): boolean {
  const start = cell * CELL_PX
  for (let y = MARGIN_PX; y < CELL_HEIGHT_PX - MARGIN_PX; y++) {
    for (let x = MARGIN_PX; x < CELL_WIDTH_PX - MARGIN_PX; x++) {
      const middle = start + y * CELL_WIDTH_PX + x
      let sum = 0
      for (let row = middle - CELL_WIDTH_PX; row <= middle + CELL_WIDTH_PX; row += CELL_WIDTH_PX)
        sum += cells[row - 1]! + cells[row]! + cells[row + 1]!
      if (sum >= 9 * SPOT_FROM) return false
    }
  }
  return true
}
