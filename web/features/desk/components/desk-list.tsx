import { useEffect, useRef } from 'react'
import { Link } from 'react-router-dom'
import { formatSheetCode } from '../../../../shared/layouts/sheet-code.ts'
import type { SheetRow } from '../../../../shared/schemas/sheet.ts'
import { paths } from '../../../lib/paths.ts'
import { momentText } from '../../../lib/time.ts'
import { counted } from '../../../lib/words.ts'
import { Glyph } from '../../../ui/glyphs.tsx'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import { Stalks } from '../../../ui/tally.tsx'
import type { DeskGroup } from '../desk-groups.ts'
import { AgeHead, AgeStraw, ageFrom } from './age-straw.tsx'

interface DeskListProps {
  groups: readonly DeskGroup[]
  chosen: string | null
  meId: string
  onOpen: (row: SheetRow) => void
}

/** Sheets that wait, grouped by why; each with its age as a straw from the day it came to now. */
export function DeskList({ groups, chosen, meId, onOpen }: DeskListProps) {
  const now = new Date()
  const table = useRef<HTMLDivElement>(null)
  // The row's scroll margin keeps it clear of the foot, which lies over the list.
  useEffect(() => {
    if (chosen) table.current?.querySelector('tr[aria-current]')?.scrollIntoView({ block: 'nearest' })
  }, [chosen])
  const rows = groups.flatMap((group) => group.rows)
  const from = ageFrom(
    rows.flatMap((row) => row.arrivedAt ?? []),
    now,
  )
  const withOther = (row: SheetRow) => row.inHand !== null && row.inHand.userId !== meId
  const columns: LedgerColumn<SheetRow>[] = [
    {
      key: 'age',
      wide: true,
      head: (
        <>
          <span className="away">age</span>
          <AgeHead from={from} now={now} />
        </>
      ),
      cell: (row) => row.arrivedAt && <AgeStraw arrivedAt={row.arrivedAt} from={from} now={now} held={row.id === chosen} />,
    },
    {
      key: 'came',
      head: 'came',
      tight: true,
      cell: (row) => <span className="sums">{row.arrivedAt ? momentText(row.arrivedAt, now) : ''}</span>,
    },
    { key: 'sheet', stack: 'lead', head: 'sheet', tight: true, cell: (row) => <SheetLink row={row} /> },
    {
      key: 'what',
      head: 'tractor and implement',
      cell: (row) => (
        <span className="xl:whitespace-nowrap">{[row.tractor, row.implement].filter(Boolean).join(', ') || 'not known'}</span>
      ),
    },
    { key: 'place', tight: true, head: 'place', cell: (row) => row.place ?? '' },
    { key: 'from', tight: true, head: 'from', cell: (row) => row.demonstrator ?? '' },
    {
      key: 'doubts',
      stack: 'named',
      head: 'doubts',
      tight: true,
      cell: (row) => (
        <>
          <span className="figures">{row.openDoubts}</span> <Stalks doubts={row.openDoubts} held={row.id === chosen} />
        </>
      ),
    },
    { key: 'why', head: 'why it waits', cell: (row) => <Why row={row} meId={meId} /> },
  ]
  return (
    <div ref={table}>
      <LedgerTable
        caption="Sheets that wait at the desk, grouped by why they wait"
        columns={columns}
        groups={groups.map((group) => ({ key: group.key, says: <GroupSays group={group} />, rows: group.rows }))}
        rowKey={(row) => row.id}
        inHand={(row) => row.id === chosen}
        quiet={withOther}
        onRow={onOpen}
        stacked
      />
    </div>
  )
}

function GroupSays({ group }: { group: DeskGroup }) {
  const doubts = group.rows.reduce((sum, row) => sum + row.openDoubts, 0)
  return (
    <>
      <strong>{group.says}</strong>{' '}
      <span className="text-graphite">
        {counted(group.rows.length, 'sheet')}
        {doubts > 0 && `, ${counted(doubts, 'doubt')}`}
      </span>
    </>
  )
}

const SheetLink = ({ row }: { row: SheetRow }) => (
  <Link to={paths.deskSheet.to(row.id)} className="figures no-underline" onClick={(event) => event.stopPropagation()}>
    {row.code ? formatSheetCode(row.code) : 'without a code'}
    {row.fileName && <span className="label block">{row.fileName}</span>}
  </Link>
)

function Why({ row, meId }: { row: SheetRow; meId: string }) {
  const held = row.inHand
  return (
    <>
      {row.answered && <Glyph name="answered" />} {row.why ?? (row.openDoubts === 0 ? 'Settled: Shift Enter enters it.' : '')}
      {held && <strong className="ml-1 whitespace-nowrap">{held.userId === meId ? 'in your hand' : `with ${held.name}`}</strong>}
    </>
  )
}
