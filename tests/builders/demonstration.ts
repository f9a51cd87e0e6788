import type { Db } from '../../server/db/database.ts'
import type { SaveDemonstration } from '../../shared/schemas/demonstration.ts'
import { createImplement, createKit, createPlace, createTractor } from './register.ts'

/** A plan whose place and machines are in the registers: one trial of two runs unless told otherwise. */
export async function preparePlan(
  db: Db,
  demonstratorId: string,
  overrides: Partial<SaveDemonstration> = {},
): Promise<SaveDemonstration> {
  const [place, tractor, implement, kit] = [
    await createPlace(db),
    await createTractor(db),
    await createImplement(db),
    await createKit(db),
  ]
  return {
    heldOn: '2026-04-09',
    placeId: place.id,
    demonstratorId,
    driver: 'S. Dolm',
    farmer: { name: 'Matis Orrel', phone: '0555 0142' },
    trials: [{ tractorId: tractor.id, implementId: implement.id, kitId: kit.id, plot: 'upper, by the ditch', runs: 2 }],
    ...overrides,
  }
}
