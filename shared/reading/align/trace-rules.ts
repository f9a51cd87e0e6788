/**
 * Follows the dark rules that run across the page at the head of each section: they show how the paper waves between its edges,
 * where no mark stands, before any field is looked for.
 */
import { cellBounds } from '../../layouts/geometry.ts'
import type { Layout } from '../../layouts/layout.ts'
import type { Homography } from '../geometry/homography.ts'
import { type Anchor, ResidualField } from '../geometry/residual-field.ts'
import { agreeing, lineEnd } from './line-ends.ts'
import type { Mark } from './marks.ts'
import { lineProfile, type Picture, samplePatch } from './patch.ts'

/** Section rules are printed from the left to the right margin, this far from the page's edges, mm. */
const MARGIN_MM = 14
/** The rule under the head of every sheet, between the upper codes. */
const HEAD_RULE = { y: 14.4, left: 31, right: 180 } as const
const STEP_MM = 0.16
/** A window is short enough to be straight, and long enough to hold more than one letter or stroke, mm. */
const WINDOW_MM = 4
/** From one window to the next, a rule turns no more than this, mm. */
const TURN_MM = 0.45
const FIRST_REACH_MM = 1.6
/** Darkness over the paper beside it that a rule keeps along a window. */
const LEAST_CONTRAST = 0.16
/** Windows without a rule after which a trace ends. */
const MOST_GAPS = 3
/** Traces from both sides that part by more than this do not follow the same line, mm. */
const MEET_MM = 0.4

/** Steps that are kept stand so far apart, mm, and weigh as much as a field. */
const APART_MM = 8
const STEP_WEIGHT = 1

interface Step {
  x: number
  dy: number
}

/** Height of the darkest row (over most of its length) near an expected one; null where there is none. */
function lineNear(picture: Picture, homography: Homography, at: Anchor, lean: number, reach_mm: number): number | null {
  const half = reach_mm + 0.7
  const displacement = { dx: at.dx, dy: at.dy, dxx: 0, dxy: 0, dyx: lean, dyy: 0 }
  const area = { x: at.x - WINDOW_MM / 2, y: at.y - half, width: WINDOW_MM, height: 2 * half }
  const patch = samplePatch(picture, { homography, center: at, displacement }, area, STEP_MM)
  const { rows } = patch
  // Dark over three quarters of the window: letters and strokes are not.
  const row = lineProfile(patch, 'rows', patch.x, patch.x + WINDOW_MM, 0.75, 1)
  const beside = Math.round(0.7 / STEP_MM)
  let best = { contrast: LEAST_CONTRAST, y: -1 }
  for (let y = beside; y < rows - beside; y++) {
    const own = (row[y - 1]! + 2 * row[y]! + row[y + 1]!) / 4
    const contrast = own - Math.max(row[y - beside]!, row[y + beside]!)
    if (contrast > best.contrast) best = { contrast, y }
  }
  if (best.y < 0) return null
  let sum = 0
  let moment = 0
  for (let y = best.y - beside + 1; y < best.y + beside; y++) {
    const rise = Math.max(0, row[y]! - 0.05)
    sum += rise
    moment += rise * y
  }
  return at.dy + (moment / sum + 0.5) * STEP_MM - half
}

function trace(picture: Picture, homography: Homography, field: ResidualField, y: number, from: number, to: number): Step[] {
  const direction = Math.sign(to - from)
  const steps: Step[] = []
  let gaps = 0
  let lean = 0
  let last: Step | null = null
  for (let x = from + (direction * WINDOW_MM) / 2; direction * (to - x) > 0; x += direction * WINDOW_MM) {
    const guess = field.at({ x, y })
    const expected: number = last ? last.dy + lean * (x - last.x) : guess.dy
    const reach = last ? TURN_MM * (1 + gaps) : FIRST_REACH_MM
    const at = { x, y, dx: guess.dx, dy: expected, weight: 1 }
    const dy = lineNear(picture, homography, at, last ? lean : guess.dyx, reach)
    if (dy === null) {
      if (++gaps > MOST_GAPS) break
      continue
    }
    if (last) lean = 0.4 * lean + (0.6 * (dy - last.dy)) / (x - last.x)
    else lean = guess.dyx
    gaps = 0
    last = { x, dy }
    steps.push(last)
  }
  return steps
}

/** A printed line across, mm. */
interface Rule {
  y: number
  left: number
  right: number
}

/** Heights of one rule, where traces from both ends agree or only one came by. */
function traceRule(picture: Picture, homography: Homography, field: ResidualField, { y, left, right }: Rule): Mark[] {
  const forth = trace(picture, homography, field, y, left, right)
  const back = trace(picture, homography, field, y, right, left)
  return thin(merge(forth, back)).map(({ x, dy }) => {
    const { dx } = field.at({ x, y })
    return { key: 'rule', x, y, dx, dy, weight: STEP_WEIGHT, onlyDown: true as const }
  })
}

