/**
 * The demo season: an invented region, maker and team. Its sheets come in through the upload door and are read by a real
 * worker; its clerk settles and enters as a person would. Nothing here is shown that the product did not make itself.
 */
import { createHash } from 'node:crypto'
import { readFile } from 'node:fs/promises'
import { basename } from 'node:path'
import type { Upload } from '../../shared/schemas/upload.ts'
import type { User } from '../../shared/schemas/user.ts'
import type { Settings } from '../config.ts'
import { openDatabase } from '../db/database.ts'
import { createBoss } from '../db/queue.ts'
import { listSent, takeFiles } from '../features/uploads/uploads.service.ts'
import type { Deps } from '../http/route.ts'
import type { FileStore } from '../storage/store.ts'
import { enterSettled, sendBackBlanks, settleByPaper } from './demo-clerk.ts'
import { addPeople, fillRegisters, type People, planRuns } from './plan-season.ts'
import { listSampleFiles, readSampleSheets, sampleRuns } from './sample-sheets.ts'
import { HALVED_RUNS, ROW_RUNS, runsToCome, TROUBLE_RUNS } from './season.ts'

export interface DemoSignIn {
  role: string
  email: string
  password: string
}

export interface DemoTarget {
  settings: Settings
  store: FileStore
  /** Starts a worker that reads what is sent in, and stops it again. */
  startWorker: () => { stop(): Promise<void> }
  say: (line: string) => void
}

/** One password for all of them, since it stands on the screen; long as any. */
export const DEMO_PASSWORD = 'three sheaves by the ditch'
const SEASON_ROWS = ['halves', 'rows', 'trouble'].map((name) => `samples/season/${name}.csv`)
const READ_WITHIN_MS = 240_000

export async function loadDemoSeason({ settings, store, startWorker, say }: DemoTarget): Promise<DemoSignIn[]> {
  const source = await openDatabase(settings.databaseUrl, { poolSize: 4 })
  const boss = createBoss(settings.databaseUrl)
  boss.on('error', () => undefined)
  await boss.start()
  const worker = startWorker()
  const deps: Deps = { source, boss, files: store, settings }
  try {
    const people = await addPeople(deps, DEMO_PASSWORD)
    const ids = await fillRegisters(deps, people.get(401)!)
    const samples = await readSampleSheets()
    const rowRuns = [...HALVED_RUNS, ...ROW_RUNS, ...TROUBLE_RUNS]
    await planRuns(deps, people, ids, [...rowRuns, ...sampleRuns(samples), ...runsToCome(new Date())])
    await sendIn(deps, people, [...SEASON_ROWS, ...(await listSampleFiles())], say)
    const clerk = people.get(201)!
    await settleByPaper(deps, clerk, samples)
    await sendBackBlanks(deps, clerk, samples)
    say(`   ${await enterSettled(deps, clerk)} records entered`)
    return signIns(people)
  } finally {
    await worker.stop()
    await boss.stop({ graceful: false, wait: true })
    await source.destroy()
  }
}

async function sendIn(deps: Deps, people: People, files: readonly string[], say: (line: string) => void): Promise<void> {
  const sender = people.get(101)!
  for (const path of files) {
    const bytes = await readFile(path)
    const file = { fileName: basename(path), path, bytes: bytes.length, sha256: createHash('sha256').update(bytes).digest('hex') }
    await takeFiles(deps, { actor: path.endsWith('.csv') ? people.get(202)! : sender, forSheetId: null }, [file])
  }
  const all = await whenRead(deps, people.get(401)!, files.length, say)
  const refused = all.filter((u) => u.state === 'not accepted')
  if (refused.length > 0)
    throw new Error(
      `the demo season has files that are not accepted: ${refused.map((u) => `${u.fileName}: ${u.reason}`).join('; ')}`,
    )
}

async function whenRead(deps: Deps, admin: User, files: number, say: (line: string) => void): Promise<Upload[]> {
  const deadline = Date.now() + READ_WITHIN_MS
  let told = 0
  for (;;) {
    const all = await listSent(deps, admin)
    const done = all.filter((u) => u.state === 'done' || u.state === 'not accepted').length
    if (done >= told + 5 || (done === files && told !== done)) {
      say(`   read ${done} of ${files} files`)
      told = done
    }
    if (done === files) return all
    if (Date.now() > deadline) throw new Error(`only ${done} of ${files} files of the demo season were read in time`)
    await new Promise((resolve) => setTimeout(resolve, 250))
  }
}

const signIns = (people: People): DemoSignIn[] =>
  [101, 201, 301, 401].map((number) => {
    const { role, email } = people.get(number)!
    return { role, email, password: DEMO_PASSWORD }
  })
