/**
 * How readings of one sheet hang together. A layout lists its ties as data; reading weighs candidates by them, and knows no
 * layout by name. Keys name cells of the layout. A tie whose `equals` is blank, or whose parts are missing, says nothing.
 */
export type Tie =
  /** Sum of `plus` less sum of `minus` is `equals`; blanks count as nothing, but one of `plus` must be there. */
  | { kind: 'balance'; plus: readonly string[]; minus: readonly string[]; equals: string }
  /** The mean of what is filled in, rounded to the written places of `equals`. */
  | { kind: 'mean'; of: readonly string[]; equals: string }
  /**
   * An area by hand: a rectangle has `sides[0]` and `sides[1]` only, four sides (in order round the plot) with the diagonal
   * from the first corner to the third make two triangles. `unit` is the choice whose option picks square metres a unit.
   */
  | {
      kind: 'area'
      sides: readonly [string, string, string, string]
      diagonal: string
      equals: string
      unit: string
      squareMetres: Readonly<Record<string, number>>
    }
  /**
   * An amount over an area by hand: `equals` = amount * factor / (area in hectares). `factor` turns the amount's unit into that
   * of `equals` (0.001 for mL and L/ha).
   */
  | {
      kind: 'rate'
      amount: string
      factor: number
      area: string
      unit: string
      squareMetres: Readonly<Record<string, number>>
      equals: string
    }
  /** Clock times in order; blanks are passed over. `usual_min` is the longest usual time from one to the next. */
  | { kind: 'order'; keys: readonly string[]; usual_min: number }
  /** `greater` is at least `less` and, where `usual` is given, not more than that above it. */
  | { kind: 'not-less'; greater: string; less: string; usual?: number }
  /** A meter of hours runs with the clock: greater - less is about the time from `start` to `end`. */
  | { kind: 'elapsed'; less: string; greater: string; start: string; end: string }
  /** Readings of like things (repeats, left and right): each within `share` of the one before, or `amount` in its own unit. */
  | { kind: 'near'; keys: readonly string[]; share?: number; amount?: number }
  /** A row of repeats: each lies within `share` of the middle of the others, or `amount`; likely, and no proof of any. */
  | { kind: 'alike'; keys: readonly string[]; share?: number; amount?: number }
  /** `key` is about `product` over `by`, within `share` of it (passes, from breadth and width); likely, and no proof. */
  | { kind: 'quotient'; key: string; product: string; by: string; share: number }
  /** An instrument's marks: values are multiples of `step`, sometimes of `half`, rarely anything else. */
  | { kind: 'marks'; keys: readonly string[]; step: number; half?: number }

export const HECTARE_M2 = 10_000
/** International acre, NIST SP 811, exact by definition. */
export const ACRE_M2 = 4046.8564224