/** The rule under the head and all section rules. */
export function traceRules(picture: Picture, layout: Layout, homography: Homography, anchors: readonly Anchor[]): Mark[] {
  const sections = layout.sections.map(({ y }) => ({ y, left: MARGIN_MM, right: layout.page.width - MARGIN_MM }))
  const field = new ResidualField(anchors)
  return [HEAD_RULE, ...sections].flatMap((rule) => traceRule(picture, homography, field, rule))
}

/** Steps of a rule that must be found within a piece of it. */
const FEWEST_STEPS = 2

/** Whether a line was followed between two places. */
export const isTraced = (anchors: readonly Anchor[], { y, left, right }: Rule): boolean =>
  anchors.filter((a) => a.onlyDown && Math.abs(a.y - y) < 0.1 && a.x >= left && a.x <= right).length >= FEWEST_STEPS

/** An end counts for the lines beside it too, this far, mm. */
const BESIDE_MM = 4
/** Where the fields around tell of less bending than this, mm, the page is flat under a line, seen or not. */
const FLAT_MM = 0.35
/** A line that was followed, without its ends, is placed sideways by the fields around where these tell of less, mm. */
const SIDEWAYS_MM = 0.6

/** Whether the place of a line without frame is known within 1 mm: by itself and its ends, or by flat paper around. */
export function isPlaced(anchors: readonly Anchor[], field: ResidualField, line: Rule): boolean {
  const sides = [line.left, line.right].map((x) => ({ x, bend: field.at({ x, y: line.y }) }))
  if (!isTraced(anchors, line)) return sides.every(({ bend }) => Math.hypot(bend.dx, bend.dy) < FLAT_MM)
  const hasEnd = (x: number) => anchors.some((a) => !a.onlyDown && Math.abs(a.y - line.y) < 0.1 && Math.abs(a.x - x) < BESIDE_MM)
  return sides.every(({ x, bend }) => Math.abs(bend.dx) < SIDEWAYS_MM || hasEnd(x))
}

/** Lines that stand so near each other, mm, are followed as one. */
const SAME_LINE_MM = 6

/** The lines under signatures and remarks, which have no frame of their own: to be followed when all fields are placed. */
export function traceBaselines(picture: Picture, layout: Layout, homography: Homography, anchors: readonly Anchor[]): Mark[] {
  const rules: Rule[] = []
  for (const cell of layout.cells) {
    if (cell.kind !== 'line' && cell.kind !== 'signature') continue
    const { x, y, width, height } = cellBounds(cell)
    const rule = rules.find(
      (r) => Math.abs(r.y - y - height) < 0.1 && x - r.right < SAME_LINE_MM && r.left - x - width < SAME_LINE_MM,
    )
    if (!rule) rules.push({ y: y + height, left: x, right: x + width })
    else {
      rule.left = Math.min(rule.left, x)
      rule.right = Math.max(rule.right, x + width)
    }
  }
  const field = new ResidualField(anchors)
  const followed = rules.flatMap((rule) => traceRule(picture, homography, field, rule))
  const lower = new ResidualField([...anchors, ...followed])
  const ends = layout.cells.flatMap((cell) => {
    if (cell.kind !== 'signature') return []
    const { x, y, width, height } = cellBounds(cell)
    const line = { y: y + height, left: x, right: x + width }
    if (!isTraced(followed, line)) return []
    const both = [
      lineEnd(picture, homography, lower, { x, y: line.y }, 1),
      lineEnd(picture, homography, lower, { x: line.right, y: line.y }, -1),
    ]
    return both.flatMap((end) => end ?? [])
  })
  return [...followed, ...agreeing(ends)]
}

/** Height of a trace between its steps; null outside or across a gap. */
function heightAt(steps: readonly Step[], x: number): number | null {
  for (let i = 1; i < steps.length; i++) {
    const [a, b] = [steps[i - 1]!, steps[i]!]
    const share = (x - a.x) / (b.x - a.x)
    if (share >= 0 && share <= 1 && Math.abs(b.x - a.x) <= 2 * WINDOW_MM) return a.dy + share * (b.dy - a.dy)
  }
  return null
}

/** Fewer steps say as much, each for more of the rule. */
function thin(steps: Step[]): Step[] {
  let last = Number.NEGATIVE_INFINITY
  return steps
    .sort((a, b) => a.x - b.x)
    .filter(({ x }) => {
      if (x - last < APART_MM) return false
      last = x
      return true
    })
}

function merge(forth: readonly Step[], back: readonly Step[]): Step[] {
  const both = [
    ...forth.map((s) => ({ s, other: heightAt(back, s.x) })),
    ...back.map((s) => ({ s, other: heightAt(forth, s.x) })),
  ]
  const agreed = both.filter(({ s, other }) => other !== null && Math.abs(other - s.dy) < MEET_MM).map(({ s }) => s)
  const parted = both.filter(({ s, other }) => other !== null && Math.abs(other - s.dy) >= MEET_MM).length
  // A trace that no other contradicts stands; where two part, each is believed near its own edge only.
  if (parted === 0) return both.map(({ s }) => s)
  return agreed.length > 2 * parted ? agreed : [...forth.slice(0, 3), ...back.slice(0, 3)]
}
