import { randomUUID } from 'node:crypto'
import type { Demonstration } from '../../shared/schemas/demonstration.ts'
import type { Entered, Sheet } from '../../shared/schemas/sheet.ts'
import type { User } from '../../shared/schemas/user.ts'
import type { Common, Holding } from '../server/access-matrix.ts'
import type { TestAgent } from '../support/agent.ts'
import type { TestServer } from '../support/server.ts'
import { preparePlan } from './demonstration.ts'
import { buildReadings } from './readings.ts'
import {
  buildImplement,
  buildKit,
  buildPlace,
  buildTractor,
  createImplement,
  createKit,
  createPlace,
  createTractor,
} from './register.ts'
import { buildOutcome, createArrivedSheet, readingsOf } from './sheet.ts'
import { createUser, TEST_PASSWORD } from './user.ts'

let day = 25

/** One of everything a demonstrator can hold: a plan, a printed sheet, a sheet at the desk with its file and picture, a record. */
export async function createHolding(server: TestServer, holder: TestAgent & { user: User }, clerk: TestAgent): Promise<Holding> {
  const { source, files } = server.deps
  const plan = await preparePlan(source.manager, holder.user.id)
  const planned = (await holder.post('/demonstrations', plan)).body as Demonstration
  const printedSheetId = planned.trials[0]?.runs[0]?.sheetId ?? ''
  const arrive = () => {
    day -= 1
    const readings = readingsOf(buildReadings({ demonstrator_id: holder.user.number, trial_date: `2026-11-${day}` }))
    return createArrivedSheet(source, holder.user.id, buildOutcome({ readings }))
  }
  const toEnter = (await clerk.get(`/sheets/${await arrive()}`)).body as Sheet
  const entered = await clerk.post(`/sheets/${toEnter.id}/enter`, { version: toEnter.version })
  const sheetId = await arrive()
  const key = `pages/${randomUUID()}.jpg`
  await files.put(key, Buffer.from('a picture'))
  const [page]: { id: string; uploadId: string }[] = await source.query(
    'SELECT id, upload_id AS "uploadId" FROM pages WHERE sheet_id = $1',
    [sheetId],
  )
  if (!page) throw new Error('the sheet that arrived has no page')
  await source.query('UPDATE pages SET picture_key = $2 WHERE id = $1', [page.id, key])
  await source.query('UPDATE uploads SET storage_key = $2 WHERE id = $1', [page.uploadId, key])
  return {
    demonstrationId: planned.id,
    printedSheetId,
    sheetId,
    uploadId: page.uploadId,
    pageId: page.id,
    recordNumber: (entered.body as Entered).recordNumber,
    plan,
  }
}

export async function createCommon(server: TestServer): Promise<Common> {
  const db = server.deps.source.manager
  const spare = await createUser(db, { passwordHash: null })
  const { email } = await createUser(db)
  const saved = {
    places: await createPlace(db),
    tractors: await createTractor(db),
    implements: await createImplement(db),
    kits: await createKit(db),
  }
  return {
    spareUserId: spare.id,
    signIn: { email, password: TEST_PASSWORD },
    registerRow: {
      places: { id: saved.places.id, body: buildPlace() },
      tractors: { id: saved.tractors.id, body: buildTractor() },
      implements: { id: saved.implements.id, body: buildImplement() },
      kits: { id: saved.kits.id, body: buildKit() },
    },
  }
}
