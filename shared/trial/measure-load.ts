/** Draft, power, energy and the fuel to expect as measures (C18 to C22). */
import {
  draft_n,
  draftFiguresOf,
  drawbarPower,
  expectedFuel,
  olderSpecificFuel_l_kwh,
  ptoPower,
  TRACTION,
  yearlyFuel,
} from './draft.ts'
import { type Facts, ptoPowerOf } from './facts.ts'
import { derive, known, lacking, type Measure } from './measure.ts'
import { kmh, quantity } from './quantity.ts'
import { numberAt, type Readings, textAt } from './readings.ts'
import { soilOf } from './soil.ts'
import { rectangularU, SPREAD, stepU } from './uncertainty.ts'

export interface Work {
  speed: Measure
  width: Measure
  depth: Measure
  /** Way of all passes together, m. */
  way: Measure
  field_min: Measure
}

export interface Load {
  draft: Measure
  draftLow: Measure
  draftHigh: Measure
  drawbar: Measure
  pto: Measure
  energy: Measure
  share_pct: Measure
  expected: Measure
  older: Measure
  yearly: Measure
}

/** A pull, N, with what it is made of: the speed first, since power and energy ask for it again. */
interface Pull {
  inputs: Measure[]
  newtons: (...values: number[]) => number
}

/** C22. The range of the table enters as a factor about 1: rectangular. */
function byTable(readings: Readings, facts: Facts, work: Work): { pull: Pull; range: number } | Measure {
  const figures = draftFiguresOf(facts.operation ?? null, textAt(readings, 'implement_type'))
  const soil = soilOf(textAt(readings, 'soil_class'))
  if (!figures) return lacking('missing_fact', 'No draft is known for this tool: the equation of D497 does not hold.', [])
  if (!soil) return lacking('blank', 'No draft without the class of the soil.', ['soil_class'])
  const tools = facts.toolCount ?? null
  if (figures.per === 'tool' && tools === null)
    return lacking('missing_fact', 'No draft: the number of tines of the implement is not known.', [])
  const width = figures.per === 'metre' ? work.width : known(tools ?? 0, [])
  const range = figures.range_pct / 100
  const factor = known(1, ['soil_class'], [{ name: 'range of the draft table', u: rectangularU(range) }])
  return {
    range,
    pull: {
      inputs: [work.speed, width, work.depth, factor],
      newtons: (v = 0, w = 0, d = 0, f = 1) => f * draft_n(figures, soil, kmh(v), w, quantity(d, 'cm')),
    },
  }
}

function byDynamometer(readings: Readings, work: Work): Pull | null {
  const kn = numberAt(readings, 'draft_kn')
  if (kn === null) return null
  const draft = known(kn, ['draft_kn'], [{ name: 'dynamometer', u: stepU(SPREAD.dynamometerStep_kn) }])
  return { inputs: [work.speed, draft], newtons: (_v = 0, pull = 0) => 1000 * pull }
}

const sayTable = (measure: Measure): Measure =>
  measure.known ? { ...measure, assumes: [...measure.assumes, 'draft by the table of D497, not measured'] } : measure

export function measureLoad(readings: Readings, facts: Facts, work: Work, ptoShare?: number): Load {
  const table = byTable(readings, facts, work)
  const model = 'pull' in table ? table.pull : null
  const measured = byDynamometer(readings, work)
  const pull = measured ?? model
  const none = 'pull' in table ? lacking('blank', 'No draft.', []) : table
  const said = (measure: Measure) => (measured ? measure : sayTable(measure))
  const draft = model ? derive(model.inputs, model.newtons) : none
  const bound = (side: number) =>
    model && 'range' in table ? derive(model.inputs.slice(0, -1), (...x) => (1 + side * table.range) * model.newtons(...x)) : none
  const drawbar = pull ? said(derive(pull.inputs, (...x) => drawbarPower(pull.newtons(...x) / 1000, kmh(x[0] ?? 0)))) : none
  const pto = measurePto(readings)
  const pulled = pull ? said(derive([...pull.inputs, work.way], (...x) => (pull.newtons(...x) * (x.at(-1) ?? 0)) / 3.6e6)) : none
  const turned = derive([pto, work.field_min], (kw = 0, min = 0) => (kw * min) / 60)
  const rated = ratedPto(facts, ptoShare)
  const traction = TRACTION[facts.drive ?? '2WD'].tilled
  const share = derive([pto.known ? pto : drawbar, rated], (kw = 0, most = 1) => (pto.known ? kw : kw / traction) / most)
  const within = withinEngine(share)
  return {
    draft,
    draftLow: bound(-1),
    draftHigh: bound(1),
    drawbar,
    pto,
    energy: pulled.known || !turned.known ? pulled : turned,
    share_pct: derive([share], (x = 0) => 100 * x),
    expected: derive([within, throttle(readings, facts), rated], (x = 0, n = 1, kw = 0) =>
      expectedFuel(x, n, quantity(kw, 'kW')),
    ),
    older: derive([within, rated], (x = 0, kw = 0) => olderSpecificFuel_l_kwh(x) * x * kw),
    yearly: derive([rated], (kw = 0) => yearlyFuel(quantity(kw, 'kW'))),
  }
}

/** C18 at the PTO: torque and speed. */
function measurePto(readings: Readings): Measure {
  const [torque, rpm] = [numberAt(readings, 'pto_torque_nm'), numberAt(readings, 'pto_rpm')]
  const cells = ['pto_torque_nm', 'pto_rpm']
  if (torque === null || rpm === null) return lacking('not_on_sheet', 'No torque at the PTO was measured.', cells)
  const speed = known(rpm, ['pto_rpm'], [{ name: 'tachometer', u: stepU(SPREAD.tachometerStep_rpm) }])
  return derive([known(torque, ['pto_torque_nm']), speed], (nm = 0, n = 0) => ptoPower(nm, n))
}

function ratedPto(facts: Facts, ptoShare?: number): Measure {
  const kw = ptoPowerOf(facts, ptoShare)
  if (kw === null) return lacking('missing_fact', 'The power of the tractor is not known.', [])
  return known(kw, [], [], facts.ptoPower_kw == null ? ['PTO power taken from the rated power of the engine'] : [])
}

/** The equations hold from no load to full load. */
function withinEngine(share: Measure): Measure {
  if (!share.known || (share.value > 0 && share.value <= 1)) return share
  return lacking('impossible', 'The work asks for more than the PTO power, by this draft: no fuel to expect.', share.cells)
}

/** N of C19: engine speed in work over the rated one; faster than rated is full throttle. */
function throttle(readings: Readings, facts: Facts): Measure {
  const [rpm, rated] = [numberAt(readings, 'rpm_load'), facts.ratedRpm ?? null]
  if (rpm === null) return lacking('blank', 'No fuel to expect without the engine speed in work.', ['rpm_load'])
  if (rated === null) return lacking('missing_fact', 'The rated speed of the engine is not known.', [])
  const step = [{ name: 'tachometer', u: stepU(SPREAD.tachometerStep_rpm) }]
  return derive([known(rpm, ['rpm_load'], step)], (n = 0) => Math.min(1, n / rated))
}
