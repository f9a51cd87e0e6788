/** Ticks: how much ink stands in the box beside its printed frame and corner, against what this writer's ticks hold. */
import type { Box } from '../../layouts/geometry.ts'
import { type Picture, samplePatch } from '../align/patch.ts'
import type { TickDist } from '../classes.ts'
import type { FieldMap } from '../geometry/page-map.ts'

const STEP_MM = 0.14
/** The frame's half width, a placing error and a lens's softness are kept out. */
const INSET_MM = 0.55
/** The heavy corner reaches this far into the box. */
const CORNER_MM = 1.75
/** Darkness (of solid print) from which on a sample counts as ink, and at which it counts in full. */
const INK_FROM = 0.16
const INK_FULL = 0.4
export interface TickInk {
  /** Ink inside the frame, mm². */
  ink_mm2: number
  /** Share of the inside that is inked. */
  share: number
  /** Share of the width that a level stroke would cross: the most that any band of rows has. */
  across: number
  /** A stroke leaves the box on both sides at about the same height. */
  through: boolean
}

export function measureTick(picture: Picture, map: FieldMap, box: Box, black: number): TickInk {
  const area = {
    x: box.x + INSET_MM,
    y: box.y + INSET_MM,
    width: box.width - 2 * INSET_MM,
    height: box.height - 2 * INSET_MM,
  }
  const patch = samplePatch(picture, map, area, STEP_MM)
  const { rows, columns } = patch
  const soft = smooth(patch.darkness, columns, rows)
  const inked = new Float32Array(rows * columns)
  let ink = 0
  let seen = 0
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const x = INSET_MM + (column + 0.5) * STEP_MM
      const y = INSET_MM + (row + 0.5) * STEP_MM
      // The corner is an L of two short bars.
      if ((x < CORNER_MM && y < 0.75) || (y < CORNER_MM && x < 0.75)) continue
      const at = row * columns + column
      const value = Math.min(1, Math.max(0, (soft[at]! / black - INK_FROM) / (INK_FULL - INK_FROM)))
      inked[at] = value
      seen++
      ink += value
    }
  }
  return {
    ink_mm2: ink * STEP_MM * STEP_MM,
    share: seen === 0 ? 0 : ink / seen,
    across: mostAcross(inked, columns, rows),
    through: goesThrough(picture, map, box, black),
  }
}

/** Beside the box, clear of its heavy corner and of the label: from here, so wide, mm. */
const BESIDE_MM = 0.42
const BESIDE_WIDTH_MM = 0.28
/** A line through a box rises or falls by less than this, mm. */
const LEVEL_MM = 1

function goesThrough(picture: Picture, map: FieldMap, box: Box, black: number): boolean {
  const heights = [box.x - BESIDE_MM - BESIDE_WIDTH_MM, box.x + box.width + BESIDE_MM].map((x) => {
    const area = { x, y: box.y + INSET_MM, width: BESIDE_WIDTH_MM, height: box.height - 2 * INSET_MM }
    const { darkness, columns, rows } = samplePatch(picture, map, area, STEP_MM)
    const inkedRow = (row: number) => darkness.subarray(row * columns, (row + 1) * columns).every((v) => v > INK_FULL * black)
    return Array.from({ length: rows }, (_, row) => row).filter(inkedRow)
  })
  const [left = [], right = []] = heights
  return left.some((a) => right.some((b) => Math.abs(a - b) * STEP_MM < LEVEL_MM))
}

/** Means of 3 x 3, so that grain is not taken for ink. */
function smooth(darkness: Float32Array, columns: number, rows: number): Float32Array {
  const out = new Float32Array(darkness.length)
  for (let y = 0; y < rows; y++) {
    for (let x = 0; x < columns; x++) {
      let sum = 0
      let count = 0
      for (let v = Math.max(0, y - 1); v <= Math.min(rows - 1, y + 1); v++) {
        for (let u = Math.max(0, x - 1); u <= Math.min(columns - 1, x + 1); u++) {
          const value = darkness[v * columns + u]!
          if (Number.isNaN(value)) continue
          sum += value
          count++
        }
      }
      out[y * columns + x] = count === 0 ? 0 : sum / count
    }
  }
  return out
}

