/** Where a field's printed lines really are: measured on profiles that writing hardly disturbs. */
import type { FieldMap } from '../geometry/page-map.ts'
import type { FieldPart } from './field-lines.ts'
import { matchLines, type Profile, support } from './lines.ts'
import { lineProfile, type Patch, type Picture, samplePatch } from './patch.ts'

export interface PartFit {
  /** Measured minus expected under the map it was measured with, mm. */
  dx: number
  dy: number
  /** Mean vote of the lines, -0.5 to 1. */
  supportX: number
  supportY: number
  /** Support less that of the same comb one box to the side: low where the place is not certain. */
  ahead: number
  /** How far single lines are from the fit, mm. */
  spread_mm: number
}

const STEP_MM = 0.16
/** Frames are the palest lines: whatever is darker counts no more than a little above them. */
const CLIP = 0.42
/** A line counts where it is dark over this share of its length; writing rarely is. */
const SHARE = 0.62
/** Kept off the corners of a box, where lines cross. */
const INSET_MM = 0.75
/** A part may stand this far from where the whole field says, mm. */
const PART_REACH_MM = 0.7

/** The patch of a whole field with room for the search. */
export function fieldPatch(picture: Picture, map: FieldMap, field: FieldPart['field'], reach_mm: number): Patch {
  const side = reach_mm + 1.6
  const above = reach_mm + 1
  const area = { x: field.x - side, y: field.y - above, width: field.width + 2 * side, height: field.height + 2 * above }
  return samplePatch(picture, map, area, STEP_MM)
}

const insideBoxes = (parts: readonly FieldPart[], shift: number) => (mm: number) =>
  parts.some(({ boxes }) => boxes.some((box) => mm - shift > box.x + INSET_MM && mm - shift < box.x + box.width - INSET_MM))

function rowsOf(patch: Patch, parts: readonly FieldPart[], shift: number): Profile {
  const values = lineProfile(patch, 'rows', -1e9, 1e9, SHARE, CLIP, insideBoxes(parts, shift))
  return { values, start_mm: patch.y, step_mm: patch.step_mm }
}

/**
 * Measures the parts of one field on one patch: first the whole field together, which fixes which box is which, then each part
 * within a little of it.
 */
export function measureParts(patch: Patch, parts: readonly FieldPart[], reach_mm: number): PartFit[] {
  const first = parts[0]
  if (!first) return []
  const { field } = first
  const down = matchLines(rowsOf(patch, parts, 0), first.level, reach_mm)
  const from = field.y + down.shift_mm + INSET_MM
  const to = field.y + down.shift_mm + field.height - INSET_MM
  const columns = {
    values: lineProfile(patch, 'columns', from, to, SHARE, CLIP),
    start_mm: patch.x,
    step_mm: patch.step_mm,
  }
  const whole = matchLines(columns, first.whole, reach_mm)
  const along = whole.shift_mm
  const { pitch_mm } = first
  const beside =
    pitch_mm === null
      ? 0
      : Math.max(support(columns, first.whole, along - pitch_mm), support(columns, first.whole, along + pitch_mm))
  const near = Math.min(PART_REACH_MM, reach_mm)
  return parts.map((part) => {
    const x = parts.length === 1 ? whole : matchLines(columns, part.upright, near, along)
    const y = matchLines(rowsOf(patch, [part], x.shift_mm), part.level, near, down.shift_mm)
    return {
      dx: x.shift_mm,
      dy: y.shift_mm,
      supportX: x.support,
      supportY: y.support,
      ahead: whole.support - beside,
      spread_mm: Math.max(x.spread_mm, y.spread_mm),
    }
  })
}
