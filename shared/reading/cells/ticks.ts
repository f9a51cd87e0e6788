/** Ticks: how much ink stands in the box beside its printed frame and corner, turned into probabilities. */
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
/** Ink of a faint tick and of dust, mm²: half way, one is as likely as the other; the steepness says how soon it is sure. */
const HALFWAY_MM2 = 0.42
const STEEPNESS = 2.6
/** A box inked over this share was made unreadable on purpose. */
const FILLED_SHARE = 0.62
const FILLED_STEEPNESS = 24

export interface TickInk {
  /** Ink inside the frame, mm². */
  ink_mm2: number
  /** Share of the inside that is inked. */
  share: number
}

export function measureTick(picture: Picture, map: FieldMap, box: Box, black: number): TickInk {
  const area = {
    x: box.x + INSET_MM,
    y: box.y + INSET_MM,
    width: box.width - 2 * INSET_MM,
    height: box.height - 2 * INSET_MM,
  }
  const patch = samplePatch(picture, map, area, STEP_MM)
  let ink = 0
  let seen = 0
  for (let row = 0; row < patch.rows; row++) {
    for (let column = 0; column < patch.columns; column++) {
      const x = INSET_MM + (column + 0.5) * STEP_MM
      const y = INSET_MM + (row + 0.5) * STEP_MM
      // The corner is an L of two short bars.
      if ((x < CORNER_MM && y < 0.75) || (y < CORNER_MM && x < 0.75)) continue
      const value = patch.darkness[row * patch.columns + column]! / black
      if (Number.isNaN(value)) continue
      seen++
      ink += Math.min(1, Math.max(0, (value - INK_FROM) / (INK_FULL - INK_FROM)))
    }
  }
  return { ink_mm2: ink * STEP_MM * STEP_MM, share: seen === 0 ? 0 : ink / seen }
}

const logistic = (x: number) => 1 / (1 + Math.exp(-x))

/** Ink to probabilities: by the logarithm of the ink, since a tick is many times a speck whatever the pen. */
export function tickDist({ ink_mm2, share }: TickInk): TickDist {
  const inked = logistic(STEEPNESS * 2 * Math.log((ink_mm2 + 0.02) / HALFWAY_MM2))
  const filled = logistic(FILLED_STEEPNESS * (share - FILLED_SHARE))
  return { empty: 1 - inked, ticked: inked * (1 - filled), spoiled: inked * filled }
}
