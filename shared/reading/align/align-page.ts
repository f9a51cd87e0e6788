/**
 * Places every field of a sheet: from the corner codes to the squares, and outwards from those field by field, each found near
 * where its placed neighbours say it is, each checked against them afterwards.
 */
import type { Layout, LayoutCell } from '../../layouts/layout.ts'
import type { BlackMark } from '../cells/black-level.ts'
import { fitHomography, type Homography, invert, multiply, type Pair, project } from '../geometry/homography.ts'
import type { FieldMap } from '../geometry/page-map.ts'
import { type Anchor, type Displacement, displacementAt } from '../geometry/residual-field.ts'
import type { Point } from '../pixels/grey.ts'
import { type FieldPart, fieldParts } from './field-lines.ts'
import { frameContrast } from './lines.ts'
import { fieldPatch, measureParts, type PartFit } from './measure-part.ts'
import { measureSquare } from './measure-square.ts'
import { measureTickPlace } from './measure-tick.ts'
import type { Picture } from './patch.ts'
import { traceRules } from './trace-rules.ts'

export interface PlacedPart {
  part: FieldPart
  center: Point
  displacement: Displacement
  /** Found on its own lines and agreeing with its neighbours. */
  found: boolean
  /** Its own place against the one its neighbours give it, mm. */
  fit_mm: number
}

export interface Alignment {
  /** Layout mm to pixels of the full picture. */
  homography: Homography
  anchors: Anchor[]
  parts: PlacedPart[]
  /** Share of the parts that were found. */
  foundShare: number
  /** Edge width of the squares, mm: how sharp the picture is. Null when no square was found. */
  edge_mm: number | null
  /** How dark solid print is, where squares were found. */
  blacks: BlackMark[]
  /** How much more alike combs are in their places than one box to the side (median): 0 where nothing tells them apart. */
  ahead: number
}

/** A field's lines must be this alike to be believed: frames are pale, so noise lowers it, and nothing else on a page repeats them. */
const LEAST_SUPPORT = { comb: 0.4, tick: 0.33 } as const
/** A comb must be at least as alike in its place as one box to the side; that all of a page are surely so is judged together. */
const LEAST_AHEAD = 0
/** How far from its neighbours' word a field is looked for, mm: more, the farther they are. */
const combReach = (distance_mm: number) => Math.min(2.4, 0.7 + 0.05 * distance_mm)
const squareReach = (distance_mm: number) => Math.min(7, 1.2 + 0.075 * distance_mm)
const TICK_REACH_MM = 0.9
/** Fields refused or not found are looked for again, from neighbours that are surer by then. */
const SECOND_LOOKS = 2
/** Disagreement with the neighbours that is refused, mm: at least this, or some times the page's usual one. */
const DISAGREE_MM = 0.55
/** A field whose own lines leave no doubt may differ so far, mm: paper folds; it is still far from the next box. */
const DISAGREE_PLAIN_MM = 1.8
const PLAIN = { support: 0.65, ahead: 0.25 } as const

interface Mark extends Anchor {
  key: string
  /** Its own lines leave no doubt where it is. */
  plain?: boolean
  spread_mm?: number
  ahead?: number
}

const scaleHomography = (h: Homography, scale: number): Homography => multiply([scale, 0, 0, 0, scale, 0, 0, 0, 1], h)

const median = (values: number[]) => values.sort((a, b) => a - b)[values.length >> 1] ?? 0
const distance = (a: Point, b: Point) => Math.hypot(a.x - b.x, a.y - b.y)
const nearest = (anchors: readonly Anchor[], p: Point) => anchors.reduce((least, a) => Math.min(least, distance(a, p)), 1e9)

function codeAnchors(pairs: readonly Pair[], homography: Homography): Mark[] {
  const back = invert(homography)
  return pairs.map(({ from, to }) => {
    const at = project(back, to.x, to.y)
    return { key: 'code', x: from.x, y: from.y, dx: at.x - from.x, dy: at.y - from.y, weight: 0.6 }
  })
}

