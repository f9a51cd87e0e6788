/** All ways of reading a comb of boxes, with their ink: numbers right-aligned, leading boxes blank or 0, decimals filled. */
import { BLANK, type BoxDist, CLASS_COUNT, VOID } from '../classes.ts'
import { MOST_PATTERNS, NET_HUMILITY, PATTERN_FLOOR, VOID_RARER } from './thresholds.ts'

export type CombKind = 'digits' | 'time' | 'date'

export interface Pattern {
  /** Digits of the boxes in writing order, -1 for a blank. */
  digits: readonly number[]
  ink: number
}

export interface Patterns {
  /** Every pattern of digits and allowed blanks down to the floor, best first. */
  found: Pattern[]
  allBlank: number
  /** Probability of digits with a gap or an empty decimal box. */
  gap: number
  /** Probability that at least one box is spoiled, at the share of spoiled boxes on real sheets. */
  spoiled: number
  /** The same at the share the net was trained with: the alarm for a person, deliberately easy to set off. */
  spoiledAlarm: number
  /** Probability of allowed patterns that were left out. */
  leftOut: number
}

/** Which boxes may stay empty before the first digit: the whole part of a number with decimals, else all but the last. */
function emptiness(format: string, kind: CombKind): boolean[] {
  const boxes = [...format].flatMap((mark, i) => (mark === '9' ? [i] : []))
  if (kind === 'time') return boxes.map((_, n) => n === 0)
  if (kind === 'date') return boxes.map((_, n) => n === 0 || n === 2)
  const point = format.indexOf('.')
  const whole = boxes.filter((at) => point < 0 || at < point).length
  return boxes.map((_, n) => n < whole - (point < 0 ? 1 : 0))
}

/** A box's distribution at the real share of spoiled boxes, with a little of it spread over all classes. */
function humble(box: BoxDist): number[] {
  const spoiled = box[VOID] ?? 0
  const sum = 1 - spoiled + spoiled * VOID_RARER
  return Array.from({ length: CLASS_COUNT }, (_, k) => {
    const share = ((box[k] ?? 0) * (k === VOID ? VOID_RARER : 1)) / sum
    return (1 - NET_HUMILITY) * share + NET_HUMILITY / CLASS_COUNT
  })
}

/** @param boxes one distribution a box, in writing order; their number must fit the format. */
export function patternsOf(boxes: ReadonlyArray<BoxDist>, format: string, kind: CombKind): Patterns {
  const p = boxes.map(humble)
  const empty = emptiness(format, kind)
  if (empty.length !== p.length) throw new RangeError(`Format ${format} has ${empty.length} boxes, not ${p.length}.`)
  const product = (f: (box: number[]) => number) => p.reduce((all, box) => all * f(box), 1)
  const whole = product((box) => 1 - box[VOID]!)
  const allBlank = product((box) => box[BLANK]!)
  const allowed = allowedMass(p, empty, kind)
  let floor = PATTERN_FLOOR
  let found = search(p, empty, kind, floor)
  while (found === null) {
    floor *= 4
    found = search(p, empty, kind, floor)
  }
  found.sort((a, b) => b.ink - a.ink)
  const sum = found.reduce((all, pattern) => all + pattern.ink, 0)
  return {
    found,
    allBlank,
    gap: Math.max(0, whole - allowed - allBlank),
    spoiled: 1 - whole,
    spoiledAlarm: 1 - boxes.reduce((all, box) => all * (1 - (box[VOID] ?? 0)), 1),
    leftOut: Math.max(0, allowed - sum),
  }
}

/** In a date the month starts anew, so its first box may be blank after a digit. */
const startsAnew = (kind: CombKind, at: number) => kind === 'date' && at === 2

/** Probability of all patterns the format allows, all-blank apart; by the state "only blanks so far". */
function allowedMass(p: number[][], empty: boolean[], kind: CombKind): number {
  let blanks = 1
  let digits = 0
  p.forEach((box, at) => {
    const digit = 1 - box[VOID]! - box[BLANK]!
    const blank = empty[at] ? box[BLANK]! : 0
    const nextDigits = (digits + blanks) * digit + (startsAnew(kind, at) ? digits * blank : 0)
    blanks *= blank
    digits = nextDigits
  })
  return digits
}

/** All patterns down to the floor, or null where they are more than can be weighed. */
function search(p: number[][], empty: boolean[], kind: CombKind, floor: number): Pattern[] | null {
  const best = p.map((box) => Math.max(...box.slice(0, VOID)))
  const rest = [...best, 1]
  for (let i = best.length - 1; i >= 0; i--) rest[i] = best[i]! * rest[i + 1]!
  const least = rest[0]! * floor
  const out: Pattern[] = []
  const digits: number[] = []
  const visit = (at: number, ink: number, onlyBlanks: boolean): void => {
    if (ink * rest[at]! < least || out.length > MOST_PATTERNS) return
    if (at === p.length) {
      if (!onlyBlanks) out.push({ digits: [...digits], ink })
      return
    }
    const box = p[at]!
    for (let digit = 0; digit < 10; digit++) {
      digits.push(digit)
      visit(at + 1, ink * box[digit]!, false)
      digits.pop()
    }
    if (empty[at] && (onlyBlanks || startsAnew(kind, at))) {
      digits.push(-1)
      visit(at + 1, ink * box[BLANK]!, onlyBlanks)
      digits.pop()
    }
  }
  visit(0, 1, true)
  return out.length > MOST_PATTERNS ? null : out
}
