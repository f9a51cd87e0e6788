/** The plot against itself, its passes, and the rate of work. */

import { quadrilateralByAc, quadrilateralByBd, smallestAngle_deg, triangleArea } from '../trial/area.ts'
import { metres } from '../trial/quantity.ts'
import { above, below } from './compare.ts'
import type { CheckContext } from './context.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure } from './text.ts'

const q35: Rule = {
  id: 'Q35',
  version: 1,
  name: 'field efficiency',
  severity: ['stop', 'doubt', 'note'],
  cells: ['side_ab_m', 'side_bc_m', 't_start', 't_end', 'speed_dist_m', 'speed_t_s'],
  why: 'No field is worked faster than width and speed allow.',
  check: (ctx) => {
    const { value: fe, from } = ctx.results.fe_pct
    if (fe === null) return []
    const told = (severity: 'stop' | 'doubt' | 'note', why: string) => [
      found(severity, from, `Field efficiency ${figure(fe, 1)} %: ${why}`, {
        fe_pct: fe,
        efc_ha_h: ctx.results.efc_ha_h.value ?? 0,
        tfc_ha_h: ctx.results.tfc_ha_h.value ?? 0,
      }),
    ]
    if (above(fe, 100)) return told('stop', 'area, time, speed or rated width cannot all be right.')
    if (above(fe, ctx.limit('efficiency_doubt_pct'))) return told('doubt', 'hardly a turn in it.')
    return below(fe, ctx.limit('efficiency_note_pct')) ? told('note', 'small plots with short runs reach 50 to 80 %.') : []
  },
}

const q36: Rule = {
  id: 'Q36',
  version: 1,
  name: 'area and passes',
  severity: ['doubt', 'note'],
  cells: ['pass_count', 'width_m', 'side_ab_m', 'side_bc_m'],
  why: 'Passes, width and length make the area, or the passes are miscounted [P].',
  check: (ctx) => {
    const { area, pass_m, shape } = ctx.plot
    const [passes, width] = [ctx.number('pass_count'), ctx.results.width_mean_m]
    if (!area.known || passes === null || width.value === null || pass_m === null || shape === 'strips') return []
    const swath = passes * width.value * pass_m
    const off = (100 * Math.abs(swath - area.value)) / area.value
    if (!above(off, ctx.limit('swath_note_pct'))) return []
    return [
      found(
        above(off, ctx.limit('swath_doubt_pct')) ? 'doubt' : 'note',
        ['pass_count', ...width.from, ...area.cells],
        `${passes} passes of ${figure(width.value, 3)} m over ${figure(pass_m, 1)} m make ${figure(swath, 0)} m², the sides ${figure(area.value, 0)} m²: ${figure(off, 0)} % apart.`,
        { passes_m2: swath, sides_m2: area.value },
      ),
    ]
  },
}

const SIDES = ['side_ab_m', 'side_bc_m', 'side_cd_m', 'side_da_m'] as const

interface Corner {
  keys: [string, string, string]
  lengths: [number, number, number]
}

/** The triangles the taped lengths make: two on each diagonal; of a rectangle, the one on A–C. */
function triangles(ctx: CheckContext): Corner[] {
  const { plot } = ctx
  const named: Array<[string, string, string]> =
    plot.shape === 'quadrilateral'
      ? [
          ['side_ab_m', 'side_bc_m', 'diag_ac_m'],
          ['side_cd_m', 'side_da_m', 'diag_ac_m'],
          ['side_bc_m', 'side_cd_m', 'diag_bd_m'],
          ['side_da_m', 'side_ab_m', 'diag_bd_m'],
        ]
      : plot.shape === 'rectangle'
        ? [
            ['side_ab_m', 'side_bc_m', 'diag_ac_m'],
            ['side_ab_m', 'side_bc_m', 'diag_bd_m'],
          ]
        : ctx.all('tri_a').map(({ n }) => [`tri_a[${n}]`, `tri_b[${n}]`, `tri_c[${n}]`])
  return named.flatMap((keys) => {
    const [a, b, c] = keys.map(ctx.number)
    return a == null || b == null || c == null ? [] : [{ keys, lengths: [a, b, c] }]
  })
}

const q37: Rule = {
  id: 'Q37',
  version: 1,
  name: 'area closure',
  severity: ['stop', 'doubt', 'note'],
  cells: [...SIDES, 'diag_ac_m', 'diag_bd_m'],
  why: 'Sides and diagonals must close, or the tape was misread.',
  check: (ctx) => {
    const corners = triangles(ctx)
    const open = corners.filter(({ lengths: [a, b, c] }) => triangleArea(metres(a), metres(b), metres(c)) === null)
    if (open.length > 0)
      return open.map(({ keys, lengths }) =>
        found(
          'stop',
          keys,
          `${keys.map((key, i) => `${ctx.label(key)} ${lengths[i]} m`).join(', ')} do not close to a triangle.`,
          Object.fromEntries(keys.map((key, i) => [key, lengths[i] ?? 0])),
        ),
      )
    return [...diagonals(ctx), ...thin(ctx, corners)]
  },
}

function thin(ctx: CheckContext, corners: Corner[]): Found[] {
  return corners.flatMap(({ keys, lengths: [a, b, c] }) => {
    const angle = smallestAngle_deg(metres(a), metres(b), metres(c))
    if (angle === null || !below(angle, ctx.limit('thin_angle_deg'))) return []
    return [
      found(
        'note',
        keys,
        `An angle of ${figure(angle, 0)}° at ${keys.map(ctx.label).join(', ')}: small tape errors move this area much.`,
        { angle_deg: angle },
      ),
    ]
  })
}

function diagonals(ctx: CheckContext): Found[] {
  const most = ctx.limit('diagonals_pct')
  const [ab, bc, cd, da] = SIDES.map(ctx.number)
  const [ac, bd] = [ctx.number('diag_ac_m'), ctx.number('diag_bd_m')]
  if (ab == null || bc == null) return []
  if (ctx.plot.shape === 'rectangle') {
    const square = Math.hypot(ab, bc)
    return [['diag_ac_m', ac] as const, ['diag_bd_m', bd] as const].flatMap(([key, d]) => {
      if (d === null || !above((100 * Math.abs(d - square)) / square, most)) return []
      return [
        found(
          'doubt',
          ['side_ab_m', 'side_bc_m', key],
          `${ctx.label(key)} ${d} m; ${ab} by ${bc} m with square corners has a diagonal of ${figure(square, 1)} m. Measure all four sides.`,
          { [key]: d, square_m: square },
        ),
      ]
    })
  }
  if (cd == null || da == null || ac === null || bd === null) return []
  const sides = { ab: metres(ab), bc: metres(bc), cd: metres(cd), da: metres(da) }
  const [byAc, byBd] = [quadrilateralByAc(sides, metres(ac)), quadrilateralByBd(sides, metres(bd))]
  if (byAc === null || byBd === null) return []
  const off = (200 * Math.abs(byAc - byBd)) / (byAc + byBd)
  if (!above(off, most)) return []
  return [
    found(
      'doubt',
      [...SIDES, 'diag_ac_m', 'diag_bd_m'],
      `By diagonal A–C ${figure(byAc, 0)} m², by B–D ${figure(byBd, 0)} m²: ${figure(off, 1)} % apart.`,
      { by_ac_m2: byAc, by_bd_m2: byBd },
    ),
  ]
}

export const plotRules: readonly Rule[] = [q35, q36, q37]
