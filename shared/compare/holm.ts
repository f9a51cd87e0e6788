/** Holm's step-down: p values that hold for all comparisons together, in the order given. */
export function holm(p: readonly number[]): number[] {
  const order = p.map((_, i) => i).sort((a, b) => p[a]! - p[b]!)
  const adjusted = new Array<number>(p.length)
  let most = 0
  order.forEach((place, rank) => {
    most = Math.max(most, Math.min(1, (p.length - rank) * p[place]!))
    adjusted[place] = most
  })
  return adjusted
}
