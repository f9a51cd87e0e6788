import { Link } from 'react-router-dom'
import { formatSheetCode } from '../../../../shared/layouts/sheet-code.ts'
import type { RecordRow } from '../../../../shared/schemas/record.ts'
import { RESULTS, type ResultKey } from '../../../../shared/trial/result.ts'
import { paths } from '../../../lib/paths.ts'
import { dateText } from '../../../lib/time.ts'
import { counted } from '../../../lib/words.ts'
import { Glyph } from '../../../ui/glyphs.tsx'
import { type LedgerColumn, type LedgerGroup, LedgerTable } from '../../../ui/ledger-table.tsx'
import { Figure } from './figure.tsx'

/** The figures a row shows, with the depth and the soil moved beside the fuel: shallow work is no saving. */
const SHOWN: ReadonlyArray<readonly [ResultKey, string]> = [
  ['l_per_ha', 'fuel'],
  ['l_per_h', 'fuel rate'],
  ['depth_mean_cm', 'depth'],
  ['ml_per_m3', 'per soil moved'],
  ['efc_ha_h', 'work rate'],
  ['slip_pct', 'slip'],
]

const MAIN: ResultKey = 'l_per_ha'

const figures: LedgerColumn<RecordRow>[] = SHOWN.map(([key, words]) => ({
  key,
  head: (
    <>
      {words} <span className="figures font-normal">{RESULTS[key].unit}</span>
    </>
  ),
  figures: true,
  cell: (row) => <Figure result={row.results[key]} main={key === MAIN} />,
}))

const columns: LedgerColumn<RecordRow>[] = [
  {
    key: 'number',
    head: 'record',
    tight: true,
    stack: 'lead',
    cell: (row) => (
      <Link to={paths.record.to(row.number)} className="word figures max-sm:inline-flex max-sm:min-h-[44px] max-sm:items-center">
        {String(row.number).padStart(4, '0')}
      </Link>
    ),
  },
  {
    key: 'tractor',
    head: 'tractor and implement',
    cell: (row) => `${row.tractor.name || 'unknown tractor'}, ${row.implement.name || 'unknown implement'}`,
  },
  ...figures,
  {
    key: 'sheet',
    head: 'sheet',
    tight: true,
    cell: (row) => (
      <>
        <span className="figures">{row.sheetCode ? formatSheetCode(row.sheetCode) : 'no code'}</span>
        {row.state === 'challenged' && (
          <span className="ml-1">
            <Glyph name="challenged" /> challenged
          </span>
        )}
      </>
    ),
  },
]

/** Runs of one day at one place stand together under a sentence: they are what may be compared. */
function byDay(records: readonly RecordRow[]): LedgerGroup<RecordRow>[] {
  const days = new Map<string, RecordRow[]>()
  for (const row of records) {
    const key = `${row.trialDate ?? ''}|${row.place.name}`
    days.set(key, [...(days.get(key) ?? []), row])
  }
  return [...days].map(([key, rows]) => {
    const { trialDate, place, demonstrator } = rows[0] as RecordRow
    return {
      key,
      says: (
        <>
          <strong>
            {trialDate ? dateText(trialDate) : 'no date'}, {place.name || 'place not known'}
          </strong>{' '}
          <span className="text-graphite">
            {counted(rows.length, 'run')}
            {demonstrator.name && `, ${demonstrator.name}`}
          </span>
        </>
      ),
      rows,
    }
  })
}

export function BookTable({ records }: { records: readonly RecordRow[] }) {
  return (
    <LedgerTable
      stacked
      caption="Records of the trial book, the last entered first, each figure with its uncertainty U, k = 2"
      columns={columns}
      groups={byDay(records)}
      rowKey={(row) => String(row.number)}
    />
  )
}
