/** Ends a child that takes more memory than any honest file needs: the heap's own limit counts no buffers and no WebAssembly. */
import { readFile } from 'node:fs/promises'

const LOOK_MS = 250
/** Pages of memory as Linux counts them on the machines Node runs on; elsewhere there is no such file, and no watch. */
const PAGE_BYTES = 4096

/**
 * @param most_mb resident memory at which `kill` is called, once
 * @returns ends the watch
 */
export function watchMemory(pid: number | undefined, most_mb: number, kill: () => void): () => void {
  const timer = setInterval(async () => {
    const statm = await readFile(`/proc/${pid}/statm`, 'utf8').catch(() => null)
    if (statm === null || (Number(statm.split(' ')[1]) * PAGE_BYTES) / 1e6 <= most_mb) return
    clearInterval(timer)
    kill()
  }, LOOK_MS)
  timer.unref()
  return () => clearInterval(timer)
}
