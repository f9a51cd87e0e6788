import type { z } from 'zod'

type Issue = Parameters<z.core.$ZodErrorMap>[0]

const figure = (limit: unknown) => String(limit)

/**
 * What a form says of a field the shared schema refuses, in words for people; undefined leaves the schema's own words.
 * Handed to the resolver, so that every form says it the same way.
 */
export function plainIssue(issue: Issue): string | undefined {
  switch (issue.code) {
    case 'too_small':
      return tooLittle(issue.origin, figure(issue.minimum), issue.inclusive !== false)
    case 'too_big':
      return issue.origin === 'string' ? `At most ${figure(issue.maximum)} characters.` : `At most ${figure(issue.maximum)}.`
    case 'invalid_type':
      return issue.expected === 'number' || issue.expected === 'int'
        ? 'A number is needed, such as 12 or 1.5.'
        : 'This is needed.'
    case 'invalid_value':
      return 'Choose one.'
    case 'invalid_format':
      return wrongForm(issue.format)
    default:
      return undefined
  }
}

function tooLittle(origin: string, least: string, inclusive: boolean): string {
  if (origin === 'string') return least === '1' ? 'This is needed.' : `At least ${least} characters.`
  if (origin === 'array') return `At least ${least} of these.`
  return inclusive ? `At least ${least}.` : `More than ${least}.`
}

function wrongForm(format: string): string | undefined {
  if (format === 'date') return 'A date is needed.'
  if (format === 'uuid') return 'Choose one.'
  if (format === 'email') return 'An e-mail address is needed, such as name@place.example.'
  return undefined
}
