/** Demonstrations, their trials and runs, as rows. */
import type { DemonstrationRow, SaveTrial } from '../../../shared/schemas/demonstration.ts'
import type { Db } from '../database.ts'
import { DemonstrationEntity, TrialEntity } from '../entities/plan.ts'

export interface DemonstrationFilter {
  from: string | null
  to: string | null
  /** Only this person's. */
  demonstratorId: string | null
  /** `heldOn|id` of the last row seen. */
  after: string | null
}

const PAGE = 200

/** Newest first. */
export async function listDemonstrations(db: Db, filter: DemonstrationFilter): Promise<DemonstrationRow[]> {
  const [afterDate = null, afterId = null] = filter.after?.split('|') ?? []
  return db.query(
    `SELECT d.id, d.held_on AS "heldOn",
       json_build_object('id', p.id, 'number', p.number, 'name', p.name, 'district', p.district) AS place,
       json_build_object('id', u.id, 'number', u.number, 'name', u.name) AS demonstrator,
       (SELECT count(*)::int FROM trials t WHERE t.demonstration_id = d.id) AS trials,
       (SELECT count(*)::int FROM trials t JOIN runs r ON r.trial_id = t.id WHERE t.demonstration_id = d.id) AS runs,
       (SELECT count(*)::int FROM trials t JOIN runs r ON r.trial_id = t.id JOIN sheets s ON s.run_id = r.id
         WHERE t.demonstration_id = d.id AND s.arrived_at IS NOT NULL) AS "sheetsArrived",
       (SELECT count(DISTINCT e.number)::int FROM trials t JOIN runs r ON r.trial_id = t.id JOIN sheets s ON s.run_id = r.id
         JOIN records e ON e.sheet_id = s.id WHERE t.demonstration_id = d.id) AS records
     FROM demonstrations d JOIN places p ON p.id = d.place_id JOIN users u ON u.id = d.demonstrator_id
     WHERE ($1::date IS NULL OR d.held_on >= $1) AND ($2::date IS NULL OR d.held_on <= $2)
       AND ($3::uuid IS NULL OR d.demonstrator_id = $3)
       AND ($4::date IS NULL OR (d.held_on, d.id) < ($4::date, $5::uuid))
     ORDER BY d.held_on DESC, d.id DESC LIMIT ${PAGE}`,
    [filter.from, filter.to, filter.demonstratorId, afterDate, afterId],
  )
}

export interface PlannedDay {
  heldOn: string
  placeId: string
  demonstratorId: string
  driver: string
}

export async function findDemonstrationRow(db: Db, id: string): Promise<DemonstrationEntity | null> {
  return db.findOneBy(DemonstrationEntity, { id })
}

export async function addDemonstration(db: Db, day: PlannedDay & { farmerId: string }): Promise<string> {
  return (await db.save(db.create(DemonstrationEntity, { ...day, version: 1 }))).id
}

/** Writes only over the version named; returns whether it still was that one. */
export async function changeDemonstration(
  db: Db,
  at: { id: string; version: number },
  day: Partial<PlannedDay> & { farmerId?: string | null },
): Promise<boolean> {
  const result = await db.update(DemonstrationEntity, at, { ...day, version: at.version + 1 })
  return result.affected === 1
}

type TrialFacts = Omit<SaveTrial, 'runs'>

export async function addTrial(db: Db, demonstrationId: string, position: number, trial: TrialFacts): Promise<string> {
  const { tractorId, implementId, kitId, plot } = trial
  return (await db.save(db.create(TrialEntity, { demonstrationId, position, tractorId, implementId, kitId, plot }))).id
}

export async function changeTrial(db: Db, id: string, trial: TrialFacts): Promise<void> {
  const { tractorId, implementId, kitId, plot } = trial
  await db.update(TrialEntity, { id }, { tractorId, implementId, kitId, plot })
}

export async function removeTrial(db: Db, id: string): Promise<void> {
  await db.delete(TrialEntity, { id })
}
