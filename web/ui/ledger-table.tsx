import type { ReactNode } from 'react'

export interface LedgerColumn<Row> {
  key: string
  head: ReactNode
  cell: (row: Row) => ReactNode
  /** Figures stand right-aligned in Mono. */
  figures?: boolean
  /** Stays on one line. */
  tight?: boolean
}

export interface LedgerGroup<Row> {
  key: string
  /** A sentence with its count; left out for a plain list. */
  says?: ReactNode
  rows: readonly Row[]
}

interface LedgerTableProps<Row> {
  /** Says what the table holds, for people who do not see it. */
  caption: string
  columns: ReadonlyArray<LedgerColumn<Row>>
  groups: ReadonlyArray<LedgerGroup<Row>>
  rowKey: (row: Row) => string
  /** The row in hand: straw-pale between two ink rules. */
  inHand?: (row: Row) => boolean
  quiet?: (row: Row) => boolean
  /** Pressing anywhere in a row; the row's own link must do the same for the keyboard. */
  onRow?: (row: Row) => void
  /** Closes the table: cells of a last row over the double rule. */
  total?: ReactNode
}

/** No frame, no stripes, no filled heads: rules, right-aligned figures, groups as sentences. */
export function LedgerTable<Row>({ caption, columns, groups, rowKey, inHand, quiet, onRow, total }: LedgerTableProps<Row>) {
  return (
    <div className="overflow-x-auto">
      <table className="w-full border-collapse text-left">
        <caption className="away">{caption}</caption>
        <thead>
          <tr className="border-b-[1.5px] border-ink">
            {columns.map((column) => (
              <th
                key={column.key}
                scope="col"
                className={`label h-[30px] px-1 font-normal whitespace-nowrap first:pl-margin last:pr-margin ${column.figures ? 'text-right' : ''}`}
              >
                {column.head}
              </th>
            ))}
          </tr>
        </thead>
        {groups.map((group) => (
          <tbody key={group.key}>
            {group.says !== undefined && (
              <tr className="border-b border-line">
                <th scope="rowgroup" colSpan={columns.length} className="px-1 pt-2 pb-0.5 pl-margin font-normal">
                  {group.says}
                </th>
              </tr>
            )}
            {group.rows.map((row) => (
              <LedgerRow
                key={rowKey(row)}
                row={row}
                columns={columns}
                held={inHand?.(row) ?? false}
                quiet={quiet?.(row) ?? false}
                {...(onRow ? { onRow } : {})}
              />
            ))}
          </tbody>
        ))}
        {total && <tfoot className="double-under border-t border-ink font-[700]">{total}</tfoot>}
      </table>
    </div>
  )
}

interface LedgerRowProps<Row> {
  row: Row
  columns: ReadonlyArray<LedgerColumn<Row>>
  held: boolean
  quiet: boolean
  onRow?: (row: Row) => void
}

function LedgerRow<Row>({ row, columns, held, quiet, onRow }: LedgerRowProps<Row>) {
  const look = held ? 'border-y-[1.5px] border-ink bg-straw-pale' : 'border-b border-feint'
  return (
    <tr
      className={`${look} ${quiet ? 'text-graphite' : ''} ${onRow ? 'cursor-pointer' : ''}`}
      onClick={onRow ? () => onRow(row) : undefined}
    >
      {columns.map((column) => (
        <td
          key={column.key}
          className={`h-[30px] px-1 align-middle first:pl-margin last:pr-margin ${column.figures ? 'figures text-right whitespace-nowrap' : ''} ${column.tight ? 'whitespace-nowrap' : ''}`}
        >
          {column.cell(row)}
        </td>
      ))}
    </tr>
  )
}
