/** The demo season's registers and people. Maker, places and people are invented. */

import type { SaveImplement, SaveKit, SavePlace, SaveTractor } from '../../shared/schemas/register.ts'
import type { InviteUser, Role } from '../../shared/schemas/user.ts'

const person = (number: number, name: string, role: Role): InviteUser => ({
  number,
  name,
  role,
  email: `${name.toLowerCase().replace(/[^a-z]+/g, '.')}@sheafbook.example`,
})

export const PEOPLE: readonly InviteUser[] = [
  person(101, 'Mira Talwade', 'demonstrator'),
  person(102, 'Ilan Quasny', 'demonstrator'),
  person(103, 'Dorrit Varrick', 'demonstrator'),
  person(104, 'Lene Osterby', 'demonstrator'),
  person(201, 'Joost Abara', 'clerk'),
  person(202, 'Rika Imhaut', 'clerk'),
  person(301, 'Petra Wendrow', 'analyst'),
  person(401, 'Sanna Ekholt', 'admin'),
]

const place = (number: number, name: string, district: string): SavePlace => ({ number, name, district, active: true })
export const PLACES: readonly SavePlace[] = [
  place(1, 'Kelwadi', 'Sannipur'),
  place(2, 'Aspalli', 'Sannipur'),
  place(3, 'Dhamrin', 'Sannipur'),
  place(4, 'Orlipet', 'Kotavel'),
  place(5, 'Brennahalli', 'Kotavel'),
  place(6, 'Tamrol', 'Kotavel'),
]

const tractor = (
  number: number,
  name: string,
  serial: string,
  power: readonly [number, number],
  more: Partial<SaveTractor> = {},
): SaveTractor => ({
  number,
  name,
  serial,
  ratedPower_kw: power[0],
  ptoPower_kw: power[1],
  ratedRpm: 2200,
  drive: '2WD',
  hourMeterKind: 'electronic',
  tyreFront: '6.00-16',
  tyreRear: '13.6-28',
  ballastFront_kg: 0,
  ballastRear_kg: 60,
  active: true,
  ...more,
})
export const TRACTORS: readonly SaveTractor[] = [
  tractor(11, 'Tarnfold 50', 'TF50-00417', [37, 32]),
  tractor(12, 'Tarnfold 60', 'TF60-00238', [45, 39], { drive: '4WD', tyreFront: '8.00-18', tyreRear: '14.9-28' }),
  tractor(13, 'Tarnfold 75', 'TF75-00112', [55, 48], {
    drive: '4WD',
    tyreFront: '9.50-20',
    tyreRear: '16.9-28',
    ballastFront_kg: 80,
  }),
  tractor(14, 'Ostrel D5', 'OSD5-3310', [38, 33]),
  tractor(15, 'Ostrel D6', 'OSD6-2077', [46, 40], { drive: '4WD', tyreFront: '8.00-18', tyreRear: '14.9-28' }),
  tractor(16, 'Ostrel D8', 'OSD8-1150', [57, 49], { drive: '4WD', tyreFront: '9.50-20', tyreRear: '16.9-28' }),
]

const tool = (
  number: number,
  name: string,
  operation: SaveImplement['operation'],
  ratedWidth_m: number,
  toolCount: number,
  maxDepth_cm: number,
): SaveImplement => ({
  number,
  name,
  operation,
  ratedWidth_m,
  toolCount,
  maxDepth_cm,
  active: true,
})
export const IMPLEMENTS: readonly SaveImplement[] = [
  tool(21, 'plough, 3 bottoms', 'plough', 0.9, 3, 30),
  tool(22, 'plough, 4 bottoms', 'plough', 1.2, 4, 30),
  tool(23, 'cultivator, 9 tines', 'cultivator', 2.2, 9, 20),
  tool(24, 'disc harrow, 16 discs', 'harrow', 2, 16, 18),
  tool(25, 'rotary tiller, 36 blades', 'rotary_tiller', 1.6, 36, 20),
  tool(26, 'subsoiler, 1 leg', 'subsoiler', 1, 1, 60),
  tool(27, 'tipping trailer, 2 wheels', 'transport', 1.8, 1, 0),
  tool(28, 'hammer mill, PTO', 'pto_work', 0.6, 1, 0),
]

const kit = (number: number, letter: string, checkedOn: string, ruleLength_cm: number): SaveKit => ({
  number,
  name: `kit ${letter}`,
  jarSerial: `J-${number}`,
  jarCapacity_ml: 5000,
  jarMark_ml: 200,
  jugSerial: `G-${number}`,
  jugCapacity_ml: 1000,
  jugMark_ml: 100,
  tapeSerial: `T-${number}`,
  gaugeSerial: `P-${number}`,
  ruleLength_cm,
  checkedOn,
  active: true,
})
export const KITS: readonly SaveKit[] = [
  kit(31, 'A', '2026-06-02', 60),
  kit(32, 'B', '2026-06-02', 60),
  kit(33, 'C', '2026-08-19', 60),
]
