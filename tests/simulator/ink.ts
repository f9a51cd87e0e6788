/** The ink layer of a page: how much of each dot of 300 to the inch is covered, and the pen that covers it. */

export const DOTS_PER_MM = 300 / 25.4

export interface InkLayer {
  width: number
  height: number
  /** 0 paper, 255 fully covered. */
  cover: Uint8Array
}

/** Point on the page in millimetres. */
export type Point = readonly [number, number]

export const newInk = (width_mm: number, height_mm: number): InkLayer => {
  const width = Math.round(width_mm * DOTS_PER_MM)
  const height = Math.round(height_mm * DOTS_PER_MM)
  return { width, height, cover: new Uint8Array(width * height) }
}

/** Covers one dot at least as much as given. */
export function cover(ink: InkLayer, x: number, y: number, value: number): void {
  if (x < 0 || y < 0 || x >= ink.width || y >= ink.height || value <= 0) return
  const i = y * ink.width + x
  if (value > ink.cover[i]!) ink.cover[i] = value
}

/** One touch of a round pen, centre and radius in dots, with a soft rim of a dot. */
export function touch(ink: InkLayer, x: number, y: number, radius: number, strength = 1): void {
  const left = Math.floor(x - radius - 1)
  const right = Math.ceil(x + radius + 1)
  const bottom = Math.ceil(y + radius + 1)
  for (let v = Math.floor(y - radius - 1); v <= bottom; v += 1) {
    for (let u = left; u <= right; u += 1) {
      const inside = radius + 0.5 - Math.hypot(u - x, v - y)
      if (inside > 0) cover(ink, u, v, Math.round(255 * strength * Math.min(1, inside)))
    }
  }
}

export interface Pen {
  width_mm: number
  /** Share of covered dots at full pressure, 0 to 1. */
  strength: number
  /** Share of a stroke where a dry pen leaves paper. */
  dry: number
}

/**
 * Draws a smooth line through the points. Pressure swells and fades along it, and a dry pen skips.
 * @param noise returns 0 to 1, called once a millimetre or so
 */
export function drawLine(ink: InkLayer, points: readonly Point[], pen: Pen, noise: () => number): void {
  let pressure = 0.9 + 0.2 * noise()
  let skip = false
  const step_mm = 0.12
  let travelled = 0
  for (let i = 0; i + 1 < points.length; i += 1) {
    const p0 = points[Math.max(0, i - 1)]!
    const [p1, p2] = [points[i]!, points[i + 1]!]
    const p3 = points[Math.min(points.length - 1, i + 2)]!
    const steps = Math.max(1, Math.ceil(Math.hypot(p2[0] - p1[0], p2[1] - p1[1]) / step_mm))
    for (let s = 0; s < steps; s += 1) {
      const t = s / steps
      travelled += step_mm
      if (travelled > 0.8) {
        travelled = 0
        pressure = 0.7 * pressure + 0.3 * (0.75 + 0.5 * noise())
        skip = noise() < pen.dry
      }
      if (skip) continue
      const x = through(p0[0], p1[0], p2[0], p3[0], t) * DOTS_PER_MM
      const y = through(p0[1], p1[1], p2[1], p3[1], t) * DOTS_PER_MM
      touch(ink, x, y, (pen.width_mm * DOTS_PER_MM * pressure) / 2, pen.strength)
    }
  }
}

const through = (a: number, b: number, c: number, d: number, t: number) =>
  b + 0.5 * t * (c - a + t * (2 * a - 5 * b + 4 * c - d + t * (3 * (b - c) + d - a)))
