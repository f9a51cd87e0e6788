/**
 * Whether an area holds writing: signatures are never read, only seen. The printed line below is looked for first: it tells where
 * the area really ends, and whether ink would show there at all.
 */
import type { Box } from '../../layouts/geometry.ts'
import { type Patch, type Picture, samplePatch } from '../align/patch.ts'
import type { FieldMap } from '../geometry/page-map.ts'

const STEP_MM = 0.25
/** The line is looked for so far around its place, mm, and so much leaning, mm a mm. */
const REACH_MM = 1.6
const LEANS = [0, 0.01, -0.01, 0.02, -0.02, 0.03, -0.03, 0.04, -0.04]
/** Kept off the line, mm. */
const ABOVE_LINE_MM = 0.7
/** Darkness (of solid print), over 3 x 3 samples, from which on there is ink: a pen is hardly wider, grain is finer. */
const INK_FROM = 0.22
/** The line is judged in so many pieces: mirrored light may take one end of it. */
const PIECES = 5

export interface AreaInk {
  /** Ink above the line, mm². */
  ink_mm2: number
  /** How dark the palest piece of the line is, of solid print: about 0.4 where nothing hides it. */
  line: number
}

interface Line {
  /** Row of the patch at its left end, and rows a column. */
  row: number
  rise: number
}

export function inkWithin(picture: Picture, map: FieldMap, box: Box, black: number): AreaInk {
  const patch = samplePatch(picture, map, { ...box, height: box.height + REACH_MM + 2 * STEP_MM }, STEP_MM)
  for (let i = 0; i < patch.darkness.length; i++) if (Number.isNaN(patch.darkness[i]!)) patch.darkness[i] = 0
  const line = findLine(patch, box.height / STEP_MM)
  const { columns, rows, darkness } = patch
  let inked = 0
  for (let x = 1; x < columns - 1; x++) {
    const last = Math.min(rows - 2, Math.floor(line.row + line.rise * x - ABOVE_LINE_MM / STEP_MM))
    for (let y = 1; y <= last; y++) {
      let sum = 0
      for (let v = -1; v <= 1; v++) for (let u = -1; u <= 1; u++) sum += darkness[(y + v) * columns + x + u]!
      if (sum > 9 * INK_FROM * black) inked++
    }
  }
  return { ink_mm2: inked * STEP_MM * STEP_MM, line: palest(patch, line) / black }
}

const at = ({ darkness, columns, rows }: Patch, x: number, y: number): number =>
  darkness[Math.min(rows - 1, Math.max(0, Math.round(y))) * columns + x]!

/** Mean darkness along a line, between two columns; a pen that crosses it counts no more than print. */
function along(patch: Patch, { row, rise }: Line, from: number, to: number): number {
  let sum = 0
  for (let x = from; x < to; x++) sum += Math.min(0.6, at(patch, x, row + rise * x))
  return sum / (to - from)
}

function findLine(patch: Patch, expected: number): Line {
  const reach = REACH_MM / STEP_MM
  let best = { value: -1, line: { row: expected, rise: 0 } }
  for (const rise of LEANS) {
    for (let k = -reach; k <= reach; k += 0.5) {
      const line = { row: expected + k - (rise * patch.columns) / 2, rise }
      const value = along(patch, line, 0, patch.columns)
      if (value > best.value) best = { value, line }
    }
  }
  return best.line
}

/** Contrast of the line to the paper on both sides, where it is least. */
function palest(patch: Patch, line: Line): number {
  const away = 1.25 / STEP_MM
  const pieces = Array.from({ length: PIECES }, (_, i) => {
    const from = Math.round((i * patch.columns) / PIECES)
    const to = Math.round(((i + 1) * patch.columns) / PIECES)
    // A curled page bends the line a little within its lean.
    const near = [-1, 0, 1].map((off) => along(patch, { ...line, row: line.row + off }, from, to))
    return Math.max(...near) - along(patch, { ...line, row: line.row - away }, from, to)
  })
  return Math.min(...pieces)
}

/** From this much ink on somebody signed; below the lesser amount nobody did; between, a person looks. */
const SIGNED_MM2 = 6
const EMPTY_MM2 = 1.2
/** Where the line is paler than this, ink does not show either: an area that seems empty may hold some. */
const LEAST_LINE = 0.2

export function signedBy({ ink_mm2, line }: AreaInk): { signed: boolean; sure: boolean; hidden: boolean } {
  const hidden = line < LEAST_LINE
  return {
    signed: ink_mm2 >= (SIGNED_MM2 + EMPTY_MM2) / 2,
    sure: ink_mm2 >= SIGNED_MM2 || (ink_mm2 <= EMPTY_MM2 && !hidden),
    hidden,
  }
}
