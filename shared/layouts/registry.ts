/** Every layout there is. A printed sheet keeps its version for ever, so versions are added and none is removed. */
import { haulage1 } from './haulage-1.ts'
import type { Layout } from './layout.ts'
import { tillage1 } from './tillage-1.ts'

export const LAYOUTS: ReadonlyArray<Layout> = [tillage1, haulage1]

/** The sheet that is meant where nobody names another. */
export const USUAL_LAYOUT = tillage1.key

/** What a sheet is for, in the words of its title: "haulage and PTO work". */
export const workOf = ({ title }: Layout): string => title.replace(/^.*: /, '')

/** The newest version of a layout, or the one asked for; null when there is none. */
export function findLayout(key: string, version?: number): Layout | null {
  const found = LAYOUTS.filter((l) => l.key === key && (version === undefined || l.version === version))
  return found.sort((a, b) => b.version - a.version)[0] ?? null
}

/** Each layout in its newest version: what is printed today. */
export const NEWEST_LAYOUTS: readonly Layout[] = LAYOUTS.filter((layout) => findLayout(layout.key) === layout)

export const findLayoutByCode = (code: string, version: number): Layout | null =>
  LAYOUTS.find((l) => l.code === code && l.version === version) ?? null
