/** Limits an office set otherwise, version by version; and what became of what the rules found. */
import type { SettingsVersion } from '../../../shared/schemas/rules.ts'
import type { Db } from '../database.ts'

export type LimitValues = Record<string, number>

/** The limits in force; version 0 is what the product ships with. */
export async function currentLimits(db: Db): Promise<{ version: number; limits: LimitValues }> {
  const rows: Array<{ version: number; limits: LimitValues }> = await db.query(
    'SELECT version, limits FROM limit_settings ORDER BY version DESC LIMIT 1',
  )
  return rows[0] ?? { version: 0, limits: {} }
}

export async function listLimitVersions(db: Db): Promise<SettingsVersion[]> {
  const rows: Array<Omit<SettingsVersion, 'setAt'> & { setAt: Date }> = await db.query(
    `SELECT s.version, s.why, u.name AS "setBy", s.set_at AS "setAt" FROM limit_settings s JOIN users u ON u.id = s.set_by
     ORDER BY s.version DESC`,
  )
  return rows.map((row) => ({ ...row, setAt: row.setAt.toISOString() }))
}

/** Adds the next version. Two writers on one version meet at the primary key: one of them is told. */
export async function addLimitVersion(
  db: Db,
  next: { version: number; limits: LimitValues; why: string; by: string },
): Promise<boolean> {
  const rows: unknown[] = await db.query(
    `INSERT INTO limit_settings (version, limits, why, set_by) VALUES ($1, $2, $3, $4) ON CONFLICT DO NOTHING RETURNING version`,
    [next.version, JSON.stringify(next.limits), next.why, next.by],
  )
  return rows.length === 1
}

/** Sheets whose doubts follow from the limits: read, and not in the book yet. */
export async function listOpenSheets(db: Db): Promise<string[]> {
  const rows: Array<{ id: string }> = await db.query(
    `SELECT id FROM sheets WHERE state IN ('arrived', 'waiting', 'settled') ORDER BY arrived_at, id`,
  )
  return rows.map((row) => row.id)
}

export interface RuleCount {
  rule: string
  fired: number
  right: number
  letStand: number
  open: number
}

/**
 * A doubt was right where a cell it named was corrected or its sheet was sent back, and was not where a person let it stand.
 * Notes wait for nobody: they only count as fired.
 */
export const countFindings = (db: Db): Promise<RuleCount[]> =>
  db.query(`
    WITH found AS (
      SELECT d.rule, d.severity, d.settled_at IS NOT NULL AS let_stand, d.standing, s.state = 'sent back' AS sent_back,
        EXISTS (SELECT FROM readings r WHERE r.sheet_id = d.sheet_id AND r.key = ANY (d.cells) AND r.settlement = 'corrected') AS corrected
      FROM doubts d JOIN sheets s ON s.id = d.sheet_id)
    SELECT rule, count(*) AS fired,
      count(*) FILTER (WHERE severity <> 'note' AND NOT let_stand AND (sent_back OR (corrected AND NOT standing))) AS "right",
      count(*) FILTER (WHERE severity <> 'note' AND let_stand) AS "letStand",
      count(*) FILTER (WHERE severity <> 'note' AND NOT let_stand AND standing AND NOT sent_back) AS open
    FROM found GROUP BY rule`)
