/** Finds the sheet by its corner codes: those that decode first, the others where they must be. */
import type { Layout } from '../../layouts/layout.ts'
import { type CornerCode, parseCornerCode } from '../../layouts/sheet-code.ts'
import { fitHomography, type Homography, type Pair } from '../geometry/homography.ts'
import { type Grey, halve } from '../pixels/grey.ts'
import type { CodeFinder, FoundCode } from './code-finder.ts'
import { type PlacedCorner, readInWindow, searchByPattern, settleFound } from './corner-search.ts'

export interface FoundSheet {
  layout: Layout
  code: CornerCode
  corners: PlacedCorner[]
  homography: Homography
}

export type FindOutcome =
  | { kind: 'found'; sheet: FoundSheet }
  | { kind: 'none' }
  | { kind: 'unknown layout' }
  | { kind: 'two sheets' }

interface Decoded {
  code: CornerCode
  at: FoundCode['corners']
}

/**
 * Looks at a quarter of the size first, where most pictures show all four; then at half (as many found as at full size, a fifth
 * of the time), then at full size.
 */
async function decode(full: Grey, half: Grey, find: CodeFinder): Promise<Decoded[]> {
  const scan = async (grey: Grey): Promise<Decoded[]> =>
    (await find(grey)).flatMap(({ text, corners }) => {
      const code = parseCornerCode(text)
      const scale = full.width / grey.width
      const at = corners.map(({ x, y }) => ({ x: x * scale, y: y * scale })) as unknown as FoundCode['corners']
      return code ? [{ code, at }] : []
    })
  const quick = await scan(halve(half))
  if (new Set(quick.map(({ code }) => `${code.sheetCode} ${code.corner}`)).size === 4) return quick
  const found = await scan(half)
  return found.length > 0 ? found : scan(full)
}

const fitAll = (corners: readonly PlacedCorner[]) => fitHomography(corners.flatMap((c) => c.pairs))

/** Finds the sheet in a picture. Throws nothing; a picture without a sheet is an outcome. */
export async function findSheet(
  full: Grey,
  half: Grey,
  find: CodeFinder,
  layoutOf: (code: string, version: number) => Layout | null,
): Promise<FindOutcome> {
  const decoded = await decode(full, half, find)
  const first = decoded[0]
  if (!first) return { kind: 'none' }
  const corners = decoded.map(({ code }) => code.corner)
  const one = decoded.every(({ code }) => code.sheetCode === first.code.sheetCode)
  if (!one || new Set(corners).size < corners.length) return { kind: 'two sheets' }
  const layout = layoutOf(first.code.layoutCode, first.code.version)
  if (!layout) return { kind: 'unknown layout' }

  const found = decoded.flatMap(({ code, at }) => settleFound(full, layout, code, at) ?? [])
  // Nearest corners first, so that each new one steadies the guess for the next.
  for (const corner of [0, 1, 2, 3].filter((c) => !found.some((f) => f.corner === c)).sort(nearestTo(found))) {
    const guess = fitAll(found)
    if (!guess) break
    const code = { ...first.code, corner }
    const seen = await readInWindow(full, find, guess, layout, corner)
    const own = seen?.code.sheetCode === code.sheetCode ? settleFound(full, layout, code, seen.at) : null
    const next = own ?? searchByPattern(full, half, guess, layout, code)
    if (next) found.push(next)
  }
  const homography = fitAll(found)
  return homography ? { kind: 'found', sheet: { layout, code: first.code, corners: found, homography } } : { kind: 'none' }
}

/** A corner across the short side of the page is nearer than one along the long side, and both than the opposite one. */
const nearestTo = (found: readonly PlacedCorner[]) => {
  const steps = (a: number, b: number) => (a + b === 1 || a + b === 5 ? 1 : (a + b) % 2 === 1 ? 2 : 3)
  const distance = (corner: number) => Math.min(...found.map((f) => steps(f.corner, corner)))
  return (a: number, b: number) => distance(a) - distance(b)
}

export interface PlacedCodes {
  sheetCode: string | null
  planned: boolean
  corners: number[]
  pairs: Pair[]
  homography: Homography | null
}

/** Corner codes near where a person's corners put them: decoded, or by their pattern where the sheet's code is known. */
export async function placeCodes(
  full: Grey,
  half: Grey,
  find: CodeFinder,
  layout: Layout,
  guess: Homography,
  known: { sheetCode: string | null; planned: boolean },
): Promise<PlacedCodes> {
  const seen = await Promise.all([0, 1, 2, 3].map((corner) => readInWindow(full, find, guess, layout, corner)))
  const code = seen.find((s) => s !== null)?.code
  const sheetCode = code?.sheetCode ?? known.sheetCode
  const planned = code?.planned ?? known.planned
  const placed = [0, 1, 2, 3].flatMap((corner) => {
    const at = seen[corner]?.at
    const own = sheetCode && { layoutCode: layout.code, version: layout.version, corner, planned, sheetCode }
    if (!own) return []
    return (at && settleFound(full, layout, own, at)) ?? searchByPattern(full, half, guess, layout, own) ?? []
  })
  const pairs = placed.flatMap((p) => p.pairs)
  // One code fixes a small part of the page: the corners a person set are better for the rest.
  const homography = placed.length >= 3 ? fitHomography(pairs) : null
  return { sheetCode, planned, corners: placed.map((p) => p.corner), pairs: homography ? pairs : [], homography }
}