/** Squares, nearest to what is known first. */
function placeSquares(picture: Picture, layout: Layout, homography: Homography, anchors: Mark[]) {
  const edges: number[] = []
  const blacks: BlackMark[] = []
  const waiting = layout.squares.map((s) => ({ ...s, cx: s.x + s.size / 2, cy: s.y + s.size / 2 }))
  while (waiting.length > 0) {
    waiting.sort((a, b) => nearest(anchors, { x: a.cx, y: a.cy }) - nearest(anchors, { x: b.cx, y: b.cy }))
    const square = waiting.shift()!
    const center = { x: square.cx, y: square.cy }
    const displacement = displacementAt(anchors, center)
    const fit = measureSquare(picture, { homography, center, displacement }, square, squareReach(nearest(anchors, center)))
    if (!fit) continue
    edges.push(fit.edge_mm)
    blacks.push({ ...center, darkness: fit.inside })
    anchors.push({ key: 'square', ...center, dx: displacement.dx + fit.dx, dy: displacement.dy + fit.dy, weight: 1 })
  }
  return { edges, blacks }
}

const isTick = (cell: LayoutCell) => cell.kind === 'tick' || cell.kind === 'choice'

const centerOf = (part: FieldPart): Point => {
  const first = part.boxes[0]!
  const last = part.boxes.at(-1)!
  return { x: (first.x + last.x + last.width) / 2, y: first.y + first.height / 2 }
}

const isGood = (fit: PartFit, tick: boolean): boolean => {
  const least = tick ? LEAST_SUPPORT.tick : LEAST_SUPPORT.comb
  return fit.supportX >= least && fit.supportY >= least && (tick || fit.ahead >= LEAST_AHEAD)
}

interface FramedPicture extends Picture {
  frameContrast: number
}

interface Placing {
  parts: FieldPart[]
  tick: boolean
  center: Point
}

const anchorKey = (part: FieldPart) => `${part.key} ${part.part}`

/** Where a fit puts the middle of a part: the shift is in the field's own, slightly turned and stretched, frame. */
function markOf(part: FieldPart, map: FieldMap, fit: PartFit, weight: number): Mark {
  const center = centerOf(part)
  const u = center.x - map.center.x
  const v = center.y - map.center.y
  const d = map.displacement
  const dx = d.dx + d.dxx * (u + fit.dx) + d.dxy * (v + fit.dy) + fit.dx
  const dy = d.dy + d.dyx * (u + fit.dx) + d.dyy * (v + fit.dy) + fit.dy
  const plain = Math.min(fit.supportX, fit.supportY) >= PLAIN.support && fit.ahead >= PLAIN.ahead
  const { spread_mm, ahead } = fit
  return { key: anchorKey(part), x: center.x, y: center.y, dx, dy, weight, plain, spread_mm, ahead }
}

function place(
  picture: FramedPicture,
  homography: Homography,
  anchors: readonly Mark[],
  placing: Placing,
  reach_mm: number,
): Mark[] {
  const own = new Set(placing.parts.map(anchorKey))
  const map = {
    homography,
    center: placing.center,
    displacement: displacementAt(anchors, placing.center, (a) => own.has((a as Mark).key)),
  }
  const fits = placing.tick
    ? placing.parts.map((part) => measureTickPlace(picture, map, part, reach_mm))
    : measureParts(fieldPatch(picture, map, placing.parts[0]!.field, reach_mm), placing.parts, reach_mm, picture.frameContrast)
  return fits.flatMap((fit, i) =>
    isGood(fit, placing.tick) ? [markOf(placing.parts[i]!, map, fit, placing.tick ? 0.4 : 1)] : [],
  )
}

const fieldOf = (anchor: Anchor) => (anchor as Mark).key.replace(/ \d+$/, '')

/** How far an anchor is from where the others (not of its own field) put it, mm. */
function disagreement(anchors: readonly Mark[], mark: Mark): number {
  const field = fieldOf(mark)
  const d = displacementAt(
    anchors,
    mark,
    (other) => other === mark || (field !== 'code' && field !== 'square' && fieldOf(other) === field),
  )
  return Math.hypot(d.dx - mark.dx, d.dy - mark.dy)
}

/** Takes out the worst anchor again and again while it disagrees with its neighbours. */
function refuseOutliers(anchors: Mark[]): Mark[] {
  let kept = anchors
  for (let round = 0; round < 6; round++) {
    const off = kept.map((mark) => (mark.key === 'code' || mark.key === 'rule' ? 0 : disagreement(kept, mark)))
    const usual = [...off].sort((a, b) => a - b)[kept.length >> 1] ?? 0
    const limit = Math.max(DISAGREE_MM, 4 * usual)
    const worst = new Set(
      kept.filter((mark, i) => {
        if (off[i]! <= (mark.plain ? DISAGREE_PLAIN_MM : limit)) return false
        return !kept.some((o, j) => off[j]! > off[i]! && distance(o, mark) < 22)
      }),
    )
    if (worst.size === 0) break
    kept = kept.filter((mark) => !worst.has(mark))
  }
  return kept
}

