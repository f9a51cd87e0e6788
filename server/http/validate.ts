import type { z } from 'zod'
import { type Issue, UserError } from '../../shared/errors.ts'

type Part = 'params' | 'query' | 'body'
const NAMES: Record<Part, string> = { params: 'address', query: 'filter', body: 'input' }

/**
 * Parses one part of a request.
 * @throws UserError `invalid` naming every field that was refused; `version_needed` for a write that names no version
 */
export function validate(part: Part, schema: z.ZodType | undefined, value: unknown): unknown {
  if (!schema) return undefined
  // Without a body Express leaves undefined, and a schema would only say that an object is expected.
  const parsed = schema.safeParse(value ?? {})
  if (parsed.success) return parsed.data
  const issues: Issue[] = parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }))
  if (part === 'body' && lacksVersion(issues, value)) throw versionNeeded()
  const named = issues.map((i) => (i.path === '' ? i.message : `${i.path}: ${i.message}`)).join('; ')
  throw new UserError('invalid', `The ${NAMES[part]} cannot be used. ${named}.`, { issues })
}

/** A write that does not say which version it was made on would overwrite what it never saw. */
const lacksVersion = (issues: Issue[], value: unknown) =>
  issues.some(({ path }) => path === 'version') && (value as { version?: unknown } | undefined)?.version === undefined

const versionNeeded = () =>
  new UserError('version_needed', 'The write must name the version it was made on. Nothing was changed. Load it again first.')
