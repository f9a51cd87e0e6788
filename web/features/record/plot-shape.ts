/** The plot as it was taped, drawn to scale from its own lengths. Pure. */

export interface Peg {
  name: 'A' | 'B' | 'C' | 'D'
  /** Metres, from the lower left of the figure; y grows downwards. */
  x: number
  y: number
}

export interface Lengths {
  ab: number
  bc: number
  cd?: number
  da?: number
  ac?: number
}

/** The pegs A to D: a rectangle by two sides, or two triangles on the diagonal A–C. Null when the lengths do not close. */
export function pegsOf({ ab, bc, cd, da, ac }: Lengths): Peg[] | null {
  if (cd === undefined || da === undefined || ac === undefined) {
    return fromCorner([
      { name: 'A', x: 0, y: bc },
      { name: 'B', x: ab, y: bc },
      { name: 'C', x: ab, y: 0 },
      { name: 'D', x: 0, y: 0 },
    ])
  }
  const b = apex(ab, bc, ac)
  const d = apex(da, cd, ac)
  if (!b || !d) return null
  // Turned so that A–B lies along the foot, as the sheet's own figure shows it; B is under the diagonal, D over it.
  const turn = Math.atan2(b.up, b.along)
  const at = (along: number, up: number) => ({
    x: along * Math.cos(turn) - up * Math.sin(turn),
    y: -(along * Math.sin(turn) + up * Math.cos(turn)),
  })
  return fromCorner([
    { name: 'A', ...at(0, 0) },
    { name: 'B', ...at(b.along, -b.up) },
    { name: 'C', ...at(ac, 0) },
    { name: 'D', ...at(d.along, d.up) },
  ])
}

/** Where two sides meet over a base of length `base`: how far along it, and how high over it. */
function apex(first: number, second: number, base: number): { along: number; up: number } | null {
  const along = (first ** 2 + base ** 2 - second ** 2) / (2 * base)
  const up2 = first ** 2 - along ** 2
  return up2 > 0 ? { along, up: Math.sqrt(up2) } : null
}

function fromCorner(pegs: Peg[]): Peg[] {
  const left = Math.min(...pegs.map((p) => p.x))
  const top = Math.min(...pegs.map((p) => p.y))
  return pegs.map((p) => ({ ...p, x: p.x - left, y: p.y - top }))
}
