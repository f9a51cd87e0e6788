/** The last word on each part: found on its own lines, sure by its neighbours, or not found. */
import { type Displacement, ResidualField } from '../geometry/residual-field.ts'
import type { Point } from '../pixels/grey.ts'
import type { FieldPart } from './field-lines.ts'
import { centerOf, disagreements, distance, keyOf, type Mark } from './marks.ts'

export interface PlacedPart {
  part: FieldPart
  center: Point
  displacement: Displacement
  /** Found on its own lines, or between neighbours that leave no room for doubt. */
  found: boolean
  /** Its own lines were seen. */
  seen: boolean
  /** How far it may be off, mm: by its own lines where they are plain, else by its neighbours. */
  fit_mm: number
}

/** Neighbours vouch for a field whose own lines are covered by ink: so many, so near, agreeing so well (median, mm). */
const VOUCH = { count: 4, within_mm: 32, agree_mm: 0.45 } as const
/**
 * A field between its neighbours may be off by so many times what they are from each other: on hard photos up to six times, where
 * paper bends within a field's width of them.
 */
const BETWEEN = 4.5

/** Where a field's own lines are not plain its lean is its neighbours', and its corners are off by so much more than its middle. */
const TO_CORNER = 1.3
/** A lean that only neighbours tell is right to this share of itself. */
const LEAN_SHARE = 0.3

export function settleParts(parts: readonly FieldPart[], marks: readonly Mark[]): PlacedPart[] {
  const byKey = new Map(marks.map((mark, i) => [mark.key, i]))
  const field = new ResidualField(marks)
  const apart = disagreements(marks)
  const off = new Map(marks.flatMap((mark, i) => (mark.group ? [[mark, Math.hypot(apart[i]!.x, apart[i]!.y)] as const] : [])))
  return parts.map((part): PlacedPart => {
    const center = centerOf(part)
    const own = byKey.get(keyOf(part))
    const mark = own === undefined ? undefined : marks[own]
    const around = field.at(center, part.key, own)
    if (!mark) {
      const fit_mm = vouched(part, center, off)
      return { part, center, displacement: around, found: fit_mm !== null, seen: false, fit_mm: fit_mm ?? Number.NaN }
    }
    const { dx, dy, slope, plain, spread_mm, dyy } = mark
    const displacement = {
      ...around,
      dx,
      dy,
      dxx: (plain ? slope?.dxx : null) ?? around.dxx,
      dyx: (plain ? slope?.dyx : null) ?? around.dyx,
      dyy: (plain ? dyy : null) ?? around.dyy,
    }
    const own_mm = spread_mm === undefined || Number.isNaN(spread_mm) ? 0 : spread_mm
    const half_mm = halfWidth(part)
    if (plain) {
      // One line taken for another at one end stretches a comb as no paper does: its corners are off, not its middle.
      const others = field.at(center, part.key)
      const lean_mm = Math.hypot(displacement.dxx - others.dxx, displacement.dyx - others.dyx) * half_mm
      return { part, center, displacement, found: true, seen: true, fit_mm: Math.max(own_mm, lean_mm) }
    }
    // Lines that are not plain and do not fit well among themselves may be others' lines.
    const corner_mm = LEAN_SHARE * Math.hypot(around.dxx, around.dyx) * half_mm
    const fit_mm = TO_CORNER * off.get(mark)! + own_mm + corner_mm
    return { part, center, displacement, found: true, seen: true, fit_mm }
  })
}

function halfWidth({ boxes }: FieldPart): number {
  const [first, last] = [boxes[0]!, boxes.at(-1)!]
  return (last.x + last.width - first.x) / 2
}

function vouched(part: FieldPart, center: Point, off: ReadonlyMap<Mark, number>): number | null {
  const near = [...off].flatMap(([mark, mm]) => (mark.group !== part.key && distance(mark, center) < VOUCH.within_mm ? [mm] : []))
  if (near.length < VOUCH.count) return null
  const agree = near.sort((a, b) => a - b)[near.length >> 1]!
  return agree <= VOUCH.agree_mm ? BETWEEN * agree : null
}
