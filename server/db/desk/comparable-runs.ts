/** The runs of the trial book as a comparison sees them: what was worked with, where, and a few figures each. */
import type { ResultValue } from '../../../shared/schemas/record.ts'
import type { Db } from '../database.ts'

interface Named {
  id: string
  number: number
  name: string
}

export interface ComparableRun {
  number: number
  state: 'entered' | 'challenged'
  trialDate: string | null
  gear: string | null
  soil: string | null
  tractor: (Named & { ptoPower_kw: number }) | null
  implement: (Named & { operation: string }) | null
  place: { name: string; district: string } | null
  /** As the plan names it; null for a sheet without a plan. */
  plot: string | null
  /** Only the figures asked for. */
  results: Record<string, Pick<ResultValue, 'value' | 'U' | 'reason'>>
  /** A person left it out of comparisons, and has not taken that back. */
  exclusion: { by: string; reason: string } | null
}

/** All runs that stand in the book, oldest day first, with the figures named by `keys`. */
export async function listComparableRuns(db: Db, keys: readonly string[]): Promise<ComparableRun[]> {
  return db.query(
    `SELECT rec.number, rec.state, rec.trial_date AS "trialDate", rec.gear, rec.soil_class AS soil,
       CASE WHEN t.id IS NOT NULL THEN jsonb_build_object('id', t.id, 'number', t.number, 'name', t.name, 'ptoPower_kw', t.pto_power_kw) END AS tractor,
       CASE WHEN i.id IS NOT NULL THEN jsonb_build_object('id', i.id, 'number', i.number, 'name', i.name, 'operation', i.operation) END AS implement,
       CASE WHEN p.id IS NOT NULL THEN jsonb_build_object('name', p.name, 'district', p.district) END AS place,
       trial.plot,
       (SELECT coalesce(jsonb_object_agg(key, jsonb_build_object('value', value->'value', 'U', value->'U', 'reason', value->'reason')), '{}')
        FROM jsonb_each(rec.results) WHERE key = ANY($1)) AS results,
       CASE WHEN ex.act = 'left out' THEN jsonb_build_object('by', u.name, 'reason', ex.reason) END AS exclusion
     FROM records rec JOIN sheets s ON s.id = rec.sheet_id
       LEFT JOIN places p ON p.id = rec.place_id LEFT JOIN tractors t ON t.id = rec.tractor_id
       LEFT JOIN implements i ON i.id = rec.implement_id
       LEFT JOIN runs run ON run.id = s.run_id LEFT JOIN trials trial ON trial.id = run.trial_id
       LEFT JOIN LATERAL (SELECT act, reason, by_id FROM exclusions WHERE record_number = rec.number ORDER BY id DESC LIMIT 1) ex ON true
       LEFT JOIN users u ON u.id = ex.by_id
     WHERE rec.state <> 'superseded'
     ORDER BY rec.trial_date NULLS LAST, rec.number`,
    [keys],
  )
}
