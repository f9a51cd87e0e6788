import { existsSync, readFileSync, readlinkSync, realpathSync, rmSync } from 'node:fs'
import { join } from 'node:path'

/** What a running cluster says about itself in its pid file. */
export interface Postmaster {
  pid: number
  port: number
}

/**
 * The live postmaster of this data folder, or null. A pid file left by a crash is removed: PostgreSQL only asks
 * whether some process has that number, so a zombie or a stranger with the same number would stop it from starting.
 */
export function findPostmaster(dataDir: string): Postmaster | null {
  const file = join(dataDir, 'postmaster.pid')
  if (!existsSync(file)) return null
  const [pid, , , port] = readFileSync(file, 'utf8').split('\n')
  if (pid !== undefined && port !== undefined && isPostgres(Number(pid), dataDir)) return { pid: Number(pid), port: Number(port) }
  rmSync(file, { force: true })
  return null
}

/** Whether the process exists and is more than an entry nobody has collected yet. */
export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0)
  } catch (cause) {
    return (cause as NodeJS.ErrnoException).code === 'EPERM'
  }
  return processState(pid) !== 'Z'
}

function isPostgres(pid: number, dataDir: string): boolean {
  if (!Number.isInteger(pid) || pid <= 0 || !isAlive(pid)) return false
  const cwd = workingFolder(pid)
  // A postmaster works in its data folder. Where that cannot be read, a live process gets the benefit of the doubt.
  return cwd === null || cwd === realpathSync(dataDir)
}

function processState(pid: number): string | null {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    return stat.slice(stat.lastIndexOf(')') + 2).charAt(0)
  } catch {
    return null
  }
}

function workingFolder(pid: number): string | null {
  try {
    return readlinkSync(`/proc/${pid}/cwd`)
  } catch {
    return null
  }
}
