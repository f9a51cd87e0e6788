import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { buildFacts, buildFullReadings, buildReadings, numbered } from '../../tests/builders/readings.ts'
import { computeResults } from './compute-results.ts'
import type { Facts } from './facts.ts'
import type { Readings } from './readings.ts'
import type { ResultKey, Results } from './result.ts'

const value = (results: Results, key: ResultKey) => results[key].value ?? Number.NaN
const relative_pct = (results: Results, key: ResultKey) => (100 * (results[key].u ?? Number.NaN)) / value(results, key)
const part = (results: Results, key: ResultKey, name: string) => results[key].budget.find((p) => p.name === name)?.u

// The golden sheet, every line of its budget (JCGM 100:2008), worked out independently to full digits.
describe('the golden sheet', () => {
  const r = computeResults(buildFullReadings(), buildFacts())

  it('fuel: 3800 mL, its four parts and their sum', () => {
    expect(r.fuel_ml.value).toBe(3800)
    expect(part(r, 'fuel_ml', 'reading the jar')).toBeCloseTo(81.64965809277261, 10)
    expect(part(r, 'fuel_ml', 'filling the jug')).toBeCloseTo(28.86751345948129, 10)
    expect(part(r, 'fuel_ml', 'scale of the jar')).toBeCloseTo(16.165807537309522, 10)
    expect(part(r, 'fuel_ml', 'scale of the jug')).toBeCloseTo(5.773502691896258, 10)
    expect(r.fuel_ml.u).toBeCloseTo(88.2874094458925, 9)
    expect(relative_pct(r, 'fuel_ml')).toBeCloseTo(2.3233528801550656, 10)
  })

  it('area: 2700 m², and the edge is the doubt, not the tape', () => {
    expect(r.area_m2.value).toBe(2700)
    expect(relative_pct(r, 'area_m2')).toBeCloseTo(0.6131244343658642, 8)
    expect((100 * (part(r, 'area_m2', 'tape') ?? 0)) / 2700).toBeCloseTo(0.1971655317584193, 8)
    expect((part(r, 'area_m2', 'edge of the plot') ?? 0) / 60).toBeCloseTo(0.26125099680830566, 10)
  })

  it('14.0741 L/ha, u 0.338185, U 0.676370', () => {
    expect(r.l_per_ha.value).toBeCloseTo(14.074074074074073, 12)
    expect(r.l_per_ha.u).toBeCloseTo(0.3381848062694031, 8)
    expect(r.l_per_ha.U).toBeCloseTo(0.6763696125388062, 8)
    expect(relative_pct(r, 'l_per_ha')).toBeCloseTo(2.402892044545759, 8)
    expect(r.l_per_acre.value).toBeCloseTo(5.6955757056, 11)
  })

  it('4.3846 L/h, u 0.107529, U 0.215058', () => {
    expect(r.l_per_h.value).toBeCloseTo(4.384615384615384, 12)
    expect(relative_pct(r, 'time_min')).toBeCloseTo(0.7850928662766596, 10)
    expect(r.l_per_h.u).toBeCloseTo(0.10752896611923901, 8)
    expect(r.l_per_h.U).toBeCloseTo(0.21505793223847802, 8)
  })

  it('depth 15.125 cm, width 0.905 m with their spreads', () => {
    expect(r.depth_mean_cm.value).toBe(15.125)
    expect(r.depth_mean_cm.u).toBeCloseTo(0.3573323432167482, 11)
    expect(relative_pct(r, 'depth_mean_cm')).toBeCloseTo(2.3625278890363517, 10)
    expect(r.depth_sd_cm.value).toBeCloseTo(0.685853, 6)
    expect(r.depth_cv_pct.value).toBeCloseTo(4.5346, 4)
    expect(r.width_mean_m.value).toBeCloseTo(0.905, 14)
    expect(r.width_mean_m.u).toBeCloseTo(0.004772607021092122, 12)
    expect(r.width_cv_pct.value).toBeCloseTo(1.6677, 4)
  })

  it('9.3052 mL/m³ with 3.36978 %', () => {
    expect(r.ml_per_m3.value).toBeCloseTo(9.305172941536577, 12)
    expect(relative_pct(r, 'ml_per_m3')).toBeCloseTo(3.3697816255976973, 7)
  })

  it('capacities, speed and slip', () => {
    expect(r.tfc_ha_h.value).toBeCloseTo(0.39592668024439914, 13)
    expect(r.efc_ha_h.value).toBeCloseTo(0.31153846153846154, 13)
    expect(r.fe_pct.value).toBeCloseTo(78.68589743589745, 10)
    expect(r.speed_km_h.value).toBeCloseTo(4.3991853360488795, 12)
    expect(relative_pct(r, 'speed_km_h')).toBeCloseTo(1.4037707756636426, 10)
    expect(r.slip_pct.value).toBeCloseTo(12.765957446808507, 11)
    expect(r.slip_pct.u).toBeCloseTo(0.31371593238796197, 9)
  })

  it('3758.17 mL at 15 °C, 3.12680 kg, 3.6078 kg/h, 11.5807 kg/ha (E15)', () => {
    expect(r.fuel15_ml.value).toBeCloseTo(3758.16855722427, 8)
    expect(r.mass_kg.value).toBeCloseTo(3.1267962396105924, 11)
    expect(r.kg_per_h.value).toBeCloseTo(3.607841814935299, 11)
    expect(r.kg_per_ha.value).toBeCloseTo(11.580726813372564, 10)
  })

  it('tells the cells and the formula of every figure', () => {
    expect(r.l_per_ha.from).toEqual(['jar_start_ml', 'jar_end_ml', 'topup_ml[1]', 'side_ab_m', 'side_bc_m'])
    expect(r.l_per_ha.formula).toBe('C03')
    expect(r.slip_pct.formula).toBe('C12')
    expect(r.l_per_h.from).toEqual(['jar_start_ml', 'jar_end_ml', 'topup_ml[1]', 't_start', 't_end'])
  })
})

