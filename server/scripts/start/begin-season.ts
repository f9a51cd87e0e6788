import { rmSync } from 'node:fs'
import type { Settings } from '../../config.ts'
import { createFileStore } from '../../storage/store.ts'
import type { Database } from './database.ts'
import { migrateFor } from './migrate-for.ts'
import { say, step } from './say.ts'
import { findSeason, keepSeason, type Season } from './season.ts'

/** How a season begins. */
interface SeasonStart {
  dataFolder: string
  /** Begin without the demo season. */
  empty: boolean
  /** Starts a worker: the demo season's sheets are read like anybody's. */
  startWorker: () => { stop(): Promise<void> }
}

/**
 * Migrates, and on the first start of a private installation loads the demo season (or notes that it begins empty).
 * A load that was broken off is thrown away whole: nobody has worked in it yet.
 */
export async function beginSeason(database: Database, settings: Settings, start: SeasonStart): Promise<Season | null> {
  const { dataFolder, empty } = start
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
    if (empty && found.kind === 'demo')
      say(`--empty comes too late: this folder holds the demo season. Remove ${dataFolder} to begin empty.`)
    return found
  }
  const season = empty ? { kind: 'empty' as const, loaded: true, signIns: [] } : await loadDemo(settings, start)
  keepSeason(dataFolder, season)
  return season
}

async function loadDemo(settings: Settings, start: SeasonStart): Promise<Season> {
  keepSeason(start.dataFolder, { kind: 'demo', loaded: false, signIns: [] })
  const { loadDemoSeason } = await import('../../demo/load.ts')
  const { startWorker } = start
  const store = createFileStore(settings.store)
  const signIns = await step('Loading the demo season (first start only)', () =>
    loadDemoSeason({ settings, store, startWorker, say }),
  )
  return { kind: 'demo', loaded: true, signIns }
}
