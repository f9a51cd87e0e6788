/** The marks that are drawn for the reader: corner codes and the squares between them. */
import type { Layout } from '../../layouts/layout.ts'
import type { BlackMark } from '../cells/black-level.ts'
import { type Homography, invert, type Pair, project } from '../geometry/homography.ts'
import { ResidualField } from '../geometry/residual-field.ts'
import { type Mark, nearest } from './marks.ts'
import { measureSquare } from './measure-square.ts'
import type { Picture } from './patch.ts'

const CODE_WEIGHT = 0.6
/** How far from its neighbours' word a square is looked for, mm: more, the farther they are. */
const squareReach = (distance_mm: number) => Math.min(7, 1.2 + 0.075 * distance_mm)

export function codeMarks(pairs: readonly Pair[], homography: Homography): Mark[] {
  const back = invert(homography)
  return pairs.map(({ from, to }) => {
    const at = project(back, to.x, to.y)
    return { key: 'code', x: from.x, y: from.y, dx: at.x - from.x, dy: at.y - from.y, weight: CODE_WEIGHT }
  })
}

export interface PlacedSquares {
  marks: Mark[]
  edges_mm: number[]
  blacks: BlackMark[]
}

/** Squares, nearest to what is known first. */
export function placeSquares(picture: Picture, layout: Layout, homography: Homography, known: readonly Mark[]): PlacedSquares {
  const all = [...known]
  const field = new ResidualField(known)
  const found: PlacedSquares = { marks: [], edges_mm: [], blacks: [] }
  const waiting = layout.squares.map((s) => ({ ...s, cx: s.x + s.size / 2, cy: s.y + s.size / 2 }))
  while (waiting.length > 0) {
    waiting.sort((a, b) => nearest(all, { x: a.cx, y: a.cy }) - nearest(all, { x: b.cx, y: b.cy }))
    const square = waiting.shift()!
    const center = { x: square.cx, y: square.cy }
    const displacement = field.at(center)
    const fit = measureSquare(picture, { homography, center, displacement }, square, squareReach(nearest(all, center)))
    if (!fit) continue
    const at = { dx: displacement.dx + fit.dx, dy: displacement.dy + fit.dy, weight: 1 }
    const mark = { key: 'square', ...center, ...at }
    all.push(mark)
    field.add(mark)
    found.marks.push(mark)
    found.edges_mm.push(fit.edge_mm)
    found.blacks.push({ ...center, darkness: fit.inside })
  }
  return found
}
