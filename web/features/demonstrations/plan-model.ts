/** What the plan form begins with, and what it says of a kit before the day. Pure. */
import { findLayout, NEWEST_LAYOUTS, USUAL_LAYOUT, workOf } from '../../../shared/layouts/registry.ts'
import type { Demonstration, SaveDemonstration, SaveTrial } from '../../../shared/schemas/demonstration.ts'
import type { Implement, Kit } from '../../../shared/schemas/register.ts'
import { leastArea, leastFuel, marksOf } from '../../../shared/trial/planning.ts'
import { USUAL_L_HA } from '../../../shared/trial/usual-fuel.ts'

/** Three runs on a plot are the least that show how much runs differ (PAES 111:2000, as quoted). */
const USUAL_RUNS = 3
/** A farmer who withdrew has no name any more; the schema asks for one, and the server leaves it unsaved. */
const ERASED = { name: 'erased', phone: '' }

export const blankTrial: SaveTrial = {
  tractorId: '',
  implementId: '',
  kitId: '',
  plot: '',
  layout: USUAL_LAYOUT,
  runs: USUAL_RUNS,
}

/** The next trial of a day: the same implement and kit, behind another tractor on another plot. */
export const nextTrial = (last: SaveTrial | undefined): SaveTrial => (last ? { ...last, tractorId: '', plot: '' } : blankTrial)

export const blankPlan = (demonstratorId: string): SaveDemonstration => ({
  heldOn: '',
  placeId: '',
  demonstratorId,
  driver: '',
  farmer: { name: '', phone: '', email: '' },
  trials: [blankTrial],
})

export const planOf = (day: Demonstration): SaveDemonstration => ({
  heldOn: day.heldOn,
  placeId: day.place.id,
  demonstratorId: day.demonstrator.id,
  driver: day.driver,
  farmer: day.farmer ?? ERASED,
  trials: day.trials.map(({ tractor, implement, kit, plot, layout, runs }) => ({
    tractorId: tractor.id,
    implementId: implement.id,
    kitId: kit.id,
    plot,
    layout,
    runs: runs.length,
  })),
})

/** How old a kit's check may be on the day, months: common practice. */
const CHECK_MONTHS = 12

const monthsBetween = (from: string, to: string): number => {
  const [fromYear = 0, fromMonth = 0, fromDay = 0] = from.split('-').map(Number)
  const [toYear = 0, toMonth = 0, toDay = 0] = to.split('-').map(Number)
  return (toYear - fromYear) * 12 + (toMonth - fromMonth) - (toDay < fromDay ? 1 : 0)
}

/** "last checked 14 months before that day; 12 are allowed", or null while the check is young enough. */
export function oldCheck(kit: Kit, heldOn: string): string | null {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(heldOn)) return null
  const months = monthsBetween(kit.checkedOn, heldOn)
  const over = months > CHECK_MONTHS || (months === CHECK_MONTHS && kit.checkedOn.slice(8) !== heldOn.slice(8))
  if (!over) return null
  return `This kit was last checked ${months} months before that day; ${CHECK_MONTHS} are allowed. Choose another, or have it checked.`
}

/** Wanted U of the fuel, %, and what is assumed of the kit: one top-up and 1 % scale error, as the trial book's own budget does. */
const WANTED = { U_pct: 5, topups: 1, scale_pct: 1, area_u_pct: 0 }

/** Least fuel to burn with a kit, litres, for ± 5 % of the fuel; null when no amount is enough. */
export function leastFuel_l(kit: Kit): number | null {
  const least = leastFuel({ ...WANTED, jarStep_ml: kit.jarMark_ml, jugMark_ml: kit.jugMark_ml })
  return least === null ? null : least / 1000
}

/** What a plot of 60 × 45 m is known to, % (standard): its edge more than the tape. */
const USUAL_AREA_U_PCT = 0.6

