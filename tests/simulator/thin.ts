/** Thinning of a black and white picture to lines one pixel wide, from both sides in turn until nothing changes. */

/**
 * A pixel goes when it lies on an edge, is no end of a line, and its removal parts nothing: exactly one change from paper to
 * ink around it. Odd rounds take from the south and east, even rounds from the north and west.
 */
export function thin(ink: Uint8Array, side: number): Array<[number, number]> {
  const around = [-side, 1 - side, 1, side + 1, side, side - 1, -1, -side - 1]
  let changed = true
  while (changed) {
    changed = false
    for (const round of [0, 1]) {
      const gone: number[] = []
      for (let y = 1; y < side - 1; y += 1) {
        for (let x = 1; x < side - 1; x += 1) {
          const i = y * side + x
          if (ink[i] && mayGo(ink, i, around, round)) gone.push(i)
        }
      }
      for (const i of gone) ink[i] = 0
      changed ||= gone.length > 0
    }
  }
  const points: Array<[number, number]> = []
  ink.forEach((value, i) => {
    if (value) points.push([i % side, Math.floor(i / side)])
  })
  return points
}

function mayGo(ink: Uint8Array, i: number, around: readonly number[], round: number): boolean {
  let neighbours = 0
  let changes = 0
  for (let k = 0; k < 8; k += 1) {
    const here = ink[i + around[k]!]!
    neighbours += here
    if (!here && ink[i + around[(k + 1) % 8]!]) changes += 1
  }
  if (neighbours < 2 || neighbours > 6 || changes !== 1) return false
  const [n, e, s, w] = [around[0]!, around[2]!, around[4]!, around[6]!].map((o) => ink[i + o]!) as [
    number,
    number,
    number,
    number,
  ]
  return round === 0 ? n * e * s === 0 && e * s * w === 0 : n * e * w === 0 && n * s * w === 0
}
