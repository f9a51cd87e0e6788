/** What the trail and refusals call the fields of the registers: words and units of the screens, not names of columns. */
const FIELDS: Record<string, { says: string; unit?: string }> = {
  serial: { says: 'chassis number' },
  ratedPower_kw: { says: 'rated engine power', unit: 'kW' },
  ptoPower_kw: { says: 'PTO power', unit: 'kW' },
  ratedRpm: { says: 'rated speed', unit: 'r/min' },
  hourMeterKind: { says: 'hour meter' },
  tyreFront: { says: 'tyres, front' },
  tyreRear: { says: 'tyres, rear' },
  lat: { says: 'latitude', unit: '°' },
  lon: { says: 'longitude', unit: '°' },
  density15_kgm3: { says: 'density of fuel here at 15 °C', unit: 'kg/m³' },
  rollingCircumference_m: { says: 'way of a turn of the rear wheel', unit: 'm' },
  gearSpeeds: { says: 'speeds by gear', unit: 'km/h' },
  scale_pct: { says: 'scale of jar and jug within', unit: '%' },
  ballastFront_kg: { says: 'ballast, front', unit: 'kg' },
  ballastRear_kg: { says: 'ballast, rear', unit: 'kg' },
  ratedWidth_m: { says: 'rated width', unit: 'm' },
  toolCount: { says: 'number of bottoms, tines or discs' },
  maxDepth_cm: { says: 'greatest depth', unit: 'cm' },
  jarSerial: { says: 'jar' },
  jarCapacity_ml: { says: 'jar holds', unit: 'mL' },
  jarMark_ml: { says: 'jar marked each', unit: 'mL' },
  jugSerial: { says: 'jug' },
  jugCapacity_ml: { says: 'jug holds', unit: 'mL' },
  jugMark_ml: { says: 'jug marked each', unit: 'mL' },
  tapeSerial: { says: 'tape' },
  gaugeSerial: { says: 'gauge' },
  ruleLength_cm: { says: 'depth rule reaches', unit: 'cm' },
  checkedOn: { says: 'checked on' },
  active: { says: 'in use' },
}

const valueWords = (value: unknown): string => {
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  return value === null || value === undefined || value === '' ? 'blank' : String(value).replaceAll('_', ' ')
}

export interface FieldChange {
  key: string
  from: unknown
  to: unknown
}

/** "rated engine power 45 to 46 kW" */
export function changeWords({ key, from, to }: FieldChange): string {
  const { says, unit } = FIELDS[key] ?? { says: key }
  return [says, valueWords(from), 'to', valueWords(to), unit].filter(Boolean).join(' ')
}

/** "rated engine power is now 45 kW" */
export function nowWords({ key, from }: FieldChange): string {
  const { says, unit } = FIELDS[key] ?? { says: key }
  return [says, 'is now', valueWords(from), unit].filter(Boolean).join(' ')
}
