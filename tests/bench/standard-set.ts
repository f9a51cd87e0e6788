/** The standard set: made by the simulator with a fixed seed, kept under .data/bench, made again when the simulator changes. */
import { createHash } from 'node:crypto'
import { access, readdir, readFile, rename } from 'node:fs/promises'
import { join } from 'node:path'
import { LEVELS } from '../simulator/levels.ts'
import { makeSet } from '../simulator/make-set.ts'

/** What a photo is made by. What only samples, plans, ties or another layout use does not change it. */
const SOURCES: ReadonlyArray<readonly [folder: string, files: RegExp]> = [
  ['tests/simulator', /^(?!.*sample|expected|golden|scan-pdf|foreign).*\.ts$/],
  ['shared/layouts', /^(layout|geometry|sheet-code|corner-modules|tillage-\d+)\.ts$/],
  ['server/print', /^(page|sheet-.*)\.ts$/],
]

async function fingerprint(): Promise<string> {
  const hash = createHash('sha256')
  for (const [folder, files] of SOURCES) {
    const names = (await readdir(folder)).filter((name) => files.test(name) && !name.endsWith('.test.ts'))
    for (const name of names.sort()) hash.update(await readFile(join(folder, name)))
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
