/** The four registers of things; they differ in their columns only. */
import { UserError } from '../../../shared/errors.ts'
import type { RegisterName, RegisterRows } from '../../../shared/schemas/register.ts'
import type { Db } from '../database.ts'
import { orConflict } from '../driver-errors.ts'
import { ImplementEntity, KitEntity, PlaceEntity, TractorEntity } from '../entities/register.ts'

export type RegisterRow = RegisterRows[RegisterName]
/** A row as it is saved: without what the database adds. */
export type RegisterInput = Record<string, unknown>

const ENTITIES = { places: PlaceEntity, tractors: TractorEntity, implements: ImplementEntity, kits: KitEntity } as const

const number = { path: 'number', message: 'This number is taken.' }
const TAKEN = {
  places_number_key: number,
  tractors_number_key: number,
  implements_number_key: number,
  kits_number_key: number,
  tractors_serial_key: { path: 'serial', message: 'A tractor with this serial number is in the register.' },
}

const tableOf = (db: Db, name: RegisterName) => db.getRepository<RegisterRow>(ENTITIES[name])

export async function listRegister<N extends RegisterName>(db: Db, name: N): Promise<RegisterRows[N][]> {
  const rows = await tableOf(db, name).find({ order: { number: 'ASC' } })
  return rows.map((row) => ({ ...row })) as RegisterRows[N][]
}

export async function findRegisterRow(db: Db, name: RegisterName, id: string): Promise<RegisterRow | null> {
  const row = await tableOf(db, name).findOneBy({ id })
  return row && { ...row }
}

/** @throws UserError `not_found` */
export async function getRegisterRow(db: Db, name: RegisterName, id: string): Promise<RegisterRow> {
  const row = await findRegisterRow(db, name, id)
  if (!row) throw new UserError('not_found', `The register of ${name} has no such row.`)
  return row
}

/** @throws UserError `conflict` when the number is taken */
export async function addRegisterRow(db: Db, name: RegisterName, input: RegisterInput): Promise<RegisterRow> {
  const saved = await orConflict(tableOf(db, name).save({ ...input, version: 1 } as RegisterRow), TAKEN)
  return getRegisterRow(db, name, saved.id)
}

/**
 * Writes only over the version the input was made on.
 * @returns whether it was still that version
 * @throws UserError `conflict` when the number is taken
 */
export async function changeRegisterRow(
  db: Db,
  name: RegisterName,
  at: { id: string; version: number },
  input: RegisterInput,
): Promise<boolean> {
  const write = tableOf(db, name).update({ id: at.id, version: at.version }, { ...input, version: at.version + 1 })
  return (await orConflict(write, TAKEN)).affected === 1
}
