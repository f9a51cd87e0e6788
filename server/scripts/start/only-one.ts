import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { CannotStart } from '../../postgres/cannot-start.ts'
import { isAlive } from '../../postgres/postmaster.ts'

/**
 * Marks the data folder as in use by this process; two starts in one folder would stop each other's database.
 * @returns what takes the mark away
 * @throws CannotStart when another start is running
 */
export function takeFolder(dataFolder: string): () => void {
  const file = join(dataFolder, 'start.pid')
  mkdirSync(dataFolder, { recursive: true })
  const other = existsSync(file) ? Number(readFileSync(file, 'utf8')) : 0
  if (other > 0 && other !== process.pid && isAlive(other) && isStart(other)) {
    throw new CannotStart(
      `Sheafbook already runs from this folder (process ${other}).`,
      'Stop it with Ctrl-C in its terminal, then start again.',
    )
  }
  writeFileSync(file, String(process.pid))
  return () => rmSync(file, { force: true })
}

/** Process numbers are used again: the mark of a killed start may name a stranger by now. */
function isStart(pid: number): boolean {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('scripts/start.ts')
  } catch {
    return true
  }
}
