import type { z } from 'zod'
import type { farmerSchema } from '../../../shared/schemas/demonstration.ts'
import type { Db } from '../database.ts'
import { FarmerEntity } from '../entities/farmer.ts'

type Farmer = z.infer<typeof farmerSchema>

export async function addFarmer(db: Db, farmer: Farmer): Promise<string> {
  return (await db.save(db.create(FarmerEntity, farmer))).id
}

export async function changeFarmer(db: Db, id: string, farmer: Farmer): Promise<void> {
  await db.update(FarmerEntity, { id }, farmer)
}

export async function findFarmer(db: Db, id: string): Promise<Farmer | null> {
  const row = await db.findOneBy(FarmerEntity, { id })
  return row && { name: row.name, phone: row.phone, email: row.email }
}

/** The demonstrations that named them keep standing, without a name. */
export async function removeFarmer(db: Db, id: string): Promise<void> {
  await db.delete(FarmerEntity, { id })
}
