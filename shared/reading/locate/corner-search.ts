/** Setting one corner code on the picture, near where it must be. */
import { cornerModules } from '../../layouts/corner-modules.ts'
import type { Layout } from '../../layouts/layout.ts'
import { type CornerCode, parseCornerCode } from '../../layouts/sheet-code.ts'
import { fitHomography, type Homography, multiply, type Pair, project, scaleAt } from '../geometry/homography.ts'
import { crop, type Grey, isInside, type Point } from '../pixels/grey.ts'
import type { CodeFinder, FoundCode } from './code-finder.ts'
import { correlate, makePattern, type Pattern, registerPattern } from './register-code.ts'

/** A corner code set on the picture: its four corners and middle in layout mm and in pixels of the full picture. */
export interface PlacedCorner {
  corner: number
  pairs: Pair[]
  correlation: number
  decoded: boolean
}

/** Likeness under which a set pattern is not believed. */
const LIKE = 0.55
/** Likeness of a coarse place that is worth refining. */
const WORTH_REFINING = 0.3
/** How far around its expected place a code is looked for, mm. */
const LOOK_MM = 9
/** A window larger than this comes from a guess that is no use, px. */
const LARGEST_WINDOW_PX = 2000

/** Corners of the symbol in modules, clockwise from its upper left. */
const symbolCorners = (modules: number): Point[] => [
  { x: 0, y: 0 },
  { x: modules, y: 0 },
  { x: modules, y: modules },
  { x: 0, y: modules },
]

const moduleToLayout = (layout: Layout, corner: number, modules: number): Homography => {
  const { x, y, size } = layout.codes[corner]!
  const step = size / modules
  return [step, 0, x, 0, step, y, 0, 0, 1]
}

/** Refines a pattern from a first place; null when it is not like the picture there. */
function settle(
  full: Grey,
  layout: Layout,
  corner: number,
  pattern: Pattern,
  start: Homography | null,
  decoded: boolean,
): PlacedCorner | null {
  const registered = start && registerPattern(full, pattern, start)
  if (!registered || registered.correlation < LIKE) return null
  const layoutOf = moduleToLayout(layout, corner, pattern.modules)
  const points = [...symbolCorners(pattern.modules), { x: pattern.modules / 2, y: pattern.modules / 2 }]
  const pairs = points.map((p) => ({ from: project(layoutOf, p.x, p.y), to: project(registered.toPhoto, p.x, p.y) }))
  return { corner, pairs, correlation: registered.correlation, decoded }
}

/** Sets a code that the finder read. */
export function settleFound(full: Grey, layout: Layout, code: CornerCode, at: FoundCode['corners']): PlacedCorner | null {
  const pattern = makePattern(cornerModules(code))
  const start = fitHomography(symbolCorners(pattern.modules).map((from, i) => ({ from, to: at[i]! })))
  return settle(full, layout, code.corner, pattern, start, true)
}

/** Runs the finder on a window about the expected place, at full size. */
export async function readInWindow(
  full: Grey,
  find: CodeFinder,
  guess: Homography,
  layout: Layout,
  corner: number,
): Promise<{ code: CornerCode; at: FoundCode['corners'] } | null> {
  const { x, y, size } = layout.codes[corner]!
  const middle = { x: x + size / 2, y: y + size / 2 }
  const center = project(guess, middle.x, middle.y)
  const reach = (size / 2 + LOOK_MM) * scaleAt(guess, middle.x, middle.y)
  if (!Number.isFinite(reach) || 2 * reach > LARGEST_WINDOW_PX || !isInside(full, center, -reach / 3)) return null
  const window = crop(full, center.x - reach, center.y - reach, center.x + reach, center.y + reach)
  if (!window) return null
  for (const found of await find(window.grey)) {
    const code = parseCornerCode(found.text)
    if (code?.corner !== corner || code.layoutCode !== layout.code) continue
    const at = found.corners.map((p) => ({ x: p.x + window.x, y: p.y + window.y })) as unknown as FoundCode['corners']
    return { code, at }
  }
  return null
}

/** Slides the known pattern over the neighbourhood of its expected place. */
export function searchByPattern(
  full: Grey,
  half: Grey,
  guess: Homography,
  layout: Layout,
  code: CornerCode,
): PlacedCorner | null {
  const pattern = makePattern(cornerModules(code))
  const start = multiply(guess, moduleToLayout(layout, code.corner, pattern.modules))
  const center = project(start, pattern.modules / 2, pattern.modules / 2)
  if (!isInside(full, center, -0.5 * scaleAt(start, 0, 0) * pattern.modules)) return null
  const reach = Math.round((LOOK_MM * pattern.modules) / layout.codes[code.corner]!.size)
  const shrink = half.width / full.width
  const shifted = (dx: number, dy: number) => multiply(start, [1, 0, dx, 0, 1, dy, 0, 0, 1])
  const onHalf = (h: Homography) => multiply([shrink, 0, 0, 0, shrink, 0, 0, 0, 1], h)
  let best = { correlation: WORTH_REFINING, dx: 0, dy: 0, found: false }
  for (let dy = -reach; dy <= reach; dy++) {
    for (let dx = -reach; dx <= reach; dx++) {
      const correlation = correlate(half, pattern, onHalf(shifted(dx, dy)), 4)
      if (correlation > best.correlation) best = { correlation, dx, dy, found: true }
    }
  }
  return best.found ? settle(full, layout, code.corner, pattern, shifted(best.dx, best.dy), false) : null
}