function placings(layout: Layout, planned: boolean): Placing[] {
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

function placeOutwards(picture: FramedPicture, homography: Homography, anchors: Mark[], waiting: Placing[]): void {
  const left = [...waiting]
  const near = new Map(left.map((p) => [p, nearest(anchors, p.center)]))
  while (left.length > 0) {
    let next = 0
    for (let i = 1; i < left.length; i++) if (near.get(left[i]!)! < near.get(left[next]!)!) next = i
    const placing = left.splice(next, 1)[0]!
    const reach = placing.tick ? TICK_REACH_MM : combReach(near.get(placing)!)
    const marks = place(picture, homography, anchors, placing, reach)
    anchors.push(...marks)
    for (const mark of marks) {
      for (const other of left) {
        const d = distance(mark, other.center)
        if (d < near.get(other)!) near.set(other, d)
      }
    }
  }
}

/**
 * Aligns a page. `codePairs`: points of the corner codes, layout mm to px of the full picture. `scale`: pixels of `picture` a
 * pixel of the full picture.
 */
export function alignPage(
  picture: Picture,
  scale: number,
  layout: Layout,
  planned: boolean,
  codePairs: readonly Pair[],
  start: Homography,
): Alignment {
  const pairs = codePairs.map(({ from, to }) => ({ from, to: { x: to.x * scale, y: to.y * scale } }))
  let homography = scaleHomography(start, scale)
  let anchors = codeAnchors(pairs, homography)
  const { edges, blacks } = placeSquares(picture, layout, homography, anchors)
  if (pairs.length < 16) {
    const squares = anchors.filter((a) => a.key === 'square')
    const toPicture = (a: Mark) => ({ from: { x: a.x, y: a.y }, to: project(homography, a.x + a.dx, a.y + a.dy) })
    const all = [...pairs, ...squares.map(toPicture)]
    const better = fitHomography(all)
    if (better) {
      anchors = codeAnchors(all, better).map((a, i) => (i < pairs.length ? a : { ...a, key: 'square', weight: 1 }))
      homography = better
    }
  }
  const edge_mm = edges.length === 0 ? null : edges.sort((a, b) => a - b)[edges.length >> 1]!
  const framed = { ...picture, frameContrast: frameContrast(edge_mm) }
  anchors.push(...traceRules(picture, layout, homography, anchors).map((a) => ({ ...a, key: 'rule' })))
  const all = placings(layout, planned)
  placeOutwards(
    framed,
    homography,
    anchors,
    all.filter((p) => !p.tick),
  )
  const lacks = (p: Placing) => p.parts.some((part) => !anchors.some((a) => a.key === anchorKey(part)))
  for (let round = 0; round < SECOND_LOOKS; round++) {
    anchors = refuseOutliers(anchors)
    const again = all.filter((p) => !p.tick && lacks(p))
    if (again.length === 0) break
    const keys = new Set(again.flatMap((p) => p.parts.map(anchorKey)))
    anchors = anchors.filter((a) => !keys.has(a.key))
    placeOutwards(framed, homography, anchors, again)
  }
  placeOutwards(
    framed,
    homography,
    anchors,
    all.filter((p) => p.tick),
  )
  anchors = refuseOutliers(anchors)
  const byKey = new Map(anchors.map((a) => [a.key, a]))
  const parts = all
    .flatMap((p) => p.parts)
    .map((part): PlacedPart => {
      const center = centerOf(part)
      const mark = byKey.get(anchorKey(part))
      const displacement = displacementAt(anchors, center)
      if (!mark) return { part, center, displacement, found: false, fit_mm: Number.NaN }
      return {
        part,
        center,
        displacement: { ...displacement, dx: mark.dx, dy: mark.dy },
        found: true,
        fit_mm: mark.plain ? Math.max(0, mark.spread_mm ?? 0) : disagreement(anchors, mark),
      }
    })
  return {
    homography: scaleHomography(homography, 1 / scale),
    anchors: anchors.map(({ x, y, dx, dy, weight, onlyDown }) =>
      onlyDown ? { x, y, dx, dy, weight, onlyDown } : { x, y, dx, dy, weight },
    ),
    parts,
    foundShare: parts.length === 0 ? 0 : parts.filter((p) => p.found).length / parts.length,
    edge_mm,
    blacks,
    ahead: median(anchors.flatMap((a) => (a.ahead === undefined || a.ahead === 1 ? [] : [a.ahead]))),
  }
}
