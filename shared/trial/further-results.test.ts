import { describe, expect, it } from 'vitest'
import { buildFacts, buildFullReadings, buildReadings, numbered } from '../../tests/builders/readings.ts'
import { computeResults } from './compute-results.ts'
import type { Facts } from './facts.ts'
import type { Readings } from './readings.ts'
import type { ResultKey } from './result.ts'

const of = (key: ResultKey, readings: Readings, facts: Facts = {}) => computeResults(readings, facts)[key]
const golden = (key: ResultKey, changes: Readings = {}, facts: Facts = {}) =>
  of(key, buildFullReadings(changes), buildFacts(facts))

// E14 and C18: worked out independently from the cited formulas (check_values: golden_draft_N_Pdb, Edb_kWh_and_l_per_kwh).
describe('load of the golden sheet', () => {
  it('draft 7192.97 N within 40 %, 8.7898 kW, 0.40997 of the PTO power', () => {
    expect(golden('draft_n').value).toBeCloseTo(7192.967452641436, 6)
    expect(golden('draft_low_n').value).toBeCloseTo(0.6 * 7192.967452641436, 6)
    expect(golden('draft_high_n').value).toBeCloseTo(1.4 * 7192.967452641436, 6)
    expect(golden('drawbar_kw').value).toBeCloseTo(8.789776927871408, 9)
    expect(golden('load_pct').value).toBeCloseTo(40.997, 3)
  })

  it('5.99414 kWh at the drawbar, 0.633953 L/kWh', () => {
    expect(golden('energy_kwh').value).toBeCloseTo(5.994139543867863, 9)
    expect(golden('l_per_kwh').value).toBeCloseTo(0.6339525418435551, 9)
    expect(golden('g_per_kwh').value).toBeCloseTo((1000 * 3.1267962396105924) / 5.994139543867863, 6)
  })

  it('C19 4.833 L/h, C21 0.223 × 32 kW, C25 15.513 L/ha', () => {
    expect(golden('expected_l_per_h').value).toBeCloseTo(4.833, 3)
    expect(golden('yearly_l_per_h').value).toBeCloseTo(7.136, 9)
    expect(golden('expected_l_per_ha').value).toBeCloseTo(15.513, 3)
  })

  it('knows the range of the draft table as most of its doubt, and says the draft was not measured', () => {
    const draft = golden('draft_n')
    expect(draft.budget[0]).toMatchObject({ name: 'range of the draft table' })
    expect(draft.budget[0]?.u).toBeCloseTo((0.4 * 7192.967452641436) / Math.sqrt(3), 3)
    expect(golden('drawbar_kw').assumes).toContain('draft by the table of D497, not measured')
  })

  // E5: abetutorials page, 15 kN at 6 km/h: 25 kW.
  it('takes a measured pull before the table', () => {
    const at6 = { draft_kn: 15, speed_dist_m: 20, ...numbered('speed_t_s', [12, 12, 12]) }
    const power = golden('drawbar_kw', at6)
    expect(power.value).toBeCloseTo(25, 12)
    expect(power.assumes).toEqual([])
    expect(golden('load_pct', at6).value).toBeCloseTo((100 * 25) / 0.67 / 32, 9)
  })

  it('has no draft for a tool outside the equation, and asks for tines where those count', () => {
    expect(golden('draft_n', {}, { operation: 'rotary_tiller' }).reason?.text).toMatch(/does not hold/)
    expect(golden('draft_n', {}, { operation: 'cultivator', toolCount: null }).reason?.text).toMatch(/tines/)
    // Field cultivator, primary (D497 table 1 [M]): 0.85 (46 + 2.8 v) × tines × cm.
    const v = golden('speed_km_h').value ?? 0
    const draft = golden('draft_n', {}, { operation: 'cultivator', toolCount: 9 })
    expect(draft.value).toBeCloseTo(0.85 * (46 + 2.8 * v) * 9 * 15.125, 6)
  })

  // E11: chisel, 45 shanks, 15 cm, 10 km/h with D497's own soil factor.
  it('takes the tool from the type of the implement', () => {
    const chisel = {
      implement_type: 'chisel',
      soil_class: 'silt loam',
      speed_dist_m: 100,
      ...numbered('speed_t_s', [36, 36, 36]),
      ...numbered(
        'depth_cm',
        Array.from({ length: 20 }, () => 15),
      ),
    }
    expect(golden('draft_n', chisel, { toolCount: 45, operation: 'cultivator' }).value).toBeCloseTo(83_193.75, 6)
  })

  it('expects no fuel where the work asks for more than the engine has', () => {
    expect(golden('expected_l_per_h', {}, { ptoPower_kw: 10 }).reason?.code).toBe('impossible')
    expect(golden('expected_l_per_h', { rpm_load: null }).reason?.code).toBe('blank')
  })

  it('takes the PTO power from the engine where no test report is known, and says so', () => {
    const yearly = golden('yearly_l_per_h', {}, { ptoPower_kw: null })
    expect(yearly.value).toBeCloseTo(0.223 * 0.86 * 37, 12)
    expect(yearly.assumes).toEqual(['PTO power taken from the rated power of the engine'])
  })

  it('reads engine power in either horsepower (NIST SP 811 App. B, from memory)', () => {
    const bare = (unit: string) => of('yearly_l_per_h', { rated_power_kw: 50, rated_power_unit: unit }).value
    expect(bare('hp')).toBeCloseTo(0.223 * 0.86 * 50 * 0.7456998716, 9)
    expect(bare('metric_hp')).toBeCloseTo(0.223 * 0.86 * 50 * 0.73549875, 9)
  })
})

