/** Finds the sheet by its corner codes: those that decode first, the others where they must be. */
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

export interface FoundSheet {
  layout: Layout
  code: CornerCode
  corners: PlacedCorner[]
  homography: Homography
}

export type FindOutcome =
  | { kind: 'found'; sheet: FoundSheet }
  | { kind: 'none' }
  | { kind: 'unknown layout' }
  | { kind: 'two sheets' }

interface Decoded {
  code: CornerCode
  corners: FoundCode['corners']
}

/** Likeness under which a pattern set by correlation is not believed. */
const LIKE = 0.55
/** How far around its expected place a code that does not decode is looked for, mm. */
const LOOK_MM = 9

/** Corners of the symbol in modules. */
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

function placed(layout: Layout, corner: number, pattern: Pattern, toPhoto: Homography, correlation: number, decoded: boolean) {
  const layoutOf = moduleToLayout(layout, corner, pattern.modules)
  const points = [...symbolCorners(pattern.modules), { x: pattern.modules / 2, y: pattern.modules / 2 }]
  const pairs = points.map((p) => ({ from: project(layoutOf, p.x, p.y), to: project(toPhoto, p.x, p.y) }))
  return { corner, pairs, correlation, decoded }
}

/** Looks at half size first (as many found, a fifth of the time), then at full size. */
async function decode(full: Grey, half: Grey, find: CodeFinder): Promise<Decoded[]> {
  const scan = async (grey: Grey, scale: number): Promise<Decoded[]> =>
    (await find(grey)).flatMap(({ text, corners }) => {
      const code = parseCornerCode(text)
      const scaled = corners.map(({ x, y }) => ({ x: x * scale, y: y * scale })) as unknown as FoundCode['corners']
      return code ? [{ code, corners: scaled }] : []
    })
  const found = await scan(half, full.width / half.width)
  return found.length > 0 ? found : scan(full, 1)
}

const fitAll = (corners: readonly PlacedCorner[]) => fitHomography(corners.flatMap((c) => c.pairs))

/** Tries the code finder on a window about the expected place, then correlation over the window. */
async function findGuided(
  full: Grey,
  half: Grey,
  find: CodeFinder,
  guess: Homography,
  layout: Layout,
  code: CornerCode,
  corner: number,
): Promise<PlacedCorner | null> {
  const at = layout.codes[corner]!
  const middle = { x: at.x + at.size / 2, y: at.y + at.size / 2 }
  const center = project(guess, middle.x, middle.y)
  const scale = scaleAt(guess, middle.x, middle.y)
  const reach = (at.size / 2 + LOOK_MM) * scale
  if (!Number.isFinite(reach) || !isInside(full, center, -reach / 3)) return null
  const pattern = makePattern(cornerModules({ ...code, corner }))
  const toLayout = moduleToLayout(layout, corner, pattern.modules)
  const window = crop(full, center.x - reach, center.y - reach, center.x + reach, center.y + reach)
  if (window && window.grey.width < 2000) {
    for (const found of await find(window.grey)) {
      const parsed = parseCornerCode(found.text)
      if (parsed?.sheetCode !== code.sheetCode || parsed.corner !== corner) continue
      const pairs = symbolCorners(pattern.modules).map((from, i) => ({
        from,
        to: { x: found.corners[i]!.x + window.x, y: found.corners[i]!.y + window.y },
      }))
      const start = fitHomography(pairs)
      const registered = start && registerPattern(full, pattern, start)
      if (registered && registered.correlation > LIKE)
        return placed(layout, corner, pattern, registered.toPhoto, registered.correlation, true)
    }
  }
  return searchByCorrelation(full, half, pattern, multiply(guess, toLayout), layout, corner)
}

function searchByCorrelation(
  full: Grey,
  half: Grey,
  pattern: Pattern,
  start: Homography,
  layout: Layout,
  corner: number,
): PlacedCorner | null {
  const module_mm = layout.codes[corner]!.size / pattern.modules
  const reach = Math.round(LOOK_MM / module_mm)
  const shrink = half.width / full.width
  const toHalf = (h: Homography) => multiply([shrink, 0, 0, 0, shrink, 0, 0, 0, 1], h)
  const shifted = (dx: number, dy: number) => multiply(start, [1, 0, dx, 0, 1, dy, 0, 0, 1])
  let best = { correlation: 0, dx: 0, dy: 0 }
  for (let dy = -reach; dy <= reach; dy++) {
    for (let dx = -reach; dx <= reach; dx++) {
      const correlation = correlate(half, pattern, toHalf(shifted(dx, dy)), 4)
      if (correlation > best.correlation) best = { correlation, dx, dy }
    }
  }
  if (best.correlation < 0.3) return null
  const registered = registerPattern(full, pattern, shifted(best.dx, best.dy))
  if (!registered || registered.correlation < LIKE) return null
  return placed(layout, corner, pattern, registered.toPhoto, registered.correlation, false)
}

/** Finds the sheet in a picture. Throws nothing; a picture without a sheet is an outcome. */
export async function findSheet(
  full: Grey,
  half: Grey,
  find: CodeFinder,
  layoutOf: (code: string, version: number) => Layout | null,
): Promise<FindOutcome> {
  const decoded = await decode(full, half, find)
  const first = decoded[0]
  if (!first) return { kind: 'none' }
  if (decoded.some(({ code }) => code.sheetCode !== first.code.sheetCode)) return { kind: 'two sheets' }
  const corners = decoded.map(({ code }) => code.corner)
  if (new Set(corners).size < corners.length) return { kind: 'two sheets' }
  const layout = layoutOf(first.code.layoutCode, first.code.version)
  if (!layout) return { kind: 'unknown layout' }

  const found: PlacedCorner[] = []
  for (const { code, corners: at } of decoded) {
    const pattern = makePattern(cornerModules(code))
    const start = fitHomography(symbolCorners(pattern.modules).map((from, i) => ({ from, to: at[i]! })))
    const registered = start && registerPattern(full, pattern, start)
    if (registered && registered.correlation > LIKE) {
      found.push(placed(layout, code.corner, pattern, registered.toPhoto, registered.correlation, true))
    }
  }
  if (found.length === 0) return { kind: 'none' }
  // Nearest corners first, so that each new one steadies the guess for the next.
  for (const corner of [0, 1, 2, 3].filter((c) => !found.some((f) => f.corner === c)).sort(nearestTo(found))) {
    const guess = fitAll(found)
    const next = guess && (await findGuided(full, half, find, guess, layout, first.code, corner))
    if (next) found.push(next)
  }
  const homography = fitAll(found)
  return homography ? { kind: 'found', sheet: { layout, code: first.code, corners: found, homography } } : { kind: 'none' }
}

/** A corner across the short side of the page is nearer than one along the long side, and both than the opposite one. */
const nearestTo = (found: readonly PlacedCorner[]) => {
  const distance = (corner: number) =>
    Math.min(
      ...found.map((f) => (f.corner + corner === 1 || f.corner + corner === 5 ? 1 : (f.corner + corner) % 2 === 1 ? 2 : 3)),
    )
  return (a: number, b: number) => distance(a) - distance(b)
}
