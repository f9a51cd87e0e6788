/** A short name for the sources that a set of pictures is made by: when one of them changes, so does the name. */
import { createHash } from 'node:crypto'
import { readdir, readFile } from 'node:fs/promises'
import { join } from 'node:path'

export type Sources = ReadonlyArray<readonly [folder: string, files: RegExp]>

/** @param more what else the pictures depend on */
export async function fingerprint(sources: Sources, more = ''): Promise<string> {
  const hash = createHash('sha256')
  for (const [folder, files] of sources) {
    const names = (await readdir(folder)).filter((name) => files.test(name) && !name.endsWith('.test.ts'))
    for (const name of names.sort()) hash.update(await readFile(join(folder, name)))
  }
  return hash.update(more).digest('hex').slice(0, 10)
}
