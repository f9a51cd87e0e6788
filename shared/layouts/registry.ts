/** Every layout there is. A printed sheet keeps its version for ever, so versions are added and none is removed. */
import { haulage1 } from './haulage-1.ts'
import type { Layout } from './layout.ts'
import { tillage1 } from './tillage-1.ts'

export const LAYOUTS: ReadonlyArray<Layout> = [tillage1, haulage1]

/** The newest version of a layout, or the one asked for; null when there is none. */
export function findLayout(key: string, version?: number): Layout | null {
  const found = LAYOUTS.filter((l) => l.key === key && (version === undefined || l.version === version))
  return found.sort((a, b) => b.version - a.version)[0] ?? null
}

export const findLayoutByCode = (code: string, version: number): Layout | null =>
  LAYOUTS.find((l) => l.code === code && l.version === version) ?? null
