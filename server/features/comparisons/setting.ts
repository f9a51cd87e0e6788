/** Where and how all the runs of a comparison were worked, as far as they share it: "at Kelwadi, ploughing". */
import type { ComparedThing } from '../../../shared/schemas/book-comparison.ts'
import type { ComparableRun } from '../../db/desk/comparable-runs.ts'

const DOING: Record<string, string> = {
  plough: 'ploughing',
  disc: 'discing',
  cultivator: 'cultivating',
  rotary_tiller: 'rotary tilling',
  harrow: 'harrowing',
  subsoiler: 'subsoiling',
}

export function settingOf(runs: readonly ComparableRun[], of: ComparedThing): string {
  const place = only(runs.map((run) => run.place?.name))
  const region = only(runs.map((run) => run.place?.district))
  const operation = of === 'implement' ? null : only(runs.map((run) => run.implement?.operation))
  const where = place ? `at ${place}` : region ? `in ${region}` : ''
  return [where, operation ? (DOING[operation] ?? '') : ''].filter((part) => part !== '').join(', ')
}

/** The one value all have; null where they differ or one has none. */
function only(values: ReadonlyArray<string | undefined>): string | null {
  const [first] = values
  return first !== undefined && values.every((value) => value === first) ? first : null
}
