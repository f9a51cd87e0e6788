/** One page against what was written on it. */
import { boxesOf } from '../../shared/layouts/geometry.ts'
import { isComb, type Layout } from '../../shared/layouts/layout.ts'
import type { PhotoMap } from '../simulator/make-photo.ts'
import type { Truth, Written } from '../simulator/scenario.ts'
import type { OnePage, OneReading } from './reading-json.ts'
import type { SheetShare } from './statistics.ts'
import { causeOf } from './why.ts'

export interface Tally {
  /** Readings that hold ink and were not made wrong on purpose. */
  readings: number
  doubts: number
  clear: number
  silent: number
}

export interface Mistake {
  file: string
  key: string
  written: Written
  read: Written
}

export interface PageScore {
  file: string
  takeAgain: string | null
  tied: Tally
  untied: Tally
  ticks: Tally
  /** Spoiled cells and wrong sums: how many, and how many were left to a person. */
  caught: SheetShare
  /** Cells left blank: how many, and how many came out clear with a value. */
  blanks: SheetShare
  mistakes: Mistake[]
  /** Spoiled cells and wrong sums that came out clear. */
  missed: string[]
  /** Why readings that hold ink, and were not made wrong on purpose, are in doubt. */
  causes: Array<{ kind: 'tied' | 'untied' | 'ticks'; cause: string }>
  /** Digits written in the number readings that came out clear. */
  clearDigits: number
  /** Distance of each read cell's middle from where it lies, mm. */
  placement_mm: number[]
  /** The same for the readings that came out clear, which may not be off by more than a millimetre. */
  clearPlacement_mm: number[]
  cpuMs: number
  ms: Readonly<Record<string, number>>
}

const emptyTally = (): Tally => ({ readings: 0, doubts: 0, clear: 0, silent: 0 })

export const sameValue = (a: Written, b: Written): boolean =>
  typeof a === 'number' && typeof b === 'number' ? Math.abs(a - b) < 1e-9 : a === b

/** The digits of a value as they are written, without points, colons and hyphens. */
export const digitsIn = (value: Written): string =>
  typeof value === 'boolean' || value === null ? '' : String(value).replace(/\D/g, '')

/** Counts one page. `cpuMs`: from bytes to readings. */
export function scorePage(
  file: string,
  page: OnePage | undefined,
  truth: Truth,
  layout: Layout,
  tied: ReadonlySet<string>,
  map: PhotoMap | null,
  cpuMs: number,
): PageScore {
  const score: PageScore = {
    file,
    takeAgain: page ? (page.takeAgain?.code ?? null) : 'no page',
    tied: emptyTally(),
    untied: emptyTally(),
    ticks: emptyTally(),
    caught: [0, 0],
    blanks: [0, 0],
    mistakes: [],
    missed: [],
    causes: [],
    clearDigits: 0,
    placement_mm: [],
    clearPlacement_mm: [],
    cpuMs,
    ms: page?.ms ?? {},
  }
  if (!page || score.takeAgain) return score
  const wrongOnPurpose = new Set([...truth.spoiled, ...truth.wrongSum])
  for (const cell of layout.cells) {
    const written = truth.readings[cell.key]
    if (written === undefined || cell.kind === 'line' || cell.kind === 'signature') continue
    const reading: OneReading = page.readings[cell.key] ?? { value: null, state: 'in doubt' }
    const onPurpose = wrongOnPurpose.has(cell.key)
    const kind = isComb(cell) ? (tied.has(cell.key) ? 'tied' : 'untied') : 'ticks'
    const tally = score[kind]
    const right = sameValue(reading.value, written)
    if (onPurpose) {
      if (reading.state === 'clear') score.missed.push(cell.key)
      score.caught = [score.caught[0] + (reading.state === 'clear' ? 0 : 1), score.caught[1] + 1]
    } else if (written === null || written === false) {
      score.blanks = [score.blanks[0] + (reading.state === 'clear' && !right ? 1 : 0), score.blanks[1] + 1]
    } else {
      tally.readings += 1
      if (reading.state === 'clear') tally.clear += 1
      else {
        tally.doubts += 1
        score.causes.push({ kind, cause: causeOf((reading.reasons ?? []).map((reason) => reason.rule)) })
      }
    }
    const holdsInk = onPurpose || (written !== null && written !== false)
    if (onPurpose && reading.state === 'clear') tally.clear += 1
    if (reading.state === 'clear' && !right) {
      if (holdsInk) tally.silent += 1
      score.mistakes.push({ file, key: cell.key, written, read: reading.value })
    }
    if (isComb(cell) && holdsInk && reading.state === 'clear') score.clearDigits += digitsIn(written).length
    const off = map && placementOff(reading, map.cells[cell.key], boxesOf(cell))
    if (off === null) continue
    score.placement_mm.push(off)
    if (reading.state === 'clear') score.clearPlacement_mm.push(off)
  }
  return score
}

type Corners = ReadonlyArray<readonly [number, number]>

/** How far the read outline lies from the true one: the worst corner, in mm of the page. */
function placementOff(reading: OneReading, lies: Corners | undefined, boxes: ReturnType<typeof boxesOf>): number | null {
  const quad = reading.quad
  if (quad?.length !== 4 || !lies) return null
  const width_mm = Math.max(...boxes.map((b) => b.x + b.width)) - Math.min(...boxes.map((b) => b.x))
  const width_px = Math.hypot(lies[1]![0] - lies[0]![0], lies[1]![1] - lies[0]![1])
  const off_px = Math.max(...quad.map(([x, y], i) => Math.hypot(x - lies[i]![0], y - lies[i]![1])))
  return (off_px * width_mm) / width_px
}
