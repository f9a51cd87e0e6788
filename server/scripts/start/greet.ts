import type { Settings } from '../../config.ts'
import { say } from './say.ts'
import type { Season } from './season.ts'

/** Prints where to go and as whom. */
export async function greet(started: {
  settings: Settings
  season: Season | null
  dataFolder: string
  databaseUrl: string
}): Promise<void> {
  const { settings, season, dataFolder } = started
  say('')
  say(`  Sheafbook: ${settings.publicUrl}`)
  for (const line of signInLines(season)) say(`  ${line}`)
  say(`  Mails sent are kept in ${dataFolder}/mail; logs are ${dataFolder}/server.log and worker.log.`)
  say('')
}

function signInLines(season: Season | null): string[] {
  if (season === null || season.signIns.length === 0) return []
  const width = Math.max(...season.signIns.map(({ role }) => role.length))
  const email = Math.max(...season.signIns.map((signIn) => signIn.email.length))
  return [
    'Sign in to the demo season as',
    ...season.signIns.map((one) => `  ${one.role.padEnd(width)}  ${one.email.padEnd(email)}  ${one.password}`),
  ]
}
