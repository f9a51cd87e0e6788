/** The rules with their limits. A change of limits is a new version; sheets not entered yet are judged by it at once. */
import { limitProblems } from '../../../shared/checks/limit-range.ts'
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

/**
 * @throws UserError `invalid` for a limit no rule has or out of its range, `changed` when somebody set limits meanwhile,
 * `conflict` when these are in force already
 */
export async function setLimits(deps: Deps, actor: User, input: SaveLimits): Promise<RulePage> {
  return deps.source.transaction(async (db) => {
    const standing = await currentLimits(db)
    const limits = mergedLimits(standing.limits, input.limits)
    if (standing.version !== input.version) throw meanwhile()
    if (Object.keys(input.limits).every((name) => isSame(name as LimitName, standing.limits, limits)))
      throw new UserError('conflict', 'These limits are in force already. No new version was made.')
    const next = { version: input.version + 1, limits, why: input.why, by: actor.id }
    if (!(await addLimitVersion(db, next))) throw meanwhile()
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

const meanwhile = () => new UserError('changed', 'Somebody set limits after you loaded them. Yours were not saved.')

const isSame = (name: LimitName, a: LimitValues, b: LimitValues) =>
  (a[name] ?? LIMITS[name].value) === (b[name] ?? LIMITS[name].value)

function mergedLimits(standing: LimitValues, changes: SaveLimits['limits']): LimitValues {
  const unknown: Issue[] = Object.keys(changes)
    .filter((name) => !Object.hasOwn(LIMITS, name))
    .map((name) => ({ path: `limits.${name}`, message: 'No rule has this limit.' }))
  if (unknown.length > 0) throw new UserError('invalid', 'A limit is not known. Nothing was saved.', { issues: unknown })
  const entries = Object.entries({ ...standing, ...changes }).filter((entry): entry is [string, number] => entry[1] !== null)
  const merged = Object.fromEntries(entries)
  const issues = Object.entries(limitProblems(merged, Object.keys(changes))).map(([name, message]) => ({
    path: `limits.${name}`,
    message,
  }))
  if (issues.length > 0) throw new UserError('invalid', 'A limit is out of its range. Nothing was saved.', { issues })
  return merged
}

function changeWords(standing: LimitValues, changes: SaveLimits['limits']): string {
  const words = Object.entries(changes).map(([name, value]) => {
    const { value: usual, unit } = LIMITS[name as LimitName]
    return `${limitWords(name)} ${standing[name] ?? usual} to ${value ?? usual}${unit ? ` ${unit}` : ''}`
  })
  return words.join(', ') || 'nothing changed'
}
