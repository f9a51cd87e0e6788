/** The worked area as a measure: which shape the sheet shows, its tape, its edge, and what was taken off. */
import { quadrilateralByAc, quadrilateralByBd, stripArea, triangleArea } from './area.ts'
import type { Facts } from './facts.ts'
import { derive, type Known, known, lacking, type Measure, type Part } from './measure.ts'
import { measureWidth } from './measure-work.ts'
import { metres } from './quantity.ts'
import { indexes, isBlank, numberAt, type Readings, textAt } from './readings.ts'
import { rectangularU, SPREAD, tapeU_m } from './uncertainty.ts'

export interface Plot {
  shape: 'rectangle' | 'quadrilateral' | 'strips' | 'triangles'
  area: Measure
  /** Way of one pass, and the breadth the passes lie across, m; null where the shape does not tell. */
  pass_m: number | null
  across_m: number | null
}

const SIDES = ['side_ab_m', 'side_bc_m', 'side_cd_m', 'side_da_m'] as const

/** A taped length with what the tape leaves open. */
function length(readings: Readings, key: string): Measure {
  const value = numberAt(readings, key)
  const plotless = [...SIDES, 'pass_length_m', 'tri_a[1]'].every((cell) => readings[cell] === undefined)
  if (plotless) return lacking('not_on_sheet', 'This sheet measures no plot.', [key])
  if (value === null)
    return lacking(isBlank(readings, key) ? 'blank' : 'not_on_sheet', 'No area: a side of the plot is missing.', [key])
  return known(value, [key], [{ name: 'tape', u: tapeU_m(value) }])
}

/** Which shape the filled cells make. A rectangle fills A–B and B–C only. */
export function shapeOf(readings: Readings): Plot['shape'] {
  const said = textAt(readings, 'plot_shape')
  if (said === 'S') return 'strips'
  if (said === 'P') return 'triangles'
  if (said === 'R') return 'rectangle'
  const others = numberAt(readings, 'side_cd_m') !== null || numberAt(readings, 'side_da_m') !== null
  return said === 'Q' || others ? 'quadrilateral' : 'rectangle'
}

/** C05: the plot with its area. */
export function measurePlot(readings: Readings, facts: Facts): Plot {
  const shape = shapeOf(readings)
  const bare = { rectangle, quadrilateral, strips, triangles }[shape](readings)
  const pass_m = numberAt(readings, 'pass_length_m') ?? bare.longer
  const across_m = bare.shorter
  const deducted = deduct(readings, bare.area)
  if (!deducted.known) return { shape, area: deducted, pass_m, across_m }
  const edge = edgePart(readings, facts, deducted, pass_m, across_m)
  const area = edge
    ? { ...deducted, parts: [...deducted.parts, edge] }
    : { ...deducted, assumes: [...deducted.assumes, 'edge of the plot left out of ±'] }
  return { shape, area, pass_m, across_m }
}

interface Bare {
  area: Measure
  longer: number | null
  shorter: number | null
}

function rectangle(readings: Readings): Bare {
  const [a, b] = [length(readings, 'side_ab_m'), length(readings, 'side_bc_m')]
  const sides = a.known && b.known ? [a.value, b.value] : []
  return { area: derive([a, b], (x, y) => x * y), longer: max(sides), shorter: min(sides) }
}

function quadrilateral(readings: Readings): Bare {
  const byBd = numberAt(readings, 'diag_ac_m') === null && numberAt(readings, 'diag_bd_m') !== null
  const sides = SIDES.map((key) => length(readings, key))
  const diagonal = length(readings, byBd ? 'diag_bd_m' : 'diag_ac_m')
  const area = derive([...sides, diagonal], (ab = 0, bc = 0, cd = 0, da = 0, d = 0) => {
    const quad = { ab: metres(ab), bc: metres(bc), cd: metres(cd), da: metres(da) }
    return (byBd ? quadrilateralByBd(quad, metres(d)) : quadrilateralByAc(quad, metres(d))) ?? Number.NaN
  })
  const values = sides.flatMap((side) => (side.known ? [side.value] : []))
  const [ab, bc, cd, da] = values
  if (ab === undefined || bc === undefined || cd === undefined || da === undefined) return { area, longer: null, shorter: null }
  const means = [(ab + cd) / 2, (bc + da) / 2]
  return {
    area: area.known || area.reason.code !== 'impossible' ? area : openTriangle(area.cells),
    longer: max(means),
    shorter: min(means),
  }
}

const openTriangle = (cells: string[]) => lacking('impossible', 'The sides and the diagonal do not close to a plot.', cells)

function strips(readings: Readings): Bare {
  const passes = numberAt(readings, 'pass_count')
  const way = length(readings, 'pass_length_m')
  const width = measureWidth(readings)
  if (passes === null)
    return { area: lacking('blank', 'No area: the passes are not counted.', ['pass_count']), longer: null, shorter: null }
  const area = derive([known(passes, ['pass_count']), width, way], (n, w, l) => stripArea(n ?? 0, metres(w ?? 0), metres(l ?? 0)))
  return { area, longer: way.known ? way.value : null, shorter: width.known ? passes * width.value : null }
}

function triangles(readings: Readings): Bare {
  const numbers = indexes(readings, 'tri_a')
  const each = numbers.map((n) => {
    const sides = ['tri_a', 'tri_b', 'tri_c'].map((stem) => length(readings, `${stem}[${n}]`))
    const area = derive(sides, (a, b, c) => triangleArea(metres(a ?? 0), metres(b ?? 0), metres(c ?? 0)) ?? Number.NaN)
    return area.known || area.reason.code !== 'impossible' ? area : openTriangle(area.cells)
  })
  if (each.length === 0)
    return { area: lacking('blank', 'No area: no triangle is written.', ['tri_a[1]']), longer: null, shorter: null }
  const area = derive(each, (...areas) => areas.reduce((sum, x) => sum + x, 0))
  const side = area.known ? Math.sqrt(area.value) : null
  return { area, longer: side, shorter: side }
}

function deduct(readings: Readings, area: Measure): Measure {
  const off = numberAt(readings, 'deduct_m2')
  if (off === null || off === 0) return area
  const piece = known(off, ['deduct_m2'], [{ name: 'deducted piece', u: SPREAD.deduction * off }])
  const left = derive([area, piece], (a, b) => a - b)
  return left.known && left.value <= 0 ? lacking('impossible', 'More is taken off than the plot holds.', left.cells) : left
}

/** Half an effective width, anywhere across the plot, along the length of a pass: larger than all the tape leaves open. */
function edgePart(readings: Readings, facts: Facts, area: Known, pass_m: number | null, across_m: number | null): Part | null {
  const measured = measureWidth(readings)
  const passes = numberAt(readings, 'pass_count')
  const shared = across_m !== null && passes !== null && passes > 0 ? across_m / passes : null
  const width_m = measured.known ? measured.value : (shared ?? facts.ratedWidth_m ?? null)
  if (width_m === null) return null
  return { name: 'edge of the plot', u: rectangularU(width_m / 2) * (pass_m ?? Math.sqrt(area.value)) }
}

const max = (list: readonly number[]): number | null => (list.length > 0 ? Math.max(...list) : null)
const min = (list: readonly number[]): number | null => (list.length > 0 ? Math.min(...list) : null)
