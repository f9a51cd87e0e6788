import type { Db } from '../../server/db/database.ts'
import { addRegisterRow } from '../../server/db/repositories/register.ts'
import type {
  Implement,
  Kit,
  Place,
  SaveImplement,
  SaveKit,
  SavePlace,
  SaveTractor,
  Tractor,
} from '../../shared/schemas/register.ts'

let last = 100
const nextNumber = () => {
  last += 1
  return last
}

export function buildPlace(overrides: Partial<SavePlace> = {}): SavePlace {
  const number = overrides.number ?? nextNumber()
  return { number, name: `Long Acre ${number}`, district: 'Nether Vale', active: true, ...overrides }
}

export function buildTractor(overrides: Partial<SaveTractor> = {}): SaveTractor {
  const number = overrides.number ?? nextNumber()
  return {
    number,
    name: `Veltra ${number}`,
    serial: `VT-${number}`,
    ratedPower_kw: 55,
    ptoPower_kw: 48,
    ratedRpm: 2200,
    drive: '4WD',
    hourMeterKind: 'electronic',
    tyreFront: '11.2-24',
    tyreRear: '16.9-30',
    ballastFront_kg: 120,
    ballastRear_kg: 0,
    active: true,
    ...overrides,
  }
}

export function buildImplement(overrides: Partial<SaveImplement> = {}): SaveImplement {
  const number = overrides.number ?? nextNumber()
  return {
    number,
    name: `Three-furrow ${number}`,
    operation: 'plough',
    ratedWidth_m: 0.9,
    toolCount: 3,
    maxDepth_cm: 30,
    active: true,
    ...overrides,
  }
}

export function buildKit(overrides: Partial<SaveKit> = {}): SaveKit {
  const number = overrides.number ?? nextNumber()
  return {
    number,
    name: `Kit ${number}`,
    jarSerial: `J-${number}`,
    jarCapacity_ml: 5000,
    jarMark_ml: 50,
    jugSerial: `M-${number}`,
    jugCapacity_ml: 1000,
    jugMark_ml: 10,
    tapeSerial: `T-${number}`,
    gaugeSerial: `G-${number}`,
    ruleLength_cm: 30,
    checkedOn: '2026-03-02',
    active: true,
    ...overrides,
  }
}

export const createPlace = async (db: Db, overrides: Partial<SavePlace> = {}) =>
  (await addRegisterRow(db, 'places', buildPlace(overrides))) as Place
export const createTractor = async (db: Db, overrides: Partial<SaveTractor> = {}) =>
  (await addRegisterRow(db, 'tractors', buildTractor(overrides))) as Tractor
export const createImplement = async (db: Db, overrides: Partial<SaveImplement> = {}) =>
  (await addRegisterRow(db, 'implements', buildImplement(overrides))) as Implement
export const createKit = async (db: Db, overrides: Partial<SaveKit> = {}) =>
  (await addRegisterRow(db, 'kits', buildKit(overrides))) as Kit