/** A stroke that crosses is level to within this height, mm. */
const BAND_MM = 0.56

function mostAcross(inked: Float32Array, columns: number, rows: number): number {
  const band = Math.round(BAND_MM / STEP_MM)
  let most = 0
  for (let top = 0; top + band <= rows; top++) {
    let crossed = 0
    for (let x = 0; x < columns; x++) {
      let darkest = 0
      for (let y = top; y < top + band; y++) darkest = Math.max(darkest, inked[y * columns + x]!)
      if (darkest > 0.5) crossed++
    }
    most = Math.max(most, crossed / columns)
  }
  return most
}

/** How this writer ticks: the ink of a usual tick, of an empty box, and how far a usual tick reaches across. */
export interface TickHabit {
  usual_mm2: number
  empty_mm2: number
  across: number
}

/** A tick by a ball pen, where a page has none to learn from. */
const PLAIN_TICK_MM2 = 1.8
/** A page whose fullest boxes hold less than this has no tick. */
const LEAST_TICK_MM2 = 0.7
/** About this share of all boxes is empty or ticked in the usual way; what is above may be crossed out. */
const UPPER_SHARE = 0.85

const median = (values: number[]) => values.sort((a, b) => a - b)[values.length >> 1] ?? 0

/** Learns from all tick boxes of a page: pens, pressure and haze differ from page to page, hardly within one. */
export function tickHabit(inks: readonly TickInk[]): TickHabit {
  const sorted = inks.map((i) => i.ink_mm2).sort((a, b) => a - b)
  const upper = sorted[Math.floor(sorted.length * UPPER_SHARE)] ?? 0
  const full = upper >= LEAST_TICK_MM2 ? upper : (sorted.at(-1) ?? 0)
  if (full < LEAST_TICK_MM2) return { usual_mm2: PLAIN_TICK_MM2, empty_mm2: median(sorted), across: 0.6 }
  const ticked = inks.filter((i) => i.ink_mm2 > 0.4 * full)
  const usual_mm2 = median(ticked.map((i) => i.ink_mm2))
  const empty_mm2 = median(inks.flatMap((i) => (i.ink_mm2 < 0.4 * usual_mm2 ? [i.ink_mm2] : [])))
  return { usual_mm2, empty_mm2, across: median(ticked.map((i) => i.across)) }
}

const logistic = (x: number) => 1 / (1 + Math.exp(-x))

/**
 * Ink over a usual tick's, at which a box is as likely ticked as empty, and how steeply that turns. On 60 simulated photos
 * (2,114 boxes) empty ones stay under 0.16, mostly under 0.07, and ticks that were found in their place over 0.46.
 */
const HALFWAY = 0.27
const STEEP = 6.5
/** So much more ink than usual, with a level stroke counted in part, was meant to cross it out. */
const CROSSED = 1.58
const CROSSED_STEEP = 40
const LEVEL_STROKE = 0.35
/** A stroke out on both sides counts as so much more ink: one line through a cross adds little to the cross's own. */
const THROUGH = 0.3

export function tickDist(ink: TickInk, habit: TickHabit): TickDist {
  const over = Math.max(0, ink.ink_mm2 - habit.empty_mm2) / Math.max(0.2, habit.usual_mm2 - habit.empty_mm2)
  const inked = logistic(STEEP * Math.log((over + 0.02) / (HALFWAY + 0.02)))
  const more = over + LEVEL_STROKE * Math.max(0, ink.across - habit.across) + (ink.through ? THROUGH : 0)
  const crossed = logistic(CROSSED_STEEP * (more - CROSSED))
  return { empty: 1 - inked, ticked: inked * (1 - crossed), spoiled: inked * crossed }
}
