/**
 * One run with a soil-working implement, consistent as a real one: the sums hold, the clock runs forward, the fuel suits the
 * work. Ranges are those of ordinary small tractors; what a sheet leaves open is left blank now and then.
 */
import { CHECKS } from '../builders/checks.ts'
import type { Chance } from './random.ts'
import { clock, type Scenario, toPlaces, type Written } from './scenario.ts'

export interface Machine {
  implement_id: number
  width_m: number
  depth_cm: readonly [number, number]
  speed_kmh: readonly [number, number]
  /** Litres per hectare. */
  fuel_l_ha: readonly [number, number]
}

/** Implements by register number, as the demonstration season knows them. */
export const MACHINES: readonly Machine[] = [
  { implement_id: 21, width_m: 0.9, depth_cm: [14, 19], speed_kmh: [3.8, 5.2], fuel_l_ha: [14, 20] },
  { implement_id: 22, width_m: 1.2, depth_cm: [14, 20], speed_kmh: [4, 5.5], fuel_l_ha: [14, 20] },
  { implement_id: 23, width_m: 2.2, depth_cm: [7, 13], speed_kmh: [4.5, 6.5], fuel_l_ha: [7, 11] },
  { implement_id: 24, width_m: 2, depth_cm: [7, 12], speed_kmh: [4.5, 6.5], fuel_l_ha: [5, 8] },
  { implement_id: 25, width_m: 1.6, depth_cm: [8, 14], speed_kmh: [2.4, 4], fuel_l_ha: [11, 17] },
  { implement_id: 26, width_m: 1, depth_cm: [32, 46], speed_kmh: [3, 4.4], fuel_l_ha: [16, 24] },
]

export interface TillageOptions {
  /** Register numbers and date the plan or the demonstration season gives; random ones otherwise. */
  head?: Record<string, Written>
  machine?: Machine
  /** true: enough is burned that the jar's marks do not swamp the figure. */
  worthwhile?: boolean
}

const mean = (values: readonly number[]) => values.reduce((sum, v) => sum + v, 0) / values.length

function headOf(chance: Chance, machine: Machine): Record<string, Written> {
  const number = () => chance.whole(1, 9999)
  const day = new Date(Date.UTC(2026, chance.whole(0, 10), chance.whole(1, 28)))
  return {
    trial_date: day.toISOString().slice(0, 10),
    demonstrator_id: number(),
    place_id: number(),
    tractor_id: number(),
    implement_id: chance.odds(0.5) ? machine.implement_id : number(),
    kit_id: number(),
  }
}

/** A rectangle, or now and then a plot of four unlike sides with its diagonals; passes run along A-B. Areas in m². */
function plotOf(chance: Chance, least_m2: number, most_m2: number) {
  let length = chance.between(42, 110)
  let breadth = length * chance.between(0.4, 0.78)
  const grow = Math.min(Math.max(1, Math.sqrt(least_m2 / (length * breadth))), Math.sqrt(most_m2 / (length * breadth)))
  length = toPlaces(length * grow, 1)
  breadth = toPlaces(breadth * grow, 1)
  if (chance.odds(0.75)) {
    const readings = { side_ab_m: length, side_bc_m: breadth, side_cd_m: null, side_da_m: null, diag_ac_m: null, diag_bd_m: null }
    return { readings, area_m2: length * breadth, length, breadth }
  }
  const off = () => chance.normal(0, 1.4)
  const pegs = [
    [off(), off()],
    [length + off(), off()],
    [length + off(), breadth + off()],
    [off(), breadth + off()],
  ] as const
  const side = (i: number, k: number) => toPlaces(Math.hypot(pegs[i]![0] - pegs[k]![0], pegs[i]![1] - pegs[k]![1]), 1)
  const [ab, bc, cd, da, ac] = [side(0, 1), side(1, 2), side(2, 3), side(3, 0), side(0, 2)]
  const heron = (a: number, b: number, c: number) => {
    const s = (a + b + c) / 2
    return Math.sqrt(s * (s - a) * (s - b) * (s - c))
  }
  return {
    readings: {
      side_ab_m: ab,
      side_bc_m: bc,
      side_cd_m: cd,
      side_da_m: da,
      diag_ac_m: ac,
      diag_bd_m: chance.odds(0.6) ? side(1, 3) : null,
    },
    area_m2: heron(ab, bc, ac) + heron(cd, da, ac),
    length,
    breadth,
  }
}

interface FuelLog {
  start: number
  /** Filled in, and when, as a share of the run. */
  topups: Array<{ ml: number; at: number }>
  end: number
  used: number
}