describe('power at the PTO (C18)', () => {
  it('2π × 540 r/min × 530.5 N·m is 30 kW; over the field time it is work', () => {
    const turned = { pto_torque_nm: 530.5164769729845, pto_rpm: 540, t_start: '09:00', t_end: '10:00' }
    expect(of('pto_kw', turned).value).toBeCloseTo(30, 10)
    expect(of('energy_kwh', turned).value).toBeCloseTo(30, 10)
    expect(of('load_pct', turned, { ptoPower_kw: 50 }).value).toBeCloseTo(60, 10)
    // E14: 30 kW, X 0.6: D497.4 8.217 L/h.
    expect(of('expected_older_l_per_h', { ...turned, pto_torque_nm: 318.3098861837907 }, { ptoPower_kw: 30 }).value).toBeCloseTo(
      8.216828575844428,
      9,
    )
  })
})

describe('density at 15 °C (C16)', () => {
  // Table 53B, worked out independently: 820 at 35 °C without the glass term.
  it('comes from a hydrometer: 834.32249', () => {
    const observed = of('density15_kgm3', { density_obs: 820, density_temp_c: 35 })
    expect(observed.value).toBeCloseTo(834.3224923708985, 6)
    expect(observed.budget.map((part) => part.name)).toEqual(['temperature of the hydrometer', 'reading the hydrometer'])
    expect(of('density15_kgm3', { density_obs: 820, density_temp_c: 35 }, { hydrometerGlass: true }).value).toBeLessThan(834.3)
  })

  it('on the sheet comes before the register, and makes the mass', () => {
    expect(golden('density15_kgm3', { density_15: 840 }).value).toBe(840)
    expect(golden('mass_kg', { density_15: 840 }).value).toBeGreaterThan(golden('mass_kg').value ?? 0)
    expect(golden('mass_kg', {}, { density15_kgm3: 0.832 }).reason?.text).toMatch(/g\/mL/)
    expect(of('density15_kgm3', { density_obs: 820, density_temp_c: null }).reason?.code).toBe('blank')
  })
})

describe('other ways of measuring fuel', () => {
  const WEIGHED = { fuel_method: 'W', jar_start_g: 6200, jar_end_g: 3042.8 }

  // Method W: 5/√6 = 2.04 g, about 2.5 mL or 0.065 % of 3800 mL.
  it('W: 2.04 g is all the doubt there is', () => {
    const mass = golden('mass_kg', WEIGHED)
    expect(1000 * (mass.budget.find((part) => part.name === 'reading the balance')?.u ?? 0)).toBeCloseTo(2.04, 2)
    const fuel = golden('fuel_ml', WEIGHED)
    // 3157.2 g in air over 830.9 kg/m³.
    expect(fuel.value).toBeCloseTo(3799.735, 2)
    expect((100 * (fuel.u ?? 0)) / (fuel.value ?? 1)).toBeCloseTo(0.065, 3)
    expect(fuel.assumes).toEqual(['balance read to 5 g', 'volume at 15 °C'])
    expect(golden('l_per_ha', WEIGHED).value).toBeCloseTo(14.0731, 3)
  })

  it('W: needs both masses, and the density', () => {
    expect(golden('fuel_ml', { ...WEIGHED, jar_end_g: null }).reason?.code).toBe('blank')
    expect(golden('fuel_ml', WEIGHED, { density15_kgm3: null }).reason?.code).toBe('missing_fact')
  })

  it('L: what was poured in is what was burned, without a level', () => {
    const refilled = { fuel_method: 'L', ...numbered('topup_ml', [1000, 1000, 1000, 800]) }
    const fuel = of('fuel_ml', refilled)
    expect(fuel.value).toBe(3800)
    // 44.51 mL, 1.1714 %: half the doubt of the level difference with the same kit.
    expect(fuel.u).toBeCloseTo(44.512170620329606, 9)
  })
})

