/**
 * Finding a row of printed lines in a measured profile. Each line votes with its own contrast against the white on both sides,
 * and no vote counts more than a printed frame's: a dark stroke of the pen is one loud voice among many.
 */

/** A printed line's extent across itself, mm. */
export interface Line {
  from: number
  to: number
  /** White to the left (above) and right (below), mm, where another line stands nearer than usual. */
  before?: number
  after?: number
}

export interface Profile {
  values: Float32Array
  /** Left end of the first sample, mm. */
  start_mm: number
  step_mm: number
  /** Contrast that a pale frame keeps in this picture: a vote's greatest weight. */
  full: number
}

/**
 * Contrast of a frame 0.22 mm wide and 0.3 dark, by how blurred the page's black edges are (20 to 80 % of the way, mm): the
 * line's share of a Gaussian of that width. A little less than all of it is a full vote.
 */
export function frameContrast(edge_mm: number | null): number {
  const sigma = Math.max(0.1, (edge_mm ?? 0.3) / 1.68)
  return Math.max(0.03, 0.9 * 0.3 * Math.tanh((0.22 * 0.4) / sigma))
}
/** A dark or bright accident next to a line may not cost more than this share of a vote. */
const AGAINST = 0.5
/** White is looked for this far beside a line, mm. */
const BESIDE_MM = 0.5

const at = ({ values, start_mm, step_mm }: Profile, mm: number): number => {
  const i = (mm - start_mm) / step_mm - 0.5
  const low = Math.floor(i)
  if (low < 0 || low + 1 >= values.length) return 0
  return values[low]! + (values[low + 1]! - values[low]!) * (i - low)
}

/** One line's vote for a shift: 1 for a printed frame, 0 for nothing, below 0 for a bright line between dark ones. */
export function voteOf(profile: Profile, line: Line, shift_mm: number): number {
  const own = at(profile, (line.from + line.to) / 2 + shift_mm)
  const before = at(profile, line.from + shift_mm - Math.min(BESIDE_MM, line.before ?? BESIDE_MM))
  const after = at(profile, line.to + shift_mm + Math.min(BESIDE_MM, line.after ?? BESIDE_MM))
  const contrast = 0.4 * (own - Math.min(before, after)) + 0.6 * (own - Math.max(before, after))
  return Math.min(1, Math.max(-AGAINST, contrast / profile.full))
}

/** Offsets that votes are worked out for once, mm: a search asks for the same ones again and again. */
export interface Grid {
  from: number
  step: number
  count: number
}

export const gridAround = (middle: number, step: number, beside: number): Grid => ({
  from: middle - beside * step,
  step,
  count: 2 * beside + 1,
})

export function votesOn(grid: Grid, vote: (by: number) => number): Float32Array {
  const votes = new Float32Array(grid.count)
  for (let i = 0; i < grid.count; i++) votes[i] = vote(grid.from + i * grid.step)
  return votes
}

/** The vote for the offset of the grid that is nearest. */
export const voteAt = ({ from, step, count }: Grid, votes: Float32Array, by: number): number =>
  votes[Math.min(Math.max(Math.round((by - from) / step), 0), count - 1)]!

/** The mean vote of all lines for one shift of their middle, and a stretch about it. */
export function support(profile: Profile, lines: readonly Line[], shift_mm: number, stretch = 0): number {
  const middle = (middleOf(lines[0]!) + middleOf(lines.at(-1)!)) / 2
  return (
    lines.reduce((sum, line) => sum + voteOf(profile, line, shift_mm + stretch * (middleOf(line) - middle)), 0) / lines.length
  )
}

export interface Match {
  /** Measured minus expected at the middle of the lines, mm. */
  shift_mm: number
  /** How much wider they stand than expected: 0.01 is a hundredth. */
  stretch: number
  /** -0.5 to 1. */
  support: number
  /** How far the single lines are from the fit, mm (median). */
  spread_mm: number
}

/** Lines with the white between near ones shared out. */
export function shareWhite(lines: readonly Line[]): Line[] {
  return lines.map((line, i) => {
    const before = (line.from - (lines[i - 1]?.to ?? -1e9)) / 2
    const after = ((lines[i + 1]?.from ?? 1e9) - line.to) / 2
    return { ...line, before, after }
  })
}

/** Where one line is near a shift: the centre of what rises over its surroundings, or null. */
export function centreOf(profile: Profile, line: Line, shift_mm: number): number | null {
  const { values, start_mm, step_mm } = profile
  const from = line.from + shift_mm - Math.min(BESIDE_MM, line.before ?? BESIDE_MM)
  const to = line.to + shift_mm + Math.min(BESIDE_MM, line.after ?? BESIDE_MM)
  const first = Math.max(0, Math.round((from - start_mm) / step_mm))
  const last = Math.min(values.length, Math.round((to - start_mm) / step_mm))
  if (last - first < 3) return null
  let base = 1
  for (let i = first; i < last; i++) base = Math.min(base, values[i]!)
  let sum = 0
  let moment = 0
  for (let i = first; i < last; i++) {
    const rise = Math.max(0, values[i]! - base - 0.02)
    sum += rise
    moment += rise * (start_mm + (i + 0.5) * step_mm)
  }
  return sum < 0.05 ? null : moment / sum - (line.from + line.to) / 2
}

function median(sorted: readonly number[]): number {
  const n = sorted.length
  return n % 2 ? sorted[n >> 1]! : (sorted[n / 2 - 1]! + sorted[n / 2]!) / 2
}

