import { spawn, spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { CannotStart } from '../../postgres/cannot-start.ts'

/**
 * Installs Debian packages when we may: as root, or by sudo when it asks for no password.
 * @param purpose what they are for, as the subject of "is missing"
 * @throws CannotStart with the one line a person has to run
 */
export async function installFromDebian(packages: string[], purpose: string): Promise<void> {
  const byHand = `apt-get install -y --no-install-recommends ${packages.join(' ')}`
  const prefix = rootPrefix()
  if (!existsSync('/usr/bin/apt-get'))
    throw new CannotStart(`${purpose} is missing.`, 'Install it with your system’s package manager, then start again.')
  if (prefix === null)
    throw new CannotStart(`${purpose} is missing.`, `Run "sudo apt-get update && sudo ${byHand}", then start again.`)
  // Another program may hold Debian's lock for a while; waiting for it beats failing.
  const aptGet = [...prefix, 'apt-get', '-o', 'DPkg::Lock::Timeout=500', '-qq']
  await run([...aptGet, 'update'], purpose, byHand)
  await run([...aptGet, 'install', '-y', '--no-install-recommends', ...packages], purpose, byHand)
}

/** What to put before a command to run it as root; null when we may not. */
function rootPrefix(): string[] | null {
  if (process.getuid?.() === 0) return []
  return spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0 ? ['sudo', '-n'] : null
}

function run(command: string[], purpose: string, byHand: string): Promise<void> {
  const [program = '', ...args] = command
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, {
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
      stdio: ['ignore', 'pipe', 'pipe'],
    })
    let said = ''
    for (const stream of [child.stdout, child.stderr]) {
      stream.on('data', (piece: Buffer) => {
        said = (said + piece.toString()).slice(-2_000)
      })
    }
    const failed = (why: string) =>
      reject(
        new CannotStart(
          `${purpose} is missing and could not be installed (${why}): ${said.trim()}`,
          `Try "${byHand}" by hand, then start again.`,
        ),
      )
    child.on('error', (cause) => failed(cause.message))
    child.on('close', (code) => (code === 0 ? resolve() : failed(`${command.join(' ')} ended with ${code}`)))
  })
}
