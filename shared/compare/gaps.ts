/** The gaps of an analysis that a claim may rest on: the intervals that suit its design. */
import type { Gap } from '../schemas/book-comparison.ts'
import type { Analysis } from '../schemas/comparison.ts'

/** Two treatments: the interval of their own test (Welch's on unlike fields). More: Tukey's, which hold for all pairs together. */
export function gapsOf({ tests, pairwise, design }: Analysis): Gap[] {
  const own = tests[0]
  if (own && design.treatments.length === 2) {
    const { first, second, difference, interval } = own
    return [{ first, second, difference, interval }]
  }
  return pairwise.map(({ first, second, difference, interval, tukeyInterval }) => ({
    first,
    second,
    difference,
    interval: pairwise.length === 1 ? interval : tukeyInterval,
  }))
}

/** The same gap seen from the other side. */
export const turned = ({ first, second, difference, interval }: Gap): Gap => ({
  first: second,
  second: first,
  difference: -difference,
  interval: [-interval[1], -interval[0]],
})
