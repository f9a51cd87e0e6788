/**
 * Easy, ordinary and hard, roughly as a person would rate the pictures: easy is careful, in good light; ordinary is out of the
 * hand, a little bent and in half shade; hard is what one would hesitate to send.
 */

import { GROUNDS, type Ground } from './background.ts'
import type { Shot } from './camera.ts'
import type { Optics } from './develop.ts'
import type { LightPlan } from './light.ts'
import type { LostCorner } from './obstacles.ts'
import type { Chance } from './random.ts'
import { drawScanPlan, type ScanPlan } from './scan.ts'
import type { Dirt } from './stains.ts'

export const LEVELS = ['easy', 'ordinary', 'hard'] as const
export type Level = (typeof LEVELS)[number]

export interface Conditions {
  shot: Shot
  light: LightPlan
  optics: Optics
  ground: Ground
  /** About how far the paper leaves the table, mm. */
  curl_mm: number
  /** Shading by the paper's slope. */
  lean: number
  /** How much the writer keeps to the boxes, 0 to 1. */
  careful: number
  /** Scanned flat instead of photographed. */
  scan: ScanPlan | null
  dirt: Dirt | null
  thumb: boolean
  lost: LostCorner | null
  /** Cells spoiled, wrong sums: expected numbers. */
  spoiled: number
  wrongSum: number
}

interface Ranges {
  tilt: number
  roll: number
  fill: readonly [number, number]
  off: number
  barrel: number
  gradient: readonly [number, number]
  shadow: readonly [number, number, number]
  glare: number
  level: readonly [number, number]
  tint: number
  defocus: readonly [number, number]
  shake: readonly [number, number, number]
  grain: readonly [number, number]
  quality: readonly [number, number]
  curl: readonly [number, number]
  careful: readonly [number, number]
  megapixels: readonly number[]
  cutCorner: number
  scanned: number
  dirt: number
  thumb: number
  foldedCorner: number
}

const RANGES: Record<Level, Ranges> = {
  easy: {
    tilt: 0.05,
    roll: 0.035,
    fill: [0.88, 0.97],
    off: 0.008,
    barrel: 0.006,
    gradient: [0, 0.12],
    shadow: [0, 0, 0],
    glare: 0,
    level: [205, 240],
    tint: 0.03,
    defocus: [0.4, 0.8],
    shake: [0, 0, 0],
    grain: [1, 3],
    quality: [86, 95],
    curl: [0, 2.5],
    careful: [0.75, 1],
    megapixels: [12],
    cutCorner: 0,
    scanned: 0.25,
    dirt: 0.04,
    thumb: 0,
    foldedCorner: 0,
  },
  ordinary: {
    tilt: 0.11,
    roll: 0.09,
    fill: [0.8, 0.94],
    off: 0.02,
    barrel: 0.014,
    gradient: [0.05, 0.3],
    shadow: [0.45, 0.12, 0.38],
    glare: 0.04,
    level: [165, 230],
    tint: 0.06,
    defocus: [0.6, 1.3],
    shake: [0.35, 0.6, 2],
    grain: [2.5, 6],
    quality: [76, 92],
    curl: [2, 9],
    careful: [0.45, 0.95],
    megapixels: [12],
    cutCorner: 0,
    scanned: 0.04,
    dirt: 0.15,
    thumb: 0.02,
    foldedCorner: 0.01,
  },
  hard: {
    tilt: 0.22,
    roll: 0.22,
    fill: [0.66, 0.92],
    off: 0.035,
    barrel: 0.02,
    gradient: [0.15, 0.5],
    shadow: [0.75, 0.25, 0.58],
    glare: 0.22,
    level: [130, 215],
    tint: 0.1,
    defocus: [0.8, 2.1],
    shake: [0.6, 1, 4.2],
    grain: [5, 13],
    quality: [62, 88],
    curl: [5, 18],
    careful: [0.25, 0.85],
    megapixels: [12, 12, 8],
    cutCorner: 0.08,
    scanned: 0,
    dirt: 0.25,
    thumb: 0.06,
    foldedCorner: 0.05,
  },
}

