/** npm run read -- FILE...: reads photos, scans and PDF pages; one JSON document a page on standard output. */
import { readFile } from 'node:fs/promises'
import { basename } from 'node:path'
import { UserError } from '../../shared/errors.ts'
import { pageReadingSchema } from '../../shared/schemas/page-reading.ts'
import { createPhotoReader } from '../readers/photo/read-page.ts'

const files = process.argv.slice(2)
if (files.length === 0) {
  process.stderr.write('usage: npm run read -- FILE...   (JPEG, PNG, WebP, TIFF, HEIC or PDF)\n')
  process.exit(2)
}

const reader = await createPhotoReader()
let failed = 0
for (const file of files) {
  try {
    for (const page of await reader.read(await readFile(file), basename(file))) {
      process.stdout.write(`${JSON.stringify(pageReadingSchema.parse(page))}\n`)
    }
  } catch (error) {
    failed++
    const known = error instanceof UserError || (error instanceof Error && 'code' in error)
    if (!known) throw error
    process.stderr.write(`${file}: ${error.message}\n`)
  }
}
await reader.close()
process.exitCode = failed > 0 ? 1 : 0
