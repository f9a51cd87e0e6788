/**
 * One run of transport or PTO work, for samples and sets of photos: who, fuel, clock and tyres as a tillage run has them, the
 * work of its own. Ranges are those of small tractors on farm roads.
 */
import { haulage1 } from '../../shared/layouts/haulage-1.ts'
import { clockMinutes } from '../../shared/trial/clock.ts'
import type { Chance } from './random.ts'
import { type Scenario, toPlaces, type Written } from './scenario.ts'
import { tillageScenario } from './scenario-tillage.ts'

type Readings = Record<string, Written>

/** Minutes with the engine on. */
function engineOn_min(readings: Readings): number {
  const at = (key: string) => clockMinutes(String(readings[key])) ?? 0
  const off = [1, 2, 3]
    .filter((n) => readings[`stop_engine_off[${n}]`] === true)
    .reduce((sum, n) => sum + at(`stop_to[${n}]`) - at(`stop_from[${n}]`), 0)
  return at('t_end') - at('t_start') - off
}

function transport(chance: Chance, minutes: number): Readings {
  const speed_kmh = chance.between(11, 24)
  const distance_km = toPlaces((speed_kmh * chance.between(0.6, 0.9) * minutes) / 60, 1)
  const pegs_m = chance.pick([50, 100, 100])
  return {
    work_kind: 'transport',
    load_by: chance.pick(['weighed', 'counted']),
    load_kg: 10 * chance.whole(80, 620),
    trip_count: chance.whole(1, 8),
    distance_km,
    distance_loaded_km: toPlaces(distance_km * chance.between(0.48, 0.52), 1),
    slope_pct: chance.odds(0.6) ? chance.whole(1, 8) : null,
    trailer_kg: 10 * chance.whole(60, 190),
    speed_dist_m: pegs_m,
    ...Object.fromEntries(
      [1, 2, 3].map((n) => [`speed_t_s[${n}]`, toPlaces((3.6 * pegs_m) / speed_kmh + chance.normal(0, 0.25), 1)]),
    ),
  }
}

function ptoWork(chance: Chance): Readings {
  const nominal = chance.odds(0.8) ? 540 : 1000
  return {
    work_kind: 'pto',
    load_by: 'counted',
    worked_kg: 10 * chance.whole(60, 900),
    trailer_kg: 10 * chance.whole(30, 120),
    pto_rpm: nominal + 10 * chance.whole(-3, 2),
    pto_nominal: String(nominal),
    pto_torque_nm: chance.odds(0.4) ? chance.whole(120, 480) : null,
  }
}

/** Values for every cell of the haulage sheet. */
export function haulageScenario(chance: Chance): Scenario {
  const shared = tillageScenario(chance.fork('run'), { worthwhile: true }).readings
  const minutes = engineOn_min(shared)
  const own: Readings = {
    ...(chance.odds(0.7) ? transport(chance.fork('road'), minutes) : ptoWork(chance.fork('mill'))),
    l_per_h_written: toPlaces((Number(shared.fuel_used_written_ml) * 60) / 1000 / minutes, 2),
    road_surface: chance.pick(['paved', 'gravel', 'earth']),
  }
  // Speed over pegs is the road's; a mill stands.
  const value = (key: string): Written => (key in own ? own[key]! : key.startsWith('speed_') ? null : (shared[key] ?? null))
  const readings = Object.fromEntries(
    haulage1.cells.map((cell) => [cell.key, cell.kind === 'tick' && cell.section === 1 ? true : value(cell.key)]),
  )
  return { readings, spoiled: [], wrongSum: [] }
}
