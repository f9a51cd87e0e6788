/** Local units of land, as people confirmed them. Rows are added and withdrawn; none is changed. */
import type { LandUnitRow, SaveLandUnit } from '../../../shared/schemas/land-unit.ts'
import type { LandUnit } from '../../../shared/trial/facts.ts'
import type { Db } from '../database.ts'
import { orConflict } from '../driver-errors.ts'

const COLUMNS = `l.id, l.name, l.district, l.size_m2, l.source, u.name AS "confirmedBy", l.confirmed_at AS "confirmedAt"`
const TAKEN = { land_units_once: { path: 'name', message: 'This unit is confirmed for this district already.' } }

type Row = Omit<LandUnitRow, 'confirmedAt'> & { confirmedAt: Date }

export async function listLandUnits(db: Db): Promise<LandUnitRow[]> {
  const rows: Row[] = await db.query(
    `SELECT ${COLUMNS} FROM land_units l JOIN users u ON u.id = l.confirmed_by WHERE l.withdrawn_at IS NULL ORDER BY l.district, l.name`,
  )
  return rows.map((row) => ({ ...row, confirmedAt: row.confirmedAt.toISOString() }))
}

/** As the formulas take them. */
export async function landUnitsOf(db: Db, district: string): Promise<LandUnit[]> {
  const units = (await listLandUnits(db)).filter((unit) => unit.district.toLowerCase() === district.toLowerCase())
  return units.map(({ name, size_m2, confirmedBy, confirmedAt }) => ({
    name,
    size_m2,
    confirmedBy,
    confirmedOn: confirmedAt.slice(0, 10),
  }))
}

/** @throws UserError `conflict` when the district has this unit */
export async function addLandUnit(db: Db, unit: SaveLandUnit, by: string): Promise<LandUnitRow> {
  const write = db.query(
    'INSERT INTO land_units (name, district, size_m2, source, confirmed_by) VALUES ($1, $2, $3, $4, $5) RETURNING id',
    [unit.name, unit.district, unit.size_m2, unit.source, by],
  ) as Promise<Array<{ id: string }>>
  const [added] = await orConflict(write, TAKEN)
  return (await listLandUnits(db)).find((row) => row.id === added!.id)!
}

/** @returns the unit that was withdrawn; null when there is none standing */
export async function withdrawLandUnit(db: Db, id: string, by: string): Promise<LandUnitRow | null> {
  const row = (await listLandUnits(db)).find((unit) => unit.id === id)
  if (!row) return null
  await db.query('UPDATE land_units SET withdrawn_by = $2, withdrawn_at = now() WHERE id = $1', [id, by])
  return row
}
