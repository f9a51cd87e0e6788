import type { LandUnitRow } from '../../../../shared/schemas/land-unit.ts'
import { SUGGESTED_LAND_UNITS } from '../../../../shared/trial/land-units.ts'
import { dateText } from '../../../lib/time.ts'
import { Button } from '../../../ui/button.tsx'
import { type LedgerColumn, LedgerTable } from '../../../ui/ledger-table.tsx'
import type { UnitStart } from './unit-form.tsx'

const size = (m2: number) => Number(m2.toFixed(3)).toString()

/** What people confirmed; `onWithdraw` takes one out of use. */
export function ConfirmedUnits({
  units,
  onWithdraw,
}: {
  units: readonly LandUnitRow[]
  onWithdraw?: (unit: LandUnitRow) => void
}) {
  const columns: LedgerColumn<LandUnitRow>[] = [
    { key: 'name', head: 'unit', stack: 'lead', cell: (unit) => unit.name },
    { key: 'district', head: 'district', stack: 'named', cell: (unit) => unit.district },
    { key: 'size', head: 'm²', figures: true, cell: (unit) => size(unit.size_m2) },
    { key: 'source', head: 'said by', stack: 'named', cell: (unit) => unit.source },
    { key: 'by', head: 'confirmed by', stack: 'named', cell: (unit) => unit.confirmedBy },
    { key: 'on', head: 'on', tight: true, stack: 'named', cell: (unit) => dateText(unit.confirmedAt.slice(0, 10)) },
  ]
  if (onWithdraw) {
    columns.push({
      key: 'withdraw',
      head: <span className="away">withdraw</span>,
      tight: true,
      cell: (unit) => (
        <Button look="word" aria-label={`Withdraw ${unit.name} in ${unit.district}`} onClick={() => onWithdraw(unit)}>
          withdraw
        </Button>
      ),
    })
  }
  return (
    <LedgerTable
      stacked
      caption="Confirmed units of land"
      columns={columns}
      groups={[{ key: 'all', rows: units }]}
      rowKey={(unit) => unit.id}
    />
  )
}

/** What pages say, in contradiction to each other: nothing is computed from it. */
export function SuggestedUnits({ onTake }: { onTake?: (start: UnitStart) => void }) {
  return (
    <section aria-labelledby="suggested">
      <h2 id="suggested" className="px-margin pt-3 pb-0.5 text-2">
        Suggested, unconfirmed
      </h2>
      <p className="label px-margin pb-1">
        From pages about land records, which contradict each other. Nothing is computed by these.
      </p>
      <LedgerTable
        stacked
        caption="Suggested units of land, unconfirmed"
        columns={[
          { key: 'name', head: 'unit', stack: 'lead', cell: (unit) => unit.name },
          { key: 'where', head: 'where', stack: 'named', cell: (unit) => unit.where },
          { key: 'size', head: 'm²', figures: true, cell: (unit) => size(unit.size_m2) },
          { key: 'source', head: 'given as', stack: 'named', cell: (unit) => unit.source },
          {
            key: 'take',
            head: <span className="away">confirm</span>,
            tight: true,
            cell: (unit) =>
              onTake && (
                <Button
                  look="word"
                  aria-label={`Confirm ${unit.name}, ${unit.source}, for a district`}
                  onClick={() => onTake({ name: unit.name, size_m2: unit.size_m2 })}
                >
                  confirm for a district
                </Button>
              ),
          },
        ]}
        groups={[{ key: 'all', rows: SUGGESTED_LAND_UNITS }]}
        rowKey={(unit) => unit.name + unit.source}
      />
    </section>
  )
}
