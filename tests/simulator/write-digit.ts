/** Writes one digit into its box. */
import type { Box } from '../../shared/layouts/geometry.ts'
import type { Glyph } from './glyph.ts'
import { cover, DOTS_PER_MM, type InkLayer, touch } from './ink.ts'
import type { Chance } from './random.ts'
import type { Writer } from './writer.ts'

/** From enlarged glyph pixels to dots of the page. */
interface Placing {
  scaleX: number
  scaleY: number
  shear: number
  turn: number
  x: number
  y: number
}

function placeIn(box: Box, glyph: Glyph, writer: Writer, chance: Chance): Placing {
  const { left, top, right, bottom } = glyph.bounds
  const inkHeight = Math.max(8, bottom - top)
  const inkWidth = Math.max(2, right - left)
  const slip = chance.odds(writer.slips) ? 2.4 : 1
  const height_mm = box.height * Math.min(0.98, Math.max(0.42, chance.normal(writer.size, writer.sizeSpread)))
  const scaleY = (height_mm * DOTS_PER_MM) / inkHeight
  const widest = (box.width * (slip > 1 ? 1.1 : writer.reach) * DOTS_PER_MM) / inkWidth
  const scaleX = Math.min(widest, scaleY * writer.stretch * chance.between(0.93, 1.07))
  const room = Math.max(0, box.height - height_mm) / 2
  const dy = Math.max(-room - 0.3, Math.min(room + 0.3, writer.shift[1] + chance.normal(0, writer.stray_mm)))
  return {
    scaleX,
    scaleY,
    shear: writer.slant + chance.normal(0, writer.slantSpread),
    turn: chance.normal(0, 0.03),
    x: (box.x + box.width / 2 + writer.shift[0] + slip * chance.normal(0, writer.stray_mm)) * DOTS_PER_MM,
    y: (box.y + box.height / 2 + slip * dy) * DOTS_PER_MM,
  }
}

function writeTraced(ink: InkLayer, glyph: Glyph, place: Placing, writer: Writer, chance: Chance): void {
  const midX = (glyph.bounds.left + glyph.bounds.right) / 2
  const midY = (glyph.bounds.top + glyph.bounds.bottom) / 2
  const [cos, sin] = [Math.cos(place.turn), Math.sin(place.turn)]
  const radius = (writer.pen.width_mm * DOTS_PER_MM) / 2
  const phase = chance.between(0, 6.28)
  for (let i = 0; i < glyph.line.length; i += 2) {
    const v = (glyph.line[i + 1]! - midY) * place.scaleY
    const u = (glyph.line[i]! - midX) * place.scaleX + place.shear * v
    const swell = glyph.press[i / 2]! ** 0.6 * (1 + 0.1 * Math.sin(phase + i / 23))
    if (writer.pen.dry > 0 && Math.sin(phase * 3 + i / 9) > 1 - 2 * writer.pen.dry) continue
    touch(ink, place.x + u * cos - v * sin, place.y + u * sin + v * cos, radius * swell, writer.pen.strength)
  }
}

function writeGrey(ink: InkLayer, glyph: Glyph, place: Placing, writer: Writer): void {
  const midX = (glyph.bounds.left + glyph.bounds.right) / 2
  const midY = (glyph.bounds.top + glyph.bounds.bottom) / 2
  const [cos, sin] = [Math.cos(place.turn), Math.sin(place.turn)]
  const half = 0.5 * glyph.side * Math.max(place.scaleX, place.scaleY) + 4
  // Digits come from many hands: bring each nearer to one stroke width.
  const threshold = Math.max(0.25, Math.min(0.75, 0.5 - writer.weight + 0.035 * (glyph.stroke * place.scaleX - 8)))
  const { side, grey } = glyph
  for (let y = Math.floor(place.y - half); y <= place.y + half; y += 1) {
    for (let x = Math.floor(place.x - half); x <= place.x + half; x += 1) {
      const dx = x - place.x
      const dy = y - place.y
      const v = -dx * sin + dy * cos
      const u = dx * cos + dy * sin - place.shear * v
      const gy = v / place.scaleY + midY
      const gx = u / place.scaleX + midX + glyph.slant * (gy - glyph.centre.y)
      const x0 = Math.floor(gx)
      const y0 = Math.floor(gy)
      if (x0 < 0 || y0 < 0 || x0 >= side - 1 || y0 >= side - 1) continue
      const i = y0 * side + x0
      const top = grey[i]! + (gx - x0) * (grey[i + 1]! - grey[i]!)
      const low = grey[i + side]! + (gx - x0) * (grey[i + side + 1]! - grey[i + side]!)
      const value = (top + (gy - y0) * (low - top) - threshold) / 0.22 + 0.5
      if (value > 0) cover(ink, x, y, Math.round(255 * writer.pen.strength * Math.min(1, value)))
    }
  }
}

/** Writes a digit in a box the way this writer does. */
export function writeDigit(ink: InkLayer, box: Box, glyph: Glyph, writer: Writer, chance: Chance): void {
  const place = placeIn(box, glyph, writer, chance)
  if (writer.stroke === 'traced' && !glyph.blotted) writeTraced(ink, glyph, place, writer, chance)
  else writeGrey(ink, glyph, place, writer)
}
