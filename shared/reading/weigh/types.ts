/** What weighing gives back, reading by reading. */

/** A number in the printed unit, 'HH:MM', 'YYYY-MM-DD', a choice's option, a tick, or null for a blank. */
export type Value = number | string | boolean | null

export interface Candidate {
  value: Value
  /** Probability with all that is known: format, marks, registers, the sheet's sums. */
  p: number
  /** Probability by the ink alone (and the format of the boxes). */
  ink: number
}

export interface Reason {
  rule: ReasonRule
  text: string
  cells: string[]
}

/** Q: a rule of the checks with the same meaning. R: reading's own. */
export type ReasonRule =
  | 'Q16' // unit missing, or two ticked
  | 'Q55' // gap between digits, or an empty decimal box
  | 'R01' // a box crossed out or written over
  | 'R02' // not sure enough
  | 'R03' // ink and knowledge favour different values
  | 'R04' // the writer's sum does not hold
  | 'R05' // not decided in the time allowed
  | 'R06' // a tick that is neither made nor absent, or two of one choice

export interface Weighed {
  value: Value
  state: 'clear' | 'in doubt'
  /** The best few, most probable first. */
  candidates: Candidate[]
  reasons: Reason[]
  /** Probability of `value`. */
  posterior: number
}

/** What is known before looking. */
export interface Facts {
  /** Numbers that exist, by register name. */
  known?: Readonly<Record<string, ReadonlySet<number>>>
  /** 'YYYY-MM-DD': a trial lies before it, mostly by less than a month. */
  today?: string
}
