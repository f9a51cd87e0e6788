/**
 * Places every field of a sheet: from the corner codes to the squares, along the section rules, and outwards from those field
 * by field, each found near where its placed neighbours say it is, each checked against them afterwards.
 */
import type { Layout } from '../../layouts/layout.ts'
import type { BlackMark } from '../cells/black-level.ts'
import { fitHomography, type Homography, multiply, type Pair, project, scaleAt } from '../geometry/homography.ts'
import type { Anchor } from '../geometry/residual-field.ts'
import { frameContrast } from './lines.ts'
import { keyOf, type Mark, refuseOutliers } from './marks.ts'
import { stepFor } from './measure-part.ts'
import type { Picture } from './patch.ts'
import { type Placing, placeOutwards, placings } from './place-fields.ts'
import { codeMarks, placeSquares } from './place-squares.ts'
import { type PlacedPart, settleParts } from './settle-parts.ts'
import { traceBaselines, traceRules } from './trace-rules.ts'

export type { PlacedPart } from './settle-parts.ts'

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

/** Fields refused or not found are looked for again, from neighbours that are surer by then. */
const SECOND_LOOKS = 2
/** How much paler frames are thought to be with each further look. */
const PALE = 0.65
/** Points that four whole corner codes give. */
const FOUR_CODES = 20

const scaled = (h: Homography, scale: number): Homography => multiply([scale, 0, 0, 0, scale, 0, 0, 0, 1], h)
const median = (values: number[]) => values.sort((a, b) => a - b)[values.length >> 1]

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
  const first = scaled(start, scale)
  const squares = placeSquares(picture, layout, first, codeMarks(pairs, first))
  const { homography, marks } = steady(pairs, squares.marks, first)
  marks.push(...traceRules(picture, layout, homography, marks))
  const edge_mm = median(squares.edges_mm) ?? null
  const px_per_mm = scaleAt(homography, layout.page.width / 2, layout.page.height / 2)
  const framed = { ...picture, frameContrast: frameContrast(edge_mm), step_mm: stepFor(px_per_mm) }

  const all = placings(layout, planned)
  const combs = all.filter((p) => !p.tick)
  let known: Mark[] = marks
  for (const kind of [combs, all.filter((p) => p.tick)]) {
    known = refuseOutliers([...known, ...placeOutwards(framed, homography, known, kind)])
    for (let round = 0; round < SECOND_LOOKS; round++) {
      const again = kind.filter((p) => isLacking(p, known))
      if (again.length === 0) break
      const keys = new Set(again.flatMap((p) => p.parts.map(keyOf)))
      known = known.filter((mark) => !keys.has(mark.key))
      // A copy of a copy, or a tired cartridge, prints paler frames than ours.
      const pale = { ...framed, pale: true, frameContrast: framed.frameContrast * PALE ** (round + 1) }
      known = refuseOutliers([...known, ...placeOutwards(pale, homography, known, again)])
    }
  }

  const parts = settleParts(
    all.flatMap((p) => p.parts),
    known,
  )
  known = [...known, ...traceBaselines(picture, layout, homography, known)]
  return {
    homography: scaled(homography, 1 / scale),
    anchors: known.map(({ key: _k, plain: _p, spread_mm: _s, ahead: _a, isComb: _c, dyy: _d, ...anchor }) => anchor),
    parts,
    foundShare: parts.length === 0 ? 0 : parts.filter((p) => p.found).length / parts.length,
    edge_mm,
    blacks: squares.blacks,
    ahead: median(known.flatMap((m) => (m.isComb && m.ahead !== undefined ? [m.ahead] : []))) ?? 0,
  }
}

const isLacking = (placing: Placing, marks: readonly Mark[]) =>
  placing.parts.some((part) => !marks.some((mark) => mark.key === keyOf(part)))

/** With a corner missing, the squares help to fix the perspective. */
function steady(pairs: readonly Pair[], squares: readonly Mark[], first: Homography): { homography: Homography; marks: Mark[] } {
  const found = squares.map((s) => ({ from: { x: s.x, y: s.y }, to: project(first, s.x + s.dx, s.y + s.dy) }))
  const better = pairs.length < FOUR_CODES ? fitHomography([...pairs, ...found]) : null
  if (!better) return { homography: first, marks: [...codeMarks(pairs, first), ...squares] }
  const again = codeMarks(found, better).map((mark) => ({ ...mark, key: 'square', weight: 1 }))
  return { homography: better, marks: [...codeMarks(pairs, better), ...again] }
}
