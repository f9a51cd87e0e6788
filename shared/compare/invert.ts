/** Inverse of a symmetric positive matrix of counts, by elimination (Gauss and Jordan); null when it is singular. */
export function invert(matrix: readonly (readonly number[])[]): number[][] | null {
  const n = matrix.length
  const rows = matrix.map((row, i) => [...row, ...Array.from({ length: n }, (_, j) => (i === j ? 1 : 0))])
  for (let column = 0; column < n; column++) {
    const pivot = rows[column]!
    const at = pivot[column]!
    // Entries are counts and shares of counts: what is left of a singular one is rounding.
    if (Math.abs(at) < 1e-9 * Math.max(1, matrix[column]![column]!)) return null
    rows[column] = pivot.map((x) => x / at)
    for (let i = 0; i < n; i++) {
      if (i === column) continue
      const factor = rows[i]![column]!
      rows[i] = rows[i]!.map((x, j) => x - factor * rows[column]![j]!)
    }
  }
  return rows.map((row) => row.slice(n))
}
