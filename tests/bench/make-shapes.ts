/**
 * node --import tsx tests/bench/make-shapes.ts [--only NAME,...] [--count N]
 * Makes the photos of the conditions without reading them, and prints their folders.
 */
import { dirname } from 'node:path'
import { parseArgs } from 'node:util'
import { shapeSet } from './shape-set.ts'
import { conditionsNamed, SHAPES_A_CONDITION } from './shapes.ts'

const { values } = parseArgs({ options: { only: { type: 'string' }, count: { type: 'string' } } })
for (const condition of conditionsNamed(values.only)) {
  const stems = await shapeSet(condition, Number(values.count ?? SHAPES_A_CONDITION), () => undefined)
  process.stdout.write(`${dirname(stems[0]!)}\n`)
}
process.exit(0)
