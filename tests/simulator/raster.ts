/** Draws the bent, written page into the picture, triangle by triangle of a fine net over the sheet. */
import type { Camera } from './camera.ts'
import type { Paper } from './paper.ts'
import { STAIN_DOTS_PER_MM, type Stain } from './stains.ts'
import type { Surface } from './surface.ts'

const NET_MM = 3

export interface Picture {
  width: number
  height: number
  rgb: Uint8Array
}

interface Knot {
  x: number
  y: number
  /** Page position in dots. */
  u: number
  v: number
  shade: number
}

/**
 * @param lean how strongly a slope towards or away from the light brightens or darkens the paper
 * @param lightAngle direction the light comes from, on the page
 */
export function drawPage(
  picture: Picture,
  paper: Paper,
  surface: Surface,
  camera: Camera,
  page: { width: number; height: number },
  lean: number,
  lightAngle: number,
): void {
  const columns = Math.ceil(page.width / NET_MM)
  const rows = Math.ceil(page.height / NET_MM)
  const towards = Math.cos(surface.angle - lightAngle)
  const knots: Knot[] = []
  for (let r = 0; r <= rows; r += 1) {
    for (let c = 0; c <= columns; c += 1) {
      const [px, py] = [(page.width * c) / columns, (page.height * r) / rows]
      const [x, y] = camera.project(surface.at(px, py))
      const shade = Math.max(0.4, 1 - lean * towards * surface.slope(px, py))
      knots.push({ x, y, u: px * paper.dotsPerMm - 0.5, v: py * paper.dotsPerMm - 0.5, shade })
    }
  }
  for (let r = 0; r < rows; r += 1) {
    for (let c = 0; c < columns; c += 1) {
      const i = r * (columns + 1) + c
      const [a, b, d, e] = [knots[i]!, knots[i + 1]!, knots[i + columns + 1]!, knots[i + columns + 2]!]
      fillTriangle(picture, paper, a, b, d)
      fillTriangle(picture, paper, b, e, d)
    }
  }
}

function fillTriangle(picture: Picture, paper: Paper, a: Knot, b: Knot, c: Knot): void {
  const area = (b.x - a.x) * (c.y - a.y) - (c.x - a.x) * (b.y - a.y)
  if (Math.abs(area) < 1e-6) return
  const top = Math.max(0, Math.ceil(Math.min(a.y, b.y, c.y) - 1e-6))
  const low = Math.min(picture.height - 1, Math.floor(Math.max(a.y, b.y, c.y) + 1e-6))
  const gradient = (pick: (k: Knot) => number) => {
    const [fa, fb, fc] = [pick(a), pick(b), pick(c)]
    return [
      ((fb - fa) * (c.y - a.y) - (fc - fa) * (b.y - a.y)) / area,
      ((fc - fa) * (b.x - a.x) - (fb - fa) * (c.x - a.x)) / area,
    ] as const
  }
  const [ux, uy] = gradient((k) => k.u)
  const [vx, vy] = gradient((k) => k.v)
  const [sx, sy] = gradient((k) => k.shade)
  const { lost } = paper
  for (let y = top; y <= low; y += 1) {
    let left = Number.POSITIVE_INFINITY
    let right = Number.NEGATIVE_INFINITY
    for (const [p, q] of [
      [a, b],
      [b, c],
      [c, a],
    ] as const) {
      if ((p.y < y && q.y < y) || (p.y > y && q.y > y) || p.y === q.y) continue
      const x = p.x + ((y - p.y) * (q.x - p.x)) / (q.y - p.y)
      left = Math.min(left, x)
      right = Math.max(right, x)
    }
    const from = Math.max(0, Math.ceil(left - 1e-6))
    const to = Math.min(picture.width - 1, Math.floor(right + 1e-6))
    if (!(from <= to)) continue
    const dy = y - a.y
    let u = a.u + ux * (from - a.x) + uy * dy
    let v = a.v + vx * (from - a.x) + vy * dy
    let shade = a.shade + sx * (from - a.x) + sy * dy
    for (let x = from; x <= to; x += 1) {
      if (!lost || lost[0] * u + lost[1] * v + lost[2] >= 0) putDot(picture, 3 * (y * picture.width + x), paper, u, v, shade)
      u += ux
      v += vx
      shade += sx
    }
  }
}

function putDot(picture: Picture, at: number, paper: Paper, u: number, v: number, shade: number): void {
  const cu = u < 0 ? 0 : Math.min(u, paper.width - 1.001)
  const cv = v < 0 ? 0 : Math.min(v, paper.height - 1.001)
  const x = cu | 0
  const y = cv | 0
  const s = cu - x
  const t = cv - y
  const i = y * paper.width + x
  const j = i + paper.width
  const { print, cover, ink, white } = paper
  const top = print[i]! + s * (print[i + 1]! - print[i]!)
  const low = print[j]! + s * (print[j + 1]! - print[j]!)
  const value = ((top + t * (low - top)) * shade) / 255
  const inkTop = cover[i]! + s * (cover[i + 1]! - cover[i]!)
  const inkLow = cover[j]! + s * (cover[j + 1]! - cover[j]!)
  const covered = (inkTop + t * (inkLow - inkTop)) / 255
  const dirt = paper.stain
    ? stainAt(paper.stain, (cu * STAIN_DOTS_PER_MM) / paper.dotsPerMm, (cv * STAIN_DOTS_PER_MM) / paper.dotsPerMm)
    : 0
  const rgb = picture.rgb
  for (let c = 0; c < 3; c += 1) {
    const left = dirt > 0 ? 1 - dirt * (1 - paper.stain!.tint[c]!) : 1
    const out = white[c]! * value * (1 - covered * (1 - ink[c]!)) * left
    rgb[at + c] = Math.min(out, 255)
  }
}

/** Strength of the dirt between four dots of its layer, 0 to 1. */
function stainAt(stain: Stain, x: number, y: number): number {
  const x0 = x | 0
  const y0 = y | 0
  const i = y0 * stain.width + x0
  const { layer, width } = stain
  const top = layer[i]! + (x - x0) * (layer[i + 1]! - layer[i]!)
  const low = layer[i + width]! + (x - x0) * (layer[i + width + 1]! - layer[i + width]!)
  return (top + (y - y0) * (low - top)) / 255
}