// What fits the printed layout: the first 10 depths and 5 widths, worked out independently.
describe('the short golden sheet', () => {
  const r = computeResults(buildReadings(), buildFacts())

  it('gives its printed figures', () => {
    expect(r.depth_mean_cm.value).toBeCloseTo(15.15, 12)
    expect(r.width_mean_m.value).toBeCloseTo(0.908, 12)
    expect(r.ml_per_m3.value).toBeCloseTo(9.28982, 5)
    expect(r.l_per_ha.value).toBeCloseTo(14.0741, 4)
    expect(r.l_per_ha.U).toBeCloseTo(0.6765, 4)
    expect(r.l_per_h.U).toBeCloseTo(0.22, 2)
  })
})

describe('uncertainty of the fuel', () => {
  const relative = (changes: Readings, facts: Facts = {}) =>
    relative_pct(computeResults(buildReadings(changes), buildFacts(facts)), 'fuel_ml')

  // The same budget with δ = 100 mL.
  it('is 1.39117 % with marks of 100 mL', () => {
    expect(relative({}, { jarMark_ml: 100 })).toBeCloseTo(1.391173866778878, 10)
  })

  it('is that of half a mark as soon as one level stands half-way', () => {
    // 4900 with marks of 200: δ 100 for both levels; the jar now gives 2900 of 3900 mL.
    const u = Math.hypot(100 / Math.sqrt(6), 100 / Math.sqrt(12), (0.01 * 2900) / Math.sqrt(3), 10 / Math.sqrt(3))
    expect(relative({ jar_start_ml: 4900 })).toBeCloseTo((100 * u) / 3900, 10)
  })

  // Method L: √(40²/6 + 100²/12 + 3·20²/3 + 21.94²); three full fillings and a part of 800 mL.
  it('is halved by refilling to the same line: 44.51 mL, 1.1714 %', () => {
    const refilled = { fuel_method: 'L', jar_start_ml: 4000, jar_end_ml: 4000, ...numbered('topup_ml', [1000, 1000, 1000, 800]) }
    const r = computeResults(buildReadings(refilled), buildFacts())
    expect(r.fuel_ml.value).toBe(3800)
    expect(r.fuel_ml.u).toBeCloseTo(44.512170620329606, 9)
    expect(relative_pct(r, 'fuel_ml')).toBeCloseTo(1.1713729110613054, 10)
  })

  it('says what it takes for granted where the register is silent', () => {
    const r = computeResults(buildReadings(), {})
    expect(r.fuel_ml.u).toBeCloseTo(88.2874094458925, 9)
    expect(r.fuel_ml.assumes).toEqual(['jar marked each 200 mL', 'jug marked each 100 mL', 'scale of jar and jug within 1 %'])
    expect(computeResults(buildReadings(), buildFacts()).fuel_ml.assumes).toEqual([])
  })

  it('adds a clock difference for each stop taken out', () => {
    const stop = { 'stop_from[1]': '09:20', 'stop_to[1]': '09:26', 'stop_engine_off[1]': true }
    expect(computeResults(buildReadings(stop), buildFacts()).time_min.u).toBeCloseTo(Math.sqrt(2) / Math.sqrt(6), 12)
  })
})

