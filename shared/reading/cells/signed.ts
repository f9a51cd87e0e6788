/** Whether an area holds writing: signatures are never read, only seen. */
import type { Box } from '../../layouts/geometry.ts'
import { type Picture, samplePatch } from '../align/patch.ts'
import type { FieldMap } from '../geometry/page-map.ts'

const STEP_MM = 0.25
/** Kept off the line below, where print begins. */
const ABOVE_LINE_MM = 0.9
const INK_FROM = 0.3

/** Ink within the area, mm². */
export function inkWithin(picture: Picture, map: FieldMap, box: Box, black: number): number {
  const patch = samplePatch(picture, map, { ...box, height: box.height - ABOVE_LINE_MM }, STEP_MM)
  let inked = 0
  for (const value of patch.darkness) if (value > INK_FROM * black) inked++
  return inked * STEP_MM * STEP_MM
}

/** From this much ink on somebody signed; below the lesser amount nobody did; between, a person looks. */
const SIGNED_MM2 = 4
const EMPTY_MM2 = 1.2

export const signedBy = (ink_mm2: number): { signed: boolean; sure: boolean } => ({
  signed: ink_mm2 >= (SIGNED_MM2 + EMPTY_MM2) / 2,
  sure: ink_mm2 >= SIGNED_MM2 || ink_mm2 <= EMPTY_MM2,
})
