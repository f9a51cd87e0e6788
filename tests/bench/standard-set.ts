/** The standard set: made by the simulator with a fixed seed, kept under .data/bench, made again when the simulator changes. */
import { access, rename } from 'node:fs/promises'
import { join } from 'node:path'
import { LEVELS } from '../simulator/levels.ts'
import { makeSet } from '../simulator/make-set.ts'
import { fingerprint, type Sources } from './fingerprint.ts'

/** What a photo is made by. What only samples, plans, ties or another layout use does not change it. */
export const SOURCES: Sources = [
  ['tests/simulator', /^(?!.*sample|expected|golden|scan-pdf|foreign).*\.ts$/],
  ['shared/layouts', /^(layout|geometry|sheet-code|corner-modules|tillage-\d+)\.ts$/],
  ['server/print', /^(page|sheet-.*)\.ts$/],
]

/** Folder of the set with `count` photos a level, made first when it is not there. */
export async function standardSet(count: number, final: boolean, say: (line: string) => void): Promise<string> {
  const folder = join('.data/bench', `${final ? 'final' : 'standard'}-${count}-${await fingerprint(SOURCES)}`)
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
