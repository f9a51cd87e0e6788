/**
 * Finding a row of printed lines in a measured profile. Each line votes with its own contrast against the white on both sides,
 * and no vote counts more than a printed frame's: a dark stroke of the pen is one loud voice among many.
 */

/** A printed line's extent across itself, mm. */
export interface Line {
  from: number
  to: number
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
  const middle = (line.from + line.to) / 2 + shift_mm
  const half = (line.to - line.from) / 2 + BESIDE_MM
  const contrast = at(profile, middle) - Math.max(0, Math.min(at(profile, middle - half), at(profile, middle + half)))
  const worse = at(profile, middle) - Math.max(at(profile, middle - half), at(profile, middle + half))
  return Math.min(1, Math.max(-AGAINST, (0.4 * contrast + 0.6 * worse) / profile.full))
}

/** The mean vote of all lines for one shift. */
export const support = (profile: Profile, lines: readonly Line[], shift_mm: number): number =>
  lines.reduce((sum, line) => sum + voteOf(profile, line, shift_mm), 0) / lines.length

export interface Match {
  /** Measured minus expected, mm. */
  shift_mm: number
  /** -0.5 to 1. */
  support: number
  /** How far the single lines are from the shift, mm (median). */
  spread_mm: number
}

/** Where one line is near a shift: the centre of what rises over its surroundings, or null. */
export function centreOf(profile: Profile, line: Line, shift_mm: number): number | null {
  const { values, start_mm, step_mm } = profile
  const from = line.from + shift_mm - BESIDE_MM
  const to = line.to + shift_mm + BESIDE_MM
  const first = Math.max(0, Math.round((from - start_mm) / step_mm))
  const last = Math.min(values.length, Math.round((to - start_mm) / step_mm))
  if (last - first < 4) return null
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

/** Looks for the lines within `reach_mm` of `around_mm`; a shift far from it must earn its distance. */
export function matchLines(profile: Profile, lines: readonly Line[], reach_mm: number, around_mm = 0): Match {
  const step = profile.step_mm / 2
  let best = -1
  let coarse = around_mm
  const steps = Math.ceil(reach_mm / step)
  for (let k = -steps; k <= steps; k++) {
    const shift = around_mm + k * step
    const value = support(profile, lines, shift) - 0.02 * Math.abs(k * step)
    if (value > best) {
      best = value
      coarse = shift
    }
  }
  const voted = lines
    .map((line) => ({ centre: centreOf(profile, line, coarse), vote: voteOf(profile, line, coarse) }))
    .filter((l): l is { centre: number; vote: number } => l.centre !== null && l.vote > 0.25 && Math.abs(l.centre - coarse) < 0.4)
  const centres = voted.map((l) => l.centre).sort((a, b) => a - b)
  const supported = support(profile, lines, coarse)
  if (centres.length === 0) return { shift_mm: coarse, support: supported, spread_mm: Number.NaN }
  const shift_mm = median(centres)
  const spread_mm = median(centres.map((c) => Math.abs(c - shift_mm)).sort((a, b) => a - b))
  return { shift_mm, support: supported, spread_mm }
}
