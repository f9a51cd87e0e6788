/** Figures worked out by hand beside the ones recomputed: one table for the rules on arithmetic and on units. */
import { sizeOfLandUnit } from '../trial/land-units.ts'
import type { ResultKey } from '../trial/result.ts'
import type { CheckContext } from './context.ts'
import type { SlipKind } from './unit-slip.ts'

export interface Written {
  key: string
  written: number
  computed: number
  unit: string
  kind: SlipKind
  /** Cells both figures came from, the written one first. */
  cells: string[]
  /** Area only: m² of one written unit. */
  size_m2?: number
  /** What the recomputed figure is by. */
  by: string
}

const PAIRS: ReadonlyArray<{ key: string; result: ResultKey; kind: SlipKind; by: string }> = [
  { key: 'fuel_used_written_ml', result: 'fuel_ml', kind: 'other', by: 'the jar' },
  { key: 'depth_mean_written_cm', result: 'depth_mean_cm', kind: 'other', by: 'the depths' },
  { key: 'width_mean_written_m', result: 'width_mean_m', kind: 'other', by: 'the widths' },
  { key: 'l_per_ha_written', result: 'l_per_ha', kind: 'per area', by: 'jar and sides' },
  { key: 'l_per_acre_written', result: 'l_per_acre', kind: 'per area', by: 'jar and sides' },
  { key: 'l_per_h_written', result: 'l_per_h', kind: 'other', by: 'jar and clock' },
  { key: 'speed_written_kmh', result: 'speed_km_h', kind: 'other', by: 'pegs and stopwatch' },
  { key: 'efc_written', result: 'efc_ha_h', kind: 'per area', by: 'sides and clock' },
]

/** The written figure of one cell with its recomputed twin; null when either is missing. */
export function writtenFigure(ctx: CheckContext, key: string): Written | null {
  if (key === 'area_written') return writtenArea(ctx)
  const pair = PAIRS.find((p) => p.key === key)
  const written = ctx.number(key)
  const result = pair ? ctx.results[pair.result] : null
  if (!pair || written === null || !result || result.value === null) return null
  return {
    key,
    written,
    computed: result.value,
    unit: result.unit,
    kind: pair.kind,
    cells: [key, ...result.from.filter((cell) => cell !== 'density_15')],
    by: pair.by,
  }
}

function writtenArea(ctx: CheckContext): Written | null {
  const written = ctx.number('area_written')
  const tick = ctx.text('area_unit')
  const { area } = ctx.plot
  const size_m2 = tick === null ? null : sizeOfLandUnit(ctx.facts, tick)
  if (written === null || !area.known || tick === null || size_m2 === null) return null
  return {
    key: 'area_written',
    written,
    computed: area.value / size_m2,
    unit: tick === 'm2' ? 'm²' : tick,
    kind: 'area',
    cells: ['area_written', 'area_unit', ...area.cells],
    size_m2,
    by: 'the sides',
  }
}

export const WRITTEN_KEYS = ['area_written', ...PAIRS.map((p) => p.key)] as const
