/** Paper that was crumpled and smoothed again: flat pieces between creases that lie anyhow. */
import type { Chance } from '../random.ts'
import type { Surface } from '../surface.ts'
import type { Range } from './condition.ts'

interface Crease {
  /** Unit normal and distance from the page's middle, mm. */
  nx: number
  ny: number
  at: number
  slope: number
}

/** Sharpness of a crease that a hand has smoothed again, mm. */
const SOFT_MM = 1.5

const kink = (distance: number) => Math.sqrt(distance * distance + SOFT_MM * SOFT_MM)

/** Paper between creases keeps its lengths, so where it stands up it is drawn in: by half the square of its slope. */
export function crumple(count: number, slope: Range, page: { width: number; height: number }, chance: Chance): Surface {
  const creases: Crease[] = Array.from({ length: count }, () => {
    const angle = chance.between(0, Math.PI)
    const size = (chance.odds(0.5) ? 1 : -1) * chance.between(slope[0], slope[1])
    return { nx: Math.cos(angle), ny: Math.sin(angle), at: chance.between(-140, 140), slope: size }
  })
  const lean = (u: number, v: number): readonly [number, number] => {
    let [p, q] = [0, 0]
    for (const { nx, ny, at, slope: s } of creases) {
      const d = u * nx + v * ny - at
      const k = (s * d) / kink(d)
      p += k * nx
      q += k * ny
    }
    return [p, q]
  }
  // Long sums of creases would roll the sheet up: the mean slope is taken out, as the table does.
  const mean = meanLean(lean, page)
  const height = (u: number, v: number) => {
    let z = 0
    for (const { nx, ny, at, slope: s } of creases) z += s * kink(u * nx + v * ny - at)
    return z - mean[0] * u - mean[1] * v
  }
  return {
    angle: 0.8,
    at: (x, y) => {
      const [u, v] = [x - page.width / 2, y - page.height / 2]
      const [p, q] = lean(u, v)
      const drawn = 0.5 * ((p - mean[0]) ** 2 + (q - mean[1]) ** 2)
      return [u * (1 - 0.3 * drawn), v * (1 - 0.3 * drawn), height(u, v)]
    },
    slope: (x, y) => {
      const [p, q] = lean(x - page.width / 2, y - page.height / 2)
      return (p - mean[0]) * Math.cos(0.8) + (q - mean[1]) * Math.sin(0.8)
    },
  }
}

function meanLean(lean: (u: number, v: number) => readonly [number, number], page: { width: number; height: number }) {
  let [p, q, n] = [0, 0, 0]
  for (let v = -page.height / 2; v <= page.height / 2; v += 20) {
    for (let u = -page.width / 2; u <= page.width / 2; u += 20) {
      const [a, b] = lean(u, v)
      p += a
      q += b
      n += 1
    }
  }
  return [p / n, q / n] as const
}
