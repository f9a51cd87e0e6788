/** The OpenAPI document as the page reads it: made by the server from the same routes it answers with. */
import { z } from 'zod'

/** As much of JSON Schema as the document uses. */
export interface JsonSchema {
  type?: string | string[] | undefined
  format?: string | undefined
  const?: unknown
  enum?: unknown[] | undefined
  properties?: Record<string, JsonSchema> | undefined
  required?: string[] | undefined
  items?: JsonSchema | undefined
  anyOf?: JsonSchema[] | undefined
  oneOf?: JsonSchema[] | undefined
  [more: string]: unknown
}
const jsonSchema = z.record(z.string(), z.unknown()) as unknown as z.ZodType<JsonSchema>

const contentSchema = z.record(z.string(), z.object({ schema: jsonSchema.optional() }))
const operationSchema = z.object({
  summary: z.string(),
  description: z.string().optional(),
  tags: z.array(z.string()).default([]),
  security: z.array(z.record(z.string(), z.array(z.string()))).default([]),
  parameters: z
    .array(z.object({ name: z.string(), in: z.string(), required: z.boolean().optional(), schema: jsonSchema.optional() }))
    .default([]),
  requestBody: z.object({ content: contentSchema }).optional(),
  responses: z.record(z.string(), z.object({ content: contentSchema.optional() })),
})
export type Operation = z.infer<typeof operationSchema>

export const documentSchema = z.object({
  info: z.object({ title: z.string(), version: z.string(), description: z.string().default('') }),
  paths: z.record(z.string(), z.record(z.string(), operationSchema)),
})
export type ApiDocument = z.infer<typeof documentSchema>

export interface Entry {
  method: string
  path: string
  operation: Operation
}
export interface Noun {
  noun: string
  entries: Entry[]
}

/** Routes by what they are about; those open to tokens alone, unless all are asked for. */
export function nounsOf(document: ApiDocument, all: boolean): Noun[] {
  const nouns = new Map<string, Entry[]>()
  for (const [path, methods] of Object.entries(document.paths)) {
    for (const [method, operation] of Object.entries(methods)) {
      if (!all && scopeOf(operation) === null) continue
      const noun = operation.tags[0] ?? ''
      nouns.set(noun, [...(nouns.get(noun) ?? []), { method: method.toUpperCase(), path, operation }])
    }
  }
  return [...nouns].map(([noun, entries]) => ({ noun, entries })).sort((a, b) => (a.noun < b.noun ? -1 : 1))
}

/** The scope a token needs; null where none is taken. */
export const scopeOf = ({ security }: Operation): string | null => security.find((way) => way.token)?.token?.[0] ?? null

/** "number or null", "text (uuid)", "one of a, b", "list of …" */
export function kindOf(schema: JsonSchema | undefined): string {
  if (!schema) return 'anything'
  if (schema.const !== undefined) return JSON.stringify(schema.const)
  if (schema.enum) return `one of ${schema.enum.map(String).join(', ')}`
  const either = schema.anyOf ?? schema.oneOf
  if (either) return [...new Set(either.map(kindOf))].join(' or ')
  if (Array.isArray(schema.type)) return [...new Set(schema.type.map((type) => kindOf({ ...schema, type })))].join(' or ')
  if (schema.type === 'array') return `list of ${kindOf(schema.items)}`
  const word = KINDS[schema.type ?? ''] ?? 'anything'
  return schema.format && schema.type !== 'null' ? `${word} (${schema.format})` : word
}
const KINDS: Record<string, string> = {
  string: 'text',
  integer: 'whole number',
  number: 'number',
  boolean: 'true or false',
  object: 'object',
  null: 'null',
}

export interface FieldLine {
  /** Names from the outermost object in. */
  path: string
  name: string
  depth: number
  kind: string
  needed: boolean
}

/** The fields of an object as lines, those of objects inside further in. */
export function fieldLines(schema: JsonSchema | undefined, above: readonly string[] = []): FieldLine[] {
  const inner = innerOf(schema)
  return Object.entries(inner?.properties ?? {}).flatMap(([name, field]) => [
    {
      path: [...above, name].join('.'),
      name,
      depth: above.length,
      kind: kindOf(field),
      needed: inner?.required?.includes(name) ?? false,
    },
    ...fieldLines(field, [...above, name]),
  ])
}

/** The object in a list, or beside null. */
function innerOf(schema: JsonSchema | undefined): JsonSchema | undefined {
  if (schema?.items) return innerOf(schema.items)
  const either = schema?.anyOf ?? schema?.oneOf
  return either?.map(innerOf).find((one) => one?.properties) ?? schema
}

/** A call to try, with a token in the shell's variable TOKEN. */
export function exampleOf({ method, path, operation }: Entry, origin: string): string {
  const needed = operation.parameters.filter((p) => p.in === 'query' && p.required)
  const query = needed.length > 0 ? `?${needed.map((p) => `${p.name}=…`).join('&')}` : ''
  const body = operation.requestBody?.content['application/json']
  return [
    method === 'GET' ? 'curl' : `curl -X ${method}`,
    '-H "Authorization: Bearer $TOKEN"',
    ...(body ? [`-H "Content-Type: application/json" -d '${JSON.stringify(sampleOf(body.schema))}'`] : []),
    `"${origin}/api${path}${query}"`,
  ].join(' ')
}

/** A value of the shape asked for. */
function sampleOf(schema: JsonSchema | undefined): unknown {
  if (!schema) return null
  if (schema.enum) return schema.enum[0]
  const either = schema.anyOf ?? schema.oneOf
  if (either) return sampleOf(either[0])
  if (schema.type === 'array') return [sampleOf(schema.items)]
  if (schema.type === 'object') {
    return Object.fromEntries(Object.entries(schema.properties ?? {}).map(([name, field]) => [name, sampleOf(field)]))
  }
  if (schema.type === 'string') return schema.format === 'uri' ? 'https://data.example.org/' : '…'
  return schema.type === 'boolean' ? true : 1
}
