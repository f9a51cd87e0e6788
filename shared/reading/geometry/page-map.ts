/** From layout millimetres to photo pixels: a perspective, and a mesh of small displacements for the page's curl. */
import type { Point } from '../pixels/grey.ts'
import { type Homography, project } from './homography.ts'
import type { Anchor, Displacement } from './residual-field.ts'
import { ResidualField } from './residual-field.ts'

/** Plain numbers, so that it can be stored with the page and drawn again. */
export interface PageMap {
  /** Flat page, mm, to photo, px. */
  homography: number[]
  mesh: { step_mm: number; columns: number; rows: number; dx_mm: number[]; dy_mm: number[] }
}

const MESH_STEP_MM = 7
const round = (value: number, steps: number) => Math.round(value * steps) / steps

export function makePageMap(
  homography: Homography,
  anchors: readonly Anchor[],
  page: { width: number; height: number },
): PageMap {
  const columns = Math.ceil(page.width / MESH_STEP_MM) + 1
  const rows = Math.ceil(page.height / MESH_STEP_MM) + 1
  const field = new ResidualField(anchors)
  const dx_mm: number[] = []
  const dy_mm: number[] = []
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const d = field.at({ x: column * MESH_STEP_MM, y: row * MESH_STEP_MM })
      dx_mm.push(round(d.dx, 1000))
      dy_mm.push(round(d.dy, 1000))
    }
  }
  return { homography: [...homography], mesh: { step_mm: MESH_STEP_MM, columns, rows, dx_mm, dy_mm } }
}

/** Where a place of the layout, mm, stands in the photo, px. */
export function toPhoto(map: PageMap, x: number, y: number): Point {
  const { step_mm, columns, rows, dx_mm, dy_mm } = map.mesh
  const u = Math.min(Math.max(x / step_mm, 0), columns - 1.001)
  const v = Math.min(Math.max(y / step_mm, 0), rows - 1.001)
  const column = u | 0
  const row = v | 0
  const fx = u - column
  const fy = v - row
  const at = row * columns + column
  const between = (d: readonly number[]) =>
    (d[at]! * (1 - fx) + d[at + 1]! * fx) * (1 - fy) + (d[at + columns]! * (1 - fx) + d[at + columns + 1]! * fx) * fy
  return project(map.homography, x + between(dx_mm), y + between(dy_mm))
}

/** The map of one field: its own displacement about its own middle. */
export interface FieldMap {
  homography: Homography
  center: Point
  displacement: Displacement
}

export function fieldToPhoto({ homography, center, displacement: d }: FieldMap, x: number, y: number): Point {
  const u = x - center.x
  const v = y - center.y
  return project(homography, x + d.dx + d.dxx * u + d.dxy * v, y + d.dy + d.dyx * u + d.dyy * v)
}