/** Levels to the mark; top-ups so that the jar neither runs over nor falls below 600 mL. */
function fuelOf(chance: Chance, need_ml: number): FuelLog {
  const step = chance.odds(0.3) ? 100 : 200
  const used = step * Math.max(4, Math.round(need_ml / step))
  const fill = () => (chance.odds(0.7) ? 1000 : step === 100 ? 100 * chance.whole(4, 9) : 200 * chance.whole(2, 4))
  const fillings: number[] = chance.odds(0.35) ? [fill()] : []
  for (;;) {
    const topups = fillings.map((ml, i) => ({ ml, at: (i + 1) / (fillings.length + 1.2) }))
    let filled = 0
    const highest = [5000 - step * chance.whole(0, 4)]
    for (const { ml, at } of topups) {
      filled += ml
      highest.push(4850 - filled + used * at)
    }
    const start = Math.floor(Math.min(...highest) / step) * step
    const end = start + filled - used
    if (end >= 600 || fillings.length === 3) return { start, topups, end, used }
    fillings.push(1000)
  }
}

/** Values for every cell of the tillage sheet. */
export function tillageScenario(chance: Chance, options: TillageOptions = {}): Scenario {
  const machine = options.machine ?? chance.pick(MACHINES)
  const head = options.head ?? headOf(chance.fork('head'), machine)
  const maybe = (share: number, value: Written): Written => (chance.odds(share) ? value : null)

  const rate = chance.between(...machine.fuel_l_ha)
  const plot = plotOf(chance.fork('plot'), options.worthwhile ? (2.4 / rate) * 10_000 : 0, (6 / rate) * 10_000)
  const fuel = fuelOf(chance.fork('fuel'), (rate * plot.area_m2) / 10)
  const speed = chance.between(...machine.speed_kmh)
  const capacity_ha_h = (machine.width_m * speed * chance.between(0.66, 0.8)) / 10
  const run_min = Math.max(20, Math.round((plot.area_m2 / 10_000 / capacity_ha_h) * 60))
  const start_min = chance.whole(7 * 60, 14 * 60 + 30)
  const end_min = start_min + run_min
  const atMinute = (share: number) => Math.round(start_min + run_min * share)
  const stopsAt = fuel.topups.map(({ at }) => atMinute(at))
  if (stopsAt.length < 3 && chance.odds(0.3)) stopsAt.push(atMinute(0.9))
  const longest = Math.max(2, Math.min(7, Math.floor(run_min * 0.05)))
  const stops = stopsAt.map((from) => {
    const to = Math.min(end_min - 1, from + chance.whole(2, longest))
    return { from, to, off: chance.odds(0.7) }
  })
  const off_min = stops.reduce((sum, { from, to, off }) => sum + (off ? to - from : 0), 0)

  const hour0 = toPlaces(chance.between(80, chance.odds(0.2) ? 14_000 : 4200), 1)
  const tyreUnit = chance.pick(['psi', 'kPa', 'bar', 'kgf/cm2'] as const)
  const tyres = tyreValues(chance.fork('tyres'), tyreUnit)

  const target = chance.between(...machine.depth_cm)
  const near = (value: number, spread: number) => value + Math.max(-1.7, Math.min(1.7, chance.normal(0, 1))) * spread
  const depths = Array.from({ length: 10 }, () => Math.round(near(target, target * 0.045) * 2) / 2)
  const width = machine.width_m * chance.between(0.93, 1.02)
  const widths = Array.from({ length: 5 }, () => toPlaces(chance.normal(width, 0.018 * machine.width_m), 2))
  const acres = chance.odds(0.25)
  const litres = fuel.used / 1000
  const rpm = 50 * chance.whole(32, 43)
  const lap = 20 / (speed / 3.6)
  const turns = chance.odds(0.8) ? 10 : chance.pick([5, 8, 12])
  const rolled = turns * chance.between(3.9, 4.45)
  const slipped = 1 - chance.between(0.05, 0.145)
  const soil = chance.pick(['fine', 'medium', 'coarse'])

  const readings: Record<string, Written> = {
    ...head,
    ...Object.fromEntries(CHECKS.map((key) => [key, options.worthwhile || !chance.odds(0.006)])),
    fuel_method: chance.odds(0.8) ? 'D' : 'L',
    hour_meter_start: hour0,
    hour_meter_end: toPlaces(hour0 + (run_min - off_min) / 60, 1),
    gear_range: chance.pick(['L', 'M', 'H']),
    gear: chance.whole(1, 4),
    warmup_min: chance.whole(15, 30),
    bystander_line_m: chance.odds(0.7) ? 20 : 5 * chance.whole(4, 8),
    ...tyres,
    tyre_p_unit: tyreUnit,
    jar_start_t: clock(start_min - chance.whole(0, 3)),
    jar_start_ml: fuel.start,
    jar_end_t: clock(end_min + chance.whole(0, 3)),
    jar_end_ml: fuel.end,
    fuel_temp_start_c: maybe(0.7, chance.whole(22, 34)),
    fuel_temp_end_c: maybe(0.7, chance.whole(35, 46)),
    fuel_used_written_ml: fuel.used,
    t_start: clock(start_min),
    t_end: clock(end_min),
    pass_count: Math.round(plot.breadth / width),
    l_per_ha_written: toPlaces(litres / (plot.area_m2 / 10_000), 2),
    ...plot.readings,
    area_written: toPlaces(plot.area_m2 / (acres ? 4046.8564224 : 10_000), 3),
    area_unit: acres ? 'acre' : 'ha',
    depth_mean_written_cm: toPlaces(mean(depths), 1),
    width_mean_written_m: toPlaces(mean(widths), 3),
    rpm_noload: rpm,
    rpm_load: rpm - 10 * chance.whole(3, 16),
    speed_dist_m: chance.odds(0.8) ? 20 : chance.pick([15, 25, 30]),
    rev_n: turns,
    soil_class: soil,
    consent_trial: chance.odds(0.96) ? 'yes' : 'no',
    consent_photo: chance.odds(0.8) ? 'yes' : 'no',
    consent_contact: chance.odds(0.65) ? 'yes' : 'no',
    circuit_restored_at: clock(end_min + chance.whole(8, 25)),
    closed_at: maybe(0.6, clock(end_min + chance.whole(26, 45))),
    circuit_restored_by: null,
    remarks: null,
    sign_demonstrator: options.worthwhile || !chance.odds(0.02),
    sign_operator: options.worthwhile || !chance.odds(0.03),
    sign_farmer: options.worthwhile || !chance.odds(0.04),
    sign_witness: chance.odds(0.4),
  }
  depths.forEach((v, i) => {
    readings[`depth_cm[${i + 1}]`] = v
  })
  widths.forEach((v, i) => {
    readings[`width_m[${i + 1}]`] = v
  })
  const lapScale = Number(readings.speed_dist_m) / 20
  for (let n = 1; n <= 3; n += 1) readings[`speed_t_s[${n}]`] = toPlaces(chance.normal(lap * lapScale, 0.25), 1)
  for (let n = 1; n <= 2; n += 1) {
    readings[`dist_load_m[${n}]`] = toPlaces(rolled * slipped + chance.normal(0, 0.12), 2)
    readings[`dist_noload_m[${n}]`] = toPlaces(rolled + chance.normal(0, 0.1), 2)
  }
  for (let n = 1; n <= 3; n += 1) {
    const topup = fuel.topups[n - 1]
    readings[`topup_ml[${n}]`] = topup?.ml ?? null
    readings[`topup_t[${n}]`] = topup ? clock(atMinute(topup.at)) : null
    readings[`topup_temp_c[${n}]`] = topup ? maybe(0.6, chance.whole(26, 34)) : null
    const stop = stops[n - 1]
    readings[`stop_from[${n}]`] = stop ? clock(stop.from) : null
    readings[`stop_to[${n}]`] = stop ? clock(stop.to) : null
    readings[`stop_engine_off[${n}]`] = stop?.off ?? false
  }
  return { readings, spoiled: [], wrongSum: [] }
}

/** Four pressures in the unit of the gauge, left and right nearly alike. */
function tyreValues(chance: Chance, unit: 'psi' | 'kPa' | 'bar' | 'kgf/cm2'): Record<string, number> {
  const perKpa = { psi: 1 / 6.894757293, kPa: 1, bar: 0.01, 'kgf/cm2': 1 / 98.0665 }[unit]
  const step = { psi: 1, kPa: 5, bar: 0.05, 'kgf/cm2': 0.05 }[unit]
  const places = step < 1 ? 2 : 0
  const one = (kpa: number) => toPlaces(Math.round((kpa * perKpa) / step) * step, places)
  const [front, rear] = [chance.between(155, 195), chance.between(95, 150)]
  return {
    tyre_p_fl: one(front + chance.normal(0, 2.5)),
    tyre_p_fr: one(front + chance.normal(0, 2.5)),
    tyre_p_rl: one(rear + chance.normal(0, 1.5)),
    tyre_p_rr: one(rear + chance.normal(0, 1.5)),
  }
}