describe('Monte Carlo (JCGM 101)', () => {
  /** A seeded generator (xorshift), so that the test is the same everywhere. */
  function uniform(seed: number): () => number {
    let state = seed
    return () => {
      state ^= state << 13
      state ^= state >>> 17
      state ^= state << 5
      return (state >>> 0) / 4294967296
    }
  }

  // Independent run: mean 14.0744, u 0.3384, 95 % 13.427 to 14.727 from 2·10⁶ draws.
  it('agrees with the budget of L/ha', () => {
    const random = uniform(20261014)
    const within = (half: number) => half * (2 * random() - 1)
    const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())
    const draws = Array.from({ length: 200_000 }, () => {
      const jar = (2800 + within(100) - within(100)) * (1 + within(0.01))
      const jug = (1000 + within(50)) * (1 + within(0.01))
      const side = (length: number) =>
        length + (within(0.0063) * length) / 30 + 0.05 * Math.sqrt(Math.ceil(length / 30)) * normal()
      const breadth = side(45) + within(0.905 / 2)
      return ((jar + jug) / 1000 / (side(60) * breadth)) * 10_000
    }).sort((a, b) => a - b)
    const mean = draws.reduce((sum, x) => sum + x, 0) / draws.length
    const u = Math.sqrt(draws.reduce((sum, x) => sum + (x - mean) ** 2, 0) / draws.length)
    expect(mean).toBeCloseTo(14.0744, 2)
    expect(u / 0.3384).toBeCloseTo(1, 2)
    expect(draws[Math.floor(0.025 * draws.length)]).toBeCloseTo(13.427, 1)
    expect(draws[Math.floor(0.975 * draws.length)]).toBeCloseTo(14.727, 1)
    const ours = computeResults(buildFullReadings(), buildFacts()).l_per_ha.u ?? 0
    expect(u / ours).toBeCloseTo(1, 2)
  })
})

describe('shapes of plot', () => {
  const area = (changes: Readings) => computeResults(buildReadings(changes), buildFacts()).area_m2
  const QUAD = { side_ab_m: 62.07, side_bc_m: 44.14, side_cd_m: 61.1, side_da_m: 43.57, diag_ac_m: 75.04 }

  it('four sides and a diagonal', () => {
    expect(area(QUAD).value).toBeCloseTo(2700.288785666263, 8)
    expect(area({ ...QUAD, diag_ac_m: null, diag_bd_m: 76.16 }).value).toBeCloseTo(2700.288656179291, 8)
  })

  it('passes side by side, triangles, and a piece taken off', () => {
    expect(area({ plot_shape: 'S', pass_length_m: 60 }).value).toBeCloseTo(50 * 0.908 * 60, 9)
    const triangle = {
      plot_shape: 'P',
      ...numbered('tri_a', [30, 13]),
      ...numbered('tri_b', [40, 14]),
      ...numbered('tri_c', [50, 15]),
    }
    expect(area(triangle).value).toBeCloseTo(600 + 84, 9)
    expect(area({ deduct_m2: 100 }).value).toBe(2600)
    // A deduction adds 5 % of itself.
    expect(area({ deduct_m2: 100 }).budget.find((p) => p.name === 'deducted piece')?.u).toBeCloseTo(5, 6)
  })

  it('have no area when they do not close or a side is blank', () => {
    expect(area({ ...QUAD, diag_ac_m: 150 }).reason).toMatchObject({
      code: 'impossible',
      text: 'The sides and the diagonal do not close to a plot.',
    })
    expect(area({ side_bc_m: null }).reason?.code).toBe('blank')
    expect(area({ deduct_m2: 3000 }).value).toBeNull()
  })
})

