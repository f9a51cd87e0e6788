/** Parquet (Apache Parquet format 2), a row group at a time: what was written is sent and forgotten. */
import { ByteWriter, ParquetWriter, type SchemaElement } from 'hyparquet-writer'
import type { Column } from '../../shared/layouts/column.ts'
import type { Value } from '../../shared/schemas/sheet.ts'
import type { Pieces, Table } from './table.ts'

/** Lines gathered, or a few more, before they are written: the memory a download takes. */
const GROUP_LINES = 10_000

type ParquetType = Pick<SchemaElement, 'type' | 'converted_type'>

const TEXT: ParquetType = { type: 'BYTE_ARRAY', converted_type: 'UTF8' }
const TYPES: Record<Column['kind'], ParquetType> = {
  integer: { type: 'INT32' },
  number: { type: 'DOUBLE' },
  boolean: { type: 'BOOLEAN' },
  date: { type: 'INT32', converted_type: 'DATE' },
  moment: { type: 'INT64', converted_type: 'TIMESTAMP_MILLIS' },
  text: TEXT,
  time: TEXT,
}

type Cell = Exclude<Value, null> | Date | undefined

/** @throws Error when a number column holds no number: the columns and what fills them have come apart */
function cellOf({ kind, name }: Column, value: Value): Cell {
  if (value === null) return undefined
  if (kind === 'date' || kind === 'moment') return new Date(String(value))
  if (kind === 'text' || kind === 'time') return String(value)
  if (typeof value !== (kind === 'boolean' ? 'boolean' : 'number')) throw new Error(`${name} holds ${JSON.stringify(value)}`)
  return value
}

/** The unit of each column stands in the file's own metadata, under `unit.NAME`. */
export async function* parquetOf({ columns, lines }: Table): Pieces {
  const schema: SchemaElement[] = [
    { name: 'root', num_children: columns.length },
    ...columns.map((c): SchemaElement => ({ name: c.name, repetition_type: 'OPTIONAL', ...TYPES[c.kind] })),
  ]
  const kvMetadata = columns.filter((c) => c.unit).map((c) => ({ key: `unit.${c.name}`, value: c.unit ?? '' }))
  const writer = new ByteWriter()
  const file = new ParquetWriter({ writer, schema, kvMetadata, createdBy: 'sheafbook' })
  const take = () => {
    const written = Buffer.from(writer.getBytes())
    writer.index = 0
    return written
  }
  yield take()
  let group: Cell[][] = columns.map(() => [])
  const write = () => {
    void file.write({
      columnData: columns.map((c, i) => ({ name: c.name, data: group[i] ?? [] })),
      rowGroupSize: group[0]?.length || 1,
    })
    group = columns.map(() => [])
    return take()
  }
  for await (const some of lines) {
    columns.forEach((column, i) => {
      for (const line of some) group[i]?.push(cellOf(column, line[i] ?? null))
    })
    if ((group[0]?.length ?? 0) >= GROUP_LINES) yield write()
  }
  if ((group[0]?.length ?? 0) > 0) yield write()
  void file.finish()
  yield take()
}
