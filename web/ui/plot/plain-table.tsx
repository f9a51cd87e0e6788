import type { ReactNode } from 'react'

export interface PlainColumn {
  head: string
  /** Right-aligned in Mono. */
  figures?: boolean
}

export interface PlainRow {
  key: string
  cells: readonly ReactNode[]
}

/** A small ruled table of words and figures; the first cell names its row. On a phone each row stands as a block of named lines. */
export function PlainTable({
  caption,
  columns,
  rows,
  shown = false,
}: {
  caption: string
  columns: readonly PlainColumn[]
  rows: readonly PlainRow[]
  /** The caption stands over the table; else only for those who do not see it. */
  shown?: boolean
}) {
  return (
    <table className="border-collapse max-sm:block max-sm:w-full">
      <caption className={shown ? 'pb-0.5 text-left text-2 font-[760] max-sm:block' : 'away'}>{caption}</caption>
      <thead className="max-sm:hidden">
        <tr className="label border-b-[1.5px] border-ink">
          {columns.map(({ head, figures }) => (
            <th
              key={head}
              scope="col"
              className={`pr-3 font-normal whitespace-nowrap last:pr-0 ${figures ? 'text-right' : 'text-left'}`}
            >
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody className="max-sm:block max-sm:border-t-[1.5px] max-sm:border-ink">
        {rows.map(({ key, cells }) => (
          <tr key={key} className="border-b border-feint max-sm:block max-sm:py-0.5">
            {cells.map((cell, i) => (
              <PlainCell key={columns[i]?.head} column={columns[i]} first={i === 0}>
                {cell}
              </PlainCell>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  )
}

function PlainCell({ column, first, children }: { column: PlainColumn | undefined; first: boolean; children: ReactNode }) {
  const Cell = first ? 'th' : 'td'
  const phone = first ? 'max-sm:block max-sm:font-[650]' : 'max-sm:flex max-sm:justify-between max-sm:gap-2'
  return (
    <Cell
      {...(first ? { scope: 'row' } : {})}
      className={`py-0.5 pr-3 whitespace-nowrap last:pr-0 max-sm:p-0 max-sm:whitespace-normal ${first ? 'text-left font-normal' : ''} ${column?.figures ? 'figures text-right' : 'text-left'} ${phone}`}
    >
      {!first && (
        <span aria-hidden="true" className="label font-sans font-normal sm:hidden">
          {column?.head}
        </span>
      )}
      <span>{children}</span>
    </Cell>
  )
}
