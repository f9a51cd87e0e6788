import { type BookFilters, downloadPath, FORMATS } from '../book.queries.ts'

const SHAPES = [
  { shape: 'records', says: 'a line a record:', dictionary: 'what the columns of a line a record mean' },
  { shape: 'values', says: 'a line a reading or figure:', dictionary: 'what the columns of a line a reading or figure mean' },
] as const
const WORDS = { csv: 'CSV', xlsx: 'XLSX', parquet: 'Parquet' } as const

/** Plain links: the browser keeps the file, and the filters go with it. */
export function Downloads({ filters }: { filters: BookFilters }) {
  return (
    <details className="max-w-[560px]">
      <summary className="word min-h-[24px] cursor-pointer max-sm:min-h-[44px]">take the data away</summary>
      <ul className="py-1">
        {SHAPES.map(({ shape, says, dictionary }) => (
          <li key={shape} className="flex flex-wrap gap-x-3 max-sm:min-h-[44px]">
            <span className="label min-w-[180px]">{says}</span>
            {FORMATS.map((format) => (
              <a
                key={format}
                className="word"
                href={downloadPath(`${shape}.${format}`, filters)}
                download
                aria-label={`${WORDS[format]}, ${says.slice(0, -1)}`}
              >
                {WORDS[format]}
              </a>
            ))}
            <a className="word" href={`/api/${shape}/dictionary.csv`} download aria-label={dictionary}>
              columns
            </a>
          </li>
        ))}
        <li className="flex flex-wrap gap-x-3 max-sm:min-h-[44px]">
          <span className="label min-w-[180px]">both, with units and sources:</span>
          <a className="word" href={downloadPath('datapackage.zip', filters)} download>
            Data Package (ZIP)
          </a>
        </li>
      </ul>
    </details>
  )
}
