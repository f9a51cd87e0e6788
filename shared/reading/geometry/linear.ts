/** Small dense systems of linear equations. */

/** Solves a symmetric or general n x n system (row by row in `a`) in place by elimination with pivots; null when singular. */
export function solve(a: Float64Array, b: Float64Array): Float64Array | null {
  const n = b.length
  for (let column = 0; column < n; column++) {
    let pivot = column
    for (let row = column + 1; row < n; row++) {
      if (Math.abs(a[row * n + column]!) > Math.abs(a[pivot * n + column]!)) pivot = row
    }
    const largest = a[pivot * n + column]!
    if (Math.abs(largest) < 1e-12) return null
    if (pivot !== column) {
      for (let k = column; k < n; k++) {
        const keep = a[column * n + k]!
        a[column * n + k] = a[pivot * n + k]!
        a[pivot * n + k] = keep
      }
      const keep = b[column]!
      b[column] = b[pivot]!
      b[pivot] = keep
    }
    for (let row = column + 1; row < n; row++) {
      const factor = a[row * n + column]! / a[column * n + column]!
      if (factor === 0) continue
      for (let k = column; k < n; k++) a[row * n + k]! -= factor * a[column * n + k]!
      b[row]! -= factor * b[column]!
    }
  }
  for (let row = n - 1; row >= 0; row--) {
    let sum = b[row]!
    for (let k = row + 1; k < n; k++) sum -= a[row * n + k]! * b[k]!
    b[row] = sum / a[row * n + row]!
  }
  return b
}

/** Least squares by normal equations, fed one equation at a time. */
export class LeastSquares {
  private readonly ata: Float64Array
  private readonly atb: Float64Array

  constructor(private readonly unknowns: number) {
    this.ata = new Float64Array(unknowns * unknowns)
    this.atb = new Float64Array(unknowns)
  }

  add(row: ArrayLike<number>, value: number, weight = 1): void {
    const n = this.unknowns
    for (let i = 0; i < n; i++) {
      const scaled = row[i]! * weight
      if (scaled === 0) continue
      for (let j = 0; j < n; j++) this.ata[i * n + j]! += scaled * row[j]!
      this.atb[i]! += scaled * value
    }
  }

  /** Draws one unknown towards zero. */
  ridge(index: number, weight: number): void {
    this.ata[index * this.unknowns + index]! += weight
  }

  solve(): Float64Array | null {
    return solve(Float64Array.from(this.ata), Float64Array.from(this.atb))
  }
}
