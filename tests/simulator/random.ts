/** Seeded chance: the same seed gives the same trial, hand and photo on every machine. */

export interface Chance {
  /** 0 up to, not including, 1. */
  unit(): number
  /** Evenly between two bounds. */
  between(low: number, high: number): number
  /** A whole number, both bounds included. */
  whole(low: number, high: number): number
  /** Normally distributed. */
  normal(mean: number, deviation: number): number
  /** true in this share of cases. */
  odds(share: number): boolean
  pick<T>(items: readonly T[]): T
  /** An independent stream, so that adding a draw in one part does not change another. */
  fork(name: string): Chance
}

function hash(text: string): number {
  let h = 2166136261
  for (let i = 0; i < text.length; i += 1) h = Math.imul(h ^ text.charCodeAt(i), 16777619)
  return h >>> 0
}

/** Chance from a text seed: a 32-bit counter through a mixing function, its period is far above what one photo draws. */
export function chanceOf(seed: string): Chance {
  let state = hash(seed)
  const unit = () => {
    state = (state + 0x9e3779b9) >>> 0
    let t = state
    t = Math.imul(t ^ (t >>> 16), 0x21f0aaad)
    t = Math.imul(t ^ (t >>> 15), 0x735a2d97)
    return ((t ^ (t >>> 15)) >>> 0) / 4294967296
  }
  const between = (low: number, high: number) => low + (high - low) * unit()
  return {
    unit,
    between,
    whole: (low, high) => low + Math.floor(unit() * (high - low + 1)),
    normal: (mean, deviation) => mean + deviation * Math.sqrt(-2 * Math.log(1 - unit())) * Math.cos(2 * Math.PI * unit()),
    odds: (share) => unit() < share,
    pick: (items) => items[Math.floor(unit() * items.length)]!,
    fork: (name) => chanceOf(`${seed}/${name}`),
  }
}
