/**
 * How high a comb stands, and how much it leans: every box votes with its upper and lower frame, the two bars with their ends.
 * Shift and lean are sought together, since a curled page leans and a long comb then has no sharp rows of its own.
 */
import { BOX } from '../../layouts/layout.ts'
import type { FieldPart } from './field-lines.ts'
import { centreOf, type Grid, gridAround, type Line, type Profile, voteAt, voteOf, votesOn } from './lines.ts'
import { lineProfile, type Patch } from './patch.ts'

export interface LevelMatch {
  /** Measured minus expected at the middle of the boxes, mm. */
  shift_mm: number
  /** Rise along the comb, mm a mm. */
  lean: number
  /** How much taller it stands than expected: 0.01 is a hundredth. */
  growth: number
  support: number
  spread_mm: number
}

interface Voter {
  /** Where along the comb, from its middle, mm. */
  along: number
  profile: Profile
  lines: readonly Line[]
  marks: readonly VotingMark[]
}

/** A line, or the end of a bar, with its votes for offsets in steps of the search. */
interface VotingMark {
  /** Height beside the middle of the boxes, mm. */
  above: number
  votes: Float32Array
}

/** Kept off a box's corners, where lines cross. */
const INSET_MM = 0.75
/** A line of a single box is seen on few samples: less than this share may be writing. */
const SHARE = 0.6
const CLIP = 0.42
/** Contrast of a bar's end that is a full vote. */
const BAR_CONTRAST = 0.3
/** What is compared on both sides of a bar's end, mm. */
const BAR_SIDE_MM = 0.55

/** What distance from the expected place costs, in support a mm; and a lean of one: rules and labels also run level. */
const AWAY_COST = 0.08
const LEAN_COST = 1.5
/** Heights beside the expected one. */
const MOST_GROWTH = 0.08
const GROWTHS = [0.04, -0.04, MOST_GROWTH, -MOST_GROWTH] as const
/** A place that is so well supported needs no bending. */
const GOOD_AS_IT_IS = 0.6
/** Leans beside the one that neighbours give. */
const LEANS = [0, 0.006, -0.006, 0.012, -0.012, 0.02, -0.02, 0.03, -0.03, 0.045, -0.045, 0.06, -0.06]

function boxVoters(patch: Patch, part: FieldPart, dx: number, middle: number, full: number, grid: Grid): Voter[] {
  const center = part.field.y + part.field.height / 2
  return part.boxes.map((box) => {
    const values = lineProfile(patch, 'rows', box.x + dx + INSET_MM, box.x + box.width + dx - INSET_MM, SHARE, CLIP)
    const profile = { values, start_mm: patch.y, step_mm: patch.step_mm, full }
    const marks = part.level.map((line) => ({
      above: line.from - center,
      votes: votesOn(grid, (by) => voteOf(profile, line, by)),
    }))
    return { along: box.x + box.width / 2 - middle, profile, lines: part.level, marks }
  })
}

function barVoter(patch: Patch, from: number, top: number, bottom: number, dx: number, middle: number, grid: Grid): Voter {
  const values = lineProfile(patch, 'rows', from + dx + 0.1, from + BOX.bar + dx - 0.1, 0.5, 0.8)
  const profile = { values, start_mm: patch.y, step_mm: patch.step_mm, full: BAR_CONTRAST }
  const half = (bottom - top) / 2
  const marks = [
    { above: -half, votes: votesOn(grid, (by) => edgeVote(profile, top + by, true)) },
    { above: half, votes: votesOn(grid, (by) => edgeVote(profile, bottom + by, false)) },
  ]
  return { along: from + BOX.bar / 2 - middle, profile, lines: [], marks }
}

function mean({ values, start_mm, step_mm }: Profile, from: number, to: number): number {
  const first = Math.max(0, Math.round((from - start_mm) / step_mm))
  const last = Math.min(values.length, Math.round((to - start_mm) / step_mm))
  if (last <= first) return 0
  let sum = 0
  for (let i = first; i < last; i++) sum += values[i]!
  return sum / (last - first)
}

function edgeVote(profile: Profile, at: number, darkBelow: boolean): number {
  const below = mean(profile, at, at + BAR_SIDE_MM)
  const above = mean(profile, at - BAR_SIDE_MM, at)
  return Math.max(-0.5, Math.min(1, (darkBelow ? below - above : above - below) / profile.full))
}

