/**
 * Pictures nobody should send: damaged files, no sheet, text, other people's codes, half a sheet, two sheets, a sheet put
 * together from pieces. Each is made from a number, so that a failure can be made again.
 */
import encodeQR from 'qr'
import sharp, { type Region, type Sharp } from 'sharp'
import { findLayout } from '../../shared/layouts/registry.ts'
import { cornerCodeText, makeSheetCode } from '../../shared/layouts/sheet-code.ts'
import { makeGround } from './background.ts'
import { claimHuge, loseMiddle, turnBits } from './foreign-damage.ts'
import { screenshot, textPage, textPicture } from './foreign-pages.ts'
import { makePhoto } from './make-photo.ts'
import { type Chance, chanceOf } from './random.ts'
import type { Scenario } from './scenario.ts'

export interface Foreign {
  kind: string
  bytes: Buffer
  /** What was written, where damage may have left the sheet as it was: only this may be read from it. */
  shows: Scenario['readings'] | null
}

interface Base {
  jpeg: Buffer
  readings: Scenario['readings']
  width: number
  height: number
}

const LAYOUT = findLayout('tillage', 1)!

/** Two filled sheets, scanned small: what the pieces are cut from. Made once. */
let bases: Promise<readonly [Base, Base]> | null = null
const twoSheets = () => {
  bases ??= oneByOne()
  return bases
}
/** The simulator draws on one page at a time: made together, both pictures would show the second sheet. */
const oneByOne = async () => [await filled('fuzz one'), await filled('fuzz two')] as const

async function filled(seed: string): Promise<Base> {
  const scan = { dpi: 150, grey: true, skew: 0.004, scale: 1, copied: false, contrast: 1, jpegQuality: 80 }
  const { jpeg, truth } = await makePhoto({
    layout: LAYOUT,
    level: 'easy',
    chance: chanceOf(seed),
    digits: 'held back',
    planned: false,
    adjust: (c) => ({ ...c, scan, lost: null, dirt: null, spoiled: 0, wrongSum: 0 }),
  })
  const { width, height } = await sharp(jpeg).metadata()
  return { jpeg, width, height, readings: truth.readings }
}

const save = (image: Sharp) => image.jpeg({ quality: 80 }).toBuffer()
const plain = (width: number, height: number, grey: number) =>
  sharp({ create: { width, height, channels: 3, background: { r: grey, g: grey, b: grey } } })

/** A code of any text as a picture, `size` pixels wide with its quiet zone. */
async function code(text: string, size: number): Promise<Buffer> {
  const modules = encodeQR(text, 'raw', { ecc: 'quartile', border: 3 })
  const raw = Buffer.from(modules.flatMap((row) => row.map((dark) => (dark ? 0 : 255))))
  return sharp(raw, { raw: { width: modules.length, height: modules.length, channels: 1 } })
    .resize(size, size, { kernel: 'nearest' })
    .png()
    .toBuffer()
}

/** Four codes where a sheet has its own. */
async function withCorners(base: Base, textOf: (corner: number) => string): Promise<Buffer> {
  const perMm = base.width / (LAYOUT.page.width + 4)
  const size = Math.round(24.5 * perMm)
  const composites = await Promise.all(
    LAYOUT.codes.map(async (place, corner) => ({
      input: await code(textOf(corner), size),
      left: Math.round((place.x + 2 - 3.2) * perMm),
      top: Math.round((place.y + 2 - 3.2) * perMm),
    })),
  )
  return save(sharp(base.jpeg).composite(composites))
}

const half = (base: Base, side: number): Region => {
  const { width, height } = base
  const [w, h] = [Math.floor(width / 2), Math.floor(height / 2)]
  return [
    { left: 0, top: 0, width: w, height },
    { left: width - w, top: 0, width: w, height },
    { left: 0, top: 0, width, height: h },
    { left: 0, top: height - h, width, height: h },
  ][side % 4]!
}

type Maker = (chance: Chance, a: Base, b: Base) => Promise<Buffer>

