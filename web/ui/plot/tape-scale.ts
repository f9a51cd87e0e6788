import { scaleLinear } from 'd3-scale'

/** A measuring tape laid along a plot: where a figure stands, and its ticks. */
export interface TapeScale {
  at(figure: number): number
  /** Ticks with figures. */
  major: number[]
  minor: number[]
  from: number
  to: number
}

const MAJOR_PX = 90
const MINOR_A_MAJOR = 5

/** A tape around all figures, from pixel to pixel; `zero` makes it reach 0. */
export function tapeScale(figures: readonly number[], [left, right]: readonly [number, number], zero = false): TapeScale {
  const all = zero || figures.length === 0 ? [0, ...figures] : figures
  const [low, high] = [Math.min(...all), Math.max(...all)]
  const room = (high - low || Math.abs(high) || 1) * 0.04
  const count = Math.max(2, Math.round(Math.abs(right - left) / MAJOR_PX))
  const scale = scaleLinear([low - (low === 0 ? 0 : room), high + room], [left, right]).nice(count)
  const [from = 0, to = 1] = scale.domain()
  return { at: (figure) => scale(figure), major: scale.ticks(count), minor: scale.ticks(count * MINOR_A_MAJOR), from, to }
}
