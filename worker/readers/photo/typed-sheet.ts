/**
 * Sheets filled in on a computer: noticed by digits that are all of one height and on one line, which no hand writes; then read
 * by the text engine and the digit net together, and weighed like ink, so that sums, clocks and registers speak as well.
 */
import { type CombCell, isComb, type Layout } from '../../../shared/layouts/layout.ts'
import type { BoxDist, DigitNet, TickDist } from '../../../shared/reading/classes.ts'
import type { Grey } from '../../../shared/reading/pixels/grey.ts'
import type { CellReading, SheetReading } from '../../../shared/reading/sheet-reading.ts'
import { weighSheet } from '../../../shared/reading/weigh/sheet.ts'
import type { Facts } from '../../../shared/reading/weigh/types.ts'
import type { PrintedText } from './printed-text.ts'
import type { TextEngine } from './text-engine.ts'
import { type Glyphs, glyphsOf } from './typed-glyphs.ts'
import { readWords, type TypedDigit, type Word } from './typed-line.ts'
import { netOnWords } from './typed-net.ts'
import { blankBoxes, boxesTyped, digitChances, type Setting } from './typed-places.ts'
import { cutStrip, isCut, type Strip } from './typed-strip.ts'

/** Coarse is enough to see whether it is type; reading wants the fine one. Pixels a millimetre. */
const PROBE_PX_PER_MM = 6
const READ_PX_PER_MM = 14
/** So many combs with ink are looked at, and so many digits must be there to say anything. */
const PROBE_COMBS = 8
const PROBE_DIGITS = 10
/** Nine tenths of typed digits differ by less, mm: measured 0.0 to 0.35 on type, 0.8 and more on hands. */
const TYPE_SPREAD_MM = 0.45
/** A digit this far from the usual height or line was not typed with the others, mm. */
const OTHER_TYPE_MM = 0.5

/** An attempt at a page has 24 s: on a machine that stalls, the text engine leaves the rest to the net, and so in doubt. */
const MOST_MS = 10_000

interface TypedTools {
  engine: TextEngine
  text: PrintedText
  net: DigitNet
}

interface Comb extends Glyphs {
  cell: CombCell
  strip: Strip
}

/** Replaces the readings of typed combs in `reading`. Sheets written by hand are left as they are, and cost a few milliseconds. */
export async function readTyped(grey: Grey, reading: SheetReading, tools: TypedTools, facts: Facts = {}): Promise<void> {
  const { layout, readings } = reading
  if (!layout || reading.takeAgain || !isTyped(grey, layout, readings)) return
  const started = performance.now()
  const combs = combsOf(grey, layout, readings, READ_PX_PER_MM)
  const setting = settingOf(combs)
  const typed = combs.filter((comb) => comb.digits.length > 0 && sameType(comb, setting))
  const words: Word[] = typed.map(({ strip, digits }) => ({ strip, digits }))
  const byText = await readWords(tools.engine, words, setting.height_px, MOST_MS)
  const byNet = await netOnWords(tools.net, words)
  const dists = new Map<string, BoxDist[]>()
  typed.forEach((comb, i) => {
    const own = boxesTyped(comb.cell, comb.strip, comb, chances(comb, byText[i]!, byNet[i]!), setting)
    if (own) dists.set(comb.cell.key, own)
  })
  for (const { cell, strip, digits, marks } of combs) {
    if (strip.ink === 0 || (digits.length === 0 && marks.length === 0)) dists.set(cell.key, blankBoxes(cell))
  }
  const weighed = weighSheet(layout, { combs: dists, ticks: ticksOf(layout, readings) }, facts)
  for (const { cell, digits } of combs) {
    const before = readings.get(cell.key)!
    const own = dists.has(cell.key) ? weighed.get(cell.key) : undefined
    if (own) readings.set(cell.key, withPlacing(before, own))
    else if (digits.length > 0) readings.set(cell.key, notType(cell, before))
  }
  await suggestLines(grey, reading, tools.text)
  reading.ms.typed = performance.now() - started
}

/** What a printed mark has cut into may look like another digit to both readers. */
const chances = ({ strip, digits }: Comb, byText: TypedDigit[] | null, byNet: number[][]) =>
  byNet.map((net, i) => digitChances(byText?.[i] ?? null, net, isCut(strip, digits[i]!)))

