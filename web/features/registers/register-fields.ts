/** What each register shows and asks: one list draws the table and the form. */
import { DRIVES, type RegisterName } from '../../../shared/schemas/register.ts'
import { OPERATIONS } from '../../../shared/trial/facts.ts'
import type { FieldOption } from '../../ui/field.tsx'

export interface RegisterField {
  key: string
  label: string
  unit?: string
  kind: 'number' | 'text' | 'date' | 'choice'
  options?: readonly FieldOption[]
  hint?: string
  /** Stands in the table; the form asks everything. */
  listed?: boolean
}

const words = (values: readonly string[]): FieldOption[] => values.map((value) => ({ value, words: value.replaceAll('_', ' ') }))
const number: RegisterField = {
  key: 'number',
  label: 'Number',
  kind: 'number',
  listed: true,
  hint: '1 to 9999: what people write on a sheet.',
}
const name: RegisterField = { key: 'name', label: 'Name', kind: 'text', listed: true }

export const REGISTER_WORDS: Record<RegisterName, { title: string; one: string; says: string }> = {
  places: { title: 'Places', one: 'place', says: 'Where demonstrations are held.' },
  tractors: { title: 'Tractors', one: 'tractor', says: 'What the rules must know of a tractor: nobody writes it on a sheet.' },
  implements: {
    title: 'Implements',
    one: 'implement',
    says: 'Width, depth and work of each implement, which the rules compare with.',
  },
  kits: { title: 'Kits', one: 'kit', says: 'Jar, jug, tape and gauge. Marks and capacities are what the rules read levels by.' },
}

export const REGISTER_FIELDS: Record<RegisterName, readonly RegisterField[]> = {
  places: [
    number,
    name,
    { key: 'district', label: 'District', kind: 'text', listed: true },
    {
      key: 'lat',
      label: 'Latitude',
      unit: '°',
      kind: 'number',
      hint: 'With the longitude: rules ask how far two places lie apart.',
    },
    { key: 'lon', label: 'Longitude', unit: '°', kind: 'number' },
    {
      key: 'density15_kgm3',
      label: 'Fuel here at 15 °C',
      unit: 'kg/m³',
      kind: 'number',
      hint: 'By its delivery note; blank where it is not known.',
    },
  ],
  tractors: [
    number,
    name,
    { key: 'serial', label: 'Chassis number', kind: 'text', listed: true },
    { key: 'ratedPower_kw', label: 'Rated engine power', unit: 'kW', kind: 'number', listed: true },
    {
      key: 'ptoPower_kw',
      label: 'PTO power',
      unit: 'kW',
      kind: 'number',
      listed: true,
      hint: 'From the test report; else 0.86 of the engine’s power, a common rule.',
    },
    { key: 'ratedRpm', label: 'Rated speed', unit: 'r/min', kind: 'number', listed: true },
    { key: 'drive', label: 'Drive', kind: 'choice', options: words(DRIVES), listed: true },
    { key: 'hourMeterKind', label: 'Hour meter', kind: 'choice', options: words(['electronic', 'mechanical']) },
    { key: 'tyreFront', label: 'Tyres, front', kind: 'text' },
    { key: 'tyreRear', label: 'Tyres, rear', kind: 'text' },
    {
      key: 'rollingCircumference_m',
      label: 'Way of a turn, rear wheel',
      unit: 'm',
      kind: 'number',
      hint: 'Without load, ten turns ÷ 10; blank where it is not known.',
    },
    { key: 'gearSpeeds', label: 'Speeds by gear', unit: 'km/h', kind: 'text', hint: 'At rated engine speed: L1 2.1, L2 3.4.' },
    { key: 'ballastFront_kg', label: 'Ballast, front', unit: 'kg', kind: 'number' },
    { key: 'ballastRear_kg', label: 'Ballast, rear', unit: 'kg', kind: 'number' },
  ],
  implements: [
    number,
    name,
    { key: 'operation', label: 'Operation', kind: 'choice', options: words(OPERATIONS), listed: true },
    { key: 'ratedWidth_m', label: 'Rated width', unit: 'm', kind: 'number', listed: true },
    { key: 'toolCount', label: 'Bottoms, tines, discs', kind: 'number', listed: true },
    {
      key: 'maxDepth_cm',
      label: 'Greatest depth',
      unit: 'cm',
      kind: 'number',
      listed: true,
      hint: 'A trailer or a PTO machine works no soil: 0.',
    },
  ],
  kits: [
    number,
    name,
    { key: 'jarSerial', label: 'Jar', kind: 'text', listed: true },
    { key: 'jarCapacity_ml', label: 'Jar holds', unit: 'mL', kind: 'number', listed: true },
    { key: 'jarMark_ml', label: 'Jar marked each', unit: 'mL', kind: 'number', listed: true },
    { key: 'jugSerial', label: 'Jug', kind: 'text' },
    { key: 'jugCapacity_ml', label: 'Jug holds', unit: 'mL', kind: 'number', listed: true },
    { key: 'jugMark_ml', label: 'Jug marked each', unit: 'mL', kind: 'number', listed: true },
    { key: 'tapeSerial', label: 'Tape', kind: 'text' },
    { key: 'gaugeSerial', label: 'Gauge', kind: 'text' },
    { key: 'ruleLength_cm', label: 'Depth rule reaches', unit: 'cm', kind: 'number' },
    {
      key: 'scale_pct',
      label: 'Scale of jar and jug within',
      unit: '%',
      kind: 'number',
      hint: 'By their calibration; blank: 1 % is taken.',
    },
    { key: 'checkedOn', label: 'Checked on', kind: 'date', listed: true, hint: 'Twelve months are allowed, a common practice.' },
  ],
}

/** What a new row begins with. */
export const newRow = (register: RegisterName): Record<string, unknown> =>
  Object.fromEntries([
    ...REGISTER_FIELDS[register].map((f) => [f.key, f.kind === 'choice' ? (f.options?.[0]?.value ?? '') : '']),
    ['active', true],
    ...(register === 'tractors'
      ? [
          ['ballastFront_kg', 0],
          ['ballastRear_kg', 0],
        ]
      : []),
    ...(register === 'kits' ? [['ruleLength_cm', 30]] : []),
  ])
