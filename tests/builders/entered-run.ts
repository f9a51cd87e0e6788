import type { Entered, Sheet } from '../../shared/schemas/sheet.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import type { TestAgent } from '../support/agent.ts'
import type { TestServer } from '../support/server.ts'
import { buildReadings } from './readings.ts'
import { buildOutcome, createArrivedSheet, readingsOf } from './sheet.ts'

/** What the golden run shows when it burns this much on its 2700 m²: the jar, and what stands by hand beside it. */
export function burning(fuel_ml: number): Readings {
  return { jar_end_ml: 5800 - fuel_ml, fuel_used_written_ml: fuel_ml, l_per_ha_written: Number((fuel_ml / 270).toFixed(2)) }
}

interface Run {
  sender: string
  /** Changes to the golden sheet. */
  readings: Readings
  /** Of a sheet printed for a plan. */
  sheetCode?: string
}

/** A golden run with changes, read, its doubts let stand by the clerk, and entered; answers its record's number. */
export async function enterRun(server: TestServer, clerk: TestAgent, { sender, readings, sheetCode }: Run): Promise<number> {
  const planned = sheetCode === undefined ? {} : { sheetCode, planned: true }
  const outcome = buildOutcome({ readings: readingsOf(buildReadings(readings)), ...planned })
  const id = await createArrivedSheet(server.deps.source, sender, outcome)
  const sheetNow = async () => (await clerk.get(`/sheets/${id}`)).body as Sheet
  for (const doubt of (await sheetNow()).doubts.filter((d) => d.severity !== 'note')) {
    const { version } = await sheetNow()
    const settled = await clerk.post(`/sheets/${id}/settle-doubt`, { version, doubtId: doubt.id, why: 'the ink says so' })
    if (settled.status !== 200) throw new Error(`${doubt.text}: ${JSON.stringify(settled.body)}`)
  }
  const entered = await clerk.post(`/sheets/${id}/enter`, { version: (await sheetNow()).version })
  if (entered.status !== 200) throw new Error(JSON.stringify([entered.body, (await sheetNow()).doubts]))
  return (entered.body as Entered).recordNumber
}
