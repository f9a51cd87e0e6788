/**
 * Two runs for the haulage sheet that a farmer would believe: a trailer drawn over a farm road, and a mill driven by the PTO.
 * Figures by hand: road 4400 mL in 52 min with the engine on, 5.08 L/h; mill 3200 mL in 40 min, 4.8 L/h.
 */
import { haulage1 } from '../../shared/layouts/haulage-1.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import { buildReadings, numbered } from './readings.ts'

const TICKED = new Set(haulage1.cells.filter((cell) => cell.kind === 'tick' && cell.section === 1).map((cell) => cell.key))

/** What both runs share with the golden sheet: head, tyres, meter, signatures. Cells it has no value for are blank. */
function onSheet(values: Readings): Readings {
  const golden = buildReadings()
  return Object.fromEntries(
    haulage1.cells.map(({ key }) => [key, TICKED.has(key) ? true : key in values ? values[key] : (golden[key] ?? null)]),
  )
}

const ROAD = onSheet({
  implement_id: 41,
  gear_range: 'H',
  gear: 3,
  hour_meter_start: 1240.3,
  hour_meter_end: 1241.3,
  t_start: '09:10',
  t_end: '10:14',
  jar_start_t: '09:09',
  jar_end_t: '10:15',
  ...numbered('topup_t', ['09:33', '09:58']),
  ...numbered('topup_temp_c', [34, 36]),
  ...numbered('topup_ml', [1000, 1000]),
  jar_end_ml: 2400,
  fuel_used_written_ml: 4400,
  l_per_h_written: 5.08,
  ...numbered('stop_from', ['09:30', '09:55']),
  ...numbered('stop_to', ['09:36', '10:01']),
  ...numbered('stop_engine_off', [true, true, false]),
  work_kind: 'transport',
  load_kg: 3450,
  trip_count: 4,
  distance_km: 15.2,
  distance_loaded_km: 7.6,
  slope_pct: 4,
  load_by: 'weighed',
  trailer_kg: 1180,
  road_surface: 'gravel',
  rpm_noload: 2200,
  rpm_load: 2050,
  speed_dist_m: 100,
  ...numbered('speed_t_s', [18.2, 18.5, 18]),
  remarks: null,
})

const MILL = onSheet({
  implement_id: 42,
  hour_meter_end: 1205,
  t_end: '09:50',
  jar_end_t: '09:51',
  ...numbered('topup_t', ['09:24']),
  ...numbered('topup_temp_c', [34]),
  ...numbered('topup_ml', [800]),
  jar_end_ml: 2400,
  fuel_used_written_ml: 3200,
  l_per_h_written: 4.8,
  work_kind: 'pto',
  load_by: 'counted',
  worked_kg: 1860,
  trailer_kg: 640,
  road_surface: 'paved',
  rpm_noload: 2000,
  rpm_load: 1900,
  pto_rpm: 540,
  pto_nominal: '540',
  pto_torque_nm: 310,
  speed_dist_m: null,
  ...numbered('speed_t_s', [null, null, null]),
})

/** The road run with changes; `undefined` takes a cell off the sheet, null leaves it blank. */
export const buildRoadRun = (changes: Readings = {}): Readings => ({ ...ROAD, ...changes })
/** The run at the mill, with changes. */
export const buildPtoRun = (changes: Readings = {}): Readings => ({ ...MILL, ...changes })
