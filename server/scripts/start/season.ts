import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { z } from 'zod'

const signInSchema = z.object({ role: z.string(), email: z.string(), password: z.string() })
const seasonSchema = z.object({ kind: z.enum(['demo', 'empty']), loaded: z.boolean(), signIns: z.array(signInSchema) })

/** Someone of the demo season, with the password printed at the start. */
export type DemoSignIn = z.infer<typeof signInSchema>
/** What a private installation began with. `loaded` is false while the demo season is on its way in. */
export type Season = z.infer<typeof seasonSchema>

const fileOf = (dataFolder: string) => join(dataFolder, 'season.json')

/** What this installation began with, or null before its first start. */
export function findSeason(dataFolder: string): Season | null {
  const file = fileOf(dataFolder)
  return existsSync(file) ? seasonSchema.parse(JSON.parse(readFileSync(file, 'utf8'))) : null
}

export function keepSeason(dataFolder: string, season: Season): void {
  writeFileSync(fileOf(dataFolder), `${JSON.stringify(season, null, 2)}\n`, { mode: 0o600 })
}
