/** What a hand makes besides digits: ticks, lines through a mistake, scribbles, signatures, words. */
import type { Box } from '../../shared/layouts/geometry.ts'
import { drawLine, type InkLayer, type Pen, type Point } from './ink.ts'
import type { Chance } from './random.ts'
import type { Writer } from './writer.ts'

const jitter = (chance: Chance, x: number, y: number, by: number): Point => [x + chance.normal(0, by), y + chance.normal(0, by)]

const draw = (ink: InkLayer, points: readonly Point[], pen: Pen, chance: Chance) => drawLine(ink, points, pen, chance.unit)

/** A tick in its box, by the writer's habit. */
export function drawTickMark(ink: InkLayer, box: Box, writer: Writer, chance: Chance): void {
  const s = box.width
  const by = 0.1 * s
  const { x, y } = box
  const over = chance.between(0, 0.35)
  const at = (u: number, v: number, j = by) => jitter(chance, x + u * s, y + v * s, j)
  if (writer.tick === 'cross') {
    draw(ink, [at(0.12, 0.15), at(0.5, 0.5, 0.04 * s), at(0.88, 0.86)], writer.pen, chance)
    draw(ink, [at(0.88, 0.14), at(0.5, 0.5, 0.04 * s), at(0.12, 0.88)], writer.pen, chance)
  } else if (writer.tick === 'slash') {
    draw(ink, [at(0.1, 0.9), at(0.5, 0.5), at(0.92, 0.08 - over)], writer.pen, chance)
  } else if (writer.tick === 'flourish') {
    draw(
      ink,
      [at(0.05, 0.45), at(0.3, 0.85), at(0.55, 0.4), at(1.05 + over, -0.25 - over), at(1.3 + over, -0.2 - over)],
      writer.pen,
      chance,
    )
  } else {
    draw(ink, [at(0.1, 0.52), at(0.25, 0.7, 0.05 * s), at(0.38, 0.86)], writer.pen, chance)
    draw(ink, [at(0.38, 0.86, 0.02), at(0.62, 0.45), at(0.92 + over / 2, 0.05 - over)], writer.pen, chance)
  }
}

/** The short bar many hands put through a 7. */
export function crossSeven(ink: InkLayer, box: Box, pen: Pen, chance: Chance): void {
  const y = box.y + box.height * chance.between(0.48, 0.56)
  const x = box.x + box.width * 0.5
  const half = box.width * chance.between(0.14, 0.24)
  draw(ink, [jitter(chance, x - half, y + 0.15, 0.1), jitter(chance, x + half, y - 0.15, 0.1)], pen, chance)
}

/** One or two straight lines through the boxes: the printed way to correct. */
export function strikeThrough(ink: InkLayer, box: Box, pen: Pen, chance: Chance): void {
  const lines = chance.odds(0.35) ? 2 : 1
  const tilt = chance.normal(0, 0.12 * box.height)
  for (let n = 0; n < lines; n += 1) {
    const y = box.y + box.height * (0.5 + 0.14 * (n - (lines - 1) / 2)) + chance.normal(0, 0.3)
    const left = jitter(chance, box.x - chance.between(-0.4, 0.6), y + tilt, 0.15)
    const right = jitter(chance, box.x + box.width + chance.between(-0.4, 0.6), y - tilt, 0.15)
    draw(ink, [left, jitter(chance, (left[0] + right[0]) / 2, y, 0.15), right], pen, chance)
  }
}

/** Two long lines over a small box and well past its sides. */
export function strikeWide(ink: InkLayer, box: Box, pen: Pen, chance: Chance): void {
  for (const level of [0.36, 0.66]) {
    const y = box.y + box.height * level
    const [left, right] = [box.x - chance.between(1, 1.8), box.x + box.width + chance.between(1, 1.8)]
    draw(ink, [jitter(chance, left, y, 0.2), jitter(chance, right, y, 0.2)], pen, chance)
  }
}

/** A zigzag that makes what was written unreadable. */
export function scribble(ink: InkLayer, box: Box, pen: Pen, chance: Chance): void {
  const turns = chance.whole(4, 9)
  const points: Point[] = []
  for (let i = 0; i <= turns; i += 1) {
    const along = i / turns
    const y = box.y + box.height * (i % 2 ? chance.between(0.12, 0.3) : chance.between(0.7, 0.9))
    points.push(jitter(chance, box.x + box.width * (0.08 + 0.84 * along), y, 0.2))
  }
  draw(ink, points, pen, chance)
}

/** A signature: a tall start, loops running right, a tail. */
export function sign(ink: InkLayer, box: Box, pen: Pen, chance: Chance): void {
  const width = box.width * chance.between(0.4, 0.85)
  const left = box.x + chance.between(0.5, Math.max(0.6, box.width - width - 1))
  const base = box.y + box.height * chance.between(0.6, 0.85)
  const height = box.height * chance.between(0.35, 0.7)
  const points: Point[] = [[left, base]]
  const loops = chance.whole(5, 12)
  for (let i = 0; i < loops; i += 1) {
    const x = left + (width * (i + 0.5)) / loops
    const tall = i === 0 || chance.odds(0.2) ? 1 : chance.between(0.25, 0.5)
    points.push(jitter(chance, x - 0.3, base - height * tall, 0.3))
    points.push(jitter(chance, x + width / loops / 2, base + (chance.odds(0.12) ? height * 0.4 : 0), 0.3))
    if (chance.odds(0.3)) points.push(jitter(chance, x, base - height * 0.2, 0.3))
  }
  if (chance.odds(0.4)) points.push([left + width * 1.05, base + 1], [left + width * 0.3, base + 1.4])
  draw(ink, points, pen, chance)
}

/** Something like running writing: words of small waves on a line. */
export function writeWords(ink: InkLayer, box: Box, pen: Pen, chance: Chance): void {
  let x = box.x + 1
  const base = box.y + box.height - 1.4
  while (x < box.x + box.width - 6) {
    const end = Math.min(box.x + box.width - 1, x + chance.between(5, 13))
    const points: Point[] = []
    while (x < end) {
      const tall = chance.odds(0.25) ? 3.4 : 1.7
      points.push(jitter(chance, x, base, 0.12), jitter(chance, x + 0.45, base - tall, 0.25))
      x += chance.between(0.9, 1.6)
    }
    points.push([x, base])
    draw(ink, points, pen, chance)
    x += chance.between(1.6, 2.6)
    if (chance.odds(0.25)) break
  }
}
