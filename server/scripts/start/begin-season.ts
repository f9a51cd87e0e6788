import { existsSync, rmSync } from 'node:fs'
import { resolve } from 'node:path'
import { pathToFileURL } from 'node:url'
import type { Settings } from '../../config.ts'
import { createFileStore, type FileStore } from '../../storage/store.ts'
import type { Database } from './database.ts'
import { migrateFor } from './migrate-for.ts'
import { say, step } from './say.ts'
import { type DemoSignIn, findSeason, keepSeason, type Season } from './season.ts'

/** What loads the demo season: rows through the application's own services, files into the store. */
interface DemoModule {
  loadDemoSeason(target: { databaseUrl: string; store: FileStore; say: (line: string) => void }): Promise<DemoSignIn[]>
}

/**
 * Migrates, and on the first start of a private installation loads the demo season (or notes that it begins empty).
 * A load that was broken off is thrown away whole: nobody has worked in it yet.
 */
export async function beginSeason(
  database: Database,
  settings: Settings,
  options: { dataFolder: string; empty: boolean },
): Promise<Season | null> {
  const { dataFolder } = options
  const found = findSeason(dataFolder)
  if (found?.loaded === false) {
    say('The demo season was broken off while loading; it is loaded anew.')
    await database.private?.remake()
    if (settings.store.kind === 'folder') rmSync(settings.store.dir, { recursive: true, force: true })
  }
  if (database.ownerUrl === undefined) say('MIGRATE_DATABASE_URL is not set: the database is taken to be up to date.')
  else await migrateFor(database.ownerUrl, database.appUrl)
  if (database.private === undefined) return null
  if (found?.loaded === true) {
    if (options.empty && found.kind === 'demo')
      say(`--empty comes too late: this folder holds the demo season. Remove ${dataFolder} to begin empty.`)
    return found
  }
  const season = options.empty
    ? { kind: 'empty' as const, loaded: true, signIns: [] }
    : await loadDemo(database.appUrl, settings, dataFolder)
  keepSeason(dataFolder, season)
  return season
}

async function loadDemo(databaseUrl: string, settings: Settings, dataFolder: string): Promise<Season> {
  const file = resolve('server/demo/load.ts')
  if (!existsSync(file)) return { kind: 'demo', loaded: true, signIns: [] }
  keepSeason(dataFolder, { kind: 'demo', loaded: false, signIns: [] })
  const { loadDemoSeason } = (await import(pathToFileURL(file).href)) as DemoModule
  const store = createFileStore(settings.store)
  const signIns = await step('Loading the demo season (first start only)', () => loadDemoSeason({ databaseUrl, store, say }))
  return { kind: 'demo', loaded: true, signIns }
}
