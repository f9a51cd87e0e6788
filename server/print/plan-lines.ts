/** The typed block of a planned sheet: twelve lines, three columns, read down. */
import type { PlanLine } from './sheet-pdf.ts'

/** What the plan and the registers know of one run. */
export interface PrintedPlan {
  /** ISO date. */
  heldOn: string
  run: number
  runs: number
  place: { number: number; name: string }
  /** null once consent was withdrawn. */
  farmer: string | null
  plot: string
  tractor: {
    number: number
    name: string
    ratedPower_kw: number
    ratedRpm: number
    drive: string
    tyreFront: string
    tyreRear: string
  }
  implement: { number: number; name: string; ratedWidth_m: number }
  kit: { number: number; jarCapacity_ml: number; jugCapacity_ml: number; tapeSerial: string; gaugeSerial: string }
  demonstrator: { number: number; name: string }
  driver: string
}

/** 34 of the 36 mm a value has in 7 pt mono, at 1.56 mm a character: the next column's label begins after it. */
export const VALUE_CHARS = 22

/** Cuts in the middle of a value, so that number and unit at its ends always stand. */
function cut(before: string, text: string, after = ''): string {
  const room = VALUE_CHARS - before.length - after.length
  const kept = text.length <= room ? text : `${text.slice(0, Math.max(0, room - 1)).trimEnd()}…`
  return `${before}${kept}${after}`
}

export function planLines(plan: PrintedPlan): PlanLine[] {
  const { place, tractor, implement, kit, demonstrator } = plan
  const [year, month, day] = plan.heldOn.split('-')
  const tyres = [tractor.tyreFront, tractor.tyreRear].filter(Boolean).join(', ')
  const tools = [kit.tapeSerial, kit.gaugeSerial].filter(Boolean).join(', ')
  return [
    { label: 'date', value: `${day}-${month}-${year} run ${plan.run}/${plan.runs}` },
    { label: 'place', value: cut(`${place.number} `, place.name) },
    { label: 'farmer', value: cut('', plan.farmer ?? '') },
    { label: 'plot', value: cut('', plan.plot) },
    { label: 'tractor', value: cut(`${tractor.number} `, tractor.name) },
    { label: 'engine', value: cut('', `${tractor.ratedPower_kw} kW ${tractor.ratedRpm}/min ${tractor.drive}`) },
    { label: 'implement', value: cut(`${implement.number} `, implement.name, ` ${implement.ratedWidth_m.toFixed(2)} m`) },
    { label: 'tyres', value: cut('', tyres) },
    { label: `kit ${kit.number}`, value: `jar ${kit.jarCapacity_ml} jug ${kit.jugCapacity_ml} mL` },
    { label: 'tape, gauge', value: cut('', tools) },
    { label: 'demonstr.', value: cut(`${demonstrator.number} `, demonstrator.name) },
    { label: 'driver', value: cut('', plan.driver) },
  ]
}

/** Which line shows the farmer: it is blanked in pictures when consent is withdrawn. */
export const FARMER_LINE = 2
