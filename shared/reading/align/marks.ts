/** Places on the page that are known, and whether they agree with each other. */
import type { FieldMap } from '../geometry/page-map.ts'
import { type Anchor, ResidualField } from '../geometry/residual-field.ts'
import type { Point } from '../pixels/grey.ts'
import type { FieldPart } from './field-lines.ts'
import type { PartFit } from './measure-part.ts'

export interface Mark extends Anchor {
  /** 'code', 'square', 'rule', or the field's key and part. */
  key: string
  /** Its own lines leave no doubt where it is. */
  plain?: boolean
  spread_mm?: number
  /** How its displacement changes downwards, by its own lines. */
  dyy?: number
  ahead?: number
  /** Several boxes: it can be told from one box to the side. */
  isComb?: boolean
}

/** Disagreement with the neighbours that is refused, mm: at least this, or some times the page's usual one. */
const DISAGREE_MM = 0.55
const DISAGREE_TIMES = 4
/** A field whose own lines leave no doubt may differ so far, mm: paper folds; it is still far from the next box. */
const DISAGREE_PLAIN_MM = 1.8
/** But not so far up and down, where the section rules have been followed and a rule may stand beside a frame. */
const DISAGREE_PLAIN_DOWN_MM = 0.6
const PLAIN = { support: 0.65, ahead: 0.25 } as const
/** Of marks that disagree, only the worst within this distance is taken out at a time, mm: it may be what spoils the others. */
const SPOILS_MM = 22
const MOST_ROUNDS = 6
const TICK_WEIGHT = 0.4

export const distance = (a: Point, b: Point) => Math.hypot(a.x - b.x, a.y - b.y)

/** Distance to the nearest anchor that tells of left and right as well. */
export const nearest = (anchors: readonly Anchor[], p: Point) =>
  anchors.reduce((least, a) => (a.onlyDown ? least : Math.min(least, distance(a, p))), 1e9)

export const centerOf = (part: FieldPart): Point => {
  const first = part.boxes[0]!
  const last = part.boxes.at(-1)!
  return { x: (first.x + last.x + last.width) / 2, y: first.y + first.height / 2 }
}

export const keyOf = (part: FieldPart) => `${part.key} ${part.part}`

/** Where a fit puts the middle of a part: the shift is in the field's own, slightly turned and stretched, frame. */
export function markOf(part: FieldPart, map: FieldMap, fit: PartFit, tick: boolean, mayBePlain = true): Mark {
  const center = centerOf(part)
  const u = center.x - map.center.x
  const v = center.y - map.center.y
  const d = map.displacement
  const mark = {
    key: keyOf(part),
    group: part.key,
    x: center.x,
    y: center.y,
    dx: d.dx + d.dxx * (u + fit.dx) + d.dxy * (v + fit.dy) + fit.dx,
    dy: d.dy + d.dyx * (u + fit.dx) + d.dyy * (v + fit.dy) + fit.dy,
    weight: tick ? TICK_WEIGHT : 1,
    plain: mayBePlain && !tick && Math.min(fit.supportX, fit.supportY) >= PLAIN.support && fit.ahead >= PLAIN.ahead,
    spread_mm: fit.spread_mm,
    ahead: fit.ahead,
    isComb: part.pitch_mm !== null,
    dyy: d.dyy + fit.growth,
  }
  // Only plain lines tell of stretch and lean: a wrong line among few tilts them far.
  if (part.pitch_mm === null || !mark.plain) return mark
  const width = part.boxes.at(-1)!.x + part.boxes.at(-1)!.width - part.boxes[0]!.x
  return { ...mark, slope: { dxx: d.dxx + fit.stretch, dyx: d.dyx + fit.lean, worth_mm2: (width / 4) ** 2 } }
}

/** How far each mark is from where the others (not of its own field) put it, mm; codes and rules stand as they are. */
export function disagreements(marks: readonly Mark[]): Point[] {
  const field = new ResidualField(marks)
  return marks.map((mark, i) => {
    if (mark.key === 'code' || mark.key === 'rule') return { x: 0, y: 0 }
    const d = field.at(mark, mark.group ?? i)
    return { x: d.dx - mark.dx, y: d.dy - mark.dy }
  })
}

/** Takes out the worst marks again and again while they disagree with their neighbours. */
export function refuseOutliers(marks: Mark[]): Mark[] {
  let kept = marks
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const off = disagreements(kept).map(({ x, y }, i) => ({
      mm: Math.hypot(x, y),
      allowed: kept[i]!.plain && Math.abs(y) < DISAGREE_PLAIN_DOWN_MM,
    }))
    const usual = off.map((o) => o.mm).sort((a, b) => a - b)[kept.length >> 1] ?? 0
    const limit = Math.max(DISAGREE_MM, DISAGREE_TIMES * usual)
    const worst = new Set(
      kept.filter((mark, i): boolean => {
        const { mm, allowed } = off[i]!
        if (mm <= (allowed ? DISAGREE_PLAIN_MM : limit)) return false
        return !kept.some((o, j) => off[j]!.mm > mm && distance(o, mark) < SPOILS_MM)
      }),
    )
    if (worst.size === 0) break
    kept = kept.filter((mark) => !worst.has(mark))
  }
  return kept
}
