/** Whether the fields that were not found lie together, as under a finger or a folded corner. */
import type { PlacedPart } from '../align/settle-parts.ts'

/** Most of the fields between those that were not found must be lost too. */
const LOST_TOGETHER = 0.6
/** A page of which more than this is lost, across or down, is not covered but badly placed. */
const MOST_OF_PAGE = 0.6
/** Single fields are lost anywhere: the outermost tenth of the lost ones on each side may lie apart. */
const APART = 0.1

type Lost = Pick<PlacedPart, 'center' | 'found'>

/** Middle of the covered part as shares of the page's width and height, or null where the lost fields lie scattered. */
export function coveredPlace(
  parts: readonly Lost[],
  page: { width: number; height: number },
): { across: number; down: number } | null {
  const lost = parts.filter((p) => !p.found)
  if (lost.length === 0) return null
  const span = (of: (p: Lost) => number) => {
    const sorted = lost.map(of).sort((a, b) => a - b)
    const skip = Math.floor(sorted.length * APART)
    return [sorted[skip]!, sorted.at(-1 - skip)!] as const
  }
  const [left, right] = span((p) => p.center.x)
  const [top, low] = span((p) => p.center.y)
  if (right - left > MOST_OF_PAGE * page.width || low - top > MOST_OF_PAGE * page.height) return null
  const within = parts.filter(({ center: { x, y } }) => x >= left && x <= right && y >= top && y <= low)
  if (within.filter((p) => !p.found).length < LOST_TOGETHER * within.length) return null
  return { across: (left + right) / 2 / page.width, down: (top + low) / 2 / page.height }
}