describe('what is missing', () => {
  it('leaves the results that need it without a figure, with the reason, and the others standing', () => {
    const r = computeResults(buildReadings({ jar_end_ml: null }), buildFacts())
    expect(r.l_per_ha).toMatchObject({
      value: null,
      U: null,
      reason: { code: 'blank', text: 'No fuel figure without the jar level at the end.' },
    })
    expect(r.efc_ha_h.value).toBeCloseTo(0.3115, 4)
    const bare = computeResults(buildReadings(), {})
    expect(bare.tfc_ha_h.reason).toMatchObject({ code: 'missing_fact', text: 'The rated width of the implement is not known.' })
    expect(bare.mass_kg.reason?.code).toBe('missing_fact')
    expect(bare.l_per_ha.value).toBeCloseTo(14.0741, 4)
  })

  it('takes facts that stand among the readings', () => {
    expect(computeResults(buildReadings({ rated_width_m: 0.9 }), {}).tfc_ha_h.value).toBeCloseTo(0.395927, 6)
  })

  it('makes no fuel out of a negative balance', () => {
    const r = computeResults(buildReadings({ jar_start_ml: 1000 }), buildFacts())
    expect(r.fuel_ml.reason).toMatchObject({ code: 'impossible', text: 'The jar balance gives 0 mL used.' })
  })

  it('has no volume for a weighed jar on this sheet', () => {
    expect(computeResults(buildReadings({ fuel_method: 'W' }), buildFacts()).fuel_ml.reason?.code).toBe('not_on_sheet')
  })

  it('uses other ways of measuring slip', () => {
    const none = { 'dist_load_m[1]': null, 'dist_load_m[2]': null, 'dist_noload_m[1]': null, 'dist_noload_m[2]': null }
    const turns = computeResults(buildReadings({ ...none, rev_load: 11.5, rev_noload: 10 }), buildFacts()).slip_pct
    expect(turns).toMatchObject({ formula: 'C13' })
    expect(turns.value).toBeCloseTo(13.043478260869565, 11)
    const watch = computeResults(buildReadings({ ...none, slip_t_load_s: 15, slip_t_noload_s: 13 }), buildFacts()).slip_pct
    expect(watch).toMatchObject({ formula: 'C14' })
    expect(watch.value).toBeCloseTo(13.333333333333334, 11)
  })
})

describe('monotonicity', () => {
  const litres = (changes: Readings) => value(computeResults(buildReadings(changes), buildFacts()), 'l_per_ha')

  it('more fuel, or less land, is more per hectare', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 5, max: 24 }),
        fc.double({ min: 20, max: 200, noNaN: true }),
        fc.double({ min: 0.1, max: 50, noNaN: true }),
        (hundreds, side, more) => {
          const jar_end_ml = hundreds * 100
          expect(litres({ jar_end_ml, side_bc_m: side })).toBeGreaterThan(
            litres({ jar_end_ml: jar_end_ml + 200, side_bc_m: side }),
          )
          expect(litres({ side_bc_m: side })).toBeGreaterThan(litres({ side_bc_m: side + more }))
        },
      ),
      { numRuns: 30 },
    )
  })

  it('is less sure of a jug with coarser marks, and of a kit with a looser scale', () => {
    fc.assert(
      fc.property(fc.integer({ min: 10, max: 500 }), fc.double({ min: 0.1, max: 3, noNaN: true }), (mark, scale) => {
        const u = (facts: Facts) => computeResults(buildReadings(), buildFacts(facts)).l_per_ha.u ?? 0
        expect(u({ jugMark_ml: mark * 2 })).toBeGreaterThan(u({ jugMark_ml: mark }))
        expect(u({ kitScale_pct: scale * 2 })).toBeGreaterThan(u({ kitScale_pct: scale }))
      }),
      { numRuns: 20 },
    )
  })
})
