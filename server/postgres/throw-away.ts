import { chmodSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { findPostmaster, isAlive } from './postmaster.ts'
import { startPrivateDatabase } from './private-database.ts'
import { drawSecrets } from './secrets.ts'

const PREFIX = 'sheafbook-tests-'

/** A cluster that lives as long as one run of the tests. */
export interface ThrowAway {
  /** Superuser's address of the database `postgres`. */
  adminUrl: string
  stop(): Promise<void>
}

/** Starts a throw-away cluster (fsync off) in the system's temporary folder. */
export async function startThrowAway(): Promise<ThrowAway> {
  await sweepLeftovers()
  const folder = mkdtempSync(join(tmpdir(), PREFIX))
  // The user postgres must get to its folder inside.
  chmodSync(folder, 0o755)
  writeFileSync(join(folder, 'starter.pid'), String(process.pid))
  const database = await startPrivateDatabase({ dataDir: join(folder, 'pg'), secrets: drawSecrets(), throwAway: true })
  const stop = async () => {
    await database.cluster.stop()
    rmSync(folder, { recursive: true, force: true })
  }
  return { adminUrl: database.adminUrl, stop }
}

/** Ends and removes clusters whose test run was killed before it could. */
async function sweepLeftovers(): Promise<void> {
  for (const name of readdirSync(tmpdir()).filter((entry) => entry.startsWith(PREFIX))) {
    const folder = join(tmpdir(), name)
    if (starterLives(folder)) continue
    const left = findPostmaster(join(folder, 'pg'))
    if (left !== null) process.kill(left.pid, 'SIGQUIT')
    rmSync(folder, { recursive: true, force: true })
  }
}

function starterLives(folder: string): boolean {
  try {
    return isAlive(Number(readFileSync(join(folder, 'starter.pid'), 'utf8')))
  } catch {
    // Not written yet (a run that starts this moment) or not ours to read: left alone.
    return true
  }
}
