/** All results of a run from its readings and what the registers know. Pure; rounds nothing. */
import { effectiveCapacity, fieldEfficiency, theoreticalCapacity } from './capacity.ts'
import { type Facts, factsWithReadings } from './facts.ts'
import { fuelMass, fuelPerAcre, fuelPerHectare, fuelPerHour, fuelPerSoil } from './fuel.ts'
import { derive, known, lacking, type Measure } from './measure.ts'
import { measureFuel, measureFuelAt15 } from './measure-fuel.ts'
import { measurePlot } from './measure-plot.ts'
import { measureDepth, measureSlip, measureSpeed, measureSpread, measureTimes, measureWidth } from './measure-work.ts'
import { hours, kmh, metres, ml, quantity, squareMetres } from './quantity.ts'
import type { Readings } from './readings.ts'
import { type ResultKey, type Results, resultOf } from './result.ts'

/**
 * Every result, by key. A result that cannot be computed is null with its reason; nothing is guessed. The rules are not
 * asked here: `resultsUnderChecks` takes back what a stop forbids.
 */
export function computeResults(readings: Readings, handedFacts: Facts = {}): Results {
  const facts = factsWithReadings(readings, handedFacts)
  const fuel = positive(measureFuel(readings, facts))
  const fuel15 = positive(measureFuelAt15(readings, facts))
  const { area } = measurePlot(readings, facts)
  const { gross, fuel: time, field } = measureTimes(readings)
  const [depth, width, speed] = [measureDepth(readings), measureWidth(readings), measureSpeed(readings)]
  const [depths, widths] = [measureSpread(readings, 'depth_cm'), measureSpread(readings, 'width_m')]
  const { formula: slipFormula, slip } = measureSlip(readings)
  const mass = derive([fuel15, density(facts)], (v = 0, rho = 0) => fuelMass(ml(v), quantity(rho, 'kg/m3')))
  const tfc = derive([ratedWidth(facts), speed], (w = 0, v = 0) => theoreticalCapacity(metres(w), kmh(v)))
  const efc = derive([area, field], (a = 0, t = 1) => effectiveCapacity(squareMetres(a), minutes(t)))
  const measures: Record<ResultKey, Measure> = {
    fuel_ml: fuel,
    l_per_h: derive([fuel, time], (f = 0, t = 1) => fuelPerHour(ml(f), minutes(t))),
    l_per_ha: derive([fuel, area], (f = 0, a = 1) => fuelPerHectare(ml(f), squareMetres(a))),
    l_per_acre: derive([fuel, area], (f = 0, a = 1) => fuelPerAcre(ml(f), squareMetres(a))),
    ml_per_m3: derive([fuel, area, depth], (f = 0, a = 1, d = 1) => fuelPerSoil(ml(f), squareMetres(a), quantity(d, 'cm'))),
    fuel15_ml: fuel15,
    mass_kg: mass,
    kg_per_h: derive([mass, time], (m = 0, t = 1) => m / minutes(t)),
    kg_per_ha: derive([mass, area], (m = 0, a = 1) => (m * 10_000) / a),
    area_m2: area,
    area_ha: derive([area], (a = 0) => a / 10_000),
    gross_min: gross,
    time_min: time,
    field_time_min: field,
    tfc_ha_h: tfc,
    efc_ha_h: efc,
    fe_pct: derive([efc, tfc], (e = 0, t = 1) => fieldEfficiency(quantity(e, 'ha/h'), quantity(t, 'ha/h'))),
    depth_mean_cm: depth,
    depth_sd_cm: depths.deviation,
    depth_cv_pct: depths.variation,
    width_mean_m: width,
    width_sd_m: widths.deviation,
    width_cv_pct: widths.variation,
    speed_km_h: speed,
    slip_pct: slip,
  }
  const entries = Object.entries(measures) as Array<[ResultKey, Measure]>
  const results = entries.map(([key, measure]) => [
    key,
    key === 'slip_pct' ? resultOf(key, measure, slipFormula) : resultOf(key, measure),
  ])
  return Object.fromEntries(results) as Results
}

const minutes = (t: number) => hours(t / 60)

/** No engine makes fuel: a balance of nothing or less is a misreading, not a result. */
function positive(fuel: Measure): Measure {
  return fuel.known && fuel.value <= 0
    ? lacking('impossible', `The jar balance gives ${Math.round(fuel.value)} mL used.`, fuel.cells)
    : fuel
}

function ratedWidth(facts: Facts): Measure {
  const width = facts.ratedWidth_m ?? null
  return width === null ? lacking('missing_fact', 'The rated width of the implement is not known.', []) : known(width, [])
}

function density(facts: Facts): Measure {
  const rho = facts.density15_kgm3 ?? null
  return rho === null
    ? lacking('missing_fact', 'The density of the fuel at 15 °C is not known.', ['density_15'])
    : known(rho, ['density_15'])
}
