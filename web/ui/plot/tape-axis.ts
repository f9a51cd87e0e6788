/** Where a measuring tape begins and ends, and its ticks. Pure. */
export interface Axis {
  from: number
  to: number
  /** Ticks with figures. */
  major: number[]
  minor: number[]
}

const STEPS = [1, 2, 5] as const
const MAJOR_TICKS = 7

/** A tape around the figures, with room on both sides; never below zero for figures above it. */
export function axisAround(figures: readonly number[]): Axis {
  const low = Math.min(...figures)
  const high = Math.max(...figures)
  const span = Math.max(high - low, Math.abs(high) * 0.1, 1e-6)
  const step = niceStep((span * 1.8) / MAJOR_TICKS)
  const from = Math.floor((low - span * 0.4) / step) * step
  const begin = low >= 0 ? Math.max(0, from) : from
  const end = Math.ceil((high + span * 0.4) / step) * step
  const count = Math.round((end - begin) / step)
  const tick = (n: number, parts: number) => Number((begin + (n * step) / parts).toPrecision(8))
  return {
    from: tick(0, 1),
    to: tick(count, 1),
    major: Array.from({ length: count + 1 }, (_, n) => tick(n, 1)),
    minor: Array.from({ length: count * 10 + 1 }, (_, n) => tick(n, 10)),
  }
}

function niceStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least))
  return power * (STEPS.find((s) => s * power >= least) ?? 10)
}
