/** The phone's camera: where it stands, where each point of space falls on its picture. */
import type { Space, Surface } from './surface.ts'

export interface Shot {
  width: number
  height: number
  /** Radians: towards the viewer (pitch), sideways (yaw), in the picture (roll). */
  pitch: number
  yaw: number
  roll: number
  /** Share of the picture's tighter side the page's outline takes. */
  fill: number
  /** Page centre off the picture's centre, as shares of width and height. */
  off: readonly [number, number]
  /** Focal length over the picture's diagonal: 0.65 is an ordinary phone. */
  focal: number
  /** Radial distortion at the corner of the picture, as a share. */
  barrel: number
}

export interface Camera {
  project(point: Space): readonly [number, number]
}

type Matrix = readonly [number, number, number, number, number, number, number, number, number]

function turn(pitch: number, yaw: number, roll: number): Matrix {
  const [cp, sp, cy, sy, cr, sr] = [
    Math.cos(pitch),
    Math.sin(pitch),
    Math.cos(yaw),
    Math.sin(yaw),
    Math.cos(roll),
    Math.sin(roll),
  ]
  const a: Matrix = [1, 0, 0, 0, cp, -sp, 0, sp, cp]
  const b: Matrix = [cy, 0, sy, 0, 1, 0, -sy, 0, cy]
  const c: Matrix = [cr, -sr, 0, sr, cr, 0, 0, 0, 1]
  return times(c, times(a, b))
}

function times(p: Matrix, q: Matrix): Matrix {
  const cell = (r: number, c: number) => p[3 * r]! * q[c]! + p[3 * r + 1]! * q[3 + c]! + p[3 * r + 2]! * q[6 + c]!
  return [cell(0, 0), cell(0, 1), cell(0, 2), cell(1, 0), cell(1, 1), cell(1, 2), cell(2, 0), cell(2, 1), cell(2, 2)]
}

/** Places the camera so that the bent page fills the picture as the shot says. */
export function aim(shot: Shot, surface: Surface, page: { width: number; height: number }): Camera {
  const m = turn(shot.pitch, shot.yaw, shot.roll)
  const diagonal = Math.hypot(shot.width, shot.height)
  const focal = shot.focal * diagonal
  const half = diagonal / 2
  const outline = Array.from({ length: 24 }, (_, i) => {
    const [u, v] = [(i % 6) / 6, Math.floor(i / 6)]
    const [x, y] = [
      [u, 0],
      [1, u],
      [1 - u, 1],
      [0, 1 - u],
    ][v] as [number, number]
    return surface.at(x * page.width, y * page.height)
  })
  let distance = 400
  let shift: readonly [number, number] = [0, 0]
  const project = ([x, y, z]: Space): readonly [number, number] => {
    const u = m[0] * x + m[1] * y - m[2] * z + shift[0]
    const v = m[3] * x + m[4] * y - m[5] * z + shift[1]
    const w = m[6] * x + m[7] * y - m[8] * z + distance
    const [px, py] = [(focal * u) / w, (focal * v) / w]
    const bulge = 1 + shot.barrel * ((px * px + py * py) / (half * half))
    return [shot.width / 2 + px * bulge, shot.height / 2 + py * bulge]
  }
  for (let round = 0; round < 12; round += 1) {
    const points = outline.map(project)
    const xs = points.map((p) => p[0])
    const ys = points.map((p) => p[1])
    const [left, right, top, bottom] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)]
    const taken = Math.max((right - left) / shot.width, (bottom - top) / shot.height)
    const perPixel = distance / focal
    shift = [
      shift[0] - ((left + right) / 2 - shot.width * (0.5 + shot.off[0])) * perPixel,
      shift[1] - ((top + bottom) / 2 - shot.height * (0.5 + shot.off[1])) * perPixel,
    ]
    distance *= taken / shot.fill
  }
  return { project }
}