/** Stretches beside the one that neighbours give: a page that curls away is narrowed by a tenth and more. */
const STRETCHES = [0.05, -0.05, 0.08, -0.08, 0.12, -0.12] as const
const HARDLY = [0, 0.02, -0.02] as const
/** Lines that speak so well for a place need no stretching, which can also make wrong lines fit. */
const GOOD_AS_IT_IS = 0.6
/** What a stretch costs, in support: 0.1 of stretch must gain so much. */
const STRETCH_COST = 1.6
/** A line farther than this from the best place is another line, mm. */
const SAME_LINE_MM = 0.4
/** Lines must span this to tell a stretch by themselves, mm. */
const SPAN_MM = 10
/** And lie this well on it, mm. */
const STRAIGHT_MM = 0.12

interface Voted {
  /** From the middle of the lines, mm. */
  along: number
  /** Measured minus expected, mm. */
  off: number
}

const middleOf = (line: Line) => (line.from + line.to) / 2

interface Best {
  value: number
  support: number
  shift: number
  stretch: number
}

const alongsOf = (lines: readonly Line[]) => {
  const middle = (middleOf(lines[0]!) + middleOf(lines.at(-1)!)) / 2
  return lines.map((line) => middleOf(line) - middle)
}

function bestOf(
  profile: Profile,
  lines: readonly Line[],
  reach_mm: number,
  around_mm: number,
  stretches: readonly number[],
): Best {
  const alongs = alongsOf(lines)
  const step = profile.step_mm / 2
  const steps = Math.ceil(reach_mm / step)
  const first = stretches[0]!
  const room = Math.max(...stretches.map(Math.abs)) * Math.max(...alongs.map(Math.abs))
  const grid = gridAround(around_mm, step, steps + Math.ceil(room / step))
  const votes = lines.map((line) => votesOn(grid, (by) => voteOf(profile, line, by)))
  let best = { value: -1, support: -1, shift: around_mm, stretch: first }
  for (const stretch of stretches) {
    for (let k = -steps; k <= steps; k++) {
      const shift = around_mm + k * step
      let sum = 0
      for (let i = 0; i < votes.length; i++) sum += voteAt(grid, votes[i]!, shift + stretch * alongs[i]!)
      const value = sum / lines.length - 0.02 * Math.abs(k * step) - STRETCH_COST * Math.abs(stretch)
      if (value > best.value) best = { value, support: sum / lines.length, shift, stretch }
    }
  }
  return best
}

/**
 * Looks for the lines within `reach_mm` of `around_mm`; a shift or stretch far from the expected one must earn its distance.
 * `stretches`: those to try; without them a page that curls away is thought of only where the lines do not fit as they are.
 */
export function matchLines(
  profile: Profile,
  lines: readonly Line[],
  reach_mm: number,
  around_mm = 0,
  stretches?: readonly number[],
): Match {
  let best = bestOf(profile, lines, reach_mm, around_mm, stretches ?? HARDLY)
  if (!stretches && best.support < GOOD_AS_IT_IS && lines.length > 2) {
    const wide = bestOf(profile, lines, reach_mm, around_mm, STRETCHES)
    if (wide.value > best.value) best = wide
  }
  const alongs = alongsOf(lines)
  const voted: Voted[] = lines.flatMap((line, i) => {
    const by = best.shift + best.stretch * alongs[i]!
    const centre = centreOf(profile, line, by)
    if (centre === null || voteOf(profile, line, by) <= 0.25 || Math.abs(centre - by) > SAME_LINE_MM) return []
    return [{ along: alongs[i]!, off: centre }]
  })
  return { ...refineMatch(voted, best.shift, best.stretch), support: best.support }
}

/** The median line; the stretch by least squares where the lines span enough, without the one that fits worst. */
function refineMatch(voted: readonly Voted[], shift: number, stretch: number): Omit<Match, 'support'> {
  if (voted.length === 0) return { shift_mm: shift, stretch, spread_mm: Number.NaN }
  let own = stretch
  if (voted.length >= 4 && voted.at(-1)!.along - voted[0]!.along >= SPAN_MM) {
    const first = slopeOf(voted)
    const off = voted.map((v) => Math.abs(v.off - first.at - first.slope * v.along))
    const worst = off.indexOf(Math.max(...off))
    const kept = voted.length > 4 ? voted.filter((_, i) => i !== worst) : voted
    const line = slopeOf(kept)
    const straight = kept.every((v) => Math.abs(v.off - line.at - line.slope * v.along) < STRAIGHT_MM)
    if (straight && Math.abs(line.slope - stretch) < 0.03) own = line.slope
  }
  const at = voted.map((v) => v.off - own * v.along).sort((a, b) => a - b)
  const shift_mm = median(at)
  return { shift_mm, stretch: own, spread_mm: median(at.map((v) => Math.abs(v - shift_mm)).sort((a, b) => a - b)) }
}

function slopeOf(voted: readonly Voted[]): { at: number; slope: number } {
  const n = voted.length
  const mx = voted.reduce((s, v) => s + v.along, 0) / n
  const my = voted.reduce((s, v) => s + v.off, 0) / n
  const xx = voted.reduce((s, v) => s + (v.along - mx) ** 2, 0)
  const slope = voted.reduce((s, v) => s + (v.along - mx) * (v.off - my), 0) / xx
  return { at: my - slope * mx, slope }
}
