/** The figures as a table for people. */
import type { Condition } from '../simulator/shapes/condition.ts'
import type { PageScore } from './compare.ts'
import { type LevelFigures, levelFigures } from './figures.ts'
import type { Peers } from './peers.ts'

const percent = (share: number | null, places = 2) => (share === null ? 'none' : `${(100 * share).toFixed(places)} %`)
const span = ([low, high]: readonly number[], places = 2) => `${(100 * low!).toFixed(places)}–${(100 * high!).toFixed(places)} %`

function kindLines(name: string, f: LevelFigures['ticks']): string[] {
  const s = f.silentError
  return [
    `  ${name.padEnd(15)} doubt ${percent(f.doubtShare).padStart(8)}  (95 % by sheet ${span(f.doubtShareInterval)}; ${f.readings} readings)`,
    `  ${''.padEnd(15)} silent ${`${s.wrong} of ${s.clear}`.padStart(10)} = ${percent(s.share, 3)}  (exact ${span([s.low, s.high], 3)}; by sheet ${span(s.bySheet, 3)})`,
  ]
}

/** One level, eight to twelve lines. */
export function levelLines(level: string, f: LevelFigures): string[] {
  const stages = Object.entries(f.cpuMs.stages).map(([name, { p50, p95 }]) => `${name} ${Math.round(p50)}/${Math.round(p95)}`)
  return [
    `${level}: ${f.photos} simulated photos, to take again ${percent(f.takeAgainShare)} (exact ${span(f.takeAgainInterval)}) ${JSON.stringify(f.takeAgainCodes)}`,
    ...kindLines('numbers, tied', f.numbers.tied),
    ...kindLines('numbers, untied', f.numbers.untied),
    ...kindLines('ticks', f.ticks),
    `  caught          ${f.caught.hits} of ${f.caught.count} = ${percent(f.catchShare)}  (95 % ${span(f.catchInterval)})`,
    `  blanks read as something ${f.blanksReadAsSomething.hits} of ${f.blanksReadAsSomething.count}`,
    ...(f.placement_mm
      ? [`  cells off by p50 ${f.placement_mm.p50}, p99 ${f.placement_mm.p99}, at most ${f.placement_mm.max} mm`]
      : []),
    `  CPU ms p50 ${Math.round(f.cpuMs.p50)}, p95 ${Math.round(f.cpuMs.p95)}; stages p50/p95: ${stages.join(', ')}`,
  ]
}

/** The number readings once more, where the reader was handed the registers too; no line where it was not. */
export function registerLines(pages: readonly PageScore[] | undefined): string[] {
  if (!pages) return []
  const { tied, untied } = levelFigures(pages).numbers
  return ['  with registers:', ...kindLines('numbers, tied', tied), ...kindLines('numbers, untied', untied)]
}

export const mistakeLines = (pages: readonly PageScore[]): string[] =>
  pages.flatMap((p) => p.mistakes).map((m) => `  ${m.file} ${m.key}: written ${String(m.written)}, read ${String(m.read)}`)

export const missedLines = (pages: readonly PageScore[]): string[] =>
  pages.flatMap((p) => p.missed.map((key) => `  ${p.file} ${key}: made wrong on purpose, read clear`))

export const peerLines = (peers: Peers): string[] => [
  `bare JPEG decode p50 ${peers.jpegDecodeMsP50.toFixed(0)} ms CPU; whole page ${peers.readOverDecode.toFixed(2)} times that`,
  ...(peers.tesseractCells > 0
    ? [
        `tesseract.js digit by digit on ${peers.tesseractCells} cells: ${peers.tesseractMsPerDigit!.toFixed(1)} ms a digit, ${percent(peers.tesseractWrongShare)} wrong`,
        `this reader: ${peers.readerMsPerDigit!.toFixed(2)} ms a digit for the whole page, ${peers.readerCutAndNetMsPerDigit!.toFixed(2)} for cutting and recognising (by the clock), ${percent(peers.readerWrongDigitShare, 4)} of the digits of clear readings wrong`,
      ]
    : []),
]

const COLUMNS = ['photos', 'again', 'tied', 'untied', 'ticks', 'silent', 'caught', 'off', 'clear off', 'CPU ms'] as const
const WIDTHS = [7, 6, 8, 8, 8, 11, 9, 7, 10, 7] as const
const inColumns = (name: string, fields: readonly string[]) =>
  `${name.padEnd(21)}${fields.map((field, i) => field.padStart(WIDTHS[i] ?? 0)).join('')}`

/** Over `shapeLine`: doubt shares of tied and untied numbers and ticks, silent errors of clear readings, mm, CPU at the median. */
export const shapeHead = inColumns('', COLUMNS)

/** One condition in one line, at its end the answers that do not fit it. */
export function shapeLine(
  { name, fits, hopeless }: Pick<Condition, 'name' | 'fits' | 'hopeless'>,
  pages: readonly PageScore[],
): string {
  const f = levelFigures(pages)
  const kinds = [f.numbers.tied, f.numbers.untied, f.ticks]
  const wrong = kinds.reduce((sum, k) => sum + k.silentError.wrong, 0)
  const clear = kinds.reduce((sum, k) => sum + k.silentError.clear, 0)
  const mm = (value: number | undefined) => (value === undefined ? '-' : value.toFixed(2))
  const again = pages.filter((p) => p.takeAgain).length
  const codes = Object.entries(f.takeAgainCodes).map(
    ([code, n]) => `${n} ${code}${fits && !fits.some((fit) => fit === code) ? ' (does not fit)' : ''}`,
  )
  if (hopeless && again < pages.length) codes.push(`${pages.length - again} read (does not fit)`)
  const [off, clearOff] = [f.placement_mm?.max, pages.flatMap((p) => p.clearPlacement_mm)]
  return `${inColumns(name, [
    String(pages.length),
    String(again),
    ...kinds.map((k) => percent(k.doubtShare, 1)),
    `${wrong}/${clear}`,
    `${f.caught.hits}/${f.caught.count}`,
    mm(off),
    mm(clearOff.length > 0 ? Math.max(...clearOff) : undefined),
    f.cpuMs.p50.toFixed(0),
  ])}  ${codes.join(', ')}`.trimEnd()
}