function combsOf(grey: Grey, layout: Layout, readings: ReadonlyMap<string, CellReading>, px_per_mm: number, most = 1000): Comb[] {
  const combs: Comb[] = []
  for (const cell of layout.cells) {
    const own = isComb(cell) ? readings.get(cell.key) : undefined
    if (!own || !isComb(cell)) continue
    if (most < 1000 && own.value === null && own.state === 'clear') continue
    const strip = cutStrip(grey, cell, own.quad, px_per_mm)
    combs.push({ cell, strip, ...glyphsOf(strip) })
    if (combs.length === most) break
  }
  return combs
}

function isTyped(grey: Grey, layout: Layout, readings: ReadonlyMap<string, CellReading>): boolean {
  const glyphs = combsOf(grey, layout, readings, PROBE_PX_PER_MM, PROBE_COMBS).flatMap((comb) => comb.digits)
  if (glyphs.length < PROBE_DIGITS) return false
  const spread = (of: (g: (typeof glyphs)[number]) => number) => {
    const sorted = glyphs.map(of).sort((a, b) => a - b)
    return sorted[Math.floor(sorted.length * 0.95)]! - sorted[Math.floor(sorted.length * 0.05)]!
  }
  const most = TYPE_SPREAD_MM * PROBE_PX_PER_MM
  return spread((g) => g.low - g.top) <= most && spread((g) => g.low) <= most
}

const median = (values: number[]) => values.sort((a, b) => a - b)[values.length >> 1] ?? 0

function settingOf(combs: readonly Comb[]): Setting {
  const glyphs = combs.flatMap((comb) => comb.digits)
  const pitches = combs.flatMap(({ digits }) =>
    digits.slice(1).map((g, i) => (g.left + g.right - digits[i]!.left - digits[i]!.right) / 2),
  )
  return {
    height_px: median(glyphs.map((g) => g.low - g.top)),
    low_px: median(glyphs.map((g) => g.low)),
    pitch_px: median(pitches),
  }
}

const sameType = ({ digits }: Comb, { height_px, low_px }: Setting) =>
  digits.every(
    (g) =>
      Math.abs(g.low - g.top - height_px) <= OTHER_TYPE_MM * READ_PX_PER_MM &&
      Math.abs(g.low - low_px) <= OTHER_TYPE_MM * READ_PX_PER_MM,
  )

/** What the units of scaled combs are ticked as; a tick in doubt says nothing. */
function ticksOf(layout: Layout, readings: ReadonlyMap<string, CellReading>): Map<string, TickDist[]> {
  const tick = (ticked: number): TickDist => ({ ticked, empty: 1 - ticked, spoiled: 0 })
  return new Map(
    layout.cells.flatMap((cell) => {
      const own = cell.kind === 'choice' ? readings.get(cell.key) : undefined
      if (!own || cell.kind !== 'choice') return []
      const sure = own.state === 'clear' ? 0.9999 : 0.6
      return [[cell.key, cell.options.map(({ option }) => tick(option === own.value ? sure : 1 - sure))] as const]
    }),
  )
}

/** What was doubted about the field's place stays. */
function withPlacing(before: CellReading, own: Pick<CellReading, 'value' | 'state' | 'candidates' | 'reasons'>): CellReading {
  const placing = before.reasons.filter((r) => r.rule === 'R07')
  return {
    ...before,
    value: own.value,
    candidates: own.candidates,
    reasons: [...own.reasons, ...placing],
    state: placing.length > 0 ? 'in doubt' : own.state,
  }
}

/** On a typed sheet, a comb with other ink in it: a hand has corrected it, or type and frame run together. */
function notType(cell: CombCell, before: CellReading): CellReading {
  const text = `${cell.label} does not hold plain type like the rest of the sheet.`
  return { ...before, state: 'in doubt', reasons: [...before.reasons, { rule: 'R08', text, cells: [cell.key] }] }
}

/** Words stay pictures; what was typed is offered to whoever keys them. Names of persons are not read at all. */
async function suggestLines(grey: Grey, { layout, map, readings }: SheetReading, text: PrintedText): Promise<void> {
  for (const cell of layout?.cells ?? []) {
    const own = readings.get(cell.key)
    if (cell.kind !== 'line' || cell.personal || !own || !map) continue
    const seen = await text.typedLine(grey, map, cell)
    if (seen) readings.set(cell.key, { ...own, candidates: [{ value: seen.text, p: seen.p, ink: seen.p }] })
  }
}
