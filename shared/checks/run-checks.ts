/** All rules over one sheet. */
import type { Facts } from '../trial/facts.ts'
import type { Readings } from '../trial/readings.ts'
import { blankRules } from './blanks.ts'
import { byHandRules } from './by-hand.ts'
import { clockRules } from './clock.ts'
import { type CheckContext, type CheckOptions, contextOf } from './context.ts'
import { copyRules } from './copies.ts'
import { dateRules } from './dates.ts'
import { fittingRules } from './fitting.ts'
import { fuelRules } from './fuel.ts'
import { fuelLoadRules } from './fuel-load.ts'
import { haulRules } from './haul.ts'
import { hourMeterRules } from './hour-meter.ts'
import { instrumentRules } from './instrument.ts'
import { jarRules } from './jar.ts'
import { paceRules } from './pace.ts'
import { plotRules } from './plot.ts'
import type { Finding, Rule, Severity } from './rule.ts'
import { soilRules } from './soil.ts'
import { tyreRules } from './tyres.ts'
import { workTimeRules } from './work-time.ts'

/** Version of the set of rules that judged a record. Change it with any change of a rule or a default limit. */
export const RULES_VERSION = '1.2.0'

/** Every rule, by id. */
export const RULES: readonly Rule[] = [
  blankRules,
  byHandRules,
  clockRules,
  copyRules,
  dateRules,
  fittingRules,
  fuelRules,
  fuelLoadRules,
  haulRules,
  hourMeterRules,
  instrumentRules,
  jarRules,
  paceRules,
  plotRules,
  soilRules,
  tyreRules,
  workTimeRules,
]
  .flat()
  .sort((a, b) => a.id.localeCompare(b.id))

const WEIGHT: Record<Severity, number> = { stop: 0, doubt: 1, note: 2 }

export function findingsOf(ctx: CheckContext): Finding[] {
  const all = RULES.flatMap((rule) =>
    rule.check(ctx).map((f) => ({ rule: rule.id, version: rule.version, ...f, cells: [...new Set(f.cells)] })),
  )
  return all.sort((a, b) => WEIGHT[a.severity] - WEIGHT[b.severity])
}

/** What the rules find on a sheet: stops first, then doubts, then notes. Pure: the same readings and facts, the same findings. */
export function runChecks(readings: Readings, facts: Facts = {}, options: CheckOptions = {}): Finding[] {
  return findingsOf(contextOf(readings, facts, options))
}
