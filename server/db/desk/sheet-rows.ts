/** Sheets as lists show them: with the names behind their numbers. */
import type { ListSheets, SheetRow, SheetState } from '../../../shared/schemas/sheet.ts'
import type { Db } from '../database.ts'
import { ofPerson } from '../repositories/sheet-people.ts'

interface Row {
  id: string
  code: string | null
  fileName: string | null
  state: SheetState
  layout: string | null
  origin: SheetRow['origin']
  arrivedAt: Date | null
  demonstrator: string | null
  place: string | null
  tractor: string | null
  implement: string | null
  trialDate: string | null
  runNumber: number | null
  openDoubts: number
  stops: number
  why: string | null
  heldBy: string | null
  heldName: string | null
  heldSince: Date | null
  recordNumber: number | null
  version: number
  sentBackReason: string | null
  answered: boolean
}

/** The number on the sheet wins over the plan: a clerk may have corrected it. */
const named = (table: string, key: string, alias: string) =>
  `LEFT JOIN readings r_${alias} ON r_${alias}.sheet_id = s.id AND r_${alias}.key = '${key}'
   LEFT JOIN ${table} ${alias} ON to_jsonb(${alias}.number) = r_${alias}.value`

const SELECT = `
SELECT s.id, s.code, CASE WHEN s.code IS NULL THEN
    (SELECT u.file_name FROM pages pg JOIN uploads u ON u.id = pg.upload_id WHERE pg.sheet_id = s.id ORDER BY u.received_at, pg.number LIMIT 1)
  END AS "fileName", s.state, s.layout_key AS layout, s.origin, s.arrived_at AS "arrivedAt",
  coalesce(d.name, o.name) AS demonstrator, coalesce(p.name, pp.name) AS place, coalesce(t.name, pt.name) AS tractor,
  coalesce(i.name, pi.name) AS implement, coalesce(rd.value #>> '{}', pd.held_on::text) AS "trialDate", run.number AS "runNumber",
  s.open_doubts AS "openDoubts", s.stops,
  CASE WHEN s.state = 'challenged' THEN coalesce(s.reason, s.first_doubt) ELSE coalesce(s.first_doubt, s.reason) END AS why,
  s.sent_back_reason AS "sentBackReason", s.answered,
  CASE WHEN s.held_until > now() THEN s.held_by END AS "heldBy", h.name AS "heldName", s.held_since AS "heldSince",
  (SELECT max(number) FROM records WHERE sheet_id = s.id) AS "recordNumber", s.version
FROM sheets s
  ${named('users', 'demonstrator_id', 'd')} ${named('places', 'place_id', 'p')} ${named('tractors', 'tractor_id', 't')}
  ${named('implements', 'implement_id', 'i')}
  LEFT JOIN readings rd ON rd.sheet_id = s.id AND rd.key = 'trial_date'
  LEFT JOIN users o ON o.id = s.owner_id LEFT JOIN users h ON h.id = s.held_by
  LEFT JOIN runs run ON run.id = s.run_id LEFT JOIN trials trial ON trial.id = run.trial_id
  LEFT JOIN demonstrations pd ON pd.id = trial.demonstration_id LEFT JOIN places pp ON pp.id = pd.place_id
  LEFT JOIN tractors pt ON pt.id = trial.tractor_id LEFT JOIN implements pi ON pi.id = trial.implement_id`

const DESK_STATES: readonly SheetState[] = ['waiting', 'settled', 'challenged', 'unreadable']
const PAGE = 200

/** Oldest first for the desk, newest first elsewhere; `after` is "arrivedAt|id" of the last row seen. */
export async function listSheetRows(
  db: Db,
  filter: ListSheets & { demonstratorId?: string },
): Promise<{ rows: SheetRow[]; next: string | null }> {
  const values: unknown[] = []
  const bind = (value: unknown) => `$${values.push(value)}`
  const where = ["s.state <> 'printed'"]
  if (filter.demonstratorId) where.push(ofPerson(bind(filter.demonstratorId)))
  if (filter.state) where.push(`s.state = ${bind(filter.state)}`)
  if (filter.desk) where.push(`s.state = ANY(${bind([...DESK_STATES])})`)
  if (filter.search) {
    const like = bind(`%${filter.search.replace(/[\\%_]/g, '\\$&')}%`)
    const code = bind(`%${filter.search.toUpperCase().replace(/[^0-9A-Z]/g, '')}%`)
    where.push(`(s.code LIKE ${code} OR p.name ILIKE ${like} OR t.name ILIKE ${like} OR coalesce(d.name, o.name) ILIKE ${like})`)
  }
  const [at, id] = filter.after?.split('|') ?? []
  const order = filter.desk ? 'ASC' : 'DESC'
  if (at && id) where.push(`(s.arrived_at, s.id) ${filter.desk ? '>' : '<'} (${bind(at)}::timestamptz, ${bind(id)}::uuid)`)
  const rows: Row[] = await db.query(
    `${SELECT} WHERE ${where.join(' AND ')} ORDER BY s.arrived_at ${order} NULLS LAST, s.id ${order} LIMIT ${PAGE + 1}`,
    values,
  )
  const page = rows.slice(0, PAGE)
  const last = page.at(-1)
  return {
    rows: page.map(toRow),
    next: rows.length > PAGE && last?.arrivedAt ? `${last.arrivedAt.toISOString()}|${last.id}` : null,
  }
}

export async function findSheetRow(db: Db, id: string): Promise<(SheetRow & { sentBackReason: string | null }) | null> {
  const rows: Row[] = await db.query(`${SELECT} WHERE s.id = $1`, [id])
  const row = rows[0]
  return row ? { ...toRow(row), sentBackReason: row.sentBackReason } : null
}

function toRow(row: Row): SheetRow {
  const { heldBy, heldName, heldSince, arrivedAt, sentBackReason, ...same } = row
  return {
    ...same,
    why: row.state === 'sent back' ? sentBackReason : row.why,
    arrivedAt: arrivedAt?.toISOString() ?? null,
    inHand: heldBy ? { userId: heldBy, name: heldName ?? '', since: (heldSince ?? new Date(0)).toISOString() } : null,
  }
}
