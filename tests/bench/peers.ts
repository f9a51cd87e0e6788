/**
 * What else does the same work on the same files in the same run: the bare decode of the JPEG, and tesseract.js on single
 * hand-written digits.
 */
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import sharp from 'sharp'
import { createWorker, OEM, PSM } from 'tesseract.js'
import { type Box, boxesOf, cellBounds } from '../../shared/layouts/geometry.ts'
import { isComb, type Layout } from '../../shared/layouts/layout.ts'
import { boxDigits } from '../simulator/boxes.ts'
import { chanceOf } from '../simulator/random.ts'
import type { Truth } from '../simulator/scenario.ts'
import { type Corners, cutBox } from './cut-box.ts'

export interface Peers {
  jpegDecodeMsP50: number
  readOverDecode: number
  tesseractCells: number
  tesseractMsPerDigit: number | null
  tesseractWrongShare: number | null
  /** Whole page over its written digits. */
  readerMsPerDigit: number | null
  /** Cutting and recognising alone, which is what the digit-by-digit reader is timed for. */
  readerCutAndNetMsPerDigit: number | null
  readerWrongDigitShare: number | null
}

export interface DigitPlace {
  file: string
  corners: Corners
  digit: number
}

/** CPU milliseconds of a bare decode to RGB. */
export async function decodeMs(bytes: Uint8Array): Promise<number> {
  const start = process.cpuUsage()
  await sharp(bytes).raw().toBuffer()
  const { user, system } = process.cpuUsage(start)
  return (user + system) / 1000
}

/** Corners of one box inside its comb's outline. */
function boxCorners(outline: Corners, bounds: Box, box: Box): Corners {
  const [a, b, c, d] = outline as [Corners[0], Corners[0], Corners[0], Corners[0]]
  const at = (x: number, y: number): readonly [number, number] => {
    const [u, v] = [(x - bounds.x) / bounds.width, (y - bounds.y) / bounds.height]
    const mix = (k: 0 | 1) => (1 - v) * ((1 - u) * a![k] + u * b![k]) + v * ((1 - u) * d![k] + u * c![k])
    return [mix(0), mix(1)]
  }
  const [right, low] = [box.x + box.width, box.y + box.height]
  return [at(box.x, box.y), at(right, box.y), at(right, low), at(box.x, low)]
}

/** Every hand-written digit of a photo, where it lies: by the simulator's map, or where the reader found its comb. */
export function digitsOf(
  file: string,
  truth: Truth,
  layout: Layout,
  outlineOf: (key: string) => Corners | null | undefined,
): DigitPlace[] {
  return layout.cells.filter(isComb).flatMap((cell) => {
    const written = truth.readings[cell.key]
    const outline = outlineOf(cell.key)
    if (!outline || written === undefined || written === null || truth.spoiled.includes(cell.key)) return []
    const unit = cell.scale && truth.readings[cell.scale.by]
    const scale = (typeof unit === 'string' && cell.scale?.factors[unit]) || 1
    const digits = boxDigits(cell, written, scale, false)
    const bounds = cellBounds(cell)
    return boxesOf(cell).flatMap((box, i) => {
      const digit = digits[i]
      return typeof digit === 'number' ? [{ file, corners: boxCorners(outline, bounds, box), digit }] : []
    })
  })
}

/** tesseract.js one digit at a time, one engine, digits only: its time and its share of wrong answers. */
export async function tesseractDigits(places: readonly DigitPlace[], count: number, load: (file: string) => Promise<Uint8Array>) {
  const chance = chanceOf('tesseract cells')
  const chosen = [...places]
    .map((place) => ({ place, order: chance.unit() }))
    .sort((a, b) => a.order - b.order)
    .slice(0, count)
    .map(({ place }) => place)
    .sort((a, b) => a.file.localeCompare(b.file))
  const data = dirname(createRequire(import.meta.url).resolve('@tesseract.js-data/eng/package.json'))
  const engine = await createWorker('eng', OEM.LSTM_ONLY, {
    langPath: join(data, '4.0.0_best_int'),
    gzip: true,
    cacheMethod: 'none',
    errorHandler: (error: unknown) => {
      throw error
    },
  })
  await engine.setParameters({
    tessedit_char_whitelist: '0123456789',
    user_defined_dpi: '300',
    tessedit_pageseg_mode: PSM.SINGLE_CHAR,
  })
  let [wrong, ms, file] = [0, 0, '']
  let picture = { data: new Uint8Array(), width: 0, height: 0 }
  for (const place of chosen) {
    if (place.file !== file) {
      file = place.file
      const { data: grey, info } = await sharp(await load(file))
        .autoOrient()
        .grayscale()
        .raw()
        .toBuffer({ resolveWithObject: true })
      picture = { data: grey, width: info.width, height: info.height }
    }
    const png = await cutBox(picture, place.corners)
    const start = process.cpuUsage()
    const answer = await engine.recognize(png)
    const { user, system } = process.cpuUsage(start)
    ms += (user + system) / 1000
    if (answer.data.text.trim() !== String(place.digit)) wrong += 1
  }
  await engine.terminate()
  return { cells: chosen.length, msPerDigit: ms / chosen.length, wrongShare: wrong / chosen.length }
}
