/** Whether a picture is good enough, and if not, which advice helps. */
import type { Alignment } from './align/align-page.ts'
import { project } from './geometry/homography.ts'
import { isBlackAndWhite } from './locate/black-and-white.ts'
import { isBlurred } from './locate/blur.ts'
import { coveredPlace } from './locate/covered-place.ts'
import { cornersMissing, covered, type TakeAgain, takeAgain } from './locate/take-again.ts'
import { type Grey, isInside } from './pixels/grey.ts'
import { type PaperLevel, paperAt } from './pixels/paper.ts'

/** A page with less of its fields found may be set wrongly as a whole. */
export const LEAST_FOUND = 0.95
/** Combs that look no better in their places than one box to the side may all be one box off. */
const LEAST_AHEAD = 0.15
/** A digit is 4 to 6 mm high: under this it is a blot. Pixels a millimetre. */
export const LEAST_PX_PER_MM = 3.2
/** Paper darker than this is noise and little else (0 to 255). */
const DARK_PAPER = 45
/** From black to white over so much of a millimetre, writing runs together. */
const BLURRED_MM = 0.85
/** Paper at the end of the scale: mirrored light. */
const GLARED_PAPER = 250

export interface PlacedPage {
  /** mm. */
  page: { width: number; height: number }
  picture: { grey: Grey; paper: PaperLevel }
  scale: number
  alignment: Alignment
  corners: readonly number[]
  pageCorners: ReadonlyArray<{ x: number; y: number }>
}

/** Null when the page may be read. */
export function judgePlacing({ page, picture, scale, alignment, corners, pageCorners }: PlacedPage): TakeAgain | null {
  if (alignment.foundShare >= LEAST_FOUND && alignment.ahead >= LEAST_AHEAD) return null
  const missing = [0, 1, 2, 3].filter((c) => !corners.includes(c))
  const full = { ...picture.grey, width: picture.grey.width / scale, height: picture.grey.height / scale }
  // Outside the picture there is no light to judge.
  const levels = alignment.parts.flatMap((p) => {
    const to = project(alignment.homography, p.center.x, p.center.y)
    return isInside(full, to) ? [{ found: p.found, level: paperAt(picture.paper, to.x * scale, to.y * scale) }] : []
  })
  const lost = levels.filter((l) => !l.found)
  const typical = levels.map((l) => l.level).sort((a, b) => a - b)[levels.length >> 1] ?? 0
  if (typical < DARK_PAPER) return takeAgain('too dark')
  const glared = lost.filter((l) => l.level >= GLARED_PAPER).length
  if (typical < GLARED_PAPER && glared > lost.length / 3) return takeAgain('glare')
  if ((alignment.edge_mm ?? 0) > BLURRED_MM) return takeAgain('too blurred')
  if (missing.length > 0) {
    const outside = missing.filter((c) => !isInside(full, pageCorners[c]!))
    // What lies outside comes first: moving the phone may bring the others in as well.
    return outside.length > 0 ? cornersMissing(outside, true) : cornersMissing(missing, false)
  }
  if (isBlackAndWhite(picture.grey)) return takeAgain('black and white')
  const place = coveredPlace(alignment.parts, page)
  return place ? covered(place.across, place.down) : takeAgain('cannot place')
}

/** A picture, at half size, without any readable code: dark, blurred, or simply without a sheet. */
export function judgeNothingFound(half: Grey, paper: PaperLevel): TakeAgain {
  const levels = Array.from(paper.level.data).sort((a, b) => a - b)
  if ((levels[Math.floor(levels.length * 0.9)] ?? 0) < DARK_PAPER) return takeAgain('too dark')
  return takeAgain(isBlurred(half) ? 'too blurred' : 'no sheet')
}
