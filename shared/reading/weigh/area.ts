/** The area that sides and a diagonal written on the sheet make. */

/** Heron's formula in Kahan's stable order (sides sorted); null where the sides make no triangle. */
function triangle_m2(x: number, y: number, z: number): number | null {
  const [a, b, c] = [x, y, z].sort((p, q) => q - p) as [number, number, number]
  const under = (a + (b + c)) * (c - (a - b)) * (c + (a - b)) * (a + (b - c))
  return c > a - b && under > 0 ? Math.sqrt(under) / 4 : null
}

/**
 * @param metres sides AB, BC, CD, DA and the diagonal AC; null is a blank, undefined unreadable. With CD, DA and AC blank the
 * plot is a rectangle of AB and BC. null where the lengths given make no area.
 */
export function fourSidedArea_m2(metres: ReadonlyArray<number | null | undefined>): number | null {
  const [ab, bc, cd, da, ac] = metres
  if (typeof ab !== 'number' || typeof bc !== 'number') return null
  if (cd === null && da === null && ac === null) return ab * bc
  if (typeof cd !== 'number' || typeof da !== 'number' || typeof ac !== 'number') return null
  const first = triangle_m2(ab, bc, ac)
  const second = triangle_m2(cd, da, ac)
  return first === null || second === null ? null : first + second
}
