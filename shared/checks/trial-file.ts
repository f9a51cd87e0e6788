/** A trial in a file: readings by key and, where wanted, what a register would know and limits set otherwise. */
import { z } from 'zod'
import { type Issue, UserError } from '../errors.ts'
import { isComb, type Layout, type LayoutCell } from '../layouts/layout.ts'
import { findLayout, LAYOUTS, USUAL_LAYOUT } from '../layouts/registry.ts'
import { type Facts, factsSchema } from '../trial/facts.ts'
import { KEY_ALIASES, READING_KEYS, type ReadingKey } from '../trial/reading-keys.ts'
import type { Readings, ReadingValue } from '../trial/readings.ts'
import { stemOf } from './cells.ts'
import { LIMITS, type LimitName } from './limits.ts'

export interface TrialFile {
  layout: Layout
  readings: Readings
  facts: Facts
  limits: Partial<Record<LimitName, number>>
}

const fileSchema = z.object({
  layout: z.string().default(USUAL_LAYOUT),
  version: z.number().int().optional(),
  readings: z.record(z.string(), z.union([z.number(), z.string(), z.boolean(), z.null()])),
  facts: factsSchema.default({}),
  settings: z.record(z.string(), z.number()).default({}),
})

/**
 * Checks a parsed file. What else stands in it (level, spoiled, wrongSum of a truth file) is not looked at.
 * @throws UserError `invalid` naming every key that is unknown and every value of a wrong kind
 */
export function readTrialFile(content: unknown): TrialFile {
  const parsed = fileSchema.safeParse(content)
  if (!parsed.success) throw refused(parsed.error.issues.map((i) => ({ path: i.path.join('.'), message: messageOf(i) })))
  const { layout: key, version, facts, settings } = parsed.data
  const layout = findLayout(key, version)
  if (!layout) {
    const there = LAYOUTS.map((l) => `${l.key} ${l.version}`).join(', ')
    throw refused([{ path: 'layout', message: `no layout "${key}"${version ? ` version ${version}` : ''}; there are ${there}` }])
  }
  const readings = withoutAliases(parsed.data.readings)
  const issues = [
    ...Object.entries(readings).flatMap(([name, value]) => readingIssue(name, value, layout)),
    ...Object.keys(settings)
      .filter((name) => !Object.hasOwn(LIMITS, name))
      .map((name) => ({ path: `settings.${name}`, message: 'unknown limit' })),
  ]
  if (issues.length > 0) throw refused(issues)
  return { layout, readings, facts, limits: settings }
}

const refused = (issues: Issue[]) =>
  new UserError('invalid', `Nothing was computed. ${issues.map((i) => `${i.path}: ${i.message}`).join('. ')}.`, { issues })

const messageOf = (issue: z.core.$ZodIssue) =>
  issue.code === 'unrecognized_keys' ? `unknown key ${issue.keys.join(', ')}` : issue.message

function withoutAliases(readings: Record<string, ReadingValue>): Record<string, ReadingValue> {
  const out: Record<string, ReadingValue> = {}
  for (const [name, value] of Object.entries(readings)) {
    const key = KEY_ALIASES[name] ?? name
    if (key !== name && readings[key] !== undefined && readings[key] !== value)
      throw refused([
        { path: `readings.${name}`, message: `${String(value)}, but ${key} is ${String(readings[key])}: they are one` },
      ])
    out[key] = value
  }
  return out
}

function readingIssue(name: string, value: ReadingValue, layout: Layout): Issue[] {
  const path = `readings.${name}`
  const { stem, n } = stemOf(name)
  const cell = layout.cells.find((c) => c.key === name)
  const known = READING_KEYS[stem]
  const fits = known && (known.repeats === 'or one' || (known.repeats === true) === (n !== null))
  const key = fits ? known : cell ? keyOfCell(cell) : null
  if (!key) {
    const wanted = known ? (known.repeats ? `unknown key: ${stem}[1], ${stem}[2] …` : `unknown key: ${stem}`) : 'unknown key'
    return [{ path, message: wanted }]
  }
  const wanted = value === null ? null : wrongKind(key, value)
  return wanted ? [{ path, message: `${JSON.stringify(value)} where ${wanted} is needed` }] : []
}

function keyOfCell(cell: LayoutCell): ReadingKey {
  if (isComb(cell)) return { kind: cell.kind === 'digits' ? 'number' : cell.kind }
  if (cell.kind === 'choice') return { kind: 'choice', options: cell.options.map((o) => o.option) }
  return { kind: cell.kind === 'line' ? 'text' : 'tick' }
}

const TYPES: Record<Exclude<ReadingKey['kind'], 'choice' | 'code'>, readonly [type: string, words: string]> = {
  number: ['number', 'a number'],
  text: ['string', 'text'],
  tick: ['boolean', 'true or false'],
  date: ['string', 'a date YYYY-MM-DD'],
  time: ['string', 'a time HH:MM'],
}

/** What is needed instead; null when the value is of the kind. Rules judge what a value says. */
function wrongKind(key: ReadingKey, value: Exclude<ReadingValue, null>): string | null {
  if (key.kind === 'choice') return key.options?.includes(String(value)) ? null : `one of ${key.options?.join(', ')}`
  if (key.kind === 'code') return typeof value === 'boolean' ? 'a number or text' : null
  const [type, words] = TYPES[key.kind]
  const inUnit = key.unit ? `${words} in ${key.unit}` : words
  return typeof value === type ? null : inUnit
}
