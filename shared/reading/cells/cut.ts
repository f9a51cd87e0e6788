/** Cuts the boxes of combs straight from the photo, as the digit net wants them (classes.ts). */
import type { Box } from '../../layouts/geometry.ts'
import type { Patch, Picture } from '../align/patch.ts'
import { samplePatch } from '../align/patch.ts'
import { CELL_HEIGHT_PX, CELL_PX, CELL_PX_PER_MM, CELL_WIDTH_PX } from '../classes.ts'
import type { FieldMap } from '../geometry/page-map.ts'

/** The area of a cell on the layout, mm, centred on its box. */
export function cellArea(box: Box) {
  const width = CELL_WIDTH_PX / CELL_PX_PER_MM
  const height = CELL_HEIGHT_PX / CELL_PX_PER_MM
  return { x: box.x + (box.width - width) / 2, y: box.y + (box.height - height) / 2, width, height }
}

/** Means of `over` x `over` samples. What lies outside the picture counts as paper. */
export function shrink(
  { columns, rows, darkness }: Patch,
  over: number,
  into: Float32Array,
  offset: number,
  black: number,
): void {
  const width = columns / over
  const height = rows / over
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      let sum = 0
      for (let v = 0; v < over; v++) {
        for (let u = 0; u < over; u++) {
          const value = darkness[(y * over + v) * columns + x * over + u]!
          sum += Number.isNaN(value) ? 0 : value
        }
      }
      into[offset + y * width + x] = Math.min(1, sum / (over * over * black))
    }
  }
}

/**
 * One cell into `cells` at its place. `black`: darkness of solid print nearby, 0 to 1. `over`: samples along each side of a
 * cell's pixel, so many that no photo pixel is passed over.
 */
export function cutCell(
  picture: Picture,
  map: FieldMap,
  box: Box,
  black: number,
  over: number,
  cells: Float32Array,
  index: number,
): void {
  shrink(samplePatch(picture, map, cellArea(box), 1 / (CELL_PX_PER_MM * over)), over, cells, index * CELL_PX, black)
}

/** 1 where the picture is hardly finer than the cell, else 2. */
export const samplesFor = (px_per_mm: number): number => (px_per_mm > 1.4 * CELL_PX_PER_MM ? 2 : 1)
