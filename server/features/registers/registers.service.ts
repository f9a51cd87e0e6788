import { type Issue, UserError } from '../../../shared/errors.ts'
import type { RegisterName } from '../../../shared/schemas/register.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import {
  addRegisterRow,
  changeRegisterRow,
  getRegisterRow,
  type RegisterInput,
  type RegisterRow,
} from '../../db/repositories/register.ts'
import { findLastActor } from '../../db/repositories/trail.ts'
import type { Deps } from '../../http/route.ts'
import { writeTrail } from '../trail/trail.service.ts'
import { changeWords, type FieldChange, nowWords } from './field-words.ts'

/** What one row of each register is called. */
const NOUNS: Record<RegisterName, string> = { places: 'place', tractors: 'tractor', implements: 'implement', kits: 'kit' }

/** @throws UserError `conflict` when the number is taken */
export async function addToRegister(deps: Deps, actor: User, name: RegisterName, input: RegisterInput): Promise<RegisterRow> {
  return deps.source.transaction(async (db) => {
    const row = await addRegisterRow(db, name, input)
    const text = `${NOUNS[name]} no. ${row.number}, ${row.name}, added`
    await writeTrail(db, { actor, action: 'add', subject: NOUNS[name], subjectId: row.id, text, details: { row } })
    return row
  })
}

/** @throws UserError `not_found`, `conflict` (number taken) or `changed` with the fields somebody else wrote meanwhile */
export async function saveInRegister(
  deps: Deps,
  actor: User,
  name: RegisterName,
  id: string,
  { version, ...input }: RegisterInput & { version: number },
): Promise<RegisterRow> {
  return deps.source.transaction(async (db) => {
    const before = await getRegisterRow(db, name, id)
    if (!(await changeRegisterRow(db, name, { id, version }, input))) throw await changedMeanwhile(db, before, input)
    const after = await getRegisterRow(db, name, id)
    const changes = differences(before, after)
    const said = changes.map(changeWords).join(', ')
    const text = `${NOUNS[name]} no. ${before.number}, ${before.name}: ${said || 'saved unchanged'}`
    await writeTrail(db, { actor, action: 'change', subject: NOUNS[name], subjectId: id, text, details: { changes } })
    return after
  })
}

function differences(before: RegisterRow, after: RegisterInput | RegisterRow): FieldChange[] {
  const [from, to] = [before as Record<string, unknown>, after as Record<string, unknown>]
  const keys = Object.keys(to).filter((key) => key !== 'version' && from[key] !== to[key])
  return keys.map((key) => ({ key, from: from[key], to: to[key] }))
}

async function changedMeanwhile(db: Db, standing: RegisterRow, input: RegisterInput): Promise<UserError> {
  const who = (await findLastActor(db, standing.id)) ?? 'Somebody'
  const issues: Issue[] = differences(standing, input).map((change) => ({ path: change.key, message: nowWords(change) }))
  return new UserError('changed', `${who} changed this row after you loaded it. Yours was not saved.`, { issues })
}
