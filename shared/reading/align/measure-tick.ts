/** Where a tick box is: its frame and heavy corner as one small picture, its inside left out, since that is for the pen. */
import { TICK } from '../../layouts/layout.ts'
import type { FieldMap } from '../geometry/page-map.ts'
import type { FieldPart } from './field-lines.ts'
import type { PartFit } from './measure-part.ts'
import { type Picture, samplePatch } from './patch.ts'

const STEP_MM = 0.14
/** White around the frame that belongs to the template; the inside from here on does not. */
const AROUND_MM = 0.7
const INSIDE_MM = 0.75
/** Darker than this counts no more: a pen across the frame is one of many samples. */
const CLIP = 0.6
/** A first look takes every so many samples: no divisor of a row, so that they do not fall into columns. */
const COARSE = 4

interface Template {
  side: number
  /** Place of each sample that counts, and how dark print makes it. */
  index: Int32Array
  row: Int32Array
  column: Int32Array
  value: Float32Array
}

/** Darkness printed at a place from the box's upper left, mm (frame #8c8c8c, corner #4d4d4d). */
function printed(x: number, y: number): number {
  const size = TICK.size
  const on = (a: number) => Math.abs(a) < 0.16 || Math.abs(a - size) < 0.16
  const within = (a: number) => a > -0.16 && a < size + 0.16
  const corner = (a: number, b: number) => a > -0.3 && a < 1.4 && b > -0.3 && b < 0.3
  if (corner(x, y) || corner(y, x)) return CLIP
  return (on(x) && within(y)) || (on(y) && within(x)) ? 0.33 : 0
}

function makeTemplate(): Template {
  const side = Math.round((TICK.size + 2 * AROUND_MM) / STEP_MM)
  const index: number[] = []
  const value: number[] = []
  for (let row = 0; row < side; row++) {
    for (let column = 0; column < side; column++) {
      const x = (column + 0.5) * STEP_MM - AROUND_MM
      const y = (row + 0.5) * STEP_MM - AROUND_MM
      const inside = Math.min(x, y, TICK.size - x, TICK.size - y)
      const deepest = Math.max(x, y) > 2 ? INSIDE_MM : 1.1
      if (inside > deepest) continue
      index.push(row * side + column)
      value.push(printed(x, y))
    }
  }
  return {
    side,
    index: Int32Array.from(index),
    row: Int32Array.from(index, (i) => Math.floor(i / side)),
    column: Int32Array.from(index, (i) => i % side),
    value: Float32Array.from(value),
  }
}

const template = makeTemplate()

/** Likeness (-1 to 1) stands for support in both directions. */
export function measureTickPlace(picture: Picture, map: FieldMap, part: FieldPart, reach_mm: number): PartFit {
  const box = part.boxes[0]!
  const steps = Math.ceil(reach_mm / STEP_MM) + 1
  const margin = AROUND_MM + steps * STEP_MM
  const side = TICK.size + 2 * margin
  const patch = samplePatch(picture, map, { x: box.x - margin, y: box.y - margin, width: side, height: side }, STEP_MM)
  const at = (dx: number, dy: number, every = 1) => likenessAt(patch.darkness, patch.columns, dx + steps, dy + steps, every)
  let best = { value: -2, dx: 0, dy: 0 }
  const look = (dx: number, dy: number, every?: number) => {
    if (Math.max(Math.abs(dx), Math.abs(dy)) >= steps) return
    const value = at(dx, dy, every)
    if (value > best.value) best = { value, dx, dy }
  }
  // Every second place and some of the samples first: the corner is wide enough to be seen from beside.
  for (let dy = 2 - steps; dy < steps; dy += 2) for (let dx = 2 - steps; dx < steps; dx += 2) look(dx, dy, COARSE)
  const { dx: nearX, dy: nearY } = best
  best.value = -2
  for (let dy = -1; dy <= 1; dy++) for (let dx = -1; dx <= 1; dx++) look(nearX + dx, nearY + dy)
  const fine = (before: number, after: number) => {
    const bend = before - 2 * best.value + after
    return bend < -1e-9 ? Math.max(-0.5, Math.min(0.5, (0.5 * (before - after)) / bend)) : 0
  }
  const dx = (best.dx + fine(at(best.dx - 1, best.dy), at(best.dx + 1, best.dy))) * STEP_MM
  const dy = (best.dy + fine(at(best.dx, best.dy - 1), at(best.dx, best.dy + 1))) * STEP_MM
  return { dx, dy, supportX: best.value, supportY: best.value, ahead: 1, spread_mm: 0, stretch: 0, lean: 0, growth: 0 }
}

/**
 * How dark the print of a placed box comes out in the photo, beside what was printed: about 1 in a sharp picture, less in blur
 * and haze, near 0 where mirrored light, a dark corner or something on the page hides it.
 */
export function tickContrast(picture: Picture, map: FieldMap, box: { x: number; y: number }): number {
  const side = template.side * STEP_MM
  const area = { x: box.x - AROUND_MM, y: box.y - AROUND_MM, width: side, height: side }
  const { darkness } = samplePatch(picture, map, area, STEP_MM)
  const { value, index } = template
  const mean = value.reduce((sum, v) => sum + v, 0) / value.length
  let together = 0
  let alone = 0
  for (let i = 0; i < value.length; i++) {
    const read = darkness[index[i]!]!
    const off = value[i]! - mean
    together += off * (Number.isNaN(read) ? 0 : Math.min(read, CLIP))
    alone += off * off
  }
  return together / alone
}

function likenessAt(darkness: Float32Array, columns: number, left: number, top: number, every: number): number {
  const { value, row, column } = template
  const n = Math.ceil(value.length / every)
  let sp = 0
  let spp = 0
  let st = 0
  let stt = 0
  let stp = 0
  for (let i = 0; i < value.length; i += every) {
    const read = darkness[(row[i]! + top) * columns + column[i]! + left]!
    const p = Math.min(read, CLIP)
    const t = value[i]!
    sp += p
    spp += p * p
    st += t
    stt += t * t
    stp += t * p
  }
  const spread = (spp - (sp * sp) / n) * (stt - (st * st) / n)
  return spread > 1e-9 ? (stp - (sp * st) / n) / Math.sqrt(spread) : 0
}
