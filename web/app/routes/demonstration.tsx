import { useQuery } from '@tanstack/react-query'
import { Link, useLocation, useParams } from 'react-router-dom'
import { z } from 'zod'
import { NEWEST_LAYOUTS } from '../../../shared/layouts/registry.ts'
import type { Demonstration } from '../../../shared/schemas/demonstration.ts'
import type { Kit } from '../../../shared/schemas/register.ts'
import { sheetStateSchema } from '../../../shared/schemas/sheet.ts'
import type { Role } from '../../../shared/schemas/user.ts'
import { Cautions, CheckList } from '../../features/demonstrations/components/check-list.tsx'
import { DayFacts } from '../../features/demonstrations/components/day-facts.tsx'
import { LeastBurn } from '../../features/demonstrations/components/least-burn.tsx'
import { TakeAlong } from '../../features/demonstrations/components/take-along.tsx'
import { hasArrived, TrialRuns } from '../../features/demonstrations/components/trial-runs.tsx'
import { WithdrawConsent } from '../../features/demonstrations/components/withdraw-consent.tsx'
import { demonstrationQueries, useWithdrawConsent } from '../../features/demonstrations/demonstrations.queries.ts'
import { hasPlot } from '../../features/demonstrations/plan-model.ts'
import { STATE_WORDS } from '../../features/sheets/sheet-words.ts'
import { isNowhere } from '../../lib/api-error.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { registerQueries } from '../../lib/register-rows.ts'
import { dateText, todayText, weekdayOf } from '../../lib/time.ts'
import { counted } from '../../lib/words.ts'
import { ButtonLink } from '../../ui/button.tsx'
import { Glyph } from '../../ui/glyphs.tsx'
import { Page } from '../../ui/page.tsx'
import { ErrorState, Loading, Saved } from '../../ui/says.tsx'
import { NotFound } from './route-error.tsx'

/** What the plan page hands over when it was saved. */
const savedSchema = z.object({ saved: z.string() })

export function Component() {
  const { id = '' } = useParams()
  const day = useQuery(demonstrationQueries.detail(id))
  if (isNowhere(day.error)) return <NotFound />
  if (day.data) return <DayPage day={day.data} />
  return (
    <Page title="Demonstration">
      {day.error ? <ErrorState error={day.error} again={() => day.refetch()} /> : <Loading what="Opening the demonstration" />}
    </Page>
  )
}

function DayPage({ day }: { day: Demonstration }) {
  const me = useMe()
  const withdraw = useWithdrawConsent(day.id)
  const kits = usedKits(day, useQuery(registerQueries.rows('kits')).data ?? [])
  const { state } = useLocation()
  const arrivedWith = savedSchema.safeParse(state)
  const layouts = NEWEST_LAYOUTS.filter((layout) => day.trials.some((trial) => trial.layout === layout.key))
  const mayPrint = me.role !== 'analyst'
  const mayPlan = me.role === 'demonstrator' || me.role === 'admin'
  const runs = day.trials.flatMap((trial) => trial.runs)
  const entered = runs.filter((run) => run.recordNumber !== null).length
  return (
    <Page
      title={`${day.place.name}, ${dateText(day.heldOn)}`}
      over={
        <Link className="word" to={paths.demonstrations.to()}>
          Demonstrations
        </Link>
      }
      sentence={`${day.place.name}, ${weekdayOf(`${day.heldOn}T12:00`)} ${dateText(day.heldOn)}: ${counted(day.trials.length, 'trial')}, ${counted(runs.length, 'run')}, ${entered === 0 ? 'none' : entered} in the book.`}
      aside={mayPlan && <ButtonLink to={paths.editDemonstration.to(day.id)}>Change the plan</ButtonLink>}
    >
      {withdraw.isSuccess ? (
        <Saved says="Consent is withdrawn: the farmer is erased here and in the pictures of these sheets." />
      ) : (
        arrivedWith.success && <Saved says={arrivedWith.data.saved} />
      )}
      <div className="grid grid-cols-[minmax(0,8fr)_minmax(0,4fr)] max-lg:grid-cols-1">
        <div className="border-r-[3px] border-double border-line max-lg:border-r-0">
          <TakeAlong
            id={day.id}
            runs={runs.length}
            first={day.heldOn >= todayText() && runs.some((run) => !hasArrived(run))}
            mayPrint={mayPrint}
            layouts={NEWEST_LAYOUTS}
          />
          <section aria-labelledby="trials" className="pt-2 pb-3">
            <h2 id="trials" className="away">
              Trials and runs
            </h2>
            <TrialRuns trials={day.trials} links={{ sheetPath: sheetPathOf(me.role), stateMark, mayPrint }} />
          </section>
          <div className="px-margin">
            <LeastBurn used={kits} />
          </div>
          {layouts.map((layout) => (
            <CheckList key={layout.key} layout={layout} among={layouts.length} />
          ))}
        </div>
        <div>
          <DayFacts day={day} mayKnowFarmer={me.role !== 'analyst'}>
            {mayPlan && day.farmer && (
              <WithdrawConsent
                pending={withdraw.isPending}
                error={withdraw.error}
                onWithdraw={(reason) => withdraw.mutate(reason)}
              />
            )}
          </DayFacts>
          <Cautions />
        </div>
      </div>
    </Page>
  )
}

const usedKits = ({ trials }: Demonstration, kits: readonly Kit[]) =>
  kits.flatMap((kit) => {
    const its = trials.filter((trial) => trial.kit.number === kit.number)
    return its.length === 0 ? [] : [{ kit, perArea: its.some((trial) => hasPlot(trial.layout)) }]
  })

const sheetPathOf = (role: Role) => (role === 'demonstrator' ? paths.mySheet.to : role === 'analyst' ? null : paths.deskSheet.to)

const NOT_IN = { glyph: 'printed', says: 'not come in yet' } as const

function stateMark(state: string) {
  const known = sheetStateSchema.safeParse(state)
  if (!known.success) return state
  // In a plan the state says only that the paper has not come in: whether it was printed nobody knows.
  const { glyph, says } = known.data === 'printed' ? NOT_IN : STATE_WORDS[known.data]
  return (
    <span className="whitespace-nowrap">
      <Glyph name={glyph} /> {says}
    </span>
  )
}
