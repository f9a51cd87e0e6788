import type { RecordFilter } from '../../db/desk/record-rows.ts'
import type { Deps } from '../../http/route.ts'
import type { Pieces } from '../../print/table.ts'
import { csvOf } from '../../print/table-csv.ts'
import { type ZipEntry, zipOf } from '../../print/zip.ts'
import { dataPackage } from './data-package.ts'
import { recordTable, valueTable } from './tables.ts'

/**
 * datapackage.json with the two files it describes. The tables are two queries: a record entered in between stands in the second
 * alone.
 */
export function packageZip(deps: Deps, filter: RecordFilter): Pieces {
  const entries = async function* (): AsyncGenerator<ZipEntry> {
    yield { name: 'datapackage.json', content: one(JSON.stringify(dataPackage(deps.settings.publicUrl), null, 2)) }
    yield { name: 'records.csv', content: csvOf(recordTable(deps, filter)) }
    yield { name: 'values.csv', content: csvOf(valueTable(deps, filter)) }
  }
  return zipOf(entries())
}

async function* one(text: string): Pieces {
  yield Buffer.from(text)
}
