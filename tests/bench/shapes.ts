/** Reads the photos of every condition and prints one line each. */
import { dirname } from 'node:path'
import type { Condition } from '../simulator/shapes/condition.ts'
import { CONDITIONS } from '../simulator/shapes/conditions.ts'
import type { PageScore } from './compare.ts'
import { missedLines, mistakeLines, shapeHead, shapeLine } from './print.ts'
import { readFolder } from './read-folder.ts'
import type { BenchReader } from './reading-json.ts'
import { shapeSet } from './shape-set.ts'

export const SHAPES_A_CONDITION = 12

/** @param names separated by commas; all conditions without them. @throws RangeError for a name that is none */
export function conditionsNamed(names: string | undefined): readonly Condition[] {
  if (!names) return CONDITIONS
  return names.split(',').map((name) => {
    const condition = CONDITIONS.find((c) => c.name === name)
    if (!condition) throw new RangeError(`no condition "${name}"; there are ${CONDITIONS.map((c) => c.name).join(', ')}`)
    return condition
  })
}

/** Makes what photos are missing, reads them, and prints a line as each condition is done, then what was read wrongly. */
export async function benchShapes(
  reader: BenchReader,
  conditions: readonly Condition[],
  count: number,
  say: (line: string) => void,
): Promise<void> {
  const print = (lines: readonly string[]) => process.stdout.write(lines.map((line) => `${line}\n`).join(''))
  const all: PageScore[] = []
  print([shapeHead])
  for (const condition of conditions) {
    const stems = await shapeSet(condition, count, say)
    const { byLevel } = await readFolder(reader, dirname(stems[0]!), stems, () => undefined)
    const pages = [...byLevel.values()].flat()
    all.push(...pages)
    print([shapeLine(condition, pages)])
  }
  print([shapeLine({ name: 'all' }, all), '', ...mistakeLines(all), ...missedLines(all)])
}
