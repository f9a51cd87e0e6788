/** Where a comb's printed lines really are: measured on profiles that writing hardly disturbs. */
import type { FieldMap } from '../geometry/page-map.ts'
import type { FieldPart } from './field-lines.ts'
import { matchLevel } from './level-match.ts'
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
  /** Wider and leaning beside the map it was measured with. */
  stretch: number
  lean: number
  growth: number
}

/** Frames are the palest lines: whatever is darker counts no more than a little above them. */
const CLIP = 0.42
/** A line counts where it is dark over this share of its length; writing rarely is. */
const SHARE = 0.62
/** Kept off the corners of a box, where lines cross. */
const INSET_MM = 0.75
/** A part may stand this far from where the whole field says, mm. */
const PART_REACH_MM = 0.7
const PART_LEVEL_REACH_MM = 0.35

/** A little finer than the picture's own pixels (thin frames may not fall between samples), and never coarser than this, mm. */
const COARSEST_MM = 0.2
export const stepFor = (px_per_mm: number): number => Math.min(COARSEST_MM, 1.15 / px_per_mm)

/** The patch of a whole field with room for the search. */
export function fieldPatch(picture: Picture, map: FieldMap, field: FieldPart['field'], reach_mm: number, step_mm: number): Patch {
  const side = reach_mm + 1.6
  const above = reach_mm + 1.9
  const area = { x: field.x - side, y: field.y - above, width: field.width + 2 * side, height: field.height + 2 * above }
  return samplePatch(picture, map, area, step_mm)
}

/** Darkness by column, over the rows inside the boxes once they are shifted by `down`. */
function columnsOf(patch: Patch, field: FieldPart['field'], down: number, full: number): Profile {
  const values = lineProfile(patch, 'columns', field.y + down + INSET_MM, field.y + down + field.height - INSET_MM, SHARE, CLIP)
  return { values, start_mm: patch.x, step_mm: patch.step_mm, full }
}

/**
 * Measures the parts of one comb on one patch: first the whole comb, which fixes which box is which, then each part within a
 * little of it. `full`: contrast of a frame in this picture.
 */
export function measureParts(patch: Patch, parts: readonly FieldPart[], reach_mm: number, full: number): PartFit[] {
  const first = parts[0]
  if (!first) return []
  const { field, pitch_mm } = first
  const rough = matchLines(columnsOf(patch, field, 0, full), first.whole, reach_mm)
  const down = matchLevel(patch, parts, rough.shift_mm, reach_mm, full)
  const columns = columnsOf(patch, field, down.shift_mm, full)
  const whole = matchLines(columns, first.whole, reach_mm)
  const along = whole.shift_mm
  const beside =
    pitch_mm === null
      ? 0
      : Math.max(...[-pitch_mm, pitch_mm].map((to) => support(columns, first.whole, along + to, whole.stretch)))
  const ahead = whole.support - beside
  const { lean, growth } = down
  if (parts.length === 1) {
    const spread_mm = Math.max(whole.spread_mm, down.spread_mm)
    const { support: supportX, stretch } = whole
    return [{ dx: along, dy: down.shift_mm, supportX, supportY: down.support, ahead, spread_mm, stretch, lean, growth }]
  }
  const near = Math.min(PART_REACH_MM, reach_mm)
  const middle = field.x + field.width / 2
  return parts.map((part) => {
    const own = (part.boxes[0]!.x + part.boxes.at(-1)!.x + part.boxes.at(-1)!.width) / 2 - middle
    const x = matchLines(columns, part.upright, near, along + whole.stretch * own, stretchesAbout(whole.stretch))
    const around = { shift_mm: down.shift_mm + lean * own, lean, growth }
    const y = matchLevel(patch, [part], x.shift_mm, PART_LEVEL_REACH_MM, full, around, [0])
    return {
      dx: x.shift_mm,
      dy: y.shift_mm,
      supportX: x.support,
      supportY: y.support,
      ahead,
      spread_mm: Math.max(x.spread_mm, y.spread_mm),
      stretch: x.stretch,
      lean,
      growth,
    }
  })
}

const stretchesAbout = (stretch: number) => [stretch, stretch - 0.02, stretch + 0.02]