const MAKERS: Readonly<Record<string, Maker>> = {
  'cut short': async (chance, a) => a.jpeg.subarray(0, Math.floor(a.jpeg.length * chance.between(0.02, 0.6))),
  'random bytes': async (chance) => Buffer.from(Array.from({ length: chance.whole(0, 5000) }, () => chance.whole(0, 255))),
  'JPEG head, random body': async (chance, a) =>
    Buffer.concat([a.jpeg.subarray(0, 700), Buffer.from(Array.from({ length: 20_000 }, () => chance.whole(0, 255)))]),
  'bits turned over': async (chance, a) => turnBits(a.jpeg, chance),
  'a hole in the file': async (chance, a) => loseMiddle(a.jpeg, chance),
  'claims to be huge': async (chance, a) => claimHuge(a.jpeg, chance),
  'a page of text': (chance) => textPicture(chance),
  'a PDF of text': (chance) => textPage(chance),
  'a screenshot': (chance, a) => screenshot(chance, a.jpeg),
  'one tone': async (chance) => save(plain(chance.whole(1, 1600), chance.whole(1, 1600), chance.pick([0, 128, 255]))),
  noise: async (chance) => {
    const raw = Buffer.from(Uint8Array.from({ length: 900 * 1200 }, () => chance.whole(0, 255)))
    return save(sharp(raw, { raw: { width: 900, height: 1200, channels: 1 } }))
  },
  'bare ground': async (chance) => {
    const ground = makeGround(chance.pick(['wood', 'soil', 'cloth'] as const), 600, 800, chance)
    return save(sharp(ground, { raw: { width: 600, height: 800, channels: 3 } }).resize(1200))
  },
  'other codes': async (chance) => {
    const composites = await Promise.all(
      Array.from({ length: chance.whole(1, 5) }, async () => ({
        input: await code(
          chance.pick(['HTTPS://EXAMPLE.ORG/A', 'WIFI:S:BARN;;', '0123456789', 'TI0110000000000X']),
          chance.whole(90, 260),
        ),
        left: chance.whole(0, 900),
        top: chance.whole(0, 1300),
      })),
    )
    return save(plain(1200, 1600, 240).composite(composites))
  },
  'a sheet with strange codes': (chance, a) => withCorners(a, (corner) => `PARCEL ${chance.whole(1000, 9999)}${corner}`),
  'a sheet of an unknown kind': (chance, a) => {
    const sheetCode = makeSheetCode((below) => chance.whole(0, below - 1))
    return withCorners(a, (corner) => cornerCodeText({ layoutCode: 'ZZ', version: 1, corner, planned: false, sheetCode }))
  },
  'four different sheets in four corners': (chance, a) =>
    withCorners(a, (corner) => {
      const sheetCode = makeSheetCode((below) => chance.whole(0, below - 1))
      return cornerCodeText({ layoutCode: LAYOUT.code, version: 1, corner, planned: false, sheetCode })
    }),
  'corners changed round': async (chance, a) => {
    const sheetCode = makeSheetCode((below) => chance.whole(0, below - 1))
    return withCorners(a, (corner) =>
      cornerCodeText({
        layoutCode: LAYOUT.code,
        version: 1,
        corner: (corner + 1 + (corner % 2) * 2) % 4,
        planned: false,
        sheetCode,
      }),
    )
  },
  'half a sheet': async (chance, a) => save(sharp(a.jpeg).extract(half(a, chance.whole(0, 3)))),
  'two sheets': async (chance, a, b) => {
    const scale = chance.between(0.6, 1)
    const [w, h] = [Math.round(a.width * scale), Math.round(a.height * scale)]
    const [left, right] = await Promise.all([a, b].map((base) => sharp(base.jpeg).resize(w, h, { fit: 'fill' }).toBuffer()))
    return save(
      plain(2 * w + 60, h + 40, 90).composite([
        { input: left!, left: 10, top: 20 },
        { input: right!, left: w + 40, top: 20 },
      ]),
    )
  },
  'halves of two sheets': async (chance, a, b) => {
    const region = half(a, chance.whole(0, 3))
    const piece = await sharp(b.jpeg).resize(a.width, a.height, { fit: 'fill' }).extract(region).toBuffer()
    return save(sharp(a.jpeg).composite([{ input: piece, left: region.left, top: region.top }]))
  },
  'quarters changed round': async (_, a) => {
    const [w, h] = [Math.floor(a.width / 2), Math.floor(a.height / 2)]
    const spots = [
      [0, 0],
      [w, 0],
      [w, h],
      [0, h],
    ] as const
    const composites = await Promise.all(
      spots.map(async ([left, top], i) => {
        const [toLeft, toTop] = spots[(i + 1) % 4]!
        return { input: await sharp(a.jpeg).extract({ left, top, width: w, height: h }).toBuffer(), left: toLeft, top: toTop }
      }),
    )
    return save(sharp(a.jpeg).composite(composites))
  },
  mirrored: async (_, a) => save(sharp(a.jpeg).flop()),
  'negative colours': async (_, a) => save(sharp(a.jpeg).negate()),
  'far too small': async (chance, a) => save(sharp(a.jpeg).resize(chance.whole(40, 380))),
  'drawn out': async (chance, a) =>
    save(sharp(a.jpeg).resize(a.width, Math.round(a.height / chance.between(3, 8)), { fit: 'fill' })),
  'waves stronger than paper bends': async (chance, a) => shear(a, chance),
}

/** Every row shifted sideways by a wave: corners can be found, nothing between them lies where it should. */
async function shear(base: Base, chance: Chance): Promise<Buffer> {
  const { data, info } = await sharp(base.jpeg).grayscale().raw().toBuffer({ resolveWithObject: true })
  const out = Buffer.alloc(data.length, 255)
  const [amount, length] = [chance.between(30, 90), chance.between(0.3, 0.9) * info.height]
  for (let y = 0; y < info.height; y += 1) {
    const by = Math.round(amount * Math.sin((2 * Math.PI * y) / length))
    for (let x = Math.max(0, -by); x < Math.min(info.width, info.width - by); x += 1) {
      out[y * info.width + x + by] = data[y * info.width + x]!
    }
  }
  return save(sharp(out, { raw: { width: info.width, height: info.height, channels: 1 } }))
}

/** A few bits may change nothing that can be seen. */
const MAY_SHOW_ALL: readonly string[] = ['bits turned over', 'a hole in the file']

export const FOREIGN_KINDS = Object.keys(MAKERS)

/** The n-th foreign picture; the kinds take turns. */
export async function makeForeign(n: number): Promise<Foreign> {
  const kind = FOREIGN_KINDS[n % FOREIGN_KINDS.length]!
  const [a, b] = await twoSheets()
  const chance = chanceOf(`foreign ${n}`)
  const [first, second] = chance.odds(0.5) ? [b, a] : [a, b]
  return { kind, bytes: await MAKERS[kind]!(chance, first, second), shows: MAY_SHOW_ALL.includes(kind) ? first.readings : null }
}
