/** Reads every photo and PDF of a folder that has its truth beside it, and counts what came of each page. */
import { readdir, readFile } from 'node:fs/promises'
import { join, relative } from 'node:path'
import { UserError } from '../../shared/errors.ts'
import { findLayout } from '../../shared/layouts/registry.ts'
import type { Facts } from '../../shared/reading/weigh/types.ts'
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
  /** Pictures that show no sheet, and what was said to them. */
  withoutSheet: Array<{ file: string; said: string }>
}

const json = async <T>(path: string): Promise<T | null> =>
  readFile(path, 'utf8').then(
    (text) => JSON.parse(text) as T,
    () => null,
  )

/** NAME.jpg, or files of another ending, in the folder and the folders in it, without the ending; sorted. */
export async function photosIn(folder: string, ending = /\.jpg$/): Promise<string[]> {
  const names = await readdir(folder, { recursive: true })
  return names
    .filter((name) => ending.test(name))
    .map((name) => join(folder, name.replace(ending, '')))
    .sort()
}

/** The truths beside the photos, where there are any. */
export async function truthsOf(stems: readonly string[]): Promise<Truth[]> {
  const truths = await Promise.all(stems.map((stem) => json<Truth | Truth[]>(`${stem}.truth.json`)))
  return truths.flatMap((truth) => truth ?? [])
}

/**
 * Reads the photos one after the other; the first twice, since the first reading of a process warms it up. `known`: registers for
 * the reader, as the worker has them; their numbers then have a second way to them.
 */
export async function readFolder(
  reader: BenchReader,
  folder: string,
  stems: readonly string[],
  onPhoto: (name: string, score: PageScore) => void,
  known?: Facts['known'],
): Promise<FolderScores> {
  const scores: FolderScores = { byLevel: new Map(), decode_ms: [], places: [], withoutSheet: [] }
  let isWarm = false
  for (const stem of stems) {
    const truths = [(await json<Truth | Truth[]>(`${stem}.truth.json`)) ?? []].flat()
    if (truths.length === 0) continue
    const photo = await readFile(`${stem}.jpg`).catch(() => null)
    const bytes = photo ?? (await readFile(`${stem}.pdf`))
    if (!isWarm) await reader.read(bytes, stem).catch(refused)
    isWarm = true
    const start = process.cpuUsage()
    const pages = await reader.read(bytes, stem, known && { known: { known } }).catch(refused)
    const { user, system } = process.cpuUsage(start)
    const cpuMs = (user + system) / 1000 / truths.length
    if (photo) scores.decode_ms.push(await decodeMs(photo))
    const map = await json<PhotoMap>(`${stem}.map.json`)
    for (const [i, truth] of truths.entries()) {
      const name = truths.length > 1 ? `${relative(folder, stem)} page ${i + 1}` : relative(folder, stem)
      const layout = findLayout(truth.layout, truth.version)
      if (!layout) {
        scores.withoutSheet.push({ file: name, said: pages[i]?.takeAgain?.code ?? (pages[i] ? 'read' : 'refused') })
        continue
      }
      const score = scorePage(name, pages[i], truth, layout, tiedKeys(layout, known !== undefined), map, cpuMs)
      scores.byLevel.set(truth.level, [...(scores.byLevel.get(truth.level) ?? []), score])
      const outlineOf = (key: string) => map?.cells[key] ?? pages[i]?.readings[key]?.quad
      if (photo && !score.takeAgain) scores.places.push(...digitsOf(stem, truth, layout, outlineOf))
      onPhoto(name, score)
    }
  }
  return scores
}

/** A file the reader refuses with a reason gives no page; anything else is a fault and ends the run. */
function refused(error: unknown): readonly OnePage[] {
  if (error instanceof UserError) return []
  throw error
}
