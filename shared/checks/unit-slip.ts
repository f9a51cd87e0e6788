/** A written figure that is off by exactly the size of another unit. */
import type { CheckContext } from './context.ts'

interface SlipNames {
  factor: number
  /** What a written figure too large, or too small, by this factor suggests. */
  large: string
  small: string
  only?: 'power'
}

const KNOWN: readonly SlipNames[] = [
  { factor: 2.471053814671653, large: 'acres for hectares', small: 'hectares for acres' },
  { factor: 10, large: 'the point one place to the right', small: 'the point one place to the left' },
  {
    factor: 100,
    large: 'the point two places to the right, or cm for m',
    small: 'the point two places to the left, or m for cm',
  },
  { factor: 1000, large: 'thousandths for ones, as mL for L', small: 'ones for thousandths, as L for mL' },
  { factor: 3.6, large: 'km/h for m/s', small: 'm/s for km/h' },
  { factor: 1.609344, large: 'km for miles', small: 'miles for km' },
  { factor: 4.54609, large: 'litres for imperial gallons', small: 'imperial gallons for litres' },
  { factor: 3.785411784, large: 'litres for US gallons', small: 'US gallons for litres' },
  { factor: 14.22334331, large: 'psi for kgf/cm²', small: 'kgf/cm² for psi' },
  { factor: 1.01387, large: 'metric hp for hp', small: 'hp for metric hp', only: 'power' },
]

export interface UnitSlip {
  factor: number
  ratio: number
  words: string
}

/** What the cell measures changes the words: an area in the wrong land unit, a rate by the wrong area. */
export type SlipKind = 'area' | 'per area' | 'power' | 'other'

const WORDS: Partial<Record<SlipKind, { large: string; small: string }>> = {
  area: { large: 'acres written as ha?', small: 'ha written as acres?' },
  'per area': { large: 'per hectare written as per acre?', small: 'per acre written as per hectare?' },
}

/**
 * The unit slip that explains written/computed, both in the unit the sheet claims; null when they agree, or when no known
 * factor fits within the limit. `size_m2`: for an area, m² of one written unit, so that local land units can be tried.
 */
export function unitSlip(
  ctx: CheckContext,
  written: number,
  computed: number,
  kind: SlipKind,
  size_m2?: number,
): UnitSlip | null {
  if (!(written > 0) || !(computed > 0)) return null
  const within = ctx.limit('unit_match_pct') / 100
  const ratio = written / computed
  const matches = (factor: number) => Math.abs(ratio / factor - 1) <= within
  if (matches(1)) return null
  for (const { factor, large, small, only } of KNOWN) {
    if (only && only !== kind) continue
    const own = factor === KNOWN[0]?.factor ? WORDS[kind] : undefined
    if (matches(factor)) return { factor, ratio, words: own?.large ?? `${large}?` }
    if (matches(1 / factor)) return { factor: 1 / factor, ratio, words: own?.small ?? `${small}?` }
  }
  for (const unit of ctx.facts.landUnits ?? []) {
    if (size_m2 !== undefined && matches(size_m2 / unit.size_m2))
      return { factor: size_m2 / unit.size_m2, ratio, words: `${unit.name} (${unit.size_m2} m²) written as the unit ticked?` }
  }
  return null
}
