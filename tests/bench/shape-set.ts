/** The photos of one condition, kept under .data/bench and made again when the condition or what draws it changes. */
import { access, mkdir, rename, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { findLayout } from '../../shared/layouts/registry.ts'
import { chanceOf } from '../simulator/random.ts'
import type { Condition } from '../simulator/shapes/condition.ts'
import { makeShape } from '../simulator/shapes/make-shape.ts'
import { fingerprint } from './fingerprint.ts'
import { SOURCES } from './standard-set.ts'

const DRAWING = [['tests/simulator/shapes', /^(?!.*conditions?\.ts).*\.ts$/] as const]

/**
 * Makes what is missing of `count` photos; the n-th is the same whatever the count.
 * @returns the photos' paths without their ending
 */
export async function shapeSet(condition: Condition, count: number, say: (line: string) => void): Promise<string[]> {
  const layout = findLayout('tillage', 1)!
  const { fits: _, hopeless: __, ...drawn } = condition
  const made = await fingerprint([...SOURCES, ...DRAWING], JSON.stringify(drawn))
  const folder = join('.data/bench', `shapes-${condition.name}-${made}`)
  await mkdir(folder, { recursive: true })
  const stems = Array.from({ length: count }, (_, i) => join(folder, `${condition.name}-${String(i + 1).padStart(3, '0')}`))
  for (const [i, stem] of stems.entries()) {
    if (await isThere(`${stem}.jpg`)) continue
    say(`making ${condition.name} ${i + 1} of ${count}`)
    const { jpeg, truth, map } = await makeShape(condition, layout, chanceOf(`shapes/${condition.name}/${i + 1}`))
    await writeFile(`${stem}.truth.json`, `${JSON.stringify(truth, null, 1)}\n`)
    await writeFile(`${stem}.map.json`, JSON.stringify(map))
    // The picture last and whole: where it is, the other two are.
    await writeFile(`${stem}.making-${process.pid}`, jpeg)
    await rename(`${stem}.making-${process.pid}`, `${stem}.jpg`)
  }
  return stems
}

const isThere = (path: string) =>
  access(path).then(
    () => true,
    () => false,
  )
