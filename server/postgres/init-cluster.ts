import { spawnSync } from 'node:child_process'
import { chownSync, existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import type { Binaries } from './binaries.ts'
import { CannotStart } from './cannot-start.ts'
import type { Identity } from './identity.ts'

/** The major version that made this data folder, or null when there is no cluster in it yet. */
export function clusterMajor(dataDir: string): number | null {
  const file = join(dataDir, 'PG_VERSION')
  return existsSync(file) ? Number(readFileSync(file, 'utf8').trim()) : null
}

/**
 * Makes a cluster in `dataDir` that asks everybody for a password. It is made beside the place and moved in when it is
 * whole, so an interrupted first start leaves nothing that looks like a cluster.
 * @throws CannotStart with initdb's own words
 */
export function initCluster(binaries: Binaries, dataDir: string, identity: Identity | null, adminPassword: string): void {
  const draft = `${dataDir}.new`
  const passwordFile = `${dataDir}.password`
  // The parents come first: made together with the folder they would be closed (0700) to the user postgres.
  mkdirSync(dirname(dataDir), { recursive: true })
  rmSync(draft, { recursive: true, force: true })
  mkdirSync(draft, { mode: 0o700 })
  writeFileSync(passwordFile, adminPassword, { mode: 0o600 })
  if (identity !== null) for (const path of [draft, passwordFile]) chownSync(path, identity.uid, identity.gid)
  try {
    runInitdb(binaries, draft, identity, passwordFile)
    renameSync(draft, dataDir)
  } finally {
    rmSync(passwordFile, { force: true })
    rmSync(draft, { recursive: true, force: true })
  }
}

function runInitdb(binaries: Binaries, folder: string, identity: Identity | null, passwordFile: string): void {
  const args = [
    '-D',
    folder,
    '-U',
    'postgres',
    '--encoding=UTF8',
    '--locale=C.UTF-8',
    '--auth=scram-sha-256',
    `--pwfile=${passwordFile}`,
  ]
  const run = spawnSync(join(binaries.dir, 'initdb'), args, { ...identity, cwd: '/', encoding: 'utf8' })
  if (run.status === 0) return
  throw new CannotStart(
    `A PostgreSQL cluster could not be made in ${folder}: ${(run.stderr || String(run.error ?? '')).trim()}`,
    'Check that the disk has room and that the folder may be written, then start again.',
    { cause: run.error },
  )
}
