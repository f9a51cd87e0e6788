import type { Entered, Sheet } from '../../shared/schemas/sheet.ts'
import type { User } from '../../shared/schemas/user.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import type { TestAgent } from '../support/agent.ts'
import type { TestServer } from '../support/server.ts'
import { buildReadings } from './readings.ts'
import { buildOutcome, createArrivedSheet, readingsOf } from './sheet.ts'

const LAST_DAY = Date.UTC(2026, 10, 25)
let daysBack = 0

/** A golden sheet that went over the desk into the book. Each is of an earlier day than the one before: no run clashes. */
export async function createRecord(
  server: TestServer,
  clerk: TestAgent,
  demonstrator: User,
  changes: Readings = {},
): Promise<Entered & { sheetId: string }> {
  daysBack += 1
  const trial_date = new Date(LAST_DAY - daysBack * 86_400_000).toISOString().slice(0, 10)
  const readings = readingsOf(buildReadings({ demonstrator_id: demonstrator.number, trial_date, ...changes }))
  const sheetId = await createArrivedSheet(server.deps.source, demonstrator.id, buildOutcome({ readings }))
  const { version } = (await clerk.get(`/sheets/${sheetId}`)).body as Sheet
  const entered = await clerk.post(`/sheets/${sheetId}/enter`, { version })
  if (entered.status !== 200) throw new Error(`the sheet was not entered: ${entered.bytes.toString()}`)
  return { ...(entered.body as Entered), sheetId }
}
