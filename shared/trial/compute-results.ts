/** All results of a run from its readings and what the registers know. Pure; rounds nothing. */
import { effectiveCapacity, fieldEfficiency, theoreticalCapacity } from './capacity.ts'
import { type Facts, factsWithReadings } from './facts.ts'
import { fuelMass, fuelPerAcre, fuelPerHectare, fuelPerHour, fuelPerSoil } from './fuel.ts'
import { measureWrittenArea } from './land-units.ts'
import { derive, known, lacking, type Measure } from './measure.ts'
import { measureDensity } from './measure-density.ts'
import { measureFuel, measureFuelAt15 } from './measure-fuel.ts'
import { measureHaulage } from './measure-haulage.ts'
import { measureLoad } from './measure-load.ts'
import { measureSoilWater } from './measure-moisture.ts'
import { measurePlot, type Plot } from './measure-plot.ts'
import { isWeighed, measureWeighed, weighedMass, weighedVolume } from './measure-weighed.ts'
import { measureDepth, measureSlip, measureSpeed, measureSpread, measureTimes, measureWidth } from './measure-work.ts'
import { hours, kmh, metres, ml, quantity, squareMetres } from './quantity.ts'
import { numberAt, type Readings } from './readings.ts'
import { RESULT_KEYS, type ResultKey, type Results, resultOf } from './result.ts'
import { tapeU_m } from './uncertainty.ts'

export interface ResultOptions {
  /** PTO power over rated engine power, where the register has no PTO power. */
  ptoShare?: number
}

/**
 * Every result, by key. A result that cannot be computed is null with its reason; nothing is guessed. The rules are not
 * asked here: `resultsUnderChecks` takes back what a stop forbids.
 */
export function computeResults(readings: Readings, handedFacts: Facts = {}, options: ResultOptions = {}): Results {
  const facts = factsWithReadings(readings, handedFacts)
  const burned = fuelOf(readings, facts)
  const plot = measurePlot(readings, facts)
  const { area } = plot
  const times = measureTimes(readings)
  const work = {
    speed: measureSpeed(readings),
    width: measureWidth(readings),
    depth: measureDepth(readings),
    way: wayOf(readings, plot),
    field_min: times.field,
  }
  const { formula: slipFormula, slip } = measureSlip(readings)
  const measures: Record<ResultKey, Measure> = {
    ...burned,
    ...fuelRates(burned.fuel_ml, burned.mass_kg, area, times.fuel, work.depth),
    area_m2: area,
    area_ha: derive([area], (a = 0) => a / 10_000),
    area_written_m2: measureWrittenArea(readings, facts),
    gross_min: times.gross,
    time_min: times.fuel,
    field_time_min: times.field,
    ...workRates(facts, area, times.field, work.speed),
    ...spreads(readings),
    depth_mean_cm: work.depth,
    width_mean_m: work.width,
    speed_km_h: work.speed,
    slip_pct: slip,
    ...loadResults(readings, facts, work, burned, area, options),
    soil_water_pct: measureSoilWater(readings),
    ...costs(facts, burned.fuel_ml, area, times.field),
    ...haulageRates(readings, burned.fuel_ml),
  }
  const results = RESULT_KEYS.map((key) => [
    key,
    key === 'slip_pct' ? resultOf(key, measures[key], slipFormula) : resultOf(key, measures[key]),
  ])
  return Object.fromEntries(results) as Results
}

const minutes = (t: number) => hours(t / 60)

/** Fuel by volume, at 15 °C and by mass. A weighed jar knows the volume at 15 °C alone, and says so. */
function fuelOf(readings: Readings, facts: Facts) {
  const density = measureDensity(readings, facts)
  if (isWeighed(readings)) {
    const weighed = measureWeighed(readings, facts)
    const volume = positive(weighedVolume(weighed, density))
    const fuel_ml = volume.known ? { ...volume, assumes: [...volume.assumes, 'volume at 15 °C'] } : volume
    return { fuel_ml, fuel15_ml: volume, density15_kgm3: density, mass_kg: positive(weighedMass(weighed, density)) }
  }
  const fuel15_ml = positive(measureFuelAt15(readings, facts))
  const mass_kg = derive([fuel15_ml, density], (v = 0, rho = 0) => fuelMass(ml(v), quantity(rho, 'kg/m3')))
  return { fuel_ml: positive(measureFuel(readings, facts)), fuel15_ml, density15_kgm3: density, mass_kg }
}

/** No engine makes fuel: a balance of nothing or less is a misreading, not a result. */
function positive(fuel: Measure): Measure {
  return fuel.known && fuel.value <= 0
    ? lacking('impossible', `The jar balance gives ${Math.round(fuel.value)} mL used.`, fuel.cells)
    : fuel
}

