import { Fragment, type ReactNode } from 'react'

export interface LedgerColumn<Row> {
  key: string
  head: ReactNode
  cell: (row: Row) => ReactNode
  /** Figures stand right-aligned in Mono. */
  figures?: boolean
  /** Stays on one line. */
  tight?: boolean
  /** Decoration that is left out where the window is narrower than a desk. */
  wide?: true
  /**
   * How the cell stands in a stacked row: `lead` heads it, `word` is a line of its own (both full width), `named` repeats the
   * column's head before it. Default: `named` for figures, else `word`.
   */
  stack?: 'lead' | 'word' | 'named'
}

export interface LedgerGroup<Row> {
  key: string
  /** A sentence with its count; left out for a plain list. */
  says?: ReactNode
  rows: readonly Row[]
}

const WIDE = 'max-lg:hidden!'

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
  /** What is opened under a row, over the whole width; null where nothing is. */
  under?: (row: Row) => ReactNode
  /** Closes the table: cells of a last row over the double rule. */
  total?: ReactNode
  /** On a phone each row stands as a block of named lines, and nothing scrolls sideways. */
  stacked?: boolean
}

/** No frame, no stripes, no filled heads: rules, right-aligned figures, groups as sentences. */
export function LedgerTable<Row>(table: LedgerTableProps<Row>) {
  const { caption, columns, groups, rowKey, inHand, quiet, onRow, under, total, stacked = false } = table
  return (
    <div className="overflow-x-auto">
      <table className={`w-full border-collapse text-left ${stacked ? 'max-sm:block' : ''}`}>
        <caption className="away">{caption}</caption>
        <thead className={stacked ? 'max-sm:hidden' : ''}>
          <tr className="border-b-[1.5px] border-ink">
            {columns.map((column) => (
              <th
                key={column.key}
                scope="col"
                className={`label h-[30px] px-1 font-normal whitespace-nowrap first:pl-margin last:pr-margin ${column.figures ? 'text-right' : ''} ${column.wide ? WIDE : ''}`}
              >
                {column.head}
              </th>
            ))}
          </tr>
        </thead>
        {groups.map((group) => (
          <tbody key={group.key} className={stacked ? 'max-sm:block' : ''}>
            {group.says !== undefined && (
              <tr className={`border-b border-line ${stacked ? 'max-sm:block' : ''}`}>
                <th
                  scope="rowgroup"
                  colSpan={columns.length}
                  className={`px-1 pt-2 pb-0.5 pl-margin font-normal ${stacked ? 'max-sm:block' : ''}`}
                >
                  {group.says}
                </th>
              </tr>
            )}
            {group.rows.map((row) => (
              <Fragment key={rowKey(row)}>
                <LedgerRow
                  row={row}
                  columns={columns}
                  held={inHand?.(row) ?? false}
                  quiet={quiet?.(row) ?? false}
                  stacked={stacked}
                  {...(onRow ? { onRow } : {})}
                />
                <Under opened={under?.(row)} span={columns.length} stacked={stacked} />
              </Fragment>
            ))}
          </tbody>
        ))}
        {total && <tfoot className="double-under border-t border-ink font-[700]">{total}</tfoot>}
      </table>
    </div>
  )
}

function Under({ opened, span, stacked }: { opened: ReactNode; span: number; stacked: boolean }) {
  if (!opened) return null
  return (
    <tr className={stacked ? 'max-sm:block' : ''}>
      <td colSpan={span} className={stacked ? 'max-sm:block' : ''}>
        {opened}
      </td>
    </tr>
  )
}

interface LedgerRowProps<Row> {
  row: Row
  columns: ReadonlyArray<LedgerColumn<Row>>
  held: boolean
  quiet: boolean
  stacked: boolean
  onRow?: (row: Row) => void
}

const STACKED_ROW = 'max-sm:flex max-sm:flex-col max-sm:px-margin max-sm:py-1.5'
const STACKED_CELL = {
  lead: 'max-sm:order-first max-sm:block max-sm:font-[650] max-sm:h-auto max-sm:p-0! max-sm:pb-0.5! max-sm:text-left max-sm:text-2',
  word: 'max-sm:block max-sm:h-auto max-sm:p-0! max-sm:text-left',
  named: 'max-sm:flex max-sm:h-auto max-sm:min-h-[28px] max-sm:items-baseline max-sm:justify-between max-sm:gap-2 max-sm:p-0!',
} as const

function LedgerRow<Row>({ row, columns, held, quiet, stacked, onRow }: LedgerRowProps<Row>) {
  const look = held ? 'border-y-[1.5px] border-ink bg-straw-pale' : 'border-b border-feint'
  return (
    <tr
      aria-current={held || undefined}
      className={`${look} scroll-my-[80px] ${quiet ? 'text-graphite' : ''} ${onRow ? 'cursor-pointer' : ''} ${stacked ? STACKED_ROW : ''}`}
      onClick={onRow ? () => onRow(row) : undefined}
    >
      {columns.map((column) => {
        const stack = column.stack ?? (column.figures ? 'named' : 'word')
        return (
          <td
            key={column.key}
            className={`h-[30px] px-1 align-middle first:pl-margin last:pr-margin ${column.figures ? 'figures text-right whitespace-nowrap' : ''} ${column.tight ? 'whitespace-nowrap' : ''} ${column.wide ? WIDE : ''} ${stacked ? STACKED_CELL[stack] : ''}`}
          >
            {stacked && stack === 'named' && (
              <span aria-hidden="true" className="label font-sans font-normal whitespace-nowrap sm:hidden">
                {column.head}
              </span>
            )}
            {column.cell(row)}
          </td>
        )
      })}
    </tr>
  )
}