interface Pose {
  shift: number
  lean: number
  growth: number
}

function supportAt(voters: readonly Voter[], { shift, lean, growth }: Pose, grid: Grid): number {
  let sum = 0
  let count = 0
  for (const { along, marks } of voters) {
    for (const { above, votes } of marks) {
      const by = shift + lean * along + growth * above
      sum += voteAt(grid, votes, by)
      count++
    }
  }
  return count === 0 ? 0 : sum / count
}

/**
 * Seeks the boxes of `parts`, with the bars that stand beside them, within `reach_mm` of `around`. A page that curls away is
 * thought of (leaning more, lower or taller) only where it does not fit as it is.
 */
export function matchLevel(
  patch: Patch,
  parts: readonly FieldPart[],
  dx: number,
  reach_mm: number,
  full: number,
  around: { shift_mm: number; lean: number; growth: number } = { shift_mm: 0, lean: 0, growth: 0 },
  leans: readonly number[] = LEANS,
): LevelMatch {
  const first = parts[0]!.boxes[0]!
  const last = parts.at(-1)!.boxes.at(-1)!
  const middle = (first.x + last.x + last.width) / 2
  const { field } = parts[0]!
  const center = field.y + field.height / 2
  const step = patch.step_mm / 2
  const steps = Math.ceil(reach_mm / step)
  // As far as the steepest lean and growth reach beyond the shift.
  const room =
    (Math.abs(around.lean) + Math.max(...leans.map(Math.abs))) * (last.x + last.width - first.x + 2) * 0.5 +
    (Math.abs(around.growth) + MOST_GROWTH) * field.height * 0.7
  const grid = gridAround(around.shift_mm, step, steps + Math.ceil(room / step))
  const voters = parts.flatMap((part) => boxVoters(patch, part, dx, middle, full, grid))
  if (Math.abs(first.x - field.x) < 0.1) {
    const rise = BOX.barRise
    voters.push(barVoter(patch, field.x - BOX.bar, field.y - rise, field.y + field.height + rise, dx, middle, grid))
  }
  const end = field.x + field.width
  if (Math.abs(last.x + last.width - end) < 0.1)
    voters.push(barVoter(patch, end, field.y, field.y + field.height, dx, middle, grid))

  let best = { value: -1, support: -1, shift: around.shift_mm, lean: around.lean, growth: around.growth }
  const seek = (growths: readonly number[]) => {
    for (const grown of growths) {
      for (const bend of leans) {
        const cost = LEAN_COST * (Math.abs(bend) + Math.abs(grown))
        for (let k = -steps; k <= steps; k++) {
          const pose = { shift: around.shift_mm + k * step, lean: around.lean + bend, growth: around.growth + grown }
          const support = supportAt(voters, pose, grid)
          const value = support - AWAY_COST * Math.abs(k * step) - cost
          if (value > best.value) best = { value, support, ...pose }
        }
      }
    }
  }
  seek([0])
  if (best.support < GOOD_AS_IT_IS && leans.length > 1) seek(GROWTHS)
  return refine(voters, best, best.support, center)
}

/** The median of what single lines say, about the best shift. */
function refine(voters: readonly Voter[], pose: Pose, support: number, center: number): LevelMatch {
  const centres: number[] = []
  for (const { along, profile, lines } of voters) {
    for (const line of lines) {
      const by = pose.shift + pose.lean * along + pose.growth * (line.from - center)
      const centre = centreOf(profile, line, by)
      if (centre !== null && voteOf(profile, line, by) > 0.25 && Math.abs(centre - by) < 0.4) centres.push(centre - by)
    }
  }
  const { lean, growth } = pose
  if (centres.length === 0) return { shift_mm: pose.shift, lean, growth, support, spread_mm: Number.NaN }
  centres.sort((a, b) => a - b)
  const n = centres.length
  const middle = n % 2 ? centres[n >> 1]! : (centres[n / 2 - 1]! + centres[n / 2]!) / 2
  const off = centres.map((c) => Math.abs(c - middle)).sort((a, b) => a - b)
  return { shift_mm: pose.shift + middle, lean, growth, support, spread_mm: off[n >> 1]! }
}
