/**
 * `npm run bench:export -- [READINGS]`: what it costs to hand over 100,000 readings (with the figures made from them) in each
 * format, beside what the database alone needs for the same lines (COPY TO, thrown away), in the same run. Its own database.
 */
import { setTimeout as pause } from 'node:timers/promises'
import { type DataSource, openDatabase } from '../../server/db/database.ts'
import { migrate } from '../../server/db/migrate.ts'
import { recordTable, valueTable } from '../../server/features/downloads/tables.ts'
import { APP_ROLE, OWNER_ROLE, prepareDatabase, prepareRoles, withClient } from '../../server/postgres/roles.ts'
import { startThrowAway } from '../../server/postgres/throw-away.ts'
import type { Pieces, Table } from '../../server/print/table.ts'
import { csvOf } from '../../server/print/table-csv.ts'
import { parquetOf } from '../../server/print/table-parquet.ts'
import { xlsxOf } from '../../server/print/table-xlsx.ts'
import { judgeSheet } from '../../shared/checks/judge-sheet.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import { buildReadings } from '../builders/readings.ts'
import { readingsOf } from '../builders/sheet.ts'
import { createUser } from '../builders/user.ts'

const PASSWORD = 'for-measuring-only'
const NAME = 'bench_export'
const MB = 1_000_000

/** The golden sheet again and again; each reading carries candidates, as one read from ink does. */
async function fill(source: DataSource, wanted: number): Promise<{ records: number; readings: number; lines: number }> {
  const values = buildReadings()
  const readings = readingsOf(values).map((r) => ({
    ...r,
    origin: 'ink',
    pageId: '5e0b5c2e-0000-4000-8000-000000000001',
    settlement: null,
    settledBy: null,
    settledAt: null,
    why: null,
    readValue: r.value,
    candidates: [0.97, 0.02, 0.01].map((p) => ({ value: r.value, p, ink: p })),
  }))
  const { results } = judgeSheet(tillage1, values, {})
  const records = Math.ceil(wanted / readings.length)
  const { id } = await createUser(source.manager)
  await source.query(
    `WITH made AS (
       INSERT INTO sheets (code, layout_key, layout_version, state, owner_id)
       SELECT 'AAAAAAAAAAA', 'tillage', 1, 'entered', $1 FROM generate_series(1, $2) RETURNING id)
     INSERT INTO records (number, version, sheet_id, state, trial_date, readings, results, facts, rules_version, formula_version, entered_by)
     SELECT row_number() OVER (), 1, id, 'entered', '2026-10-14', $3, $4, '{}', '1', '1', $1 FROM made`,
    [id, records, JSON.stringify(readings), JSON.stringify(results)],
  )
  const personal = tillage1.cells.filter((c) => 'personal' in c && c.personal && readings.some((r) => r.key === c.key)).length
  return {
    records,
    readings: records * readings.length,
    lines: records * (readings.length - personal + Object.keys(results).length),
  }
}

/** The same lines written by the database and thrown away: nothing of ours can be quicker. */
const FLOOR = `COPY (
  SELECT rec.number, rec.version, rec.state, s.code, rec.trial_date, line.* FROM records rec JOIN sheets s ON s.id = rec.sheet_id, LATERAL (
    SELECT r->>'key', r->>'value', r->>'unit', r->>'origin' FROM jsonb_array_elements(rec.readings) r
    UNION ALL SELECT f.key, f.value->>'value', f.value->>'unit', f.value->>'U' FROM jsonb_each(rec.results) f) line
  ORDER BY rec.number DESC) TO '/dev/null' WITH (FORMAT csv)`

async function measure(name: string, pieces: Pieces): Promise<void> {
  global.gc?.()
  const rss = process.memoryUsage.rss()
  let most = rss
  const watch = setInterval(() => {
    most = Math.max(most, process.memoryUsage.rss())
  }, 100)
  const cpu = process.cpuUsage()
  const start = performance.now()
  let first: number | undefined
  let bytes = 0
  for await (const piece of pieces) {
    first ??= performance.now() - start
    bytes += piece.length
    // A socket takes its piece in a later turn.
    await pause(0)
  }
  const wall_s = (performance.now() - start) / 1000
  const { user, system } = process.cpuUsage(cpu)
  clearInterval(watch)
  const figures = [
    `${wall_s.toFixed(2)} s`,
    `cpu ${((user + system) / 1e6).toFixed(2)} s`,
    `first byte ${(first ?? 0).toFixed(0)} ms`,
    `${(bytes / MB).toFixed(1)} MB`,
    `memory +${((most - rss) / MB).toFixed(0)} MB`,
  ]
  process.stdout.write(`${name.padEnd(16)} ${figures.map((f) => f.padEnd(18)).join('')}\n`)
}

async function run(wanted: number): Promise<void> {
  const cluster = await startThrowAway()
  const url = (user: string) =>
    Object.assign(new URL(cluster.adminUrl), { pathname: `/${NAME}`, username: user, password: PASSWORD }).href
  const adminUrl = Object.assign(new URL(cluster.adminUrl), { pathname: `/${NAME}` }).href
  try {
    await withClient(cluster.adminUrl, async (admin) => {
      await prepareRoles(admin, { owner: PASSWORD, app: PASSWORD })
      await prepareDatabase(admin, NAME, adminUrl)
    })
    await migrate(url(OWNER_ROLE))
    const source = await openDatabase(url(APP_ROLE), { poolSize: 2 })
    const filled = await fill(source, wanted)
    process.stdout.write(`${filled.readings} readings of ${filled.records} records, ${filled.lines} lines with their figures\n`)
    const deps = { source, settings: { publicUrl: 'http://localhost:4180' } as never }
    const long = (): Table => valueTable(deps, {})
    await measure('warming up', csvOf(long()))
    const start = performance.now()
    await withClient(adminUrl, (admin) => admin.query(FLOOR))
    process.stdout.write(`${'COPY TO nowhere'.padEnd(16)} ${((performance.now() - start) / 1000).toFixed(2)} s\n`)
    await measure('long CSV', csvOf(long()))
    await measure('long Parquet', parquetOf(long()))
    await measure('long XLSX', xlsxOf([long()]))
    await measure('wide CSV', csvOf(recordTable(deps, {})))
    await source.destroy()
  } finally {
    await cluster.stop()
  }
}

await run(Number(process.argv[2] ?? 100_000))
