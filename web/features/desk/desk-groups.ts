/** Why sheets wait: groups of the desk's list, in the order they are worth working in. */
import type { SheetRow } from '../../../shared/schemas/sheet.ts'

export interface DeskGroup {
  key: string
  says: string
  rows: SheetRow[]
}

const GROUPS: ReadonlyArray<{ key: string; says: string; holds: (row: SheetRow) => boolean }> = [
  { key: 'answered', says: 'The field has answered', holds: (row) => row.answered && row.state === 'waiting' },
  { key: 'challenged', says: 'Challenged after it was entered', holds: (row) => row.state === 'challenged' },
  { key: 'stops', says: 'No result until it is settled', holds: (row) => row.stops > 0 },
  { key: 'doubts', says: 'Readings in doubt', holds: (row) => row.openDoubts > 0 },
  {
    key: 'place',
    says: 'The reader could not place the picture',
    holds: (row) => row.state === 'unreadable' || row.layout === null,
  },
  { key: 'ready', says: 'Settled, ready to enter', holds: () => true },
]

/** Each sheet in the first group that fits; within it the oldest first. */
export function groupsOf(rows: readonly SheetRow[]): DeskGroup[] {
  const groups = GROUPS.map(({ key, says }): DeskGroup => ({ key, says, rows: [] }))
  const byAge = [...rows].sort((a, b) => (a.arrivedAt ?? '').localeCompare(b.arrivedAt ?? ''))
  for (const row of byAge) groups[GROUPS.findIndex((group) => group.holds(row))]?.rows.push(row)
  return groups.filter((group) => group.rows.length > 0)
}
