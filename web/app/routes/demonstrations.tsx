import { useQuery } from '@tanstack/react-query'
import type { DemonstrationRow } from '../../../shared/schemas/demonstration.ts'
import { DemonstrationList } from '../../features/demonstrations/components/demonstration-list.tsx'
import { demonstrationQueries } from '../../features/demonstrations/demonstrations.queries.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { dateText, todayText } from '../../lib/time.ts'
import { counted } from '../../lib/words.ts'
import { ButtonLink } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading } from '../../ui/says.tsx'

export function Component() {
  const me = useMe()
  const list = useQuery(demonstrationQueries.list())
  const mayPlan = me.role === 'demonstrator' || me.role === 'admin'
  const plan = mayPlan && <ButtonLink to={paths.planDemonstration.to()}>Plan a demonstration</ButtonLink>
  return (
    <Page
      title="Demonstrations"
      sentence={list.data ? sentenceOf(list.data, todayText()) : 'Demonstrations'}
      aside={list.data && list.data.length > 0 && plan}
    >
      {list.error && <ErrorState error={list.error} again={() => list.refetch()} />}
      {list.isPending && <Loading what="Looking up the demonstrations" />}
      {list.data?.length === 0 && (
        <EmptyState says="No demonstration is planned. A plan prints its own sheets: what it knows, nobody writes." next={plan} />
      )}
      {list.data && list.data.length > 0 && (
        <DemonstrationList rows={list.data} today={todayText()} all={me.role !== 'demonstrator'} />
      )}
    </Page>
  )
}

/** The next day first: that is what is looked for here. */
function sentenceOf(rows: readonly DemonstrationRow[], today: string): string {
  const next = rows.filter((row) => row.heldOn >= today).at(-1)
  if (next)
    return `The next demonstration is ${next.heldOn === today ? 'today' : `on ${dateText(next.heldOn)}`}, at ${next.place.name}.`
  return rows.length === 0 ? 'No demonstrations yet.' : `${counted(rows.length, 'demonstration')} held, and none to come.`
}
