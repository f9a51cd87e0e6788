/** Reads every photo of a folder that has its truth beside it, and counts what came of each. */
import { readdir, readFile } from 'node:fs/promises'
import { join, relative } from 'node:path'
import { UserError } from '../../shared/errors.ts'
import { findLayout } from '../../shared/layouts/registry.ts'
import type { PhotoMap } from '../simulator/make-photo.ts'
import type { Truth } from '../simulator/scenario.ts'
import { type PageScore, scorePage } from './compare.ts'
import { type DigitPlace, decodeMs, digitsOf } from './peers.ts'
import type { BenchReader, OnePage } from './reading-json.ts'
import { tiedKeys } from './tied.ts'

export interface FolderScores {
  byLevel: Map<string, PageScore[]>
  /** CPU milliseconds of the bare decode of each photo. */
  decode_ms: number[]
  /** Every hand-written digit, for a reader that goes digit by digit. */
  places: DigitPlace[]
}

const json = async <T>(path: string): Promise<T | null> =>
  readFile(path, 'utf8').then(
    (text) => JSON.parse(text) as T,
    () => null,
  )

/** NAME.jpg, in the folder and the folders in it, without the ending; sorted. */
export async function photosIn(folder: string): Promise<string[]> {
  const names = await readdir(folder, { recursive: true })
  return names
    .filter((name) => name.endsWith('.jpg'))
    .map((name) => join(folder, name.slice(0, -'.jpg'.length)))
    .sort()
}

/** Reads the photos one after the other; the first twice, since the first reading of a process warms it up. */
export async function readFolder(
  reader: BenchReader,
  folder: string,
  stems: readonly string[],
  onPhoto: (name: string, score: PageScore) => void,
): Promise<FolderScores> {
  const scores: FolderScores = { byLevel: new Map(), decode_ms: [], places: [] }
  for (const stem of stems) {
    const truth = await json<Truth>(`${stem}.truth.json`)
    const layout = truth && findLayout(truth.layout, truth.version)
    if (!layout) continue
    const bytes = await readFile(`${stem}.jpg`)
    if (scores.decode_ms.length === 0) await reader.read(bytes, stem).catch(refused)
    const start = process.cpuUsage()
    const pages = await reader.read(bytes, `${stem}.jpg`).catch(refused)
    const { user, system } = process.cpuUsage(start)
    scores.decode_ms.push(await decodeMs(bytes))
    const map = await json<PhotoMap>(`${stem}.map.json`)
    const name = relative(folder, stem)
    const score = scorePage(name, pages[0], truth, layout, tiedKeys(layout), map, (user + system) / 1000)
    scores.byLevel.set(truth.level, [...(scores.byLevel.get(truth.level) ?? []), score])
    const outlineOf = (key: string) => map?.cells[key] ?? pages[0]?.readings[key]?.quad
    if (!score.takeAgain) scores.places.push(...digitsOf(stem, truth, layout, outlineOf))
    onPhoto(name, score)
  }
  return scores
}

/** A file the reader refuses with a reason gives no page; anything else is a fault and ends the run. */
function refused(error: unknown): readonly OnePage[] {
  if (error instanceof UserError) return []
  throw error
}