export interface BurnLine {
  says: string
  /** Rounded up to 10 mL; null when no amount is enough. */
  least_ml: number | null
  marks: number | null
}

/** Least fuel for the uncertainties people ask for, with this kit. */
export function burnLines(kit: Kit): BurnLine[] {
  const asked = [3, 5, 10].flatMap((U_pct) => [
    { says: `L/h to ± ${U_pct} %`, U_pct, area_u_pct: 0 },
    { says: `L/ha to ± ${U_pct} %`, U_pct, area_u_pct: USUAL_AREA_U_PCT },
  ])
  return asked.map(({ says, U_pct, area_u_pct }) => {
    const scale_pct = kit.scale_pct ?? WANTED.scale_pct
    const least = leastFuel({ ...WANTED, U_pct, area_u_pct, scale_pct, jarStep_ml: kit.jarMark_ml, jugMark_ml: kit.jugMark_ml })
    if (least === null) return { says, least_ml: null, marks: null }
    return { says, least_ml: Math.ceil(least / 10) * 10, marks: marksOf(least, kit.jarMark_ml) }
  })
}

/** A kit, and whether any of its runs has a plot to give litres a hectare of. */
export interface UsedKit {
  kit: Kit
  perArea: boolean
}

export interface BurnTable {
  /** Numbers of the kits it holds for. */
  kits: number[]
  jarMark_ml: number
  perArea: boolean
  lines: BurnLine[]
}

/** One table for kits of which the same holds; litres a hectare only where a run has a plot. */
export function burnTables(used: readonly UsedKit[]): BurnTable[] {
  const tables = new Map<string, BurnTable>()
  for (const { kit, perArea } of used) {
    const { jarMark_ml } = kit
    const lines = burnLines(kit).filter(({ says }) => perArea || !says.startsWith('L/ha'))
    const key = JSON.stringify([jarMark_ml, lines])
    const like = tables.get(key)
    if (like) like.kits.push(kit.number)
    else tables.set(key, { kits: [kit.number], jarMark_ml, perArea, lines })
  }
  return [...tables.values()]
}

/** Length of a pass taken for the edge of a plot nobody has pegged yet, m. */
const USUAL_PASS_M = 60

/** Least plot for ± 5 % of litres a hectare, ha, with this kit and implement; null where nothing is usual, or none is enough. */
export function leastArea_ha(kit: Kit, tool: Implement): number | null {
  const fuel_l_per_ha = USUAL_L_HA[tool.operation]
  if (fuel_l_per_ha === undefined) return null
  const { U_pct, topups } = WANTED
  const scale_pct = kit.scale_pct ?? WANTED.scale_pct
  const least = leastArea({
    U_pct,
    topups,
    scale_pct,
    jarStep_ml: kit.jarMark_ml,
    jugMark_ml: kit.jugMark_ml,
    fuel_l_per_ha,
    width_m: tool.ratedWidth_m,
    pass_m: USUAL_PASS_M,
  })
  return least === null ? null : least / 10_000
}

/** The sheets a run can be written on, by what they are for. */
export const sheetChoices = NEWEST_LAYOUTS.map((layout) => ({ value: layout.key, words: workOf(layout) }))

/** Whether a plot is pegged out for the sheet chosen. Without one the line is printed all the same: for the way or the yard. */
export const hasPlot = (layout: string | undefined): boolean => Boolean(findLayout(layout ?? USUAL_LAYOUT)?.figure)

/** A row of a register, or a person, that a plan can name. */
export interface Chosen {
  id: string
  number: number
  name: string
  active?: boolean
}

/** What may be chosen: rows in use, and those the plan names already, by their numbers. */
export const choicesOf = (rows: readonly Chosen[], chosen: readonly string[]): Array<{ value: string; words: string }> =>
  rows
    .filter((row) => row.active !== false || chosen.includes(row.id))
    .sort((a, b) => a.number - b.number)
    .map((row) => ({ value: row.id, words: `${row.number}  ${row.name}` }))
