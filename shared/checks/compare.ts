/** Comparisons at a limit: a figure worked out to exactly the limit is not beyond it, whatever its last binary digit. */
const REST = 1e-9
const slack = (limit: number) => REST * Math.max(1, Math.abs(limit))

export const above = (value: number, limit: number): boolean => value > limit + slack(limit)
export const below = (value: number, limit: number): boolean => value < limit - slack(limit)
export const outside = (value: number, low: number, high: number): boolean => below(value, low) || above(value, high)
