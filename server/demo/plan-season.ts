/** Registers, people and plans of the demo season, through the same services a person's clicks go through. */
import type { SaveDemonstration } from '../../shared/schemas/demonstration.ts'
import type { User } from '../../shared/schemas/user.ts'
import { addUser, setPasswordHash } from '../db/repositories/user.ts'
import { planDemonstration } from '../features/demonstrations/demonstrations.service.ts'
import { addToRegister } from '../features/registers/registers.service.ts'
import { hashPassword } from '../features/session/password.ts'
import type { Deps } from '../http/route.ts'
import { IMPLEMENTS, KITS, PEOPLE, PLACES, TRACTORS } from './registers.ts'
import type { DemoRun } from './season.ts'

export type People = ReadonlyMap<number, User>

export async function addPeople(deps: Deps, password: string): Promise<People> {
  const passwordHash = await hashPassword(password)
  const people = new Map<number, User>()
  for (const person of PEOPLE) {
    const user = await addUser(deps.source.manager, person)
    await setPasswordHash(deps.source.manager, user.id, passwordHash)
    people.set(person.number, { ...user, hasPassword: true })
  }
  return people
}

interface Ids {
  places: Map<number, string>
  tractors: Map<number, string>
  implements: Map<number, string>
  kits: Map<number, string>
}

export async function fillRegisters(deps: Deps, admin: User): Promise<Ids> {
  const add = async (name: keyof Ids, rows: readonly { number: number }[]) => {
    const ids = new Map<number, string>()
    for (const row of rows) ids.set(row.number, (await addToRegister(deps, admin, name, row as never)).id)
    return ids
  }
  return {
    places: await add('places', PLACES),
    tractors: await add('tractors', TRACTORS),
    implements: await add('implements', IMPLEMENTS),
    kits: await add('kits', KITS),
  }
}

const FARMERS = ['R. Pendarkar', 'A. Loviste', 'H. Marrin', 'T. Osvald', 'J. Kelder', 'S. Amrani', 'B. Torvald', 'K. Nandel']
const DRIVERS = ['S. Ollivar', 'V. Brandt', 'N. Idrisov', 'P. Calder']

function groupBy<T>(items: readonly T[], keyOf: (item: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>()
  for (const item of items) groups.set(keyOf(item), [...(groups.get(keyOf(item)) ?? []), item])
  return groups
}

/** One demonstration for each day, place and demonstrator; the printed sheets get the codes that the samples carry. */
export async function planRuns(deps: Deps, people: People, ids: Ids, runs: readonly DemoRun[]): Promise<void> {
  const days = groupBy(runs, (r) => `${r.heldOn}|${r.place}|${r.demonstrator}`)
  let turn = 0
  for (const day of days.values()) {
    const first = day[0]!
    const demonstrator = people.get(first.demonstrator)!
    const trials = [...groupBy(day, (r) => `${r.tractor}|${r.implement}|${r.kit}|${r.plot}`).values()]
    const input: SaveDemonstration = {
      heldOn: first.heldOn,
      placeId: ids.places.get(first.place)!,
      demonstratorId: demonstrator.id,
      driver: DRIVERS[turn % DRIVERS.length]!,
      farmer: { name: FARMERS[turn % FARMERS.length]!, phone: '' },
      trials: trials.map((trial) => ({
        tractorId: ids.tractors.get(trial[0]!.tractor)!,
        implementId: ids.implements.get(trial[0]!.implement)!,
        kitId: ids.kits.get(trial[0]!.kit)!,
        plot: trial[0]!.plot,
        runs: trial.length,
      })),
    }
    const planned = await planDemonstration(deps, demonstrator, input)
    for (const [t, trial] of trials.entries()) {
      for (const [r, run] of trial.entries())
        await deps.source.query('UPDATE sheets SET code = $1 WHERE run_id = $2', [run.sheetCode, planned.trials[t]!.runs[r]!.id])
    }
    turn += 1
  }
}
