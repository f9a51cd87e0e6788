import type { Settings } from '../../config.ts'
import { firstAdminAddress } from './first-admin.ts'
import { say } from './say.ts'
import type { DemoSignIn, Season } from './season.ts'

/**
 * Prints where to go and as whom.
 * @param season null with a database of the user's own
 */
export async function greet(settings: Settings, season: Season | null, dataFolder: string): Promise<void> {
  const lines = season?.kind === 'demo' ? signInLines(season.signIns) : await firstAdminLines(settings)
  say('')
  say(`  Sheafbook: ${settings.publicUrl}`)
  for (const line of lines) say(`  ${line}`)
  say(`  Mails sent are kept in ${dataFolder}/mail; logs are ${dataFolder}/server.log and worker.log.`)
  say('')
}

function signInLines(signIns: DemoSignIn[]): string[] {
  if (signIns.length === 0) return []
  const role = Math.max(...signIns.map((one) => one.role.length))
  const email = Math.max(...signIns.map((one) => one.email.length))
  return [
    'Sign in to the demo season as',
    ...signIns.map((one) => `  ${one.role.padEnd(role)}  ${one.email.padEnd(email)}  ${one.password}`),
  ]
}

async function firstAdminLines(settings: Settings): Promise<string[]> {
  const address = await firstAdminAddress(settings)
  return address === null
    ? []
    : ['Nobody is registered yet. This link makes the first admin, once, within a day:', `  ${address}`]
}
