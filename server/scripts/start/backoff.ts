const FIRST_WAIT_MS = 500
const LONGEST_WAIT_MS = 30_000
/** Who lived this long has recovered: its next fall starts from the shortest wait again. */
const RECOVERED_AFTER_MS = 60_000

/** How often a process fell in a row, and how long to wait before it is started again. */
export interface Falls {
  inARow: number
  wait_ms: number
}

export const NO_FALLS: Falls = { inARow: 0, wait_ms: 0 }

/** The falls after one more, by how long the process lived: waits double up to half a minute. */
export function fallAgain(before: Falls, lived_ms: number): Falls {
  const inARow = lived_ms >= RECOVERED_AFTER_MS ? 1 : before.inARow + 1
  return { inARow, wait_ms: Math.min(FIRST_WAIT_MS * 2 ** (inARow - 1), LONGEST_WAIT_MS) }
}
