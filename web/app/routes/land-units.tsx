import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { UnitForm, type UnitStart } from '../../features/land-units/components/unit-form.tsx'
import { ConfirmedUnits, SuggestedUnits } from '../../features/land-units/components/unit-tables.tsx'
import { landUnitQueries, useWithdrawLandUnit } from '../../features/land-units/land-units.queries.ts'
import { useMe } from '../../lib/me.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorNote, ErrorState, Loading, Saved } from '../../ui/says.tsx'
import { RegisterNav } from './register-nav.tsx'

export function Component() {
  const admin = useMe().role === 'admin'
  const rows = useQuery(landUnitQueries.rows())
  const withdraw = useWithdrawLandUnit()
  const [start, setStart] = useState<UnitStart | null>(null)
  const [saved, setSaved] = useState<string | null>(null)
  const open = (from: UnitStart) => {
    setSaved(null)
    setStart(from)
  }
  return (
    <Page
      title="Land units"
      over={<RegisterNav />}
      sentence="Local units of land, as somebody who knows the district confirmed them."
      aside={admin && <Button onClick={() => open({})}>Confirm a unit</Button>}
    >
      {start && (
        <UnitForm
          key={`${start.name} ${start.size_m2}`}
          start={start}
          onSaved={(unit) => {
            setSaved(`Confirmed: 1 ${unit.name} in ${unit.district} is ${unit.size_m2} m².`)
            setStart(null)
          }}
          onLeave={() => setStart(null)}
        />
      )}
      {saved && <Saved says={saved} />}
      {withdraw.error && <ErrorNote error={withdraw.error} />}
      {rows.error && <ErrorState error={rows.error} again={() => rows.refetch()} />}
      {rows.isPending && <Loading what="Opening the units of land" />}
      {rows.data?.length === 0 && (
        <EmptyState says="No unit of land is confirmed yet. An area written in one is not computed until somebody does." />
      )}
      {rows.data && rows.data.length > 0 && (
        <ConfirmedUnits
          units={rows.data}
          {...(admin
            ? {
                onWithdraw: (unit) =>
                  withdraw.mutate(unit.id, { onSuccess: () => setSaved(`Withdrawn: ${unit.name} in ${unit.district}.`) }),
              }
            : {})}
        />
      )}
      <SuggestedUnits {...(admin ? { onTake: open } : {})} />
    </Page>
  )
}
