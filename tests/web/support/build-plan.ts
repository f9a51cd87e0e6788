import { z } from 'zod'
import { USUAL_LAYOUT } from '../../../shared/layouts/registry.ts'
import type { Demonstration } from '../../../shared/schemas/demonstration.ts'
import { type Implement, type Kit, type Place, REGISTERS, type Tractor } from '../../../shared/schemas/register.ts'
import { answer, type FakeApi } from './fake-api.ts'

export const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`

const kept = { active: true, version: 1 }
export const PLACE: Place = { ...kept, id: id(21), number: 21, name: 'Kelbrun', district: 'Ostmark' }
const tractor: Tractor = {
  ...kept,
  id: id(12),
  number: 12,
  name: 'Tarn 50',
  serial: 'TN50-1',
  ratedPower_kw: 37,
  ptoPower_kw: 32,
  ratedRpm: 2200,
  drive: '2WD',
  hourMeterKind: 'electronic',
  tyreFront: '',
  tyreRear: '',
  ballastFront_kg: 0,
  ballastRear_kg: 0,
}
export const TRACTORS: Tractor[] = [tractor, { ...tractor, id: id(13), number: 13, name: 'Tarn 60', serial: 'TN60-1' }]
export const PLOUGH: Implement = {
  ...kept,
  id: id(31),
  number: 31,
  name: 'two-bottom plough',
  operation: 'plough',
  ratedWidth_m: 0.9,
  toolCount: 2,
  maxDepth_cm: 28,
}
export const KIT: Kit = {
  ...kept,
  id: id(4),
  number: 4,
  name: 'kit A',
  jarSerial: 'J-4',
  jarCapacity_ml: 5000,
  jarMark_ml: 200,
  jugSerial: 'G-4',
  jugCapacity_ml: 1000,
  jugMark_ml: 100,
  tapeSerial: '',
  gaugeSerial: '',
  ruleLength_cm: 30,
  checkedOn: '2026-06-02',
}

/** The registers as anybody who is signed in reads them. */
export function serveRegisters(api: FakeApi): void {
  api.on('GET', '/registers/places', () => answer(z.array(REGISTERS.places.row), [PLACE]))
  api.on('GET', '/registers/tractors', () => answer(z.array(REGISTERS.tractors.row), TRACTORS))
  api.on('GET', '/registers/implements', () => answer(z.array(REGISTERS.implements.row), [PLOUGH]))
  api.on('GET', '/registers/kits', () => answer(z.array(REGISTERS.kits.row), [KIT]))
}

const named = ({ id: of, number, name }: { id: string; number: number; name: string }) => ({ id: of, number, name })

/** A day of one trial and two runs: one sheet is entered, the other still paper. */
export const buildDay = (change: Partial<Demonstration> = {}): Demonstration => ({
  id: id(100),
  heldOn: '2026-12-08',
  place: { ...named(PLACE), district: PLACE.district },
  demonstrator: { id: id(1), number: 12, name: 'Ossa Brandt' },
  driver: 'S. Dolm',
  farmer: { name: 'Matis Orrel', phone: '0555 0142' },
  trials: [
    {
      id: id(101),
      plot: 'upper',
      layout: USUAL_LAYOUT,
      tractor: named(tractor),
      implement: named(PLOUGH),
      kit: named(KIT),
      runs: [
        { id: id(102), number: 1, sheetId: id(103), sheetCode: '7K4QM2KA0T', sheetState: 'entered', recordNumber: 231 },
        { id: id(104), number: 2, sheetId: id(105), sheetCode: '7K4QM35A0T', sheetState: 'printed', recordNumber: null },
      ],
    },
  ],
  version: 3,
  ...change,
})
