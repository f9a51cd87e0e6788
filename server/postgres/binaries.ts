import { existsSync, readdirSync } from 'node:fs'
import { join } from 'node:path'

/** The folder of one PostgreSQL's programs, and its major version. */
export interface Binaries {
  dir: string
  major: number
}

/** The oldest PostgreSQL the migrations are written for. */
export const OLDEST_MAJOR = 13

/**
 * Finds PostgreSQL where Debian puts it: one folder a major version, none of them on the path.
 * With `major` only that version will do, because a cluster's files belong to the version that made them.
 */
export function findBinaries(major?: number, root = '/usr/lib/postgresql'): Binaries | null {
  const found = listVersions(root)
    .filter((version) => version >= OLDEST_MAJOR && (major === undefined || version === major))
    .map((version) => ({ dir: join(root, String(version), 'bin'), major: version }))
    .filter(({ dir }) => existsSync(join(dir, 'initdb')) && existsSync(join(dir, 'postgres')))
  return found.sort((a, b) => b.major - a.major)[0] ?? null
}

function listVersions(root: string): number[] {
  if (!existsSync(root)) return []
  return readdirSync(root)
    .filter((name) => /^\d+$/.test(name))
    .map(Number)
}
