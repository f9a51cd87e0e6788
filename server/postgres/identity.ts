import { readFileSync, statSync } from 'node:fs'
import { dirname } from 'node:path'
import { CannotStart } from './cannot-start.ts'

/** The user a cluster runs as. PostgreSQL refuses to run as root. */
export interface Identity {
  uid: number
  gid: number
}

/** The user `postgres` when we are root, otherwise null: the cluster then runs as whoever started us. */
export function clusterIdentity(passwd = '/etc/passwd'): Identity | null {
  if (process.getuid?.() !== 0) return null
  const line = readFileSync(passwd, 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith('postgres:'))
  const [, , uid, gid] = line?.split(':') ?? []
  if (uid === undefined || gid === undefined) {
    throw new CannotStart(
      'PostgreSQL does not run as root, and this machine has no user "postgres".',
      'Run "apt-get install postgresql", which makes one, or start as an ordinary user.',
    )
  }
  return { uid: Number(uid), gid: Number(gid) }
}

/** Whether the user may walk down to `folder`; under a closed home folder (mode 0700) it may not. */
export function canReach(identity: Identity, folder: string): boolean {
  const parent = dirname(folder)
  if (parent === folder) return true
  return canEnter(identity, parent) && canReach(identity, parent)
}

function canEnter(identity: Identity, folder: string): boolean {
  const { mode, uid, gid } = statSync(folder)
  if (uid === identity.uid) return (mode & 0o100) !== 0
  if (gid === identity.gid) return (mode & 0o010) !== 0
  return (mode & 0o001) !== 0
}
