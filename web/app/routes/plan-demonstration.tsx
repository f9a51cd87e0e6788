import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { useNavigate, useParams } from 'react-router-dom'
import type { Demonstration } from '../../../shared/schemas/demonstration.ts'
import { PlanForm } from '../../features/demonstrations/components/plan-form.tsx'
import { demonstrationQueries, useSavePlan } from '../../features/demonstrations/demonstrations.queries.ts'
import { blankPlan, planOf } from '../../features/demonstrations/plan-model.ts'
import { isNowhere } from '../../lib/api-error.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { registerQueries } from '../../lib/register-rows.ts'
import { dateText } from '../../lib/time.ts'
import { counted } from '../../lib/words.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading } from '../../ui/says.tsx'
import { NotFound } from './route-error.tsx'

/** A new plan, or the one the address names. */
export function Component() {
  const { id } = useParams()
  const { role } = useMe()
  if (role !== 'demonstrator' && role !== 'admin') {
    return (
      <Page title="Plan a demonstration">
        <EmptyState says="Demonstrators plan their own days, and an admin anybody's. You may look at them." />
      </Page>
    )
  }
  return id ? <ChangePlan id={id} /> : <Planning day={null} />
}

function ChangePlan({ id }: { id: string }) {
  const day = useQuery(demonstrationQueries.detail(id))
  if (isNowhere(day.error)) return <NotFound />
  if (day.data) return <Planning day={day.data} />
  return (
    <Page title="Change a plan">
      {day.error ? <ErrorState error={day.error} again={() => day.refetch()} /> : <Loading what="Opening the plan" />}
    </Page>
  )
}

function Planning({ day }: { day: Demonstration | null }) {
  const me = useMe()
  const navigate = useNavigate()
  const cache = useQueryClient()
  // The version the form was filled from: a plan that comes in later must not lend its version to older answers.
  const [at, setAt] = useState(day)
  const save = useSavePlan(at)
  const places = useQuery(registerQueries.rows('places'))
  const tractors = useQuery(registerQueries.rows('tractors'))
  const tools = useQuery(registerQueries.rows('implements'))
  const kits = useQuery(registerQueries.rows('kits'))
  const demonstrators = useQuery({ ...demonstrationQueries.demonstrators(), enabled: me.role === 'admin' })
  const failed = [places, tractors, tools, kits, demonstrators].find((query) => query.error)
  const ready = places.data && tractors.data && tools.data && kits.data && (me.role !== 'admin' || demonstrators.data)
  const refresh = () => at && cache.invalidateQueries({ queryKey: demonstrationQueries.detail(at.id).queryKey })
  const title = day ? `Change the plan of ${dateText(day.heldOn)}, ${day.place.name}` : 'Plan a demonstration'
  return (
    <Page title={title} over={day ? undefined : 'Saving the plan makes a sheet, with its own code, for every run.'}>
      {failed && <ErrorState error={failed.error} again={() => failed.refetch()} />}
      {!failed && !ready && <Loading what="Opening the registers" />}
      {day && at && day.version !== at.version && (
        <p role="status" className="border-b border-line bg-straw-pale px-margin py-1">
          This plan was changed while you were at it.{' '}
          <Button look="word" onClick={() => setAt(day)}>
            Take the newer plan, and lose what you typed
          </Button>
        </p>
      )}
      {ready && (
        <PlanForm
          key={at?.version ?? 'new'}
          begin={at ? planOf(at) : blankPlan(me.role === 'demonstrator' ? me.id : '')}
          choices={{
            places: places.data,
            tractors: tractors.data,
            tools: tools.data,
            kits: kits.data,
            demonstrators: me.role === 'admin' ? (demonstrators.data ?? []) : null,
          }}
          farmerKnown={at === null || at.farmer !== null}
          pending={save.isPending}
          error={save.error}
          saveWords={day ? 'Save the plan' : 'Save the plan and make its sheets'}
          onSave={(plan) =>
            save.mutate(plan, {
              onSuccess: ({ id, trials }) => navigate(paths.demonstration.to(id), { state: { saved: planSaved(trials) } }),
              onError: () => refresh(),
            })
          }
          onLeave={() => navigate(day ? paths.demonstration.to(day.id) : paths.demonstrations.to())}
        />
      )}
    </Page>
  )
}

function planSaved(trials: Demonstration['trials']): string {
  const runs = trials.reduce((sum, trial) => sum + trial.runs.length, 0)
  return `The plan is saved: ${counted(trials.length, 'trial')}, ${counted(runs, 'run')}, each with its own sheet.`
}
