/** The standard set: made by the simulator with a fixed seed, kept under .data/bench, made again when the simulator changes. */
import { createHash } from 'node:crypto'
import { access, readdir, readFile, rename } from 'node:fs/promises'
import { join } from 'node:path'
import { LEVELS } from '../simulator/levels.ts'
import { makeSet } from '../simulator/make-set.ts'

const SOURCES = ['tests/simulator', 'shared/layouts', 'server/print']

async function fingerprint(): Promise<string> {
  const hash = createHash('sha256')
  for (const folder of SOURCES) {
    for (const name of (await readdir(folder)).sort()) if (name.endsWith('.ts')) hash.update(await readFile(join(folder, name)))
  }
  return hash.digest('hex').slice(0, 10)
}

/** Folder of the set with `count` photos a level, made first when it is not there. */
export async function standardSet(count: number, final: boolean, say: (line: string) => void): Promise<string> {
  const folder = join('.data/bench', `${final ? 'final' : 'standard'}-${count}-${await fingerprint()}`)
  const made = await access(folder).then(
    () => true,
    () => false,
  )
  if (made) return folder
  const making = `${folder}.making-${process.pid}`
  for (const level of LEVELS) {
    say(`making ${count} simulated photos, ${level}`)
    await makeSet({ out: making, count, level, seed: 'standard set', final, planned: false })
  }
  await rename(making, folder)
  return folder
}
