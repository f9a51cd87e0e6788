import type { RegisterName } from '../../../../shared/schemas/register.ts'
import { dateText } from '../../../lib/time.ts'
import { Button } from '../../../ui/button.tsx'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import { REGISTER_FIELDS, REGISTER_WORDS } from '../register-fields.ts'

export type RegisterRow = Record<string, unknown> & { id: string; version: number; active: boolean }

/** "Jar holds" becomes "jar holds"; "PTO power" stays. */
const lower = (label: string) => (/^[A-Z]{2}/.test(label) ? label : label.charAt(0).toLowerCase() + label.slice(1))

/** A register as a ledger; `onChange` opens a row for writing. */
export function RegisterTable({
  register,
  rows,
  onChange,
}: {
  register: RegisterName
  rows: readonly RegisterRow[]
  onChange?: (row: RegisterRow) => void
}) {
  const columns: LedgerColumn<RegisterRow>[] = REGISTER_FIELDS[register]
    .filter((f) => f.listed)
    .map((f) => ({
      key: f.key,
      head: f.unit ? `${lower(f.label)}, ${f.unit}` : lower(f.label),
      ...(f.key === 'name' ? { stack: 'lead' as const } : { stack: 'named' as const }),
      figures: f.kind === 'number',
      cell: (row) => (f.kind === 'date' ? dateText(String(row[f.key])) : String(row[f.key] ?? '').replaceAll('_', ' ')),
    }))
  columns.push({ key: 'active', head: 'in use', tight: true, stack: 'named', cell: (row) => (row.active ? 'yes' : 'no') })
  if (onChange) {
    columns.push({
      key: 'change',
      head: <span className="away">change</span>,
      tight: true,
      cell: (row) => (
        <Button look="word" aria-label={`Change ${String(row.name)}`} onClick={() => onChange(row)}>
          change
        </Button>
      ),
    })
  }
  return (
    <LedgerTable
      stacked
      caption={REGISTER_WORDS[register].title}
      columns={columns}
      groups={[{ key: 'all', rows }]}
      rowKey={(row) => row.id}
      quiet={(row) => !row.active}
    />
  )
}
