/** Looks for fields outwards from what is known. */
import type { Layout, LayoutCell } from '../../layouts/layout.ts'
import type { Homography } from '../geometry/homography.ts'
import { ResidualField } from '../geometry/residual-field.ts'
import type { Point } from '../pixels/grey.ts'
import { type FieldPart, fieldParts } from './field-lines.ts'
import { distance, type Mark, markOf, nearest } from './marks.ts'
import { fieldPatch, measureParts, type PartFit } from './measure-part.ts'
import { measureTickPlace } from './measure-tick.ts'
import type { Picture } from './patch.ts'

/** Lines must speak for a place so much to be believed: frames are pale, and grain and pens lower it. */
const LEAST_SUPPORT = { comb: 0.4, tick: 0.33 } as const
/** A comb must be at least as alike in its place as one box to the side; that all of a page are surely so is judged together. */
const LEAST_AHEAD = 0
/** How far from its neighbours' word a field is looked for, mm: more, the farther they are; never as far as the next box. */
const combReach = (distance_mm: number) => Math.min(2.4, 0.7 + 0.05 * distance_mm)
const tickReach = (distance_mm: number) => Math.min(1.7, 0.6 + 0.04 * distance_mm)

export interface FramedPicture extends Picture {
  /** Contrast of a pale frame in it. */
  frameContrast: number
  /** Frames are looked for that are paler than they should be: none is then plain enough to stand against its neighbours. */
  pale?: boolean
  /** Samples of a field lie so far apart. */
  step_mm: number
}

/** What is looked for in one go: a comb with its parts, or one tick box. */
export interface Placing {
  parts: FieldPart[]
  tick: boolean
  center: Point
}

const isTick = (cell: LayoutCell) => cell.kind === 'tick' || cell.kind === 'choice'

export function placings(layout: Layout, planned: boolean): Placing[] {
  return layout.cells.flatMap((cell) => {
    if (planned && 'planned' in cell && cell.planned) return []
    const parts = fieldParts(cell)
    if (parts.length === 0) return []
    const tick = isTick(cell)
    // The options of a choice stand apart, so each is found on its own.
    const groups = tick ? parts.map((part) => [part]) : [parts]
    return groups.map((group) => {
      const { x, y, width, height } = group[0]!.field
      return { parts: group, tick, center: { x: x + width / 2, y: y + height / 2 } }
    })
  })
}

const isGood = (fit: PartFit, tick: boolean): boolean => {
  const least = tick ? LEAST_SUPPORT.tick : LEAST_SUPPORT.comb
  return fit.supportX >= least && fit.supportY >= least && (tick || fit.ahead >= LEAST_AHEAD)
}

function place(picture: FramedPicture, homography: Homography, field: ResidualField, placing: Placing, reach_mm: number): Mark[] {
  const { parts, tick, center } = placing
  const map = { homography, center, displacement: field.at(center) }
  const fits = tick
    ? parts.map((part) => measureTickPlace(picture, map, part, reach_mm))
    : measureParts(fieldPatch(picture, map, parts[0]!.field, reach_mm, picture.step_mm), parts, reach_mm, picture.frameContrast)
  return fits.flatMap((fit, i) => (isGood(fit, tick) ? [markOf(parts[i]!, map, fit, tick, !picture.pale)] : []))
}

/** Nearest to what is known first; what is found helps to find the next. Gives the marks of what was found. */
export function placeOutwards(
  picture: FramedPicture,
  homography: Homography,
  known: readonly Mark[],
  waiting: readonly Placing[],
): Mark[] {
  const field = new ResidualField(known)
  const found: Mark[] = []
  const left = [...waiting]
  const near = new Map(left.map((p) => [p, nearest(known, p.center)]))
  while (left.length > 0) {
    let next = 0
    for (let i = 1; i < left.length; i++) if (near.get(left[i]!)! < near.get(left[next]!)!) next = i
    const placing = left.splice(next, 1)[0]!
    const reach = (placing.tick ? tickReach : combReach)(near.get(placing)!)
    const marks = place(picture, homography, field, placing, reach)
    found.push(...marks)
    for (const mark of marks) {
      field.add(mark)
      for (const other of left) {
        const d = distance(mark, other.center)
        if (d < near.get(other)!) near.set(other, d)
      }
    }
  }
  return found
}