describe('soil water (C23)', () => {
  it('148.62, 131.75, 32.40 g are 16.98037 % of the dry soil', () => {
    const one = { 'moist_wet_g[1]': 148.62, 'moist_dry_g[1]': 131.75, 'moist_can_g[1]': 32.4 }
    expect(of('soil_water_pct', one).value).toBeCloseTo(16.98037242073478, 10)
    // E12: irrigation slides: 230, 204 and 78 g with the box: 20.635 %.
    const two = { ...one, 'moist_wet_g[2]': 230, 'moist_dry_g[2]': 204, 'moist_can_g[2]': 78 }
    expect(of('soil_water_pct', two).value).toBeCloseTo((16.98037242073478 + 20.634920634920636) / 2, 9)
    expect(of('soil_water_pct', two).budget[0]?.name).toBe('scatter of the samples')
    expect(of('soil_water_pct', { ...one, 'moist_dry_g[1]': 10 }).reason?.code).toBe('impossible')
  })
})

describe('cost (C24)', () => {
  it('14.0741 L/ha at 92.50 are 1301.85; with 520 an hour 2970.99', () => {
    expect(golden('fuel_cost_per_ha', { fuel_price: 92.5 }).value).toBeCloseTo(1301.8518518518517, 8)
    const all = golden('cost_per_ha', { fuel_price: 92.5 }, { labour_per_h: 120, machine_per_h: 400 })
    expect(all.value).toBeCloseTo(2970.99, 2)
    expect(golden('cost_per_ha', { fuel_price: 92.5 }).reason?.text).toMatch(/driver and machine/)
  })
})

describe('a sheet without a plot', () => {
  const HAUL: Readings = {
    jar_start_ml: 4800,
    jar_end_ml: 2000,
    'topup_ml[1]': 1000,
    t_start: '09:10',
    t_end: '10:02',
    distance_km: 19,
    distance_loaded_km: 9.5,
    load_kg: 2000,
    trip_count: 2,
    load_by: 'weighed',
  }

  it('gives litres per hour, 100 km, tonne, and tonne-kilometre', () => {
    expect(of('l_per_h', HAUL).value).toBeCloseTo(4.384615, 6)
    expect(of('l_per_100_km', HAUL).value).toBeCloseTo(20, 12)
    expect(of('l_per_t', HAUL).value).toBeCloseTo(3.8 / 4, 12)
    expect(of('l_per_t_km', HAUL).value).toBeCloseTo(3.8 / 19, 12)
    expect(of('l_per_100_km', HAUL).U).toBeGreaterThan(0)
  })

  it('has no area, and says that none is on the sheet', () => {
    expect(of('l_per_ha', HAUL).reason).toMatchObject({ code: 'not_on_sheet', text: 'This sheet measures no plot.' })
    expect(of('depth_mean_cm', HAUL).reason?.code).toBe('not_on_sheet')
    expect(of('width_mean_m', HAUL).reason?.code).toBe('not_on_sheet')
  })

  it('is less sure of a counted load than of a weighed one', () => {
    const u = (load_by: string) => of('l_per_t', { ...HAUL, load_by }).u ?? 0
    expect(u('counted')).toBeGreaterThan(u('weighed'))
  })

  it('takes tonnes, a way driven loaded throughout, or what went through a machine', () => {
    const { load_kg: _, distance_loaded_km: __, trip_count: ___, ...rest } = HAUL
    expect(of('l_per_t_km', { ...rest, load_t: 2 })).toMatchObject({ value: 3.8 / 38 })
    expect(of('l_per_t_km', { ...rest, load_t: 2 }).assumes).toContain('loaded all the way')
    expect(of('l_per_t', { ...rest, worked_kg: 7600 }).value).toBeCloseTo(0.5, 12)
  })
})

describe('a sheet with a plot', () => {
  it('has no kilometres', () => {
    expect(of('l_per_100_km', buildReadings(), buildFacts()).reason?.code).toBe('not_on_sheet')
  })
})
