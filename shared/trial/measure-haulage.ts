/** What a transport or PTO run moved: kilometres, tonnes, tonne-kilometres. */
import { derive, known, lacking, type Measure } from './measure.ts'
import { numberAt, type Readings, textAt } from './readings.ts'
import { rectangularU, SPREAD, stepDifferenceU, stepU } from './uncertainty.ts'

export interface Haulage {
  distance: Measure
  tonnes: Measure
  /** Load times the way it was carried. */
  tonneKilometres: Measure
}

const LOAD_STEP_KG = 10

function kilometres(readings: Readings, key: string): Measure {
  const km = numberAt(readings, key)
  if (km === null)
    return lacking(readings[key] === null ? 'blank' : 'not_on_sheet', 'No distance was driven, or none is written.', [key])
  return known(km, [key], [{ name: 'odometer', u: stepDifferenceU(SPREAD.odometerStep_km) }])
}

/** A mass in tonnes from the first of these cells that is filled. */
function tonnesOf(readings: Readings, keys: ReadonlyArray<{ key: string; perTonne: number }>): Measure {
  const filled = keys.find(({ key }) => numberAt(readings, key) !== null)
  if (!filled) {
    const blank = keys.some(({ key }) => readings[key] === null)
    return lacking(blank ? 'blank' : 'not_on_sheet', 'No load was moved, or none is written.', [keys[0]?.key ?? 'load_kg'])
  }
  const value = (numberAt(readings, filled.key) ?? 0) / filled.perTonne
  const weighed = textAt(readings, 'load_by') !== 'counted'
  const u = weighed ? stepU(LOAD_STEP_KG / 1000) : rectangularU(SPREAD.countedLoad * value)
  const assumes = weighed ? [] : ['a counted load is right within 10 %']
  return known(value, [filled.key], [{ name: weighed ? 'weighing the load' : 'counting the load', u }], assumes)
}

/** `load_kg` and `load_t` are of one trip; `worked_kg` is all that went through a machine. */
export function measureHaulage(readings: Readings): Haulage {
  const distance = kilometres(readings, 'distance_km')
  const trip = tonnesOf(readings, [
    { key: 'load_kg', perTonne: 1000 },
    { key: 'load_t', perTonne: 1 },
  ])
  const worked = tonnesOf(readings, [{ key: 'worked_kg', perTonne: 1000 }])
  const trips = numberAt(readings, 'trip_count')
  const count = known(trips ?? 1, trips === null ? [] : ['trip_count'])
  const loadedWay = numberAt(readings, 'distance_loaded_km') === null ? null : kilometres(readings, 'distance_loaded_km')
  const carried = loadedWay ?? (distance.known ? { ...distance, assumes: ['loaded all the way'] } : distance)
  return {
    distance,
    tonnes: worked.known ? worked : derive([trip, count], (t = 0, n = 1) => t * n),
    tonneKilometres: derive([trip, carried], (t = 0, km = 0) => t * km),
  }
}
