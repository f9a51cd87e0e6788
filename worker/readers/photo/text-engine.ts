/** tesseract.js, one engine a process: started with the first text, made anew now and then, never fetching anything. */
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import type { Page } from 'tesseract.js'
import { sharpOnce } from './decode.ts'

const require = createRequire(import.meta.url)
/** The engine keeps what it has seen: it is made anew after so many pictures. */
const RENEW_AFTER = 500

/** A grey picture, one byte a dot. */
export interface TextPicture {
  width: number
  height: number
  data: Uint8Array
  /** Dots a millimetre of the type as it would be printed. */
  px_per_mm: number
}

export interface SeenSymbol {
  text: string
  /** 0 to 100. */
  confidence: number
  /** Middle in pixels of the picture. */
  x: number
  y: number
}

export interface TextEngine {
  /** The text, line by line. @param characters no others are answered */
  text(picture: TextPicture, characters: string): Promise<string>
  /** One line of words, and how sure the engine is of the least sure of them, 0 to 100. */
  line(picture: TextPicture, characters: string): Promise<{ text: string; confidence: number }>
  /** Every character with its place. */
  symbols(picture: TextPicture, characters: string): Promise<SeenSymbol[]>
  close(): Promise<void>
}

const startEngine = async () => {
  const { createWorker, OEM } = await import('tesseract.js')
  const data = join(dirname(require.resolve('@tesseract.js-data/eng/package.json')), '4.0.0_best_int')
  let failed: unknown = null
  const worker = await createWorker('eng', OEM.LSTM_ONLY, {
    langPath: data,
    gzip: true,
    cacheMethod: 'none',
    errorHandler: (error: unknown) => {
      failed = error
    },
  })
  return { worker, failure: () => failed }
}

/** The engine takes 0.7 s to start and 180 MB to keep: nothing is started before the first text. */
export function createTextEngine(): TextEngine {
  let engine: ReturnType<typeof startEngine> | null = null
  let seen = 0

  async function recognise(picture: TextPicture, characters: string, blocks: boolean) {
    if (engine && ++seen > RENEW_AFTER) {
      await (await engine).worker.terminate()
      engine = null
    }
    if (!engine) {
      engine = startEngine()
      seen = 1
    }
    const { worker, failure } = await engine
    await worker.setParameters({ tessedit_char_whitelist: characters })
    const { data } = await worker.recognize(await asPng(picture), {}, { text: true, blocks })
    if (failure()) throw new Error('The text engine failed.', { cause: failure() })
    return data
  }

  return {
    text: async (picture, characters) => (await recognise(picture, characters, false)).text,
    async line(picture, characters) {
      const words = wordsOf(await recognise(picture, characters, true))
      return {
        text: words.map((word) => word.text).join(' '),
        confidence: Math.min(...words.map((word) => word.confidence), words.length > 0 ? 100 : 0),
      }
    },
    async symbols(picture, characters) {
      return wordsOf(await recognise(picture, characters, true)).flatMap((word) =>
        word.symbols.map(({ text, confidence, bbox: { x0, x1, y0, y1 } }) => ({
          text,
          confidence,
          x: (x0 + x1) / 2,
          y: (y0 + y1) / 2,
        })),
      )
    },
    async close() {
      if (engine) await (await engine).worker.terminate()
      engine = null
    },
  }
}

const wordsOf = ({ blocks }: Page) =>
  (blocks ?? []).flatMap((block) => block.paragraphs.flatMap((p) => p.lines.flatMap((line) => line.words)))

async function asPng({ width, height, data, px_per_mm }: TextPicture): Promise<Buffer> {
  const sharp = await sharpOnce()
  return sharp(data, { raw: { width, height, channels: 1 } })
    .normalise()
    .withMetadata({ density: Math.round(px_per_mm * 25.4) })
    .png()
    .toBuffer()
}
