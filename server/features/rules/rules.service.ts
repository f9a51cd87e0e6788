/** The rules with their limits. A change of limits is a new version; sheets not entered yet are judged by it at once. */
import { certaintyOf, LIMITS, type LimitName, limitWords } from '../../../shared/checks/limits.ts'
import { limitsOfRule } from '../../../shared/checks/rule-limits.ts'
import { RULES, RULES_VERSION } from '../../../shared/checks/run-checks.ts'
import { type Issue, UserError } from '../../../shared/errors.ts'
import type { RulePage, SaveLimits } from '../../../shared/schemas/rules.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import { recheckSheet } from '../../db/intake/recheck-sheet.ts'
import {
  addLimitVersion,
  countFindings,
  currentLimits,
  type LimitValues,
  listLimitVersions,
  listOpenSheets,
} from '../../db/repositories/limit-settings.ts'
import type { Deps } from '../../http/route.ts'
import { writeTrail } from '../trail/trail.service.ts'

const NEVER = { fired: 0, right: 0, letStand: 0, open: 0 }

export async function readRules(db: Db): Promise<RulePage> {
  const settings = await currentLimits(db)
  const counts = new Map((await countFindings(db)).map(({ rule, ...count }) => [rule, count]))
  return {
    rulesVersion: RULES_VERSION,
    settingsVersion: settings.version,
    versions: await listLimitVersions(db),
    limits: (Object.keys(LIMITS) as LimitName[]).map((name) => {
      const { value: usual, unit, source } = LIMITS[name]
      return { name, value: settings.limits[name] ?? usual, usual, unit, source, certainty: certaintyOf(source) }
    }),
    rules: RULES.map(({ id, version, name, severity, why }) => ({
      id,
      version,
      name,
      severity: [...severity],
      why,
      limits: [...limitsOfRule(id)],
      ...(counts.get(id) ?? NEVER),
    })),
  }
}

/** @throws UserError `invalid` for a limit no rule has, `changed` when somebody set limits meanwhile */
export async function setLimits(deps: Deps, actor: User, input: SaveLimits): Promise<RulePage> {
  return deps.source.transaction(async (db) => {
    const standing = await currentLimits(db)
    const limits = mergedLimits(standing.limits, input.limits)
    const next = { version: input.version + 1, limits, why: input.why, by: actor.id }
    if (standing.version !== input.version || !(await addLimitVersion(db, next)))
      throw new UserError('changed', 'Somebody set limits after you loaded them. Yours were not saved.')
    const text = `limits, version ${next.version}: ${changeWords(standing.limits, input.limits)}. “${input.why}”`
    await writeTrail(db, {
      actor,
      action: 'change',
      subject: 'limits',
      subjectId: null,
      text,
      details: { version: next.version },
    })
    for (const id of await listOpenSheets(db)) await recheckSheet(db, id)
    return readRules(db)
  })
}

function mergedLimits(standing: LimitValues, changes: SaveLimits['limits']): LimitValues {
  const unknown: Issue[] = Object.keys(changes)
    .filter((name) => !Object.hasOwn(LIMITS, name))
    .map((name) => ({ path: `limits.${name}`, message: 'No rule has this limit.' }))
  if (unknown.length > 0) throw new UserError('invalid', 'A limit is not known. Nothing was saved.', { issues: unknown })
  const merged = { ...standing, ...changes }
  return Object.fromEntries(Object.entries(merged).filter((entry): entry is [string, number] => entry[1] !== null))
}

function changeWords(standing: LimitValues, changes: SaveLimits['limits']): string {
  const words = Object.entries(changes).map(([name, value]) => {
    const { value: usual, unit } = LIMITS[name as LimitName]
    return `${limitWords(name)} ${standing[name] ?? usual} to ${value ?? usual}${unit ? ` ${unit}` : ''}`
  })
  return words.join(', ') || 'nothing changed'
}