const fuelRates = (fuel: Measure, mass: Measure, area: Measure, time: Measure, depth: Measure) => ({
  l_per_h: derive([fuel, time], (f = 0, t = 1) => fuelPerHour(ml(f), minutes(t))),
  l_per_ha: derive([fuel, area], (f = 0, a = 1) => fuelPerHectare(ml(f), squareMetres(a))),
  l_per_acre: derive([fuel, area], (f = 0, a = 1) => fuelPerAcre(ml(f), squareMetres(a))),
  ml_per_m3: derive([fuel, area, depth], (f = 0, a = 1, d = 1) => fuelPerSoil(ml(f), squareMetres(a), quantity(d, 'cm'))),
  kg_per_h: derive([mass, time], (m = 0, t = 1) => m / minutes(t)),
  kg_per_ha: derive([mass, area], (m = 0, a = 1) => (m * 10_000) / a),
})

function workRates(facts: Facts, area: Measure, field: Measure, speed: Measure) {
  const tfc_ha_h = derive([ratedWidth(facts), speed], (w = 0, v = 0) => theoreticalCapacity(metres(w), kmh(v)))
  const efc_ha_h = derive([area, field], (a = 0, t = 1) => effectiveCapacity(squareMetres(a), minutes(t)))
  const fe_pct = derive([efc_ha_h, tfc_ha_h], (e = 0, t = 1) => fieldEfficiency(quantity(e, 'ha/h'), quantity(t, 'ha/h')))
  return { tfc_ha_h, efc_ha_h, fe_pct }
}

function ratedWidth(facts: Facts): Measure {
  const width = facts.ratedWidth_m ?? null
  return width === null ? lacking('missing_fact', 'The rated width of the implement is not known.', []) : known(width, [])
}

function spreads(readings: Readings) {
  const [depths, widths] = [measureSpread(readings, 'depth_cm'), measureSpread(readings, 'width_m')]
  return {
    depth_sd_cm: depths.deviation,
    depth_cv_pct: depths.variation,
    width_sd_m: widths.deviation,
    width_cv_pct: widths.variation,
  }
}

/** Way of all passes, m. */
function wayOf(readings: Readings, { pass_m, area }: Plot): Measure {
  const passes = numberAt(readings, 'pass_count')
  if (passes === null) return lacking('blank', 'No work done: the passes are not counted.', ['pass_count'])
  if (pass_m === null) return lacking('blank', 'No work done: the length of a pass is not known.', ['pass_length_m'])
  const cells = numberAt(readings, 'pass_length_m') === null ? area.cells : ['pass_length_m']
  // One tape laid all lengths: its error goes into every pass alike.
  return known(passes * pass_m, ['pass_count', ...cells], [{ name: 'tape', u: passes * tapeU_m(pass_m) }])
}

function loadResults(
  readings: Readings,
  facts: Facts,
  work: Parameters<typeof measureLoad>[2],
  burned: { fuel_ml: Measure; mass_kg: Measure },
  area: Measure,
  { ptoShare }: ResultOptions,
) {
  const load = measureLoad(readings, facts, work, ptoShare)
  return {
    draft_n: load.draft,
    draft_low_n: load.draftLow,
    draft_high_n: load.draftHigh,
    drawbar_kw: load.drawbar,
    pto_kw: load.pto,
    load_pct: load.share_pct,
    energy_kwh: load.energy,
    l_per_kwh: derive([burned.fuel_ml, load.energy], (f = 0, e = 1) => f / 1000 / e),
    g_per_kwh: derive([burned.mass_kg, load.energy], (m = 0, e = 1) => (1000 * m) / e),
    expected_l_per_h: load.expected,
    expected_older_l_per_h: load.older,
    yearly_l_per_h: load.yearly,
    expected_l_per_ha: derive([load.expected, area, work.field_min], (q = 0, a = 1, t = 0) => (q * minutes(t) * 10_000) / a),
  }
}

/** C24, in the currency of the price. */
function costs(facts: Facts, fuel: Measure, area: Measure, field: Measure) {
  const price = told(facts.fuelPrice_per_l, 'The price of fuel is not known.')
  const hourly = (facts.labour_per_h ?? 0) + (facts.machine_per_h ?? 0)
  const rate = told(hourly > 0 ? hourly : null, 'What driver and machine cost an hour is not known.')
  return {
    fuel_cost_per_ha: derive([fuel, area, price], (f = 0, a = 1, p = 0) => (10 * f * p) / a),
    cost_per_ha: derive(
      [fuel, area, price, rate, field],
      (f = 0, a = 1, p = 0, r = 0, t = 0) => (10 * f * p + 10_000 * r * minutes(t)) / a,
    ),
  }
}

const told = (value: number | null | undefined, reason: string): Measure =>
  value == null ? lacking('missing_fact', reason, []) : known(value, [])

function haulageRates(readings: Readings, fuel: Measure) {
  const { distance, tonnes, tonneKilometres } = measureHaulage(readings)
  const litresPer = (moved: Measure, per: number) => derive([fuel, moved], (f = 0, x = 1) => ((f / 1000) * per) / x)
  return {
    l_per_100_km: litresPer(distance, 100),
    l_per_t: litresPer(tonnes, 1),
    l_per_t_km: litresPer(tonneKilometres, 1),
  }
}
