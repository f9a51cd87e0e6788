/**
 * npm run bench:read -- [FOLDER] [--final] [--json] [--peers] [--count N] [--why] [--registers]
 * npm run bench:read -- --shapes [--only NAME,...] [--count N]
 * Reads every NAME.jpg and NAME.pdf of a folder (and the folders in it) that has a NAME.truth.json, and prints how well and how fast. Without
 * a folder: the standard set, 60 photos a level, 200 with --final. --why: what readings are in doubt for. --registers: all once
 * more with the registers of the set's world, as the worker has them. --shapes: one line for each condition of paper, light, print
 * and hand, 12 photos each. All photos are simulated until real ones exist.
 */
import { readFile } from 'node:fs/promises'
import { parseArgs } from 'node:util'
import { digitsIn, type PageScore } from './compare.ts'
import { levelFigures } from './figures.ts'
import { type Peers, tesseractDigits } from './peers.ts'
import { levelLines, missedLines, mistakeLines, peerLines, registerLines } from './print.ts'
import { photosIn, readFolder, truthsOf } from './read-folder.ts'
import { openReader } from './reader.ts'
import { registersOf } from './registers.ts'
import { benchShapes, conditionsNamed, SHAPES_A_CONDITION } from './shapes.ts'
import { standardSet } from './standard-set.ts'
import { quantile } from './statistics.ts'
import { whyLines } from './why.ts'

const { values, positionals } = parseArgs({
  options: {
    final: { type: 'boolean', default: false },
    json: { type: 'boolean', default: false },
    peers: { type: 'boolean', default: false },
    count: { type: 'string' },
    shapes: { type: 'boolean', default: false },
    only: { type: 'string' },
    why: { type: 'boolean', default: false },
    registers: { type: 'boolean', default: false },
  },
  allowPositionals: true,
})
const say = (line: string) => process.stderr.write(`${line}\n`)

if (values.shapes) {
  const conditions = conditionsNamed(values.only)
  const reader = await openReader()
  await benchShapes(reader, conditions, Number(values.count ?? SHAPES_A_CONDITION), say)
  await reader.close()
  process.exit(0)
}

const folder = positionals[0] ?? (await standardSet(Number(values.count ?? (values.final ? 200 : 60)), values.final, say))
const reader = await openReader()
const stems = await photosIn(folder, /\.(jpg|pdf)$/)
const onPhoto = (name: string, score: PageScore) => {
  if (!values.json) say(`${name}: ${score.takeAgain ?? `${score.mistakes.length} silent`}, ${Math.round(score.cpuMs)} ms`)
}
const { byLevel, decode_ms, places, withoutSheet } = await readFolder(reader, folder, stems, onPhoto)
const known = values.registers ? registersOf(await truthsOf(stems)) : undefined
const withRegisters = known && (await readFolder(reader, folder, stems, onPhoto, known)).byLevel
await reader.close()

const all = [...byLevel.values()].flat()
const cells = values.final || values.peers ? 2000 : 200
const tesseract = places.length > 0 ? await tesseractDigits(places, cells, (file) => readFile(`${file}.jpg`)) : null
const cpu = all.map((p) => p.cpuMs).sort((a, b) => a - b)
const jpegDecodeMsP50 = quantile(
  [...decode_ms].sort((a, b) => a - b),
  0.5,
)
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
const levels = [...byLevel.entries()].sort(([a], [b]) => order.indexOf(a) - order.indexOf(b))

if (values.json) {
  const figuresOf = (entries: typeof levels) => Object.fromEntries(entries.map(([level, pages]) => [level, levelFigures(pages)]))
  const figures = { levels: figuresOf(levels), ...(withRegisters ? { withRegisters: figuresOf([...withRegisters]) } : {}) }
  process.stdout.write(`${JSON.stringify({ simulated: true, ...figures, peers }, null, 1)}\n`)
} else {
  for (const [level, pages] of levels) {
    process.stdout.write(
      `${[
        ...levelLines(level, levelFigures(pages)),
        ...registerLines(withRegisters?.get(level)),
        ...mistakeLines(pages),
        ...missedLines(pages),
        ...(values.why ? whyLines(pages) : []),
      ].join('\n')}\n\n`,
    )
  }
  for (const { file, said } of withoutSheet) process.stdout.write(`${file}: no sheet in it; answered with: ${said}\n`)
  process.stdout.write(`${peerLines(peers).join('\n')}\n`)
}
process.exit(0)

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
