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

/** A small ruled table of words and figures; the first cell of a row names it. */
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
  const align = (i: number) => (columns[i]?.figures ? 'figures text-right' : 'text-left')
  return (
    <table className="border-collapse">
      <caption className={shown ? 'pb-0.5 text-left text-2 font-[760]' : 'away'}>{caption}</caption>
      <thead>
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
      <tbody>
        {rows.map(({ key, cells }) => (
          <tr key={key} className="border-b border-feint">
            {cells.map((cell, i) => {
              const Cell = i === 0 ? 'th' : 'td'
              return (
                <Cell
                  key={columns[i]?.head}
                  {...(i === 0 ? { scope: 'row' } : {})}
                  className={`py-0.5 pr-3 font-normal whitespace-nowrap last:pr-0 ${align(i)}`}
                >
                  {cell}
                </Cell>
              )
            })}
          </tr>
        ))}
      </tbody>
    </table>
  )
}
