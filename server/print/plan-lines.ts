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

/** A line whose number and unit, at the value's ends, stand also where what is between them must be cut. */
const between = (label: string, before: string, text: string, after = ''): PlanLine => ({
  label,
  value: `${before}${text}${after}`,
  ends: { before, after },
})

export function planLines(plan: PrintedPlan): PlanLine[] {
  const { place, tractor, implement, kit, demonstrator } = plan
  const [year, month, day] = plan.heldOn.split('-')
  const tyres = [tractor.tyreFront, tractor.tyreRear].filter(Boolean).join(', ')
  const tools = [kit.tapeSerial, kit.gaugeSerial].filter(Boolean).join(', ')
  return [
    { label: 'date', value: `${day}-${month}-${year} run ${plan.run}/${plan.runs}` },
    between('place', `${place.number} `, place.name),
    { label: 'farmer', value: plan.farmer ?? '' },
    { label: 'plot', value: plan.plot },
    between('tractor', `${tractor.number} `, tractor.name),
    { label: 'engine', value: `${tractor.ratedPower_kw} kW ${tractor.ratedRpm}/min ${tractor.drive}` },
    between('implement', `${implement.number} `, implement.name, ` ${implement.ratedWidth_m.toFixed(2)} m`),
    { label: 'tyres', value: tyres },
    { label: `kit ${kit.number}`, value: `jar ${kit.jarCapacity_ml} jug ${kit.jugCapacity_ml} mL` },
    { label: 'tape, gauge', value: tools },
    between('demonstr.', `${demonstrator.number} `, demonstrator.name),
    { label: 'driver', value: plan.driver },
  ]
}

/** Which line shows the farmer: it is blanked in pictures when consent is withdrawn. */
export const FARMER_LINE = 2