/** Warm or cold light against each other, and a little green: the red and blue factors against green. */
const whiteBalance = (warm: number, green: number): readonly [number, number] => [1 + warm - green, 1 - warm - green]

/** Draws up the conditions of one photo. */
export function drawConditions(level: Level, chance: Chance): Conditions {
  const r = RANGES[level]
  const range = ([low, high]: readonly [number, number]) => chance.between(low, high)
  const long = Math.round(Math.sqrt((chance.pick(r.megapixels) * 4e6) / 3) / 8) * 8
  const short = Math.round((long * 3) / 4)
  const sideways = chance.odds(level === 'easy' ? 0.1 : 0.2)
  const upsideDown = chance.odds(0.06)
  const cut = chance.odds(r.cutCorner)
  const turned = (sideways ? (chance.odds(0.5) ? 1 : -1) * (Math.PI / 2) : 0) + (upsideDown ? Math.PI : 0)
  const cutBy = cut ? chance.between(0.05, 0.09) : 0
  const tilt = (spread: number) => Math.max(-2.1 * spread, Math.min(2.1 * spread, chance.normal(0, spread)))
  // Turned enough that one corner alone stands out: moved to that side, it leaves the picture and the others stay.
  const leanOut = (roll: number) => (cut ? Math.sign(roll) * (0.15 + Math.abs(roll) / 3) : roll)
  const side = () => (chance.odds(0.5) ? 1 : -1)
  return {
    shot: {
      width: sideways ? long : short,
      height: sideways ? short : long,
      pitch: tilt(r.tilt),
      yaw: tilt(r.tilt * 0.75),
      roll: turned + leanOut(chance.normal(0, r.roll)),
      fill: cut ? 0.96 : range(r.fill),
      off: cut ? [cutBy * side(), 0.2 * cutBy * side()] : [chance.normal(0, r.off / 2), chance.normal(0, r.off / 2)],
      focal: chance.between(0.58, 0.8),
      barrel: chance.normal(0, r.barrel),
    },
    light: {
      gradient: range(r.gradient),
      shadow: chance.odds(r.shadow[0]) ? chance.between(r.shadow[1], r.shadow[2]) : 0,
      softness: chance.between(0.01, 0.12),
      glare: chance.odds(r.glare) ? chance.between(0.35, 0.9) : 0,
      vignette: chance.between(0.05, 0.3),
      level: range(r.level),
      white: whiteBalance(chance.normal(0, r.tint), chance.normal(0, r.tint / 4)),
    },
    optics: {
      defocus_px: range(r.defocus),
      shake_px: chance.odds(r.shake[0]) ? chance.between(r.shake[1], r.shake[2]) : 0,
      shakeAngle: chance.between(0, 3.14),
      grain: range(r.grain),
      sharpen: chance.odds(0.6) ? chance.between(0.3, 1.2) : 0,
      jpegQuality: Math.round(range(r.quality)),
      storedLying: chance.odds(0.15),
    },
    ground: chance.pick(GROUNDS),
    curl_mm: range(r.curl),
    lean: chance.between(0.15, 0.6),
    careful: range(r.careful),
    scan: chance.odds(r.scanned) ? drawScanPlan(chance.fork('scan')) : null,
    dirt: chance.odds(r.dirt) ? chance.pick(['coffee', 'mud', 'mud', 'oil'] as const) : null,
    thumb: chance.odds(r.thumb),
    lost: chance.odds(r.foldedCorner)
      ? { corner: chance.pick([0, 1, 2, 3] as const), legs: [chance.between(14, 34), chance.between(14, 34)], folded: true }
      : null,
    spoiled: 1.3,
    wrongSum: 0.16,
  }
}
