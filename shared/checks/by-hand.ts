/** Arithmetic done by hand in the field, done again. */
import { above } from './compare.ts'
import type { CheckContext } from './context.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure, rough } from './text.ts'
import { unitSlip } from './unit-slip.ts'
import { WRITTEN_KEYS, type Written, writtenFigure } from './written.ts'

const slipOf = (ctx: CheckContext, w: Written) => unitSlip(ctx, w.written, w.computed, w.kind, w.size_m2)

/** "Area by hand 0.66 ha, by the sides 0.267 ha". The recomputed figure keeps the digits that tell it apart. */
function sides(ctx: CheckContext, w: Written): string {
  const decimals = Math.min(4, Math.max(3 - Math.floor(Math.log10(Math.abs(w.computed) || 1)), 0))
  return `${ctx.label(w.key)} ${w.written} ${w.unit}, by ${w.by} ${figure(w.computed, decimals)} ${w.unit}`
}

const comparedOf = (w: Written) => ({ written: w.written, computed: w.computed, unit: w.unit })

/** Off from the recomputed figure: doubt or, when far off and no unit explains it, stop. */
function offBy(ctx: CheckContext, w: Written, doubt_pct: number, stop_pct: number | null): Found[] {
  const off_pct = (100 * Math.abs(w.written - w.computed)) / Math.abs(w.computed)
  if (!above(off_pct, doubt_pct)) return []
  const slip = slipOf(ctx, w)
  if (slip) return [found('doubt', w.cells, `${sides(ctx, w)}: ${slip.words}`, { ...comparedOf(w), explained_by: 'Q15' })]
  const far = stop_pct !== null && above(off_pct, stop_pct)
  return [found(far ? 'stop' : 'doubt', w.cells, `${sides(ctx, w)}: ${rough(off_pct)} % apart.`, comparedOf(w))]
}

const q08: Rule = {
  id: 'Q08',
  version: 1,
  name: 'fuel balance',
  severity: ['stop', 'doubt'],
  cells: ['fuel_used_written_ml', 'jar_start_ml', 'topup_ml', 'jar_end_ml'],
  why: 'Start plus top-ups less end is the fuel used; another figure is a wrong sum or a misread digit.',
  check: (ctx) => {
    const w = writtenFigure(ctx, 'fuel_used_written_ml')
    return w === null ? [] : offBy(ctx, w, 0, ctx.limit('by_hand_stop_pct'))
  },
}

/** Means are held to half of the last written place: of the layout's format, not of the digits in use. */
function meanByHand(key: string): Rule['check'] {
  return (ctx) => {
    const w = writtenFigure(ctx, key)
    if (w === null) return []
    const half = 0.5 * 10 ** -(ctx.cell(key).decimals ?? 0)
    if (!above(Math.abs(w.written - w.computed), half)) return []
    return [found('doubt', w.cells, `${sides(ctx, w)}.`, { ...comparedOf(w), allowed: half })]
  }
}

const q12: Rule = {
  id: 'Q12',
  version: 1,
  name: 'mean depth by hand',
  severity: ['doubt'],
  cells: ['depth_mean_written_cm', 'depth_cm'],
  why: 'A wrong sum, or a misread digit in one of the depths.',
  check: meanByHand('depth_mean_written_cm'),
}

const q13: Rule = {
  id: 'Q13',
  version: 1,
  name: 'mean width by hand',
  severity: ['doubt'],
  cells: ['width_mean_written_m', 'width_m'],
  why: 'A wrong sum, or a misread digit in one of the widths.',
  check: meanByHand('width_mean_written_m'),
}

const q14: Rule = {
  id: 'Q14',
  version: 1,
  name: 'area by hand',
  severity: ['stop', 'doubt'],
  cells: ['area_written', 'area_unit', 'side_ab_m', 'side_bc_m', 'side_cd_m', 'side_da_m', 'diag_ac_m'],
  why: 'Every figure per hectare hangs on the area.',
  check: (ctx) => {
    const w = writtenFigure(ctx, 'area_written')
    return w === null ? [] : offBy(ctx, w, ctx.limit('area_by_hand_pct'), ctx.limit('by_hand_stop_pct'))
  },
}

const RATES = ['l_per_h_written', 'l_per_ha_written', 'l_per_acre_written', 'speed_written_kmh', 'efc_written']

const q17: Rule = {
  id: 'Q17',
  version: 1,
  name: 'rates by hand',
  severity: ['doubt'],
  cells: RATES,
  why: 'The figure told in the field is worked out again.',
  check: (ctx) =>
    RATES.flatMap((key) => {
      const w = writtenFigure(ctx, key)
      if (w === null) return []
      const half_pct = (50 * 10 ** -(ctx.cell(key).decimals ?? 0)) / Math.abs(w.computed)
      return offBy(ctx, w, Math.max(half_pct, ctx.limit('rate_by_hand_pct')), null)
    }),
}

const q15: Rule = {
  id: 'Q15',
  version: 1,
  name: 'unit slip',
  severity: ['doubt'],
  cells: [...WRITTEN_KEYS],
  why: 'A written figure off by exactly the size of another unit is the right figure in the wrong unit.',
  check: (ctx) =>
    WRITTEN_KEYS.flatMap((key) => {
      const w = writtenFigure(ctx, key)
      const slip = w === null ? null : slipOf(ctx, w)
      if (w === null || slip === null) return []
      const own = w.kind === 'area' ? [w.key, 'area_unit'] : [w.key]
      return [
        found('doubt', own, `${sides(ctx, w)}: ${slip.words}`, { ...comparedOf(w), ratio: slip.ratio, factor: slip.factor }),
      ]
    }),
}

const q21: Rule = {
  id: 'Q21',
  version: 1,
  name: 'slip by the wrong divisor',
  severity: ['doubt'],
  cells: ['slip_written_pct', 'rev_load', 'rev_noload'],
  why: 'Slip by turns is divided by the loaded count; dividing by the other is the frequent mistake.',
  check: (ctx) => {
    const [written, loaded, unloaded] = [ctx.number('slip_written_pct'), ctx.number('rev_load'), ctx.number('rev_noload')]
    if (written === null || loaded === null || unloaded === null || loaded <= 0 || unloaded <= 0) return []
    const wrong = (100 * (loaded - unloaded)) / unloaded
    const right = (100 * (loaded - unloaded)) / loaded
    if (Math.abs(written - wrong) > 0.1 || Math.abs(written - right) <= 0.1) return []
    return [
      found(
        'doubt',
        ['slip_written_pct', 'rev_load', 'rev_noload'],
        `Slip by hand ${written} %, by the loaded count ${figure(right, 1)} %: divided by the count without load?`,
        { written, computed: right },
      ),
    ]
  },
}

export const byHandRules: readonly Rule[] = [q08, q12, q13, q14, q15, q17, q21]
