/**
 * npm run bench:read -- [FOLDER] [--final] [--json] [--peers] [--count N]
 * Reads every NAME.jpg of a folder (and the folders in it) that has a NAME.truth.json, and prints how well and how fast. Without
 * a folder: the standard set, 60 photos a level, 200 with --final. All photos are simulated until real ones exist.
 */
import { readdir, readFile } from 'node:fs/promises'
import { join, relative } from 'node:path'
import { parseArgs } from 'node:util'
import { UserError } from '../../shared/errors.ts'
import { findLayout } from '../../shared/layouts/registry.ts'
import type { PhotoMap } from '../simulator/make-photo.ts'
import type { Truth } from '../simulator/scenario.ts'
import { digitsIn, type PageScore, scorePage } from './compare.ts'
import { levelFigures } from './figures.ts'
import { type DigitPlace, decodeMs, digitsOf, type Peers, tesseractDigits } from './peers.ts'
import { levelLines, missedLines, mistakeLines, peerLines } from './print.ts'
import { openReader } from './reader.ts'
import type { OnePage } from './reading-json.ts'
import { standardSet } from './standard-set.ts'
import { quantile } from './statistics.ts'
import { tiedKeys } from './tied.ts'

const { values, positionals } = parseArgs({
  options: {
    final: { type: 'boolean', default: false },
    json: { type: 'boolean', default: false },
    peers: { type: 'boolean', default: false },
    count: { type: 'string' },
  },
  allowPositionals: true,
})
const say = (line: string) => process.stderr.write(`${line}\n`)
const json = async <T>(path: string): Promise<T | null> =>
  readFile(path, 'utf8').then(
    (text) => JSON.parse(text) as T,
    () => null,
  )

const folder = positionals[0] ?? (await standardSet(Number(values.count ?? (values.final ? 200 : 60)), values.final, say))
const stems = (await readdir(folder, { recursive: true }))
  .filter((name) => name.endsWith('.jpg'))
  .map((name) => join(folder, name.slice(0, -4)))
  .sort()

const reader = await openReader()
const scores = new Map<string, PageScore[]>()
const decode: number[] = []
const places: DigitPlace[] = []
let warm = false
for (const stem of stems) {
  const truth = await json<Truth>(`${stem}.truth.json`)
  const layout = truth && findLayout(truth.layout, truth.version)
  if (!layout) continue
  const bytes = await readFile(`${stem}.jpg`)
  if (!warm) await reader.read(bytes, stem).catch(refused)
  warm = true
  const start = process.cpuUsage()
  const pages = await reader.read(bytes, `${stem}.jpg`).catch(refused)
  const { user, system } = process.cpuUsage(start)
  decode.push(await decodeMs(bytes))
  const map = await json<PhotoMap>(`${stem}.map.json`)
  const name = relative(folder, stem)
  const score = scorePage(name, pages[0], truth, layout, tiedKeys(layout), map, (user + system) / 1000)
  scores.set(truth.level, [...(scores.get(truth.level) ?? []), score])
  if (!score.takeAgain) places.push(...digitsOf(stem, truth, layout, (key) => map?.cells[key] ?? pages[0]?.readings[key]?.quad))
  if (!values.json) say(`${name}: ${score.takeAgain ?? `${score.mistakes.length} silent`}, ${Math.round(score.cpuMs)} ms`)
}
await reader.close()

const all = [...scores.values()].flat()
const sortedDecode = decode.sort((a, b) => a - b)
const cells = values.final || values.peers ? 2000 : 200
const tesseract = places.length > 0 ? await tesseractDigits(places, cells, (file) => readFile(`${file}.jpg`)) : null
const cpu = all.map((p) => p.cpuMs).sort((a, b) => a - b)
const jpegDecodeMsP50 = quantile(sortedDecode, 0.5)
const peers: Peers = {
  jpegDecodeMsP50,
  readOverDecode: quantile(cpu, 0.5) / jpegDecodeMsP50,
  tesseractCells: tesseract?.cells ?? 0,
  tesseractMsPerDigit: tesseract?.msPerDigit ?? null,
  tesseractWrongShare: tesseract?.wrongShare ?? null,
  readerMsPerDigit: places.length > 0 ? cpu.reduce((a, b) => a + b, 0) / places.length : null,
  readerCutAndNetMsPerDigit:
    places.length > 0 ? all.reduce((sum, p) => sum + (p.ms.cut ?? 0) + (p.ms.net ?? 0), 0) / places.length : null,
  readerWrongDigitShare: wrongDigits(all),
}
const order = ['easy', 'ordinary', 'hard']
const levels = [...scores.entries()].sort(([a], [b]) => order.indexOf(a) - order.indexOf(b))

if (values.json) {
  const figures = Object.fromEntries(levels.map(([level, pages]) => [level, levelFigures(pages)]))
  process.stdout.write(`${JSON.stringify({ simulated: true, levels: figures, peers }, null, 1)}\n`)
} else {
  for (const [level, pages] of levels) {
    process.stdout.write(
      `${[...levelLines(level, levelFigures(pages)), ...mistakeLines(pages), ...missedLines(pages)].join('\n')}\n\n`,
    )
  }
  process.stdout.write(`${peerLines(peers).join('\n')}\n`)
}
process.exit(0)

/** A file the reader refuses with a reason gives no page; anything else is a fault and ends the run. */
function refused(error: unknown): readonly OnePage[] {
  if (error instanceof UserError) return []
  throw error
}

/** Digits of clear readings that came out wrong, over all digits of clear readings. */
function wrongDigits(pages: readonly PageScore[]): number | null {
  const clear = pages.reduce((sum, p) => sum + p.clearDigits, 0)
  if (clear === 0) return null
  let wrong = 0
  for (const mistake of pages.flatMap((p) => p.mistakes)) {
    if (!digitsIn(mistake.written)) continue
    const [a, b] = [digitsIn(mistake.written).padStart(12), digitsIn(mistake.read).padStart(12)]
    for (let i = 0; i < 12; i += 1) if (a[i] !== b[i]) wrong += 1
  }
  return wrong / clear
}
