/**
 * Makes a set of simulated photos: NAME.jpg, NAME.truth.json (what was written) and NAME.map.json (where each cell lies).
 * node --import tsx tests/simulator/make-set.ts --out DIR --count 60 --level easy|ordinary|hard --seed N [--final] [--planned]
 */
import { mkdir, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { parseArgs } from 'node:util'
import { findLayout } from '../../shared/layouts/registry.ts'
import { LEVELS, type Level } from './levels.ts'
import { makePhoto } from './make-photo.ts'
import { chanceOf } from './random.ts'

export interface SetRequest {
  out: string
  count: number
  level: Level
  seed: string
  final: boolean
  planned: boolean
  layout?: string
}

/** Writes `count` photos; the n-th is the same whatever the count. */
export async function makeSet(request: SetRequest, onPhoto?: (name: string) => void): Promise<void> {
  const layout = findLayout(request.layout ?? 'tillage')
  if (!layout) throw new RangeError(`no layout "${request.layout}"`)
  await mkdir(request.out, { recursive: true })
  for (let n = 1; n <= request.count; n += 1) {
    const name = `${request.level}-${String(n).padStart(3, '0')}`
    const chance = chanceOf(`${request.seed}/${request.final ? 'final' : 'standard'}/${name}`)
    const photo = await makePhoto({
      layout,
      level: request.level,
      chance,
      digits: request.final ? 'final' : 'held back',
      planned: request.planned || chance.fork('planned').odds(0.3),
    })
    const path = join(request.out, name)
    await writeFile(`${path}.jpg`, photo.jpeg)
    await writeFile(`${path}.truth.json`, `${JSON.stringify(photo.truth, null, 1)}\n`)
    await writeFile(`${path}.map.json`, JSON.stringify(photo.map))
    onPhoto?.(name)
  }
}

if (process.argv[1]?.endsWith('make-set.ts')) {
  const { values } = parseArgs({
    options: {
      out: { type: 'string' },
      count: { type: 'string', default: '60' },
      level: { type: 'string', default: 'ordinary' },
      seed: { type: 'string', default: '1' },
      layout: { type: 'string', default: 'tillage' },
      final: { type: 'boolean', default: false },
      planned: { type: 'boolean', default: false },
    },
  })
  const level = LEVELS.find((l) => l === values.level)
  if (!values.out || !level) {
    process.stderr.write(`usage: make-set --out DIR --count N --level ${LEVELS.join('|')} --seed N [--final] [--planned]\n`)
    process.exit(2)
  }
  const { out, seed, layout, final, planned } = values
  await makeSet({ out, count: Number(values.count), level, seed, layout, final, planned }, (name) => {
    process.stdout.write(`${name} ${Math.round(process.cpuUsage().user / 1000)} ms\n`)
  })
}
